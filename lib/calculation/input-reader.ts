import type { FieldProblem } from "@/lib/core/errors";
import { nearestName } from "@/lib/core/nearest";
import { pointerTo } from "@/lib/core/problem";
import {
  compatibleUnits,
  parseAmount,
  parseUnit,
  type Quantity,
  type Reading,
  toSi,
  type Unit,
} from "@/lib/units";
import { amountText } from "./amount-text";
import {
  absoluteZeroText,
  absoluteZeroTolerance,
  brokenBound,
  type DeclaredNumber,
  outsideUsual,
} from "./declared-number";
import type { Caution, UsedCell, UsedQuantity } from "./evaluation";
import type { ChoicePlan } from "./input-plan";

export function isQuantity(
  given: unknown,
): given is { value: number; unit?: string; at?: { value: number; unit: string } } {
  return typeof given === "object" && given !== null && "value" in given && typeof given.value === "number";
}

export function receivedOf(given: unknown): { received?: string | number | boolean | null } {
  if (typeof given === "string") return { received: given.slice(0, 120) };
  return typeof given === "number" || typeof given === "boolean" || given === null ? { received: given } : {};
}

/**
 * Reads single values of one request into SI and gathers everything that is wrong with them. `place` says which input
 * or cell is being read; units are parsed once for a request.
 */
export class ValueReader {
  problems: FieldProblem[] = [];
  cautions: Caution[] = [];
  /** Remarks on how units were read. */
  readonly unitRemarks = new Set<string>();
  /** Keep what was read in the form of the reply. */
  readonly echo: boolean;
  /** What was read last, when `echo`; null after a problem. */
  used: UsedCell | null = null;

  // Place being read: `inputs/t`, or `inputs/layers/1/k`; in rows of a request `rows/12/t`.
  base: readonly (string | number)[] = ["inputs"];
  input = "";
  row = -1;
  column = "";
  label = "";
  tableLabel = "";

  private readonly units = new Map<Quantity, Map<string, Reading<Unit>>>();

  constructor(echo: boolean) {
    this.echo = echo;
  }

  pointer(...further: readonly string[]): string {
    const cell = this.row < 0 ? [] : this.column === "" ? [this.row] : [this.row, this.column];
    return pointerTo(...this.base, this.input, ...cell, ...further);
  }

  /** The thing being read, at the beginning of a sentence. */
  name(): string {
    return this.row < 0 ? this.label : `${this.tableLabel}, row ${this.row + 1}: ${this.label}`;
  }

  problem(code: FieldProblem["code"], message: string, more: Partial<FieldProblem> = {}): void {
    this.used = null;
    this.problems.push({ pointer: this.pointer(), code, message, ...more });
  }

  missing(unit?: string): void {
    const hint =
      unit === undefined || unit === "1" ? "Give it." : `Give it in ${unit}, or with a unit of its own.`;
    this.problem("missing-input", `${this.name()} is missing. ${hint}`);
  }

  /** Unit of a given value, or null with the problem told. */
  unit(text: string, quantity: Quantity, member = "unit"): Unit | null {
    let known = this.units.get(quantity);
    if (!known) this.units.set(quantity, (known = new Map()));
    let reading = known.get(text);
    if (!reading) known.set(text, (reading = parseUnit(text, { expect: quantity })));
    if (reading.ok) {
      for (const remark of reading.notices) this.unitRemarks.add(remark);
      return reading.value;
    }
    const { code, message } = reading.fault;
    this.problem(code, `${this.name()}: ${message}`, {
      pointer: this.pointer(member),
      received: text.slice(0, 120),
      expected: quantity.name,
      acceptedUnits: compatibleUnits(quantity),
    });
    return null;
  }

  private keep(value: number, unit: Unit, si: number): void {
    this.used = usedQuantity(value, unit, si);
  }

  /** A number in SI, NaN with the problem told. */
  number(number: DeclaredNumber, given: unknown): number {
    let value: number;
    let unit = number.unit;
    if (typeof given === "number") value = given;
    else if (isQuantity(given)) {
      value = given.value;
      if (given.unit !== undefined) {
        const read = this.unit(given.unit, number.quantity);
        if (!read) return NaN;
        unit = read;
      }
    } else {
      this.notANumber(number, given);
      return NaN;
    }
    const si = toSi(value, unit, number.quantity.kind);
    if (!Number.isFinite(si)) {
      this.problem("invalid-input", `${this.name()} is not a finite number in SI units.`, receivedOf(given));
      return NaN;
    }
    if (!(si > number.clearAbove && si < number.clearBelow) && !this.withinBounds(number, si, value, unit))
      return NaN;
    if (this.echo) this.keep(value, unit, si);
    return si < 0 && number.quantity.kind === "absolute" ? 0 : si;
  }

  private notANumber(number: DeclaredNumber, given: unknown): void {
    const unit = number.unit.symbol;
    const plain = unit === "1" ? "a number" : `a number in ${unit}`;
    const said = typeof given === "string" ? `the text “${given.slice(0, 60)}”` : "no number";
    this.problem("invalid-input", `${this.name()} is ${said}. Send ${plain}${this.mend(number, given)}.`, {
      ...receivedOf(given),
      expected: plain,
    });
  }

  /** How a text would be sent as a quantity: exactly, where it can be read; with both readings, where it has two. */
  private mend({ quantity }: DeclaredNumber, given: unknown): string {
    if (typeof given !== "string") return " or an object with value and unit";
    const amount = parseAmount(given, { expect: quantity, shorthand: true });
    if (!amount.ok) {
      const { suggestions } = amount.fault;
      return suggestions.length > 0 ? `, for example ${suggestions.slice(0, 2).join(" or ")}` : "";
    }
    const { value, unit } = amount.value;
    return unit ? `, or { "value": ${value}, "unit": "${unit.symbol}" }` : `, without quotes: ${value}`;
  }

  /** Judges a value that is not clearly inside; false with the problem told. */
  private withinBounds(number: DeclaredNumber, si: number, value: number, unit: Unit): boolean {
    const text = amountText(value, unit.symbol);
    if (number.quantity.kind === "absolute" && si < absoluteZeroTolerance) {
      const zero = absoluteZeroText(unit);
      this.problem("out-of-range", `${this.name()} is ${text}. It must be at least ${zero}, absolute zero.`, {
        received: value,
        expected: `at least ${zero}`,
        limit: zero,
      });
      return false;
    }
    const broken = brokenBound(number, si);
    if (broken) {
      this.problem("out-of-range", `${this.name()} is ${text}. It must be ${broken.expected}.`, {
        received: value,
        expected: broken.expected,
        limit: broken.limit,
      });
      return false;
    }
    const usual = outsideUsual(number, si);
    if (usual !== null) {
      this.cautions.push({
        code: "usual-range",
        message: `${this.name()} is ${text}; usual is ${usual}. Check the value and its unit.`,
        pointer: this.pointer(),
      });
    }
    return true;
  }

  /** Place of an option, −1 with the problem told. */
  choice(plan: ChoicePlan, given: unknown): number {
    const index = typeof given === "string" ? plan.places.get(given) : undefined;
    if (index !== undefined) {
      if (this.echo) this.used = { option: plan.keys[index]! };
      return index;
    }
    const keys = plan.keys.join(", ");
    if (typeof given !== "string") {
      this.problem("invalid-input", `${this.name()} must be one of ${keys}.`, {
        ...receivedOf(given),
        expected: keys,
      });
      return -1;
    }
    const near = nearestName(given, plan.keys);
    const hint = near === null ? `Options: ${keys}.` : `Did you mean “${near}”?`;
    this.problem("unknown-member", `${this.name()} has no option “${given.slice(0, 60)}”. ${hint}`, {
      received: given.slice(0, 120),
      expected: near ?? keys,
    });
    return -1;
  }

  text(maxLength: number, given: unknown): void {
    if (given === undefined || given === null) {
      this.used = { text: "" };
    } else if (typeof given !== "string") {
      this.problem("invalid-input", `${this.name()} must be a text.`, receivedOf(given));
    } else if (given.length > maxLength) {
      this.problem(
        "invalid-input",
        `${this.name()} has ${given.length} characters; at most ${maxLength} are kept.`,
        {
          limit: maxLength,
        },
      );
    } else this.used = { text: given };
  }

  /** Names in a record that nothing here is called. */
  unknownMembers(given: Readonly<Record<string, unknown>>, known: ReadonlySet<string>, what: string): void {
    for (const name in given) {
      if (known.has(name)) continue;
      const near = nearestName(name, known);
      const hint =
        near === null ? `Known are ${[...known].slice(0, 12).join(", ")}.` : `Did you mean “${near}”?`;
      this.problems.push({
        pointer: `${what === "input" ? pointerTo(...this.base, name) : this.pointer(name)}`,
        code: "unknown-member",
        message: `There is no ${what} “${name.slice(0, 60)}”${what === "input" ? "" : ` in ${this.label}`}. ${hint}`,
        ...(near !== null && { expected: near }),
      });
    }
  }
}

export function usedQuantity(value: number, unit: Unit, si: number): UsedQuantity {
  return { value, unit: unit.symbol, ucum: unit.ucum, si };
}
