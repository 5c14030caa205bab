import { integrate } from "@/lib/numeric/quadrature";
import { linearInterpolator, monotoneCubic } from "@/lib/numeric/interpolation";

/**
 * One form of a property as functions of the absolute temperature in kelvin, in SI. `mean` is the mean over an
 * interval with distinct ends in any order, to 1e-10 relative; both continue the form outside its range.
 */
export interface FormCurve {
  value(temperature: number): number;
  mean(from: number, to: number): number;
}

/** How a form's own numbers relate to kelvin and SI: argument = T/factor − shift, property = number·scale. */
export interface FormScale {
  readonly factor: number;
  readonly shift: number;
  readonly scale: number;
}

/** Intervals narrower than this, relative to their place, are so short that Simpson's rule is exact to rounding. */
const shortInterval = 1e-6;
const quadrature = { relTol: 1e-12, absTol: 0, maxEvaluations: 20_000 };

export function constantForm(value: number): FormCurve {
  return { value: () => value, mean: () => value };
}

function horner(coefficients: readonly number[], x: number): number {
  let sum = 0;
  for (let i = coefficients.length - 1; i >= 0; i--) sum = sum * x + coefficients[i]!;
  return sum;
}

/**
 * Σ cᵢ·xⁱ. The mean of xⁱ over (a, b) is hᵢ(a, b)/(i + 1) with the complete symmetric polynomial
 * hᵢ = Σ aʲ·bⁱ⁻ʲ, which does not cancel as (bⁱ⁺¹ − aⁱ⁺¹)/(b − a) does when b → a.
 */
export function polynomialForm(
  coefficients: readonly number[],
  { factor, shift, scale }: FormScale,
): FormCurve {
  return {
    value: (temperature) => scale * horner(coefficients, temperature / factor - shift),
    mean(from, to) {
      const a = from / factor - shift;
      const b = to / factor - shift;
      let symmetric = 1;
      let power = 1;
      let sum = coefficients[0]!;
      for (let i = 1; i < coefficients.length; i++) {
        power *= b;
        symmetric = a * symmetric + power;
        sum += (coefficients[i]! * symmetric) / (i + 1);
      }
      return scale * sum;
    },
  };
}

/** Mean of any smooth curve by adaptive quadrature. Throws `NumericFault` `not-converged`. */
function quadratureMean(value: (temperature: number) => number, from: number, to: number): number {
  if (Math.abs(to - from) <= shortInterval * Math.max(Math.abs(from), Math.abs(to))) {
    return (value(from) + 4 * value(from + (to - from) / 2) + value(to)) / 6;
  }
  return integrate(value, from, to, quadrature).value / (to - from);
}

/** Any other form, from its value alone. */
export function quadratureForm(value: (temperature: number) => number): FormCurve {
  return { value, mean: (from, to) => quadratureMean(value, from, to) };
}

/** log₁₀ k = Σ cᵢ·(log₁₀ x)ⁱ */
export function logPolynomialForm(
  coefficients: readonly number[],
  { factor, shift, scale }: FormScale,
): FormCurve {
  return quadratureForm(
    (temperature) => scale * 10 ** horner(coefficients, Math.log10(temperature / factor - shift)),
  );
}

/** log₁₀ k = P(√x)/Q(√x) */
export function logRatioForm(
  numerator: readonly number[],
  denominator: readonly number[],
  { factor, shift, scale }: FormScale,
): FormCurve {
  return quadratureForm((temperature) => {
    const root = Math.sqrt(temperature / factor - shift);
    return scale * 10 ** (horner(numerator, root) / horner(denominator, root));
  });
}

/** Points joined by straight lines or a monotone cubic; beyond the points along the tangent at the end. */
export function tableForm(
  points: readonly (readonly [number, number])[],
  interpolation: "linear" | "monotone-cubic",
  { factor, shift, scale }: FormScale,
): FormCurve {
  const xs = points.map(([x]) => (x + shift) * factor);
  const ys = points.map(([, y]) => y * scale);
  const curve = interpolation === "linear" ? linearInterpolator(xs, ys) : monotoneCubic(xs, ys);
  const first = xs[0]!;
  const last = xs.at(-1)!;

  const value = (temperature: number): number => {
    if (temperature < first) return ys[0]! + curve.slope(first) * (temperature - first);
    if (temperature > last) return ys.at(-1)! + curve.slope(last) * (temperature - last);
    return curve.value(temperature);
  };
  /** Index of the first point above the temperature. */
  const above = (temperature: number): number => {
    let low = 0;
    let high = xs.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (xs[middle]! > temperature) high = middle;
      else low = middle + 1;
    }
    return low;
  };
  const mean = (from: number, to: number): number => {
    const lo = Math.min(from, to);
    const hi = Math.max(from, to);
    const next = xs[above(lo)];
    // Without a point inside, the curve is one cubic, for which Simpson's rule is exact and does not cancel.
    if (next === undefined || next >= hi) return (value(lo) + 4 * value(lo + (hi - lo) / 2) + value(hi)) / 6;
    const inside = curve.integral(Math.max(lo, first), Math.min(hi, last));
    const before = lo < first ? (first - lo) * value((lo + first) / 2) : 0;
    const after = hi > last ? (hi - last) * value((last + hi) / 2) : 0;
    return (before + inside + after) / (hi - lo);
  };
  return { value, mean };
}
