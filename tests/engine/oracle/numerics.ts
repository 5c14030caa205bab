/**
 * Plain numerical methods of the oracle, sharing nothing with lib/numeric: slow, and accurate enough to judge it
 * (about 1e-11 of the value or of the largest term).
 */

/** Root by bisection down to neighbouring doubles; null when the ends have one sign. */
export function bisect(f: (x: number) => number, lower: number, upper: number): number | null {
  const atLower = f(lower);
  if (atLower === 0) return lower;
  const atUpper = f(upper);
  if (atUpper === 0) return upper;
  if (!(atLower < 0 !== atUpper < 0)) return null;
  let [a, b] = [lower, upper];
  for (let step = 0; step < 2000; step++) {
    const middle = a + (b - a) / 2;
    if (middle <= a || middle >= b) break;
    const value = f(middle);
    if (value === 0) return middle;
    if (value < 0 === atLower < 0) a = middle;
    else b = middle;
  }
  return Math.abs(f(a)) < Math.abs(f(b)) ? a : b;
}

/** Smallest value on a dense scan, refined by golden section between the neighbours of the best point. */
export function scanMinimum(f: (x: number) => number, lower: number, upper: number): number {
  const points = 60;
  let best = lower;
  let least = f(lower);
  for (let i = 1; i <= points; i++) {
    const x = i === points ? upper : lower + ((upper - lower) * i) / points;
    const value = f(x);
    if (value < least) [best, least] = [x, value];
  }
  const step = (upper - lower) / points;
  let [a, b] = [Math.max(lower, best - step), Math.min(upper, best + step)];
  const golden = (Math.sqrt(5) - 1) / 2;
  for (let i = 0; i < 45; i++) {
    const [c, d] = [b - golden * (b - a), a + golden * (b - a)];
    if (f(c) <= f(d)) b = d;
    else a = c;
  }
  const middle = (a + b) / 2;
  return f(middle) < least ? middle : best;
}

/** Romberg's scheme on trapezoids of up to 128 panels, for smooth integrands. */
export function romberg(f: (x: number) => number, lower: number, upper: number, levels = 7): number {
  let row = [((f(lower) + f(upper)) * (upper - lower)) / 2];
  for (let level = 1; level <= levels; level++) {
    const h = (upper - lower) / 2 ** level;
    let middle = 0;
    for (let i = 1; i < 2 ** level; i += 2) middle += f(lower + i * h);
    const next = [row[0]! / 2 + h * middle];
    for (let k = 1; k <= level; k++) {
      next.push(next[k - 1]! + (next[k - 1]! - row[k - 1]!) / (4 ** k - 1));
    }
    row = next;
  }
  return row.at(-1)!;
}

function trapezoid(f: (x: number) => number, lower: number, upper: number, panels: number): number {
  const h = (upper - lower) / panels;
  let sum = (f(lower) + f(upper)) / 2;
  for (let i = 1; i < panels; i++) sum += f(lower + i * h);
  return sum * h;
}

const panelsFor = (x: number): number => 60 + Math.ceil(2 * Math.abs(x));

/** Integrals of periodic functions converge faster than any power by the trapezoid rule. */
export const besselJ = (n: number, x: number): number =>
  trapezoid((t) => Math.cos(n * t - x * Math.sin(t)), 0, Math.PI, panelsFor(x)) / Math.PI;

export const besselIScaled = (n: number, x: number): number =>
  trapezoid((t) => Math.exp(x * Math.cos(t) - Math.abs(x)) * Math.cos(n * t), 0, Math.PI, panelsFor(x)) /
  Math.PI;

export const besselI = (n: number, x: number): number => besselIScaled(n, x) * Math.exp(Math.abs(x));

export const besselKScaled = (n: number, x: number): number =>
  trapezoid((t) => Math.exp(x - x * Math.cosh(t)) * Math.cosh(n * t), 0, Math.acosh(1 + 800 / x), 500);

export const besselK = (n: number, x: number): number => besselKScaled(n, x) * Math.exp(-x);

/** Schläfli's integral; only for x of ordinary size. */
export function besselY(n: number, x: number): number {
  const first = romberg((t) => Math.sin(x * Math.sin(t) - n * t), 0, Math.PI, 12);
  const sign = n % 2 === 0 ? 1 : -1;
  const tail = (t: number): number =>
    (Math.exp(n * t) + sign * Math.exp(-n * t)) * Math.exp(-x * Math.sinh(t));
  return (first - romberg(tail, 0, Math.asinh(800 / x), 14)) / Math.PI;
}

/** The m-th sign change of J_n on a fine walk, by bisection. */
export function besselJZero(n: number, m: number): number {
  const step = 0.1;
  let found = 0;
  for (let x = step; ; x += step) {
    if (besselJ(n, x) < 0 !== besselJ(n, x + step) < 0 && ++found === m) {
      return bisect((u) => besselJ(n, u), x, x + step) ?? NaN;
    }
  }
}

/** exp(x²)·erfc(x): its integral over exp(−x²t²)/(1 + t²) for x > 0. */
export function erfcx(x: number): number {
  if (x < 0) return 2 * Math.exp(x * x) - erfcx(-x);
  if (x < 2) return Math.exp(x * x) * (1 - erf(x));
  // Continued fraction, evaluated from far inside.
  let tail = 0;
  for (let k = 200; k >= 1; k--) tail = k / 2 / (x + tail);
  return 1 / (Math.sqrt(Math.PI) * (x + tail));
}

export function erf(x: number): number {
  if (Math.abs(x) > 3) return Math.sign(x) * (1 - Math.exp(-x * x) * erfcx(Math.abs(x)));
  let [sum, term] = [x, x];
  for (let n = 1; n < 200; n++) {
    term *= (-x * x) / n;
    sum += term / (2 * n + 1);
  }
  return (2 / Math.sqrt(Math.PI)) * sum;
}

export const erfc = (x: number): number => (x < 2 ? 1 - erf(x) : Math.exp(-x * x) * erfcx(x));
