import { j0, j1, y0, y1 } from "./bessel-kernel";
import { zeroGuess } from "./bessel-zero-guess";
import { decayed, grown, i0, i1, k0, k1 } from "./modified-bessel-kernel";

/*
 * Bessel functions of whole order n ≥ 0 and real x; any other order gives NaN. Relative error below 2e-15 for I and K up
 * to order 20, and of J and Y relative to the amplitude √(J² + Y²), or to the value itself where x < n and J has no zeros;
 * below 1e-14 up to order 100. Formula numbers are those of the NIST Digital Library of Mathematical Functions (DLMF).
 */

const isOrder = (n: number): boolean => n >= 0 && Number.isInteger(n);

/* n! up to the last that a double holds, each correctly rounded. */
const factorials = Float64Array.from({ length: 171 }, (_, n) => {
  let product = 1n;
  for (let k = 2n; k <= n; k += 1n) product *= k;
  return Number(product);
});

/** (x/2)^n/n!, which leads the power series. */
function leadingTerm(n: number, x: number): number {
  if (n < factorials.length) return Math.pow(x / 2, n) / factorials[n]!;
  let term = Math.pow(x / 2, 170) / factorials[170]!;
  for (let k = 171; k <= n; k += 1) term *= x / (2 * k);
  return term;
}

/** Σ (±x²/4)^k·n!/(k!·(n+k)!), the power series over its leading term (DLMF 10.2.2, 10.25.2). */
function powerSeries(n: number, x: number, sign: 1 | -1): number {
  const step = 0.25 * sign * x * x;
  let term = 1;
  let sum = 0;
  for (let k = 1; Math.abs(term) > 1e-17; k += 1) {
    term *= step / (k * (n + k));
    sum += term;
  }
  return 1 + sum;
}

/** √(2πx)·e^−x·I_n(x) for x above 30 and n² (DLMF 10.40.1); the smallest term is below 1e-25 there. */
function hankelI(n: number, x: number): number {
  let term = 1;
  let sum = 0;
  for (let k = 1; Math.abs(term) > 1e-17; k += 1) {
    term *= ((2 * k - 1) ** 2 - 4 * n * n) / (8 * k * x);
    sum += term;
  }
  return 1 + sum;
}

/** I_n/I_0 by the ratios I_k/I_(k−1) downward (D. E. Amos, Math. Comp. 28 (1974) 239), which is stable and never overflows. */
function ratioToI0(n: number, x: number): number {
  const start = Math.ceil(Math.sqrt(n * n + 36 * x)) + 10;
  // Amos' bound for the ratio above the start; its error falls by the square of every ratio on the way down.
  let ratio = x / (start + 0.5 + Math.sqrt((start + 1.5) ** 2 + x * x));
  for (let k = start; k > n; k -= 1) ratio = x / (2 * k + x * ratio);
  let product = 1;
  for (let k = n; k >= 1; k -= 1) {
    ratio = x / (2 * k + x * ratio);
    product *= ratio;
  }
  return product;
}

function firstKind(n: number, x: number, scaled: boolean): number {
  if (!isOrder(n) || Number.isNaN(x)) return NaN;
  const size = Math.abs(x);
  const sign = x < 0 && n % 2 === 1 ? -1 : 1;
  if (size === 0) return n === 0 ? 1 : sign * size;
  if (size === Infinity) return sign * (scaled ? 0 : Infinity);
  if (n === 0) return i0(size, scaled);
  if (n === 1) return sign * i1(size, scaled);
  if (size * size <= 4 * (n + 1)) {
    const value = leadingTerm(n, size) * powerSeries(n, size, 1);
    return sign * (scaled ? value * Math.exp(-size) : value);
  }
  if (size > 30 && size >= n * n) {
    const value = hankelI(n, size) / (Math.sqrt(2 * Math.PI) * Math.sqrt(size));
    return sign * (scaled ? value : grown(value, size));
  }
  if (scaled || size > 700) {
    const value = ratioToI0(n, size) * i0(size, true);
    return sign * (scaled ? value : grown(value, size));
  }
  return sign * (ratioToI0(n, size) * i0(size, false));
}

/** Modified Bessel function of the first kind I_n(x); infinite where it exceeds the largest double. */
export function besselI(n: number, x: number): number {
  return firstKind(n, x, false);
}

/** e^−|x|·I_n(x), finite for every x. */
export function besselIScaled(n: number, x: number): number {
  return firstKind(n, x, true);
}

/** Upward recurrence K_(k+1) = K_(k−1) + (2k/x)·K_k (DLMF 10.29.1): every term is positive, so it is stable. */
function secondKind(n: number, x: number, scaled: boolean): number {
  if (!isOrder(n) || !(x >= 0)) return NaN;
  if (x === 0) return Infinity;
  if (x === Infinity) return 0;
  if (n === 0) return k0(x, scaled);
  if (n === 1) return k1(x, scaled);
  // The scaled functions carry the recurrence where the others would be denormal.
  const damp = !scaled && x > 600;
  let below = k0(x, scaled || damp);
  let here = k1(x, scaled || damp);
  for (let k = 1; k < n; k += 1) {
    const above = below + ((2 * k) / x) * here;
    below = here;
    here = above;
  }
  return damp ? decayed(here, x) : here;
}

/** Modified Bessel function of the second kind K_n(x): infinite at 0, NaN below. */
export function besselK(n: number, x: number): number {
  return secondKind(n, x, false);
}

/** e^x·K_n(x), above 0 for every finite x: infinite at 0, NaN below. */
export function besselKScaled(n: number, x: number): number {
  return secondKind(n, x, true);
}

/**
 * J_n for 0 < x ≤ n by Miller's downward recurrence, scaled by the larger of J_0 and J_1 (DLMF 3.6(iii)). Below the
 * turning point the wanted solution outgrows every other on the way down.
 */
function millerJ(n: number, x: number): number {
  let above = 0;
  let here = 1;
  let wanted = 0;
  for (let k = n + Math.ceil(8 * Math.cbrt(n)) + 10; k >= 1; k -= 1) {
    const below = ((2 * k) / x) * here - above;
    above = here;
    here = below;
    if (k - 1 === n) wanted = here;
    if (Math.abs(here) > 1e250) {
      here *= 1e-250;
      above *= 1e-250;
      wanted *= 1e-250;
    }
  }
  const zeroth = j0(x);
  const first = j1(x);
  return Math.abs(zeroth) > Math.abs(first) ? (wanted / here) * zeroth : (wanted / above) * first;
}

/**
 * Bessel function of the first kind J_n(x). Power series for small x, upward recurrence (DLMF 10.6.1) for x above n,
 * where it is neutrally stable, Miller's downward recurrence between.
 */
export function besselJ(n: number, x: number): number {
  if (!isOrder(n) || Number.isNaN(x)) return NaN;
  const size = Math.abs(x);
  const sign = x < 0 && n % 2 === 1 ? -1 : 1;
  if (size === 0) return n === 0 ? 1 : sign * size;
  if (n === 0) return j0(size);
  if (n === 1) return sign * j1(size);
  if (size * size <= 2 * (n + 1)) return sign * (leadingTerm(n, size) * powerSeries(n, size, -1));
  if (size <= n) return sign * millerJ(n, size);
  let below = j0(size);
  let here = j1(size);
  for (let k = 1; k < n; k += 1) {
    const above = ((2 * k) / size) * here - below;
    below = here;
    here = above;
  }
  return sign * here;
}

/** Bessel function of the second kind Y_n(x) by upward recurrence, in which it dominates: −∞ at 0, NaN below. */
export function besselY(n: number, x: number): number {
  if (!isOrder(n) || !(x >= 0)) return NaN;
  if (x === 0) return -Infinity;
  if (n === 0) return y0(x);
  let below = y0(x);
  let here = y1(x);
  for (let k = 1; k < n && here !== -Infinity; k += 1) {
    const above = ((2 * k) / x) * here - below;
    below = here;
    here = above;
  }
  return here;
}

/**
 * The m-th positive zero of J_n, m whole from 1, to about a unit in the last place: a guess by asymptotic expansions,
 * then Halley's method with the second derivative of Bessel's equation. Any other n or m gives NaN.
 */
export function besselJZero(n: number, m: number): number {
  if (!isOrder(n) || !(m >= 1) || !Number.isInteger(m)) return NaN;
  let x = zeroGuess(n, m);
  for (let step = 0; step < 10; step += 1) {
    const value = besselJ(n, x);
    const slope = (n / x) * value - besselJ(n + 1, x);
    const curvature = -slope / x - (1 - (n / x) ** 2) * value;
    const move = (2 * value * slope) / (2 * slope * slope - value * curvature);
    x -= move;
    // Convergence is cubic: after a move this small the next one is below rounding.
    if (Math.abs(move) < 1e-8 * x) return x;
  }
  return x;
}
