import { languageFunctions } from "../functions";
import { propertyIntegralCost, propertyValueCost } from "../runtime/fuel";
import type { ListLength, Typed, TypedProgram } from "../types";
import { lengthKey } from "./value";

const functionCosts: ReadonlyMap<string, number> = new Map(
  languageFunctions.map((row) => [row.name, row.cost]),
);

/** Fuel of one evaluation: a whole number, and more for each element of lists. */
export interface Cost {
  fixed: number;
  readonly perElement: Map<string, { readonly length: ListLength; amount: number }>;
}

/** Adds up the static size of expressions; functions of the working count in full at each call. */
export class CostMeter {
  private readonly instances = new Map<number, Cost>();

  constructor(private readonly program: TypedProgram) {}

  /** Cost of one evaluation, without the evaluations of bodies of special forms inside, which pay for themselves. */
  of(typed: Typed): Cost {
    const cost: Cost = { fixed: 0, perElement: new Map() };
    this.add(typed, cost);
    return cost;
  }

  private add(typed: Typed, to: Cost): void {
    let own = 1;
    if (typed.node === "call") own = Math.max(1, functionCosts.get(typed.function) ?? 1);
    if (typed.node === "property") {
      own += typed.operation === "value" ? propertyValueCost : propertyIntegralCost;
    }
    charge(to, own, lengthCharged(typed));
    switch (typed.node) {
      case "negate":
      case "not":
        this.add(typed.operand, to);
        break;
      case "arithmetic":
      case "comparison":
      case "logic":
        this.add(typed.left, to);
        this.add(typed.right, to);
        break;
      case "conditional":
        this.add(typed.condition, to);
        this.add(typed.whenTrue, to);
        this.add(typed.whenFalse, to);
        break;
      case "call":
      case "property":
        for (const argument of typed.arguments) this.add(argument, to);
        break;
      case "function-call":
        for (const argument of typed.arguments) this.add(argument, to);
        merge(to, this.instance(typed.instance));
        break;
      case "balance":
      case "argmin":
      case "integral":
      case "series":
        this.add(typed.lower, to);
        this.add(typed.upper, to);
        break;
      case "fixed-point":
        this.add(typed.start, to);
        break;
    }
  }

  private instance(index: number): Cost {
    const known = this.instances.get(index);
    if (known) return known;
    const instance = this.program.functions[index];
    if (!instance) throw new Error(`Function instance ${index} does not exist.`);
    const cost = this.of(instance.body);
    this.instances.set(index, cost);
    return cost;
  }
}

/** Length a node is charged for: its own, or for a reduction that of its longest list. */
function lengthCharged(typed: Typed): ListLength | null {
  if (typed.type.is === "number" && typed.type.length) return typed.type.length;
  if (typed.node !== "call") return null;
  for (const argument of typed.arguments) {
    if (argument.type.is === "number" && argument.type.length) return argument.type.length;
  }
  return null;
}

function charge(to: Cost, amount: number, length: ListLength | null): void {
  if (!length) {
    to.fixed += amount;
  } else if (length.table === null) {
    to.fixed += amount * Math.max(1, length.plus);
  } else {
    const key = lengthKey(length);
    const entry = to.perElement.get(key);
    if (entry) entry.amount += amount;
    else to.perElement.set(key, { length, amount });
  }
}

function merge(to: Cost, from: Cost): void {
  to.fixed += from.fixed;
  for (const { length, amount } of from.perElement.values()) charge(to, amount, length);
}
