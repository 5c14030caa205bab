import { isStructural } from "../runtime/list-functions";
import { lengthKey, type Operation, type Value } from "./value";
import type { ListLength, Typed, TypedProgram } from "../types";

type Form = Extract<Typed, { node: "balance" | "argmin" | "integral" | "series" | "fixed-point" }>;

/** A special form of the program, for messages. */
export interface Site {
  readonly form: Form;
}

const stillOperations: ReadonlySet<Operation["is"]> = new Set<Operation["is"]>([
  "constant",
  "input",
  "column",
  "line",
  "bound",
  "option-field",
  "column-option-field",
  "option-test",
  "negate",
  "arithmetic",
]);

/** List functions that refuse some lists, so that they may not be computed early. */
const refusing: ReadonlySet<string> = new Set(["at", "first", "last", "interpolate"]);

/** Text that is equal for equal operations; `SameValue` for numbers, so that 0 and −0 differ. */
function payload(operation: Operation): string {
  const { is } = operation;
  switch (is) {
    case "constant":
      return Object.is(operation.value, -0) ? "constant -0" : `constant ${operation.value}`;
    case "input":
    case "column":
    case "line":
      return `${is} ${operation.index}`;
    case "bound":
      return `bound ${operation.depth}`;
    case "option-field":
      return `field ${operation.choice} ${operation.values.join(" ")}`;
    case "column-option-field":
      return `column field ${operation.choiceColumn} ${operation.values.join(" ")}`;
    case "option-test":
      return `option ${operation.choice} ${operation.option} ${operation.equal}`;
    case "arithmetic":
    case "logic":
      return operation.operator;
    case "comparison":
      return `${operation.operator}${operation.tolerant ? " tolerant" : ""}`;
    case "call":
      return `call ${operation.name}`;
    case "property":
      return `${operation.material.from} ${operation.material.index} ${operation.property} ${operation.operation}`;
    case "form":
      return `form ${operation.form} ${operation.bound.id}`;
    case "negate":
    case "not":
    case "select":
    case "judged":
    case "after":
      return is;
  }
}

/**
 * Turns typed trees into values (value numbering). Functions of the working are expanded in place and remembered by
 * their arguments; sums and products do not depend on the order of their two operands, bit for bit.
 */
export class Graph {
  private readonly known = new Map<string, Value>();
  private readonly calls = new Map<string, Value>();
  private readonly slots = new Map<number, Value>();
  private depth = 0;

  constructor(
    private readonly program: TypedProgram,
    private readonly sites: Site[],
    /** Value of a line by its index. */
    private readonly lineValue: (graph: Graph, index: number) => Value,
  ) {}

  value(operation: Operation, operands: readonly Value[], length: ListLength | null, bound?: Value): Value {
    const commutes =
      operation.is === "arithmetic" && (operation.operator === "+" || operation.operator === "*");
    let key = payload(operation);
    const [a, b] = operands;
    if (commutes && a && b) {
      key += a.id < b.id ? ` ${a.id} ${b.id}` : ` ${b.id} ${a.id}`;
    } else {
      for (const operand of operands) key += ` ${operand.id}`;
    }
    if (length) key += ` ${lengthKey(length)}`;
    const found = this.known.get(key);
    if (found) return found;
    let free = operation.is === "bound" ? 1 << operation.depth : 0;
    let still =
      stillOperations.has(operation.is) || (operation.is === "call" && !refusing.has(operation.name));
    const isPower = operation.is === "arithmetic" && operation.operator === "^";
    let light = stillOperations.has(operation.is) && !isPower && !length;
    let reads = operation.is === "property";
    for (const operand of operands) {
      free |= operand.free;
      still &&= operand.still;
      light &&= operand.light;
      reads ||= operand.reads;
      operand.uses++;
    }
    if (bound) free &= ~bound.free;
    const made: Value = {
      id: this.known.size,
      operation,
      operands,
      length,
      free,
      still,
      light,
      reads,
      uses: 0,
    };
    this.known.set(key, made);
    return made;
  }

  constant(value: number): Value {
    return this.value({ is: "constant", value }, [], null);
  }

  build(typed: Typed): Value {
    const length = typed.type.is === "number" ? typed.type.length : null;
    const leaf = (operation: Operation): Value => this.value(operation, [], length);
    switch (typed.node) {
      case "constant":
        return this.constant(typed.value);
      case "input":
        return leaf({ is: "input", index: typed.index });
      case "column":
        return leaf({ is: "column", index: typed.index });
      case "line":
        return this.lineValue(this, typed.index);
      case "slot": {
        const value = this.slots.get(typed.slot);
        if (!value) throw new Error(`Slot ${typed.slot} (${typed.symbol}) has no value here.`);
        return value;
      }
      case "option-field":
        return leaf({ is: "option-field", choice: typed.choice, values: typed.values });
      case "column-option-field":
        return leaf({
          is: "column-option-field",
          choiceColumn: typed.choiceColumn,
          values: typed.values,
        });
      case "option-test":
        return leaf({
          is: "option-test",
          choice: typed.choice,
          option: typed.option,
          equal: typed.equal,
        });
      case "negate": {
        const operand = this.build(typed.operand);
        if (operand.operation.is === "constant") return this.constant(-operand.operation.value);
        return this.value({ is: "negate" }, [operand], length);
      }
      case "not":
        return this.value({ is: "not" }, [this.build(typed.operand)], null);
      case "arithmetic": {
        const left = this.build(typed.left);
        const right = this.build(typed.right);
        return (
          this.folded(typed.operator, left, right) ??
          this.value({ is: "arithmetic", operator: typed.operator }, [left, right], length)
        );
      }
      case "comparison":
        return this.value(
          { is: "comparison", operator: typed.operator, tolerant: typed.tolerant },
          [this.build(typed.left), this.build(typed.right)],
          null,
        );
      case "logic":
        return this.value(
          { is: "logic", operator: typed.operator },
          [this.build(typed.left), this.build(typed.right)],
          null,
        );
      case "conditional":
        return this.value(
          { is: "select" },
          [this.build(typed.condition), this.build(typed.whenTrue), this.build(typed.whenFalse)],
          length,
        );
      case "call":
        return this.call(typed, length);
      case "function-call":
        return this.functionCall(typed);
      case "property":
        return this.value(
          {
            is: "property",
            material: typed.material,
            property: typed.property,
            operation: typed.operation,
          },
          typed.arguments.map((argument) => this.build(argument)),
          length,
        );
      case "balance":
      case "argmin":
      case "integral":
      case "series":
      case "fixed-point":
        return this.form(typed, length);
    }
  }

  /** Arithmetic on constants is done once, with the operations the code would use. */
  private folded(operator: "+" | "-" | "*" | "/" | "^", left: Value, right: Value): Value | null {
    if (left.operation.is !== "constant" || right.operation.is !== "constant") return null;
    const [a, b] = [left.operation.value, right.operation.value];
    if (operator === "^") return null;
    const result = operator === "+" ? a + b : operator === "-" ? a - b : operator === "*" ? a * b : a / b;
    return Number.isFinite(result) ? this.constant(result) : null;
  }

  private call(typed: Extract<Typed, { node: "call" }>, length: ListLength | null): Value {
    const operands = typed.arguments.map((argument) => this.build(argument));
    const call = this.value({ is: "call", name: typed.function }, operands, length);
    return isStructural(typed.function) ? call : this.judge(call);
  }

  /** The value, judged finite wherever it is computed. Inputs and constants are finite already. */
  judge(value: Value): Value {
    const is = value.operation.is;
    if (is === "judged" || is === "constant" || is === "input" || is === "column" || is === "line")
      return value;
    return this.value({ is: "judged" }, [value], value.length);
  }

  private functionCall(typed: Extract<Typed, { node: "function-call" }>): Value {
    const instance = this.program.functions[typed.instance];
    if (!instance) throw new Error(`Function instance ${typed.instance} does not exist.`);
    const given = typed.arguments.map((argument) => this.build(argument));
    const key = `${typed.instance} ${this.depth} ${given.map((value) => value.id).join(" ")}`;
    const found = this.calls.get(key);
    if (found) return found;
    instance.parameters.forEach((parameter, index) => {
      const value = given[index];
      if (!value) throw new Error(`${instance.name} is called with too few arguments.`);
      this.slots.set(parameter.slot, value);
    });
    const body = this.build(instance.body);
    // An argument that can stop the run is evaluated even where the body's taken branch does not read it.
    const strict = given.filter((value) => !value.still);
    const result = this.judge(
      strict.length > 0 ? this.value({ is: "after" }, [body, ...strict], body.length) : body,
    );
    this.calls.set(key, result);
    return result;
  }

  private form(typed: Form, length: ListLength | null): Value {
    const ends =
      typed.node === "fixed-point"
        ? [this.build(typed.start)]
        : [this.build(typed.lower), this.build(typed.upper)];
    const boundLength = typed.node === "fixed-point" ? length : null;
    const bound = this.value({ is: "bound", depth: this.depth }, [], boundLength);
    this.slots.set(typed.slot, bound);
    this.depth++;
    const body = this.build(typed.body);
    this.depth--;
    const operation: Operation = { is: "form", form: typed.node, bound, site: this.sites.length };
    this.sites.push({ form: typed });
    return this.value(operation, [...ends, body], length, bound);
  }
}
