import { NumericFault } from "@/lib/numeric/fault";
import { globalMinimum } from "@/lib/numeric/minimum";
import { integrate } from "@/lib/numeric/quadrature";
import { brent } from "@/lib/numeric/root";
import { RunFault } from "../types";

/** Accuracy of integral, relative to its value. */
const integralTolerance = 1e-11;
const integralEvaluations = 20_000;

/** Names of a special form and of its ends for messages, as the compiler knows them. */
export interface FormText {
  /** "balance over u" */
  readonly name: string;
  /** Value of the bound variable with its unit. */
  readonly bound: (value: number) => string;
  /** Value of the expression with its unit. */
  readonly result: (value: number) => string;
}

function requireOrder(text: FormText, lower: number, upper: number): void {
  if (lower !== lower || upper !== upper) {
    throw new RunFault("not-finite", `An end of ${text.name} is not a number.`);
  }
  if (lower > upper) {
    throw new RunFault(
      "crossed-bounds",
      `The lower end of ${text.name} (${text.bound(lower)}) lies above the upper end (${text.bound(upper)}).`,
      {},
      { lower, upper },
    );
  }
}

/** The x in [lower, upper] at which f is zero. Throws `RunFault` `crossed-bounds`, `no-solution`, `not-finite`, `not-converged`. */
export function solveBalance(text: FormText, f: (x: number) => number, lower: number, upper: number): number {
  requireOrder(text, lower, upper);
  try {
    return brent(f, lower, upper).x;
  } catch (fault) {
    if (!(fault instanceof NumericFault)) throw fault;
    if (fault.code === "no-sign-change") {
      const [atLower, atUpper] = [f(lower), f(upper)];
      throw new RunFault(
        "no-solution",
        `${text.name} finds no zero: the expression is ${text.result(atLower)} at ${text.bound(lower)} and ` +
          `${text.result(atUpper)} at ${text.bound(upper)}, without a change of sign. Widen the interval or check the inputs.`,
        {},
        { lower, upper, atLower, atUpper },
      );
    }
    if (fault.code === "pole") {
      throw new RunFault(
        "no-solution",
        `${text.name} finds no zero between ${text.bound(lower)} and ${text.bound(upper)}: the expression changes ` +
          "sign through a pole, where it is infinite.",
        {},
        { lower, upper, reason: "pole" },
      );
    }
    throw solverFault(text, fault);
  }
}

/** The x in [lower, upper] at which f is smallest, the smallest of equal ones. Throws as `solveBalance`. */
export function solveArgmin(text: FormText, f: (x: number) => number, lower: number, upper: number): number {
  requireOrder(text, lower, upper);
  try {
    return globalMinimum(f, lower, upper).x;
  } catch (fault) {
    if (!(fault instanceof NumericFault)) throw fault;
    throw solverFault(text, fault);
  }
}

/** Integral of f from lower to upper, negative when upper lies below lower. Throws `RunFault` `not-converged`, `not-finite`. */
export function solveIntegral(
  text: FormText,
  f: (x: number) => number,
  lower: number,
  upper: number,
): number {
  if (lower === upper) return 0;
  const [from, to] = lower < upper ? [lower, upper] : [upper, lower];
  try {
    const { value } = integrate(f, from, to, {
      relTol: integralTolerance,
      absTol: 0,
      maxEvaluations: integralEvaluations,
    });
    return lower < upper ? value : -value;
  } catch (fault) {
    if (!(fault instanceof NumericFault)) throw fault;
    throw solverFault(text, fault);
  }
}

function solverFault(text: FormText, fault: NumericFault): RunFault {
  return fault.code === "not-converged"
    ? new RunFault(
        "not-converged",
        `${text.name} did not converge. ${fault.message}`,
        {},
        { ...fault.details },
      )
    : new RunFault(
        "not-finite",
        `The expression of ${text.name} is not finite within its interval. ${fault.message}`,
        {},
        { ...fault.details },
      );
}

/** An end of a series, which must be whole. Throws `RunFault` `out-of-range`. */
export function wholeBound(end: number): number {
  if (!Number.isInteger(end)) {
    throw new RunFault(
      Number.isFinite(end) ? "out-of-range" : "not-finite",
      `An end of series is ${end}. It must be a whole number.`,
      {},
      { end },
    );
  }
  return end;
}
