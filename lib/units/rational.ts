import type { Rational } from "./types";

/** Exact fractions for exponents of dimensions and weights of temperatures. */

function greatestCommonDivisor(a: number, b: number): number {
  while (b !== 0) [a, b] = [b, a % b];
  return a;
}

/** `n/d` in lowest terms, denominator positive. Throws RangeError for fractions that whole doubles cannot hold. */
export function rational(n: number, d = 1): Rational {
  if (!Number.isSafeInteger(n) || !Number.isSafeInteger(d) || d === 0)
    throw new RangeError(`${n}/${d} is not a fraction of whole numbers that can be held exactly.`);
  const divisor = greatestCommonDivisor(Math.abs(n), Math.abs(d)) * Math.sign(d);
  return { n: n / divisor + 0, d: d / divisor };
}

export const zero: Rational = rational(0);
export const one: Rational = rational(1);

export function addRational(a: Rational, b: Rational): Rational {
  if (a.n === 0) return b;
  if (b.n === 0) return a;
  return a.d === b.d ? rational(a.n + b.n, a.d) : rational(a.n * b.d + b.n * a.d, a.d * b.d);
}

export function negateRational(a: Rational): Rational {
  return { n: 0 - a.n, d: a.d };
}

export function multiplyRational(a: Rational, b: Rational): Rational {
  if (a.n === 0 || b.n === 0) return zero;
  return rational(a.n * b.n, a.d * b.d);
}

export function sameRational(a: Rational, b: Rational): boolean {
  return a.n === b.n && a.d === b.d;
}

export function rationalToNumber(a: Rational): number {
  return a.n / a.d;
}

/** `3/2` as text: `3/2`, whole numbers without denominator. */
export function rationalText(a: Rational): string {
  return a.d === 1 ? String(a.n) : `${a.n}/${a.d}`;
}

const largestDenominator = 1000;

/**
 * The fraction with a denominator up to 1000 that is this double (2/3 typed as 0.6666666666666666 included), or
 * null when there is none: an exponent such as 0.123456 is no power that a dimension can carry.
 */
export function rationalFromNumber(x: number): Rational | null {
  if (!Number.isFinite(x) || Math.abs(x) > 1e6) return null;
  // Convergents of the continued fraction; the first that meets the double to rounding is the fraction meant.
  let [p0, q0, p1, q1] = [1, 0, Math.floor(x), 1];
  let rest = x - p1;
  while (q1 <= largestDenominator) {
    if (Math.abs(p1 / q1 - x) <= 4 * Number.EPSILON * Math.max(1, Math.abs(x))) return rational(p1, q1);
    if (rest === 0) return null;
    const inverse = 1 / rest;
    const whole = Math.floor(inverse);
    rest = inverse - whole;
    [p0, q0, p1, q1] = [p1, q1, whole * p1 + p0, whole * q1 + q0];
  }
  return null;
}
