import { NumericFault } from "./fault";

export interface Root {
  readonly x: number;
  readonly fx: number;
  readonly iterations: number;
}

export interface RootOptions {
  /** Width of the last bracket relative to x; below 4 ulp it has no effect. */
  readonly relTol?: number;
  readonly absTol?: number;
  readonly maxIterations?: number;
}

/**
 * Zero of f in [lo, hi] by Brent's method (R. P. Brent, Algorithms for Minimization without Derivatives, 1973, ch. 4):
 * inverse quadratic interpolation and secant steps, kept within a bracket by bisection. An end that is exactly zero is
 * the answer. A change of sign through a pole is told from a zero: |f| at the end of the search is then larger than at
 * the ends of the interval. Throws NumericFault `no-sign-change`, `pole`, `not-finite`, `not-converged`.
 */
export function brent(f: (x: number) => number, lo: number, hi: number, options: RootOptions = {}): Root {
  const { relTol = 0, absTol = 0, maxIterations = 300 } = options;
  let a = lo;
  let b = hi;
  let fa = f(a);
  if (fa === 0) return { x: a, fx: 0, iterations: 0 };
  let fb = f(b);
  if (fb === 0) return { x: b, fx: 0, iterations: 0 };
  if (Number.isNaN(fa) || Number.isNaN(fb)) throw notFinite(Number.isNaN(fa) ? a : b);
  if (fa > 0 === fb > 0) {
    throw new NumericFault("no-sign-change", `The values at ${lo} and ${hi} have the same sign.`, {
      lo,
      hi,
      atLo: fa,
      atHi: fb,
    });
  }
  const largest = Math.max(Math.abs(fa), Math.abs(fb));
  let c = a;
  let fc = fa;
  let d = b - a;
  let e = d;
  for (let iteration = 1; iteration <= maxIterations; iteration += 1) {
    if (Math.abs(fc) < Math.abs(fb)) {
      [a, b, c] = [b, c, b];
      [fa, fb, fc] = [fb, fc, fb];
    }
    const tolerance =
      2 * Number.EPSILON * Math.abs(b) + 0.5 * (absTol + relTol * Math.abs(b)) + Number.MIN_VALUE;
    const half = 0.5 * (c - b);
    if (Math.abs(half) <= tolerance || fb === 0) {
      if (Math.abs(fb) > largest && Math.abs(fb) > 1e3 * Number.MIN_VALUE) {
        throw new NumericFault("pole", `The sign changes through a pole near ${b}.`, { x: b, fx: fb });
      }
      return { x: b, fx: fb, iterations: iteration };
    }
    if (Math.abs(e) >= tolerance && Math.abs(fa) > Math.abs(fb)) {
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
      if (2 * p < Math.min(3 * half * q - Math.abs(tolerance * q), Math.abs(e * q))) {
        e = d;
        d = p / q;
      } else {
        d = half;
        e = half;
      }
    } else {
      d = half;
      e = half;
    }
    a = b;
    fa = fb;
    b += Math.abs(d) > tolerance ? d : half > 0 ? tolerance : -tolerance;
    fb = f(b);
    if (Number.isNaN(fb)) throw notFinite(b);
    if (fb > 0 === fc > 0) {
      c = a;
      fc = fa;
      d = b - a;
      e = d;
    }
  }
  throw new NumericFault("not-converged", `No zero was found within ${maxIterations} steps.`, {
    x: b,
    fx: fb,
  });
}

function notFinite(x: number): NumericFault {
  return new NumericFault("not-finite", `The value at ${x} is not a number.`, { x });
}
