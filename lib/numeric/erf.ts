import { chebyshev } from "./chebyshev";
import { erfcxFar, erfcxMiddle, erfcxTail, erfNear } from "./tables/error-function";

/*
 * Error function and its complements by Chebyshev tables of our own (tables/generate.ts): erf(x)/x up to |x| = 1, beyond
 * it e^(x²)·erfc x. Relative error below 2e-15 in every interval, down to the denormal numbers.
 */

/** erf x for |x| ≤ 1. */
function nearZero(x: number): number {
  return x * chebyshev(erfNear, 2 * x * x - 1);
}

/** e^(x²)·erfc x for x ≥ 0.5. */
function scaledTail(x: number): number {
  if (x <= 2) return chebyshev(erfcxMiddle, (4 * x - 5) / 3);
  return (x <= 5 ? chebyshev(erfcxFar, (20 / x - 7) / 3) : chebyshev(erfcxTail, 10 / x - 1)) / x;
}

/** e^(±x²) with the rounding of x² taken care of: x is split so that the square of the larger part is exact. */
function gaussian(x: number, sign: 1 | -1): number {
  const high = Math.round(x * 16) / 16;
  return Math.exp(sign * high * high) * Math.exp(sign * (x - high) * (x + high));
}

/** erfc x for x ≥ 0.5. */
function complement(x: number): number {
  return x > 27.3 ? 0 : gaussian(x, -1) * scaledTail(x);
}

/** Error function erf x = 2/√π·∫₀ˣ e^(−t²) dt. */
export function erf(x: number): number {
  const size = Math.abs(x);
  if (!(size > 1)) return nearZero(x);
  const value = size > 6 ? 1 : 1 - complement(size);
  return x < 0 ? -value : value;
}

/** Complementary error function erfc x = 1 − erf x; 0 beyond x = 27.3, where it is below the smallest double. */
export function erfc(x: number): number {
  return x >= 0.5 ? complement(x) : 1 - erf(x);
}

/** Scaled complementary error function e^(x²)·erfc x; infinite below x = −26.6, where it exceeds the largest double. */
export function erfcx(x: number): number {
  if (x >= 0.5) return scaledTail(x);
  if (x < -27) return Infinity;
  return x < -1 ? gaussian(x, 1) * (2 - complement(-x)) : gaussian(x, 1) * (1 - nearZero(x));
}
