import { CodedError, type FieldProblem } from "@/lib/core/errors";
import { fromSi, parseUnit, toSi } from "@/lib/units";
import type { WorkedCase } from "./definition";
import { evaluate } from "./execute";
import type { MaterialSnapshots } from "./materials-needed";
import type { Prepared } from "./prepare";

/** How far one value of a run is from what a worked case expects; all in the case's unit. */
export interface Deviation {
  readonly symbol: string;
  /** Place in a list, from 0. */
  readonly index?: number;
  readonly expected: number;
  /** null when the run has no such value. */
  readonly found: number | null;
  readonly unit: string;
  /** Largest difference allowed. */
  readonly tolerance: number;
  readonly passed: boolean;
}

export interface CaseOutcome {
  readonly title: string;
  readonly passed: boolean;
  readonly deviations: readonly Deviation[];
  /** What the run was refused with, when it was. */
  readonly refused: {
    readonly code: string;
    readonly message: string;
    readonly problems: readonly FieldProblem[];
  } | null;
}

type Expected = NonNullable<WorkedCase["expected"]>[string];

/** The larger of both tolerances, in the case's unit; a temperature's `absTol` is a difference in its degree. */
function toleranceOf(expected: Expected, value: number): number {
  return Math.max(expected.absTol ?? 0, (expected.relTol ?? 0) * Math.abs(value));
}

/** Rounding of the two conversions never decides a case. */
const rounding = 1e-12;

function deviation(
  symbol: string,
  expected: Expected,
  value: number,
  found: number | undefined,
  index?: number,
): Deviation {
  const tolerance = toleranceOf(expected, value);
  const allowed = tolerance + rounding * Math.max(Math.abs(value), Math.abs(found ?? 0));
  return {
    symbol,
    ...(index !== undefined && { index }),
    expected: value,
    found: found ?? null,
    unit: expected.unit,
    tolerance,
    passed: found !== undefined && Math.abs(found - value) <= allowed,
  };
}

function deviationsOf(
  prepared: Prepared,
  symbol: string,
  expected: Expected,
  result: { value?: number | undefined; values?: number[] | undefined; unit: string } | undefined,
): Deviation[] {
  const plan = prepared.results.find(({ declaration }) => declaration.symbol === symbol);
  const wanted = expected.values ?? (expected.value === undefined ? [] : [expected.value]);
  const unit = plan && parseUnit(expected.unit, { expect: plan.quantity });
  const given = result && plan && parseUnit(result.unit, { expect: plan.quantity });
  const inUnit = (value: number): number | undefined =>
    plan && unit?.ok && given?.ok
      ? fromSi(toSi(value, given.value, plan.quantity.kind), unit.value, plan.quantity.kind)
      : undefined;
  const found = (result?.values ?? (result?.value === undefined ? [] : [result.value])).map(inUnit);
  const isList = expected.values !== undefined;
  const count = isList ? Math.max(wanted.length, found.length) : 1;
  return Array.from({ length: count }, (_, i) => {
    const value = wanted[i];
    const one = deviation(symbol, expected, value ?? NaN, found[i], isList ? i : undefined);
    return value === undefined ? { ...one, passed: false } : one;
  });
}

/**
 * Runs one worked case and compares. Passed means every expected value is within its tolerance, or the run was refused
 * with the code that the case names.
 */
export function runCase(prepared: Prepared, worked: WorkedCase, materials: MaterialSnapshots): CaseOutcome {
  const { title } = worked;
  try {
    const run = evaluate(prepared, { inputs: worked.inputs }, materials);
    const deviations = Object.entries(worked.expected ?? {}).flatMap(([symbol, expected]) =>
      deviationsOf(prepared, symbol, expected, run.results[symbol]),
    );
    const passed =
      worked.refused === undefined && deviations.length > 0 && deviations.every((one) => one.passed);
    return { title, passed, deviations, refused: null };
  } catch (error) {
    if (!(error instanceof CodedError)) throw error;
    const codes = [error.code, ...error.problems.map(({ code }) => code)];
    return {
      title,
      passed: worked.refused !== undefined && codes.includes(worked.refused),
      deviations: [],
      refused: { code: error.code, message: error.message, problems: error.problems },
    };
  }
}

/** Every worked case of a definition, in its order. */
export function runAllCases(prepared: Prepared, materials: MaterialSnapshots): CaseOutcome[] {
  return prepared.definition.cases.map((worked) => runCase(prepared, worked, materials));
}
