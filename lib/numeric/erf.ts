const twoOverSqrtPi = 2 / Math.sqrt(Math.PI);
const step = 0.5;
/* exp(−n²h²) for the trapezoidal sum. */
const weights = Float64Array.from({ length: 13 }, (_, index) => Math.exp(-((index + 1) ** 2) * step * step));

/** Series with terms of one sign, erf x = 2/√π·e^(−x²)·Σ 2ⁿ x^(2n+1)/(2n+1)!! (Abramowitz & Stegun 7.1.6). */
function erfSeries(x: number): number {
  const square = x * x;
  let term = x;
  let sum = x;
  for (let n = 1; term > sum * 1e-18; n += 1) {
    term *= (2 * square) / (2 * n + 1);
    sum += term;
  }
  return twoOverSqrtPi * Math.exp(-square) * sum;
}

/**
 * e^(x²)·erfc x for x ≥ 0.5 by the trapezoidal rule on erfc's integral with the pole's residue taken off:
 * C. Chiarella and A. Reichel, Math. Comp. 22 (1968) 137. With h = 1/2 the error of the rule is e^(−4π²) < 1e-17.
 */
function scaledTail(x: number): number {
  const square = x * x;
  let sum = 0;
  for (let index = weights.length - 1; index >= 0; index -= 1) {
    sum += (weights[index] as number) / ((index + 1) ** 2 * step * step + square);
  }
  const trapezoid = (step / Math.PI) * (1 / x + 2 * x * sum);
  return x < Math.PI / step
    ? trapezoid - 2 / (Math.expm1((2 * Math.PI * x) / step) * Math.exp(-square))
    : trapezoid;
}

/** e^(−x²) with the rounding of x² taken care of: x is split so that the larger square is exact. */
function gaussian(x: number): number {
  const high = Math.round(x * 16) / 16;
  return Math.exp(-high * high) * Math.exp(-(x - high) * (x + high));
}

/** Error function. Relative error below 1e-15. */
export function erf(x: number): number {
  if (Number.isNaN(x)) return Number.NaN;
  const size = Math.abs(x);
  const value = size < 1 ? erfSeries(size) : size > 6 ? 1 : 1 - gaussian(size) * scaledTail(size);
  return x < 0 ? -value : value;
}

/** Complementary error function. Relative error below 1e-14 down to underflow near x = 26.5. */
export function erfc(x: number): number {
  if (x < 0.5) return 1 - erf(x);
  return x > 27.3 ? 0 : gaussian(x) * scaledTail(x);
}

/** Scaled complementary error function e^(x²)·erfc x; finite for every x above −26. */
export function erfcx(x: number): number {
  if (x >= 0.5) return scaledTail(x);
  return Math.exp(x * x) * (1 - erf(x));
}
