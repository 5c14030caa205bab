import { inWords, NumericFault } from "./fault";

export interface Root {
  readonly x: number;
  readonly fx: number;
  /** Steps taken, each one evaluation. */
  readonly iterations: number;
}

export interface RootOptions {
  /** Width of the last bracket relative to x; by default, and at least, a few units in the last place. */
  readonly relTol?: number;
  readonly absTol?: number;
  readonly maxIterations?: number;
}

/** A zero nearer to 0 than this part of the interval's larger end is 0: bisection does not go on to the denormals. */
const negligible = 1e-40;
/** Residuals below this part of the larger end need no proof that they belong to a zero. */
const clearZero = 1e-9;
/** Distance, in final brackets, at which a zero, a jump and a pole are told apart. */
const probeReach = 1e8;
/** Growth of |f| over that distance that makes a zero, and its reciprocal a pole; between them it is a jump. */
const probeGrowth = 1.5;

/**
 * Zero of f in [lo, hi], lo ≤ hi, by Brent's method (R. P. Brent, Algorithms for Minimization without Derivatives, 1973,
 * ch. 4): inverse quadratic interpolation and secant steps, kept within a bracket by bisection, down to a few units in the
 * last place. An end that is exactly zero is the answer; an infinite value counts by its sign.
 * Throws NumericFault `no-sign-change` (with lo, hi, atLo, atHi), `pole` when the sign changes where |f| grows without
 * bound, `not-converged` when it changes by a jump or the steps run out, `not-finite` when f is not a number.
 */
export function brent(f: (x: number) => number, lo: number, hi: number, options: RootOptions = {}): Root {
  const { relTol = 0, absTol = 0, maxIterations = 2500 } = options;
  const atLo = judged(f, lo);
  if (atLo === 0) return { x: lo, fx: 0, iterations: 0 };
  const atHi = judged(f, hi);
  if (atHi === 0) return { x: hi, fx: 0, iterations: 0 };
  if (atLo > 0 === atHi > 0) {
    throw new NumericFault(
      "no-sign-change",
      `The values at both ends have the same sign: ${inWords(atLo)} at ${inWords(lo)} and ${inWords(atHi)} at ${inWords(hi)}.`,
      { lo, hi, atLo, atHi },
    );
  }
  // b is the best point, a the one before it, c the other end of the bracket.
  let a = lo;
  let fa = atLo;
  let b = hi;
  let fb = atHi;
  let c = lo;
  let fc = atLo;
  let step = b - a;
  let before = step;
  const floor = negligible * Math.max(Math.abs(lo), Math.abs(hi)) + 0.5 * absTol + Number.MIN_VALUE;
  for (let iteration = 1; iteration <= maxIterations; iteration += 1) {
    if (Math.abs(fc) < Math.abs(fb)) {
      a = b;
      fa = fb;
      b = c;
      fb = fc;
      c = a;
      fc = fa;
    }
    const tolerance = (2 * Number.EPSILON + 0.5 * relTol) * Math.abs(b) + floor;
    const half = 0.5 * c - 0.5 * b;
    if (fb === 0) return { x: b, fx: 0, iterations: iteration - 1 };
    if (Math.abs(half) <= tolerance) {
      if (!(Math.abs(fb) <= clearZero * largestFinite(atLo, atHi)))
        requireZero(f, lo, hi, b, Math.abs(fb), tolerance);
      return { x: b, fx: fb, iterations: iteration - 1 };
    }
    // An infinite value has no slope to follow.
    const smooth = Math.abs(fa) < Infinity && Math.abs(fc) < Infinity;
    let next = half;
    if (smooth && Math.abs(before) >= tolerance && Math.abs(fa) > Math.abs(fb)) {
      const s = fb / fa;
      let p: number;
      let q: number;
      if (a === c) {
        p = 2 * half * s;
        q = 1 - s;
      } else {
        const r = fb / fc;
        q = fa / fc;
        p = s * (2 * half * q * (q - r) - (b - a) * (r - 1));
        q = (q - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      else p = -p;
      if (2 * p < Math.min(3 * half * q - Math.abs(tolerance * q), Math.abs(before * q))) next = p / q;
    }
    before = next === half ? half : step;
    step = next;
    a = b;
    fa = fb;
    b += Math.abs(step) > tolerance ? step : half > 0 ? tolerance : -tolerance;
    fb = judged(f, b);
    if (fb > 0 === fc > 0) {
      c = a;
      fc = fa;
      step = b - a;
      before = step;
    }
  }
  throw new NumericFault(
    "not-converged",
    `No zero was found within ${maxIterations} steps; the last value is ${inWords(fb)} at ${inWords(b)}.`,
    { x: b, fx: fb },
  );
}

/**
 * A bracket has closed on x with a residual that is not small. Going away from a zero |f| rises, from a jump it stays,
 * from a pole it falls.
 */
function requireZero(
  f: (x: number) => number,
  lo: number,
  hi: number,
  x: number,
  residual: number,
  tolerance: number,
): void {
  const reach = Math.min(probeReach * tolerance, 0.5 * hi - 0.5 * lo);
  // One of the two lies within the interval; the other says nothing where it does not.
  const left = x - reach >= lo ? Math.abs(judged(f, x - reach)) : Infinity;
  const right = x + reach <= hi ? Math.abs(judged(f, x + reach)) : Infinity;
  const away = Math.min(left, right);
  if (residual === Infinity || away * probeGrowth < residual)
    throw new NumericFault("pole", `The sign changes through a pole near ${inWords(x)}.`, { x });
  if (away < residual * probeGrowth)
    throw new NumericFault(
      "not-converged",
      `The value jumps over zero near ${inWords(x)} without meeting it.`,
      {
        x,
        residual,
      },
    );
}

/** The larger of two sizes; 0 where both are infinite. */
function largestFinite(a: number, b: number): number {
  const left = Math.abs(a);
  const right = Math.abs(b);
  return Math.max(left < Infinity ? left : 0, right < Infinity ? right : 0);
}

function judged(f: (x: number) => number, x: number): number {
  const value = f(x);
  if (value !== value)
    throw new NumericFault("not-finite", `The value at ${inWords(x)} is not a number.`, { x });
  return value;
}
