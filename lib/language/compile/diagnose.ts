import type { FormText } from "../runtime/solvers";
import { RunFault, type Frame, type Typed, type TypedProgram } from "../types";
import { describeExpression, describeValue } from "./describe";
import { isFinite, Walk, WalkAbandoned, type WalkListener } from "./walk";
import type { WalkValue } from "./walk-functions";

type Form = Extract<Typed, { node: "balance" | "argmin" | "integral" | "series" | "fixed-point" }>;

/** Sentences about a special form, with the units of its variable and of its expression. */
export function formText(form: Form): FormText {
  const bound = form.node === "fixed-point" ? form.start.type : boundType(form.lower.type, form.upper.type);
  return {
    name: form.node === "fixed-point" ? "fixed_point" : form.node,
    bound: (value) => describeValue(bound, value),
    result: (value) => describeValue(form.body.type, value),
  };
}

/** A literal 0 takes the dimension of the other end. */
function boundType(lower: Typed["type"], upper: Typed["type"]): Typed["type"] {
  return lower.is === "number" && lower.literalZero ? upper : lower;
}

/** "Line 4 (R_total)": where in the working, for the beginning of a sentence. */
export function linePlace(
  program: TypedProgram,
  index: number,
): { text: string; symbol: string; line: number } | null {
  const line = program.lines[index];
  return line
    ? { text: `Line ${line.span.line} (${line.symbol})`, symbol: line.symbol, line: line.span.line }
    : null;
}

/**
 * Looks for the first value that is not finite in the lines `from` to `to` (or in the condition −1 − from) and throws
 * `RunFault` `not-finite` with its operation and operands. Returns when all are finite after all.
 */
export function findNotFinite(program: TypedProgram, frame: Frame, from: number, to: number): void {
  if (to < 0) {
    const condition = program.conditions[-1 - to];
    if (condition) search(program, frame, null, (walk) => void walk.condition(condition.expression));
    return;
  }
  for (let index = Math.max(0, from); index <= to; index++) {
    const line = program.lines[index];
    if (line) search(program, frame, index, (walk) => void walk.judged(line.expression));
  }
}

function search(program: TypedProgram, frame: Frame, line: number | null, visit: (walk: Walk) => void): void {
  const place = line === null ? null : linePlace(program, line);
  const prefix = place ? `${place.text}: ` : "";
  const fault = (text: string, details: Record<string, string | number>): RunFault =>
    new RunFault("not-finite", `${prefix}${text}`, place ?? {}, details);
  const listener: WalkListener = {
    notFinite(typed, value) {
      const origin = trace(walk, typed, firstFault(value));
      throw fault(...sentence(program, walk, origin.typed, origin.place));
    },
    compared(typed) {
      const side = [typed.left, typed.right].find((each) => !isFinite(walk.unjudged(each)));
      const origin = side ? trace(walk, side, null) : { typed, place: null };
      throw fault(...sentence(program, walk, origin.typed, origin.place));
    },
  };
  const walk = new Walk(program, frame, formText, listener);
  try {
    visit(walk);
  } catch (error) {
    if (error instanceof WalkAbandoned) throw fault("the value is not finite.", {});
    if (!(error instanceof RunFault) || error.symbol !== null) throw error;
    if (error.code === "not-finite" && walk.refused) {
      const origin = trace(walk, walk.refused.typed, firstFault(walk.refused.value));
      throw fault(...sentence(program, walk, origin.typed, origin.place));
    }
    throw new RunFault(error.code, `${prefix}${error.message}`, place ?? {}, error.details);
  }
}

/** Place of the first element that is not finite; null for a number. */
function firstFault(value: WalkValue): number | null {
  return typeof value === "number" ? null : value.findIndex((element) => !Number.isFinite(element));
}

interface Origin {
  readonly typed: Typed;
  readonly place: number | null;
}

/** Follows a value that is not finite down to the operation whose operands are still finite. */
function trace(walk: Walk, typed: Typed, place: number | null): Origin {
  for (const operand of operandsOf(walk, typed)) {
    if (isLeaf(operand)) continue;
    const value = walk.unjudged(operand);
    if (!isFinite(value)) return trace(walk, operand, firstFault(value));
  }
  return { typed, place };
}

function isLeaf(typed: Typed): boolean {
  return ["constant", "input", "column", "line", "slot", "option-field", "column-option-field"].includes(
    typed.node,
  );
}

/** Operands that decide the value now; the variables that they read are bound. */
function operandsOf(walk: Walk, typed: Typed): readonly Typed[] {
  switch (typed.node) {
    case "negate":
      return [typed.operand];
    case "arithmetic":
      return [typed.left, typed.right];
    case "call":
    case "property":
      return typed.arguments;
    case "conditional":
      return [walk.condition(typed.condition) ? typed.whenTrue : typed.whenFalse];
    case "function-call": {
      const faulty = typed.arguments.filter((each) => !isLeaf(each) && !isFinite(walk.unjudged(each)));
      return faulty.length > 0 ? faulty : [walk.enter(typed)];
    }
    case "series": {
      const [from, to] = [walk.unjudged(typed.lower), walk.unjudged(typed.upper)];
      if (typeof from !== "number" || typeof to !== "number") return [];
      for (let n = from; n <= to; n++) {
        walk.bind(typed.slot, n);
        if (!isFinite(walk.unjudged(typed.body))) return [typed.body];
      }
      return [];
    }
    default:
      return [];
  }
}

/** "1/h_2 is infinite, with h_2 = 0 W/(m²·K)", and the same as data. */
function sentence(
  program: TypedProgram,
  walk: Walk,
  typed: Typed,
  place: number | null,
): [string, Record<string, string | number>] {
  const operation = describeExpression(program, typed);
  const result = typed.node === "comparison" ? NaN : elementAtPlace(walk.unjudged(typed), place);
  const what = Number.isNaN(result) ? "is not a number" : "is infinite";
  const operands = new Map<string, string>();
  const details: Record<string, string | number> = { operation };
  const shown = isLeaf(typed)
    ? []
    : typed.node === "comparison"
      ? [typed.left, typed.right]
      : operandsOf(walk, typed);
  for (const operand of shown) {
    if (operand.node === "constant") continue;
    const value = elementAtPlace(walk.unjudged(operand), place);
    const text = describeExpression(program, operand);
    operands.set(text, describeValue(operand.type, value));
    details[text] = Number.isFinite(value) ? value : String(value);
  }
  const where = place === null ? "" : ` (element ${place + 1})`;
  const list = [...operands].map(([text, value]) => `${text} = ${value}`).join(", ");
  const missing = typed.node === "option-field" || typed.node === "column-option-field";
  if (missing) return [`the chosen option has no value for ${operation}${where}.`, details];
  return [`${operation} ${what}${where}${list ? `, with ${list}` : ""}.`, details];
}

function elementAtPlace(value: WalkValue, place: number | null): number {
  if (typeof value === "number") return value;
  return value[place ?? 0] ?? NaN;
}
