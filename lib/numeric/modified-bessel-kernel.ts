import { chebyshev } from "./chebyshev";
import {
  i0Far,
  i0Middle,
  i0Near,
  i0Tail,
  i1Far,
  i1Middle,
  i1Near,
  i1Tail,
  k0Far,
  k0Middle,
  k0Near,
  k0Tail,
  k1Far,
  k1Middle,
  k1Near,
  k1Tail,
} from "./tables/modified-bessel";

/*
 * Modified Bessel functions of orders 0 and 1 for x > 0, from which the other orders follow. Chebyshev tables of our own
 * (tables/generate.ts) to 1e-17 of the largest term. Relative error below 1e-15 in every interval, scaled or not.
 */

/** value·e^x for x ≥ 0, without overflow before the product does. */
export function grown(value: number, x: number): number {
  if (x < 700) return value * Math.exp(x);
  const half = Math.exp(x / 2);
  return value * half * half;
}

/** value·e^−x for x ≥ 0, with full digits down to the denormal numbers. */
export function decayed(value: number, x: number): number {
  if (x < 700) return value * Math.exp(-x);
  const half = Math.exp(-x / 2);
  return value * half * half;
}

/** I_0(x) for 0 ≤ x ≤ 2. */
function i0Small(x: number): number {
  const square = x * x;
  return 1 + 0.25 * square * chebyshev(i0Near, 0.5 * square - 1);
}

/** I_1(x) for 0 ≤ x ≤ 2. */
function i1Small(x: number): number {
  const square = x * x;
  return 0.5 * x * (1 + 0.25 * square * chebyshev(i1Near, 0.5 * square - 1));
}

/** e^−x·I_0(x) for x > 2. */
function i0Damped(x: number): number {
  if (x <= 5) return chebyshev(i0Middle, (2 * x - 7) / 3);
  return (x <= 12 ? chebyshev(i0Far, (120 / x - 17) / 7) : chebyshev(i0Tail, 24 / x - 1)) / Math.sqrt(x);
}

/** e^−x·I_1(x) for x > 2. */
function i1Damped(x: number): number {
  if (x <= 5) return chebyshev(i1Middle, (2 * x - 7) / 3);
  return (x <= 12 ? chebyshev(i1Far, (120 / x - 17) / 7) : chebyshev(i1Tail, 24 / x - 1)) / Math.sqrt(x);
}

/** e^−x·I_0(x) when scaled, else I_0(x). */
export function i0(x: number, scaled: boolean): number {
  if (x <= 2) return scaled ? i0Small(x) * Math.exp(-x) : i0Small(x);
  return scaled ? i0Damped(x) : grown(i0Damped(x), x);
}

/** e^−x·I_1(x) when scaled, else I_1(x). */
export function i1(x: number, scaled: boolean): number {
  if (x <= 2) return scaled ? i1Small(x) * Math.exp(-x) : i1Small(x);
  return scaled ? i1Damped(x) : grown(i1Damped(x), x);
}

/** e^x·K_0(x) when scaled, else K_0(x). */
export function k0(x: number, scaled: boolean): number {
  if (x <= 1) {
    // Both terms are positive here, so nothing cancels.
    const value = chebyshev(k0Near, 2 * x * x - 1) - Math.log(x) * i0Small(x);
    return scaled ? value * Math.exp(x) : value;
  }
  const table =
    x <= 3
      ? chebyshev(k0Middle, 3 / x - 2)
      : x <= 8
        ? chebyshev(k0Far, (48 / x - 11) / 5)
        : chebyshev(k0Tail, 16 / x - 1);
  const value = table / Math.sqrt(x);
  return scaled ? value : decayed(value, x);
}

/** e^x·K_1(x) when scaled, else K_1(x). */
export function k1(x: number, scaled: boolean): number {
  if (x <= 1) {
    const value = 1 / x + (Math.log(x) * i1Small(x) + x * chebyshev(k1Near, 2 * x * x - 1));
    return scaled ? value * Math.exp(x) : value;
  }
  const table =
    x <= 3
      ? chebyshev(k1Middle, 3 / x - 2)
      : x <= 8
        ? chebyshev(k1Far, (48 / x - 11) / 5)
        : chebyshev(k1Tail, 16 / x - 1);
  const value = table / Math.sqrt(x);
  return scaled ? value : decayed(value, x);
}
