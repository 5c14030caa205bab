/** A curve through points, with exact integral and slope. */
export interface Interpolator {
  /** Value at x within the points' range. */
  value(x: number): number;
  /** Exact integral of the curve from a to b (signed). */
  integral(a: number, b: number): number;
  /** Slope at x; at a knot of a broken line that of the segment to its right. */
  slope(x: number): number;
}

/** Index of the segment that holds x; the first or the last one for an x beyond the ends. */
function segment(xs: readonly number[], x: number): number {
  let low = 0;
  let high = xs.length - 2;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((xs[middle] as number) <= x) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** Cubic of each segment in t = x − x_i: y = y_i + t·(b + t·(c + t·d)). */
interface Pieces {
  readonly b: readonly number[];
  readonly c: readonly number[];
  readonly d: readonly number[];
}

function fromPieces(xs: readonly number[], ys: readonly number[], { b, c, d }: Pieces): Interpolator {
  const antiderivative = (index: number, t: number) =>
    t *
    ((ys[index] as number) +
      t * ((b[index] as number) / 2 + t * ((c[index] as number) / 3 + (t * (d[index] as number)) / 4)));
  const before = [0];
  for (let index = 0; index + 1 < xs.length; index += 1) {
    before.push(
      (before[index] as number) + antiderivative(index, (xs[index + 1] as number) - (xs[index] as number)),
    );
  }
  const upTo = (x: number) => {
    const index = segment(xs, x);
    return (before[index] as number) + antiderivative(index, x - (xs[index] as number));
  };
  return {
    value(x) {
      const index = segment(xs, x);
      const t = x - (xs[index] as number);
      return (
        (ys[index] as number) +
        t * ((b[index] as number) + t * ((c[index] as number) + t * (d[index] as number)))
      );
    },
    integral(from, to) {
      const first = segment(xs, from);
      // Within one segment the difference is taken there, so that a short interval keeps its digits.
      if (first === segment(xs, to)) {
        const origin = xs[first] as number;
        return antiderivative(first, to - origin) - antiderivative(first, from - origin);
      }
      return upTo(to) - upTo(from);
    },
    slope(x) {
      const index = segment(xs, x);
      const t = x - (xs[index] as number);
      return (b[index] as number) + t * (2 * (c[index] as number) + 3 * t * (d[index] as number));
    },
  };
}

function requirePoints(xs: readonly number[], ys: readonly number[]): void {
  if (xs.length !== ys.length || xs.length < 2)
    throw new RangeError("Interpolation needs at least two points, as many x as y.");
  for (let index = 1; index < xs.length; index += 1) {
    if (!((xs[index] as number) > (xs[index - 1] as number)))
      throw new RangeError("The x of interpolation points must rise.");
  }
}

/** Straight lines between points with rising x. */
export function linearInterpolator(xs: readonly number[], ys: readonly number[]): Interpolator {
  requirePoints(xs, ys);
  const b = xs
    .slice(1)
    .map((x, index) => ((ys[index + 1] as number) - (ys[index] as number)) / (x - (xs[index] as number)));
  const zero = b.map(() => 0);
  return fromPieces(xs, ys, { b, c: zero, d: zero });
}

/**
 * Monotone cubic through points with rising x: slopes by the weighted harmonic mean of F. N. Fritsch and J. Butland,
 * SIAM J. Sci. Stat. Comput. 5 (1984) 300, ends by the three-point formula kept within the monotone region. It makes
 * no extremum that the points do not have.
 */
export function monotoneCubic(xs: readonly number[], ys: readonly number[]): Interpolator {
  requirePoints(xs, ys);
  const n = xs.length;
  const h = xs.slice(1).map((x, index) => x - (xs[index] as number));
  const delta = h.map((width, index) => ((ys[index + 1] as number) - (ys[index] as number)) / width);
  if (n === 2) return linearInterpolator(xs, ys);
  const m = new Array<number>(n).fill(0);
  for (let index = 1; index + 1 < n; index += 1) {
    const left = delta[index - 1] as number;
    const right = delta[index] as number;
    if (left * right <= 0) continue;
    const w1 = 2 * (h[index] as number) + (h[index - 1] as number);
    const w2 = (h[index] as number) + 2 * (h[index - 1] as number);
    m[index] = (w1 + w2) / (w1 / left + w2 / right);
  }
  m[0] = endSlope(h[0] as number, h[1] as number, delta[0] as number, delta[1] as number);
  m[n - 1] = endSlope(h[n - 2] as number, h[n - 3] as number, delta[n - 2] as number, delta[n - 3] as number);
  const c = h.map(
    (width, index) =>
      (3 * (delta[index] as number) - 2 * (m[index] as number) - (m[index + 1] as number)) / width,
  );
  const d = h.map(
    (width, index) =>
      ((m[index] as number) + (m[index + 1] as number) - 2 * (delta[index] as number)) / width ** 2,
  );
  return fromPieces(xs, ys, { b: m.slice(0, n - 1), c, d });
}

function endSlope(h0: number, h1: number, delta0: number, delta1: number): number {
  const slope = ((2 * h0 + h1) * delta0 - h0 * delta1) / (h0 + h1);
  if (slope * delta0 <= 0) return 0;
  if (delta0 * delta1 <= 0 && Math.abs(slope) > 3 * Math.abs(delta0)) return 3 * delta0;
  return slope;
}
