/** Exact fraction in lowest terms, denominator positive. */
export interface Rational {
  readonly n: number;
  readonly d: number;
}

export const baseQuantities = [
  "length",
  "mass",
  "time",
  "temperature",
  "electric current",
  "amount of substance",
  "luminous intensity",
  "money",
] as const;
export type BaseQuantity = (typeof baseQuantities)[number];

/** Exponents in the order of `baseQuantities`. Always made by the functions of `dimension.ts`. */
export type Dimension = readonly Rational[];

/**
 * How a number in this quantity relates to its unit's zero. Only temperature has two readings; `plain` is
 * everything else (a gauge pressure's zero is part of its unit and applies under `plain`).
 */
export type ScaleKind = "absolute" | "difference" | "plain";

/** A unit as parsed. SI value = (value + shift) · factor, where `shift` counts only for absolute or plain. */
export interface Unit {
  /** As we print it: `W/(m·K)`, `°C`, `Δ°C`, `ft²·°F·h/BTU`. `1` for a bare number. */
  readonly symbol: string;
  /** UCUM code, or null where UCUM has none (`EUR`, `clo`, `tog`). */
  readonly ucum: string | null;
  readonly dimension: Dimension;
  readonly factor: number;
  readonly shift: number;
  /** Set by `Δ°C`, `Δ°F`, `ΔK`: can only be a difference. */
  readonly differenceOnly?: true;
}

/** One named physical quantity (ISO 80000 names). */
export interface Quantity {
  readonly name: string;
  readonly dimension: Dimension;
  readonly kind: ScaleKind;
  /** Unit shown unless a template declares another. */
  readonly unit: string;
  /** Units offered in pickers, default first. All have this dimension. */
  readonly units: readonly string[];
  /** Usual range in SI, for hints only. */
  readonly typical?: readonly [number, number];
}

/** Why a text could not be read, with the place in it (0-based, end exclusive). */
export interface UnitFault {
  readonly code: "unreadable-unit" | "unit-mismatch" | "invalid-input" | "missing-input";
  readonly message: string;
  readonly start: number;
  readonly end: number;
  /** Texts that would be read, best first. */
  readonly suggestions: readonly string[];
}

export type Reading<T> =
  | { readonly ok: true; readonly value: T; readonly notices: readonly string[] }
  | { readonly ok: false; readonly fault: UnitFault };

export interface ReadOptions {
  /** What is wanted here; settles `°F` as temperature or difference, and allows a check of the dimension. */
  readonly expect?: Quantity;
  /** Read shorthand with one reading of the expected dimension (`W/mK`, `F`), with a notice. For fields and spreadsheets. */
  readonly shorthand?: boolean;
}
