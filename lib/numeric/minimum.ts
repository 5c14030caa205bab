import { inWords, NumericFault } from "./fault";

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

/** Values that differ by rounding only count as equal, so that of equal minima the smallest x is answered. */
const equalTo = (least: number): number => least + 4 * Number.EPSILON * Math.abs(least);

/**
 * Smallest value of f on [lo, hi], lo ≤ hi: a scan finds every valley that its steps can see, Brent's minimiser (parabolic
 * steps with golden sections, Brent 1973, ch. 5) refines each, and both ends take part. Of equal minima the smallest x; of
 * a level stretch its left end. x is known to about 1e-8 of itself, as far as values near a minimum can tell.
 * A value of +∞ is no minimum. Throws NumericFault `not-finite` where f is NaN or −∞, or nowhere finite.
 */
export function globalMinimum(
  f: (x: number) => number,
  lo: number,
  hi: number,
  options: MinimumOptions = {},
): Minimum {
  const { points = 129, relTol = 1e-10 } = options;
  if (lo === hi) return finite({ x: lo, fx: judged(f, lo) });
  const xs = Float64Array.from({ length: points }, (_, index) =>
    index === points - 1 ? hi : lo + (hi - lo) * (index / (points - 1)),
  );
  const fs = xs.map((x) => judged(f, x));
  const candidates: Minimum[] = [];
  for (let index = 0; index < points; index += 1) {
    const here = fs[index]!;
    const before = index === 0 ? Infinity : fs[index - 1]!;
    const after = index === points - 1 ? Infinity : fs[index + 1]!;
    if (here > before || here > after || here === Infinity) continue;
    candidates.push({ x: xs[index]!, fx: here });
    // Inside a level stretch there is no valley to go down.
    if (here === before && here === after) continue;
    const from = xs[Math.max(0, index - 1)]!;
    const to = xs[Math.min(points - 1, index + 1)]!;
    candidates.push(valley(f, from, to, relTol * (hi - lo)));
  }
  const limit = equalTo(candidates.reduce((least, { fx }) => Math.min(least, fx), Infinity));
  const best = candidates.reduce<Minimum>(
    (found, candidate) => (candidate.fx <= limit && candidate.x < found.x ? candidate : found),
    { x: Infinity, fx: Infinity },
  );
  return leftEnd(f, xs, fs, finite(best), limit);
}

/** Left end of the level stretch that x lies in; x itself where the function rises on its left. */
function leftEnd(
  f: (x: number) => number,
  xs: Float64Array,
  fs: Float64Array,
  best: Minimum,
  limit: number,
): Minimum {
  const lo = xs[0]!;
  const near = best.x - 1e-4 * (xs[1]! - lo);
  if (!(near > lo) || judged(f, near) > limit) return best;
  let outside = lo;
  xs.forEach((x, index) => {
    if (x < near && fs[index]! > limit) outside = x;
  });
  let inside = near;
  for (let step = 0; step < 200; step += 1) {
    const middle = outside + 0.5 * (inside - outside);
    if (middle <= outside || middle >= inside) break;
    if (judged(f, middle) <= limit) inside = middle;
    else outside = middle;
  }
  return { x: inside, fx: judged(f, inside) };
}

function finite(minimum: Minimum): Minimum {
  if (minimum.fx === Infinity)
    throw new NumericFault("not-finite", "The value is finite nowhere in the interval.", {});
  return minimum;
}

function judged(f: (x: number) => number, x: number): number {
  const value = f(x);
  if (!(value > -Infinity))
    throw new NumericFault(
      "not-finite",
      `The value at ${inWords(x)} is ${inWords(value)}, so there is no minimum.`,
      { x },
    );
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
