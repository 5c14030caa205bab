import type { Typed } from "../types";

type ComparisonOperator = Extract<Typed, { node: "comparison" }>["operator"];

/** Relative difference up to which two values count as equal in bounds, requires, limits and validity ranges. */
export const equalWithin = 1e-9;

/** Equal within 1e-9 of the larger magnitude (140 °F is 60 °C). */
export function nearlyEqual(left: number, right: number): boolean {
  return Math.abs(left - right) <= equalWithin * Math.max(Math.abs(left), Math.abs(right)) || left === right;
}

/** Comparison of conditions: nearly equal values satisfy `>=`, `<=` and `==`, and do not satisfy `>`, `<` and `!=`. */
export const tolerantComparisons: Readonly<
  Record<ComparisonOperator, (left: number, right: number) => boolean>
> = {
  "==": (left, right) => nearlyEqual(left, right),
  "!=": (left, right) => !nearlyEqual(left, right),
  "<": (left, right) => left < right && !nearlyEqual(left, right),
  "<=": (left, right) => left < right || nearlyEqual(left, right),
  ">": (left, right) => left > right && !nearlyEqual(left, right),
  ">=": (left, right) => left > right || nearlyEqual(left, right),
};

/** Comparison of workings: exact. */
export const exactComparisons: Readonly<
  Record<ComparisonOperator, (left: number, right: number) => boolean>
> = {
  "==": (left, right) => left === right,
  "!=": (left, right) => left !== right,
  "<": (left, right) => left < right,
  "<=": (left, right) => left <= right,
  ">": (left, right) => left > right,
  ">=": (left, right) => left >= right,
};
