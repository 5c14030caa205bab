import { exactComparisons, tolerantComparisons } from "../runtime/comparison";
import { fixedPointList, fixedPointNumber } from "../runtime/fixed-point";
import { isStructural } from "../runtime/list-functions";
import { power } from "../runtime/scalar";
import { solveArgmin, solveBalance, solveIntegral, wholeBound, type FormText } from "../runtime/solvers";
import type { Frame, Typed, TypedProgram } from "../types";
import { asNumber, callFunction, spread, type WalkValue } from "./walk-functions";

type Form = Extract<Typed, { node: "balance" | "argmin" | "integral" | "series" | "fixed-point" }>;

/** The walk was given up because it costs too much; the fault is then reported without its operation. */
export class WalkAbandoned extends Error {}

const walkSteps = 4_000_000;

const arithmetic: Readonly<Record<"+" | "-" | "*" | "/" | "^", (a: number, b: number) => number>> = {
  "+": (a, b) => a + b,
  "-": (a, b) => a - b,
  "*": (a, b) => a * b,
  "/": (a, b) => a / b,
  "^": power,
};

/** What the walk tells about a judged value that is not finite, or a comparison with something that is no number. */
export interface WalkListener {
  notFinite(typed: Typed, value: WalkValue): never;
  compared(typed: Extract<Typed, { node: "comparison" }>): never;
}

export function isFinite(value: WalkValue): boolean {
  return typeof value === "number" ? Number.isFinite(value) : value.every(Number.isFinite);
}

/**
 * Slow evaluation of the typed tree on a frame whose earlier lines are finished. It serves the diagnosis of faults only:
 * generated code notices cheaply that something is not finite, and the walk finds out what.
 */
export class Walk {
  private readonly slots = new Map<number, WalkValue>();
  private steps = 0;
  private judging = true;
  /** Last value of a body of a special form that was not finite. */
  refused: { readonly typed: Typed; readonly value: WalkValue } | null = null;

  constructor(
    private readonly program: TypedProgram,
    private readonly frame: Frame,
    private readonly text: (form: Form) => FormText,
    private readonly listener: WalkListener,
  ) {}

  /** Value without any judgement. */
  unjudged(typed: Typed): WalkValue {
    return this.withJudging(false, () => this.value(typed));
  }

  /** Value of a line or condition side, judged like its calls. */
  judged(typed: Typed): WalkValue {
    return this.judge(typed, this.value(typed));
  }

  bind(slot: number, value: WalkValue): void {
    this.slots.set(slot, value);
  }

  /** Gives the parameters of a function of the working their values and answers its body. */
  enter(typed: Extract<Typed, { node: "function-call" }>): Typed {
    const instance = this.program.functions[typed.instance]!;
    const given = typed.arguments.map((argument) => this.value(argument));
    instance.parameters.forEach((parameter, index) => this.slots.set(parameter.slot, given[index]!));
    return instance.body;
  }

  condition(typed: Typed): boolean {
    switch (typed.node) {
      case "option-test":
        return (this.frame.choices[typed.choice] === typed.option) === typed.equal;
      case "not":
        return !this.condition(typed.operand);
      case "logic": {
        const left = this.condition(typed.left);
        return typed.operator === "and"
          ? left && this.condition(typed.right)
          : left || this.condition(typed.right);
      }
      case "comparison": {
        const left = asNumber(this.value(typed.left));
        const right = asNumber(this.value(typed.right));
        if (this.judging && (Number.isNaN(left) || Number.isNaN(right))) this.listener.compared(typed);
        return (typed.tolerant ? tolerantComparisons : exactComparisons)[typed.operator](left, right);
      }
      case "conditional":
        return this.condition(this.condition(typed.condition) ? typed.whenTrue : typed.whenFalse);
      default:
        throw new Error(`A condition was expected, not ${typed.node}.`);
    }
  }

  value(typed: Typed): WalkValue {
    if (++this.steps > walkSteps) throw new WalkAbandoned();
    const { frame } = this;
    switch (typed.node) {
      case "constant":
        return typed.value;
      case "input":
        return frame.numbers[typed.index]!;
      case "column":
        return frame.columns[typed.index]!;
      case "line":
        return frame.values[typed.index]!;
      case "slot":
        return this.slots.get(typed.slot)!;
      case "option-field":
        return typed.values[frame.choices[typed.choice]!]!;
      case "column-option-field":
        return Float64Array.from(frame.choiceColumns[typed.choiceColumn]!, (option) => typed.values[option]!);
      case "negate":
        return spread((x) => -x, [this.value(typed.operand)]);
      case "arithmetic":
        return spread(arithmetic[typed.operator], [this.value(typed.left), this.value(typed.right)]);
      case "conditional":
        return this.widened(
          typed,
          this.value(this.condition(typed.condition) ? typed.whenTrue : typed.whenFalse),
        );
      case "call": {
        const value = callFunction(
          typed.function,
          typed.arguments.map((argument) => this.value(argument)),
        );
        return isStructural(typed.function) ? value : this.judge(typed, value);
      }
      case "function-call":
        return this.judge(typed, this.value(this.enter(typed)));
      case "property":
        return this.property(typed);
      case "balance":
      case "argmin":
      case "integral":
      case "series":
      case "fixed-point":
        return this.form(typed);
      case "option-test":
      case "not":
      case "comparison":
      case "logic":
        throw new Error(`A value was expected, not ${typed.node}.`);
    }
  }

  /** A number that stands for a list, as long as the program knows it. */
  private widened(typed: Typed, value: WalkValue): WalkValue {
    const length = typed.type.is === "number" ? typed.type.length : null;
    if (!length || typeof value !== "number") return value;
    return new Float64Array(this.rows(length.table) + length.plus).fill(value);
  }

  private rows(table: string | null): number {
    if (table === null) return 0;
    const { layout } = this.program;
    const at = (list: readonly { readonly table: string }[]): number =>
      list.findIndex((each) => each.table === table);
    return (
      this.frame.columns[at(layout.columns)] ??
      this.frame.choiceColumns[at(layout.choiceColumns)] ??
      this.frame.columnMaterials[at(layout.columnMaterials)] ??
      []
    ).length;
  }

  private judge(typed: Typed, value: WalkValue): WalkValue {
    if (this.judging && !isFinite(value)) this.listener.notFinite(typed, value);
    return value;
  }

  private property(typed: Extract<Typed, { node: "property" }>): WalkValue {
    const { material, property, operation } = typed;
    const given = typed.arguments.map((argument) => this.value(argument));
    const { judging } = this;
    const readers = material.from === "column" ? this.frame.columnMaterials[material.index]! : null;
    const places: WalkValue[] = readers ? [Float64Array.from(readers.keys())] : [];
    return spread(
      (...values) => {
        const reader = readers ? readers[values.pop()!]! : this.frame.materials[material.index]!;
        const [first = NaN, second = NaN] = values;
        return operation === "value"
          ? reader.value(property, first, judging)
          : reader[operation](property, first, second, judging);
      },
      [...given, ...places],
    );
  }

  private form(typed: Form): WalkValue {
    const body = (x: WalkValue): WalkValue => {
      this.slots.set(typed.slot, x);
      return this.value(typed.body);
    };
    const number = (x: number): number => {
      const value = asNumber(body(x));
      // Solvers refuse such a value without knowing where it came from.
      if (!Number.isFinite(value)) this.refused = { typed: typed.body, value };
      return value;
    };
    if (typed.node === "fixed-point") return this.solved(body, this.fixedPoint(typed, body));
    const lower = asNumber(this.value(typed.lower));
    const upper = asNumber(this.value(typed.upper));
    if (typed.node === "integral") return solveIntegral(this.text(typed), number, lower, upper);
    if (typed.node === "series") {
      let sum = 0;
      const last = wholeBound(upper);
      for (let n = wholeBound(lower); n <= last; n++) sum += asNumber(body(n));
      return sum;
    }
    const solver = typed.node === "balance" ? solveBalance : solveArgmin;
    const x = this.withJudging(false, () => solver(this.text(typed), number, lower, upper));
    return this.solved(body, x);
  }

  private fixedPoint(
    typed: Extract<Form, { node: "fixed-point" }>,
    body: (x: WalkValue) => WalkValue,
  ): WalkValue {
    const start = this.value(typed.start);
    return this.withJudging(false, () => {
      if (typeof start === "number") return fixedPointNumber((x) => asNumber(body(x)), start);
      const result = new Float64Array(start.length);
      const room = new Float64Array(start.length);
      fixedPointList((x) => body(x) as Float64Array, start, start.length, room, result);
      return result;
    });
  }

  private solved(body: (x: WalkValue) => WalkValue, solution: WalkValue): WalkValue {
    if (this.judging) body(solution);
    return solution;
  }

  private withJudging<T>(judging: boolean, work: () => T): T {
    const before = this.judging;
    this.judging = judging;
    try {
      return work();
    } finally {
      this.judging = before;
    }
  }
}
