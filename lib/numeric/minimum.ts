import { NumericFault } from "./fault";

export interface Minimum {
  readonly x: number;
  readonly fx: number;
}

export interface MinimumOptions {
  /** Points of the scan, both ends included. */
  readonly points?: number;
  /** Accuracy of x relative to the interval. */
  readonly relTol?: number;
}

const golden = (3 - Math.sqrt(5)) / 2;

/**
 * Smallest value of f on [lo, hi]: a scan finds every valley that its steps can see, Brent's minimiser (parabolic steps
 * with golden sections, Brent 1973, ch. 5) refines each, and both ends take part. Of equal minima the smallest x.
 * Throws NumericFault `not-finite` when f is NaN or infinite at a point of the scan.
 */
export function globalMinimum(
  f: (x: number) => number,
  lo: number,
  hi: number,
  options: MinimumOptions = {},
): Minimum {
  const { points = 129, relTol = 1e-10 } = options;
  if (lo === hi) return { x: lo, fx: judged(f, lo) };
  const xs = Array.from({ length: points }, (_, index) =>
    index === points - 1 ? hi : lo + ((hi - lo) * index) / (points - 1),
  );
  const fs = xs.map((x) => judged(f, x));
  const candidates: Minimum[] = [
    { x: lo, fx: fs[0] as number },
    { x: hi, fx: fs[points - 1] as number },
  ];
  for (let index = 0; index < points; index += 1) {
    const here = fs[index] as number;
    const before = index === 0 ? here : (fs[index - 1] as number);
    const after = index === points - 1 ? here : (fs[index + 1] as number);
    if (here > before || here > after || (here === before && here === after)) continue;
    candidates.push(
      valley(
        f,
        xs[Math.max(0, index - 1)] as number,
        xs[Math.min(points - 1, index + 1)] as number,
        relTol * (hi - lo),
      ),
    );
    candidates.push({ x: xs[index] as number, fx: here });
  }
  // Values that differ by rounding only count as equal, so that the smallest x of a flat stretch is answered.
  const least = Math.min(...candidates.map((candidate) => candidate.fx));
  const equal = candidates.filter(
    (candidate) => candidate.fx - least <= 4 * Number.EPSILON * Math.abs(least),
  );
  return equal.reduce((best, candidate) => (candidate.x < best.x ? candidate : best));
}

function judged(f: (x: number) => number, x: number): number {
  const value = f(x);
  if (!Number.isFinite(value))
    throw new NumericFault("not-finite", `The value at ${x} is not finite.`, { x });
  return value;
}

/** One valley within [from, to] to an accuracy of x. */
function valley(f: (x: number) => number, from: number, to: number, accuracy: number): Minimum {
  let a = from;
  let b = to;
  let x = a + golden * (b - a);
  let w = x;
  let v = x;
  let fx = judged(f, x);
  let fw = fx;
  let fv = fx;
  let d = 0;
  let e = 0;
  for (let iteration = 0; iteration < 200; iteration += 1) {
    const middle = 0.5 * (a + b);
    const tolerance = 1e-9 * Math.abs(x) + accuracy;
    if (Math.abs(x - middle) <= 2 * tolerance - 0.5 * (b - a)) break;
    let parabolic = false;
    if (Math.abs(e) > tolerance) {
      const r = (x - w) * (fx - fv);
      let q = (x - v) * (fx - fw);
      let p = (x - v) * q - (x - w) * r;
      q = 2 * (q - r);
      if (q > 0) p = -p;
      else q = -q;
      const earlier = e;
      if (Math.abs(p) < Math.abs(0.5 * q * earlier) && p > q * (a - x) && p < q * (b - x)) {
        e = d;
        d = p / q;
        const u = x + d;
        if (u - a < 2 * tolerance || b - u < 2 * tolerance) d = x < middle ? tolerance : -tolerance;
        parabolic = true;
      }
    }
    if (!parabolic) {
      e = x < middle ? b - x : a - x;
      d = golden * e;
    }
    const u = x + (Math.abs(d) >= tolerance ? d : d > 0 ? tolerance : -tolerance);
    const fu = judged(f, u);
    if (fu <= fx) {
      if (u < x) b = x;
      else a = x;
      [v, w, x] = [w, x, u];
      [fv, fw, fx] = [fw, fx, fu];
    } else {
      if (u < x) a = u;
      else b = u;
      if (fu <= fw || w === x) {
        [v, w] = [w, u];
        [fv, fw] = [fw, fu];
      } else if (fu <= fv || v === x || v === w) {
        v = u;
        fv = fu;
      }
    }
  }
  return { x, fx };
}
