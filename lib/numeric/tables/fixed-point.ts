/**
 * Fixed-point numbers of 400 binary places held as whole numbers: the arithmetic under the tables of this folder. Rounding
 * is downward to the last place, about 1e-120, which leaves 50 digits and more where the series cancel most.
 */
export type Fixed = bigint;

const places = 400n;
export const one: Fixed = 1n << places;

/** A fraction of whole numbers. */
export const fromRatio = (numerator: number, denominator = 1): Fixed =>
  (BigInt(numerator) << places) / BigInt(denominator);
export const multiply = (a: Fixed, b: Fixed): Fixed => (a * b) >> places;
export const divide = (a: Fixed, b: Fixed): Fixed => (a << places) / b;
export const absolute = (a: Fixed): Fixed => (a < 0n ? -a : a);

/** The nearest double; conversion of a whole number rounds correctly and the power of two is exact. */
export const toNumber = (a: Fixed): number => Number(a) / 2 ** Number(places);

/** First term and all that follow from it, each made from the one before and its number, until one vanishes. */
export function sumSeries(first: Fixed, next: (term: Fixed, k: number) => Fixed): Fixed {
  let sum = first;
  let term = first;
  for (let k = 1; term !== 0n; k += 1) {
    term = next(term, k);
    sum += term;
  }
  return sum;
}

/** Square root of a ≥ 0 by Newton's method from above. */
export function squareRoot(a: Fixed): Fixed {
  const square = a << places;
  let root = 1n << BigInt(Math.ceil(square.toString(2).length / 2));
  for (;;) {
    const next = (root + square / root) >> 1n;
    if (next >= root) return root;
    root = next;
  }
}

/** e^a for any a: the series at a/2¹⁶, squared 16 times. */
export function exponential(a: Fixed): Fixed {
  const halvings = 16n;
  const small = a >> halvings;
  let power = sumSeries(one, (term, k) => multiply(term, small) / BigInt(k));
  for (let step = 0n; step < halvings; step += 1n) power = multiply(power, power);
  return power;
}

/** Σ signᵏ·q^(2k+1)/(2k+1) at q = 1/n: arctan q with alternating signs, artanh q without. */
function inverseSeries(n: bigint, sign: 1n | -1n): Fixed {
  let power = one / n;
  let sum = power;
  for (let k = 1n; power !== 0n; k += 1n) {
    power = (sign * power) / (n * n);
    sum += power / (2n * k + 1n);
  }
  return sum;
}

/** J. Machin's formula: π/4 = 4·arctan 1/5 − arctan 1/239. */
export const pi: Fixed = 16n * inverseSeries(5n, -1n) - 4n * inverseSeries(239n, -1n);

/** ln a for a > 0: a power of two is taken off, then 2·artanh((m − 1)/(m + 1)) summed. */
export function logarithm(a: Fixed): Fixed {
  const exponent = BigInt(a.toString(2).length) - places - 1n;
  const mantissa = exponent >= 0n ? a >> exponent : a << -exponent;
  const q = divide(mantissa - one, mantissa + one);
  const square = multiply(q, q);
  let power = q;
  let sum = q;
  for (let k = 3n; power !== 0n; k += 2n) {
    power = multiply(power, square);
    sum += power / k;
  }
  return 2n * sum + exponent * 2n * inverseSeries(3n, 1n);
}

/** Cosine and sine by their series after whole turns are taken off. */
export function cosineAndSine(a: Fixed): readonly [Fixed, Fixed] {
  const angle = a % (2n * pi);
  const square = multiply(angle, angle);
  return [
    sumSeries(one, (term, k) => -multiply(term, square) / BigInt((2 * k - 1) * 2 * k)),
    sumSeries(angle, (term, k) => -multiply(term, square) / BigInt(2 * k * (2 * k + 1))),
  ];
}

/** Euler's constant by R. P. Brent and E. M. McMillan, Math. Comp. 34 (1980) 305, algorithm B1; its error is e^(−4n). */
export function eulerConstant(): Fixed {
  const n = 80;
  let term = one;
  let sum = one;
  let harmonic = 0n;
  let weighted = 0n;
  for (let k = 1; term !== 0n; k += 1) {
    term = (term * BigInt(n * n)) / BigInt(k * k);
    harmonic += fromRatio(1, k);
    sum += term;
    weighted += multiply(term, harmonic);
  }
  return divide(weighted, sum) - logarithm(fromRatio(n));
}
