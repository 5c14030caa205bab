/** A curve through points, with exact integral and slope. */
export interface Interpolator {
  /** Value at x; at a point exactly the point's. Beyond the ends the first or last piece goes on. */
  value(x: number): number;
  /** Exact integral of the curve from a to b, signed; its error is that of rounding, also over short intervals. */
  integral(a: number, b: number): number;
  /** Slope at x; at a knot of a broken line that of the piece to its right. */
  slope(x: number): number;
}

/** Cubics y = y_i + t·(b_i + t·(c_i + t·d_i)) in t = x − x_i, one between each two points. */
class PiecewiseCubic implements Interpolator {
  /** Integral over each piece. */
  private readonly whole: Float64Array;

  constructor(
    private readonly xs: Float64Array,
    private readonly ys: Float64Array,
    private readonly b: Float64Array,
    private readonly c: Float64Array,
    private readonly d: Float64Array,
  ) {
    this.whole = b.map((_, index) => this.within(index, xs[index]!, xs[index + 1]!));
  }

  /** Index of the piece that holds x; the first or the last one for an x beyond the ends. */
  private piece(x: number): number {
    let low = 0;
    let high = this.xs.length - 2;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (this.xs[middle]! <= x) low = middle;
      else high = middle - 1;
    }
    return low;
  }

  private at(index: number, x: number): number {
    // The cubic meets its right end by rounding only.
    if (x === this.xs[index + 1]) return this.ys[index + 1]!;
    const t = x - this.xs[index]!;
    return this.ys[index]! + t * (this.b[index]! + t * (this.c[index]! + t * this.d[index]!));
  }

  /** Integral of one piece: Simpson's rule, exact for cubics and without the cancellation of an antiderivative. */
  private within(index: number, from: number, to: number): number {
    const middle = from + (to - from) / 2;
    return ((to - from) / 6) * (this.at(index, from) + 4 * this.at(index, middle) + this.at(index, to));
  }

  value(x: number): number {
    return this.at(this.piece(x), x);
  }

  integral(a: number, b: number): number {
    if (a > b) return -this.integral(b, a);
    const first = this.piece(a);
    const last = this.piece(b);
    if (first === last) return this.within(first, a, b);
    let sum = this.within(first, a, this.xs[first + 1]!);
    for (let index = first + 1; index < last; index += 1) sum += this.whole[index]!;
    return sum + this.within(last, this.xs[last]!, b);
  }

  slope(x: number): number {
    const index = this.piece(x);
    const t = x - this.xs[index]!;
    return this.b[index]! + t * (2 * this.c[index]! + 3 * t * this.d[index]!);
  }
}

function requirePoints(xs: readonly number[], ys: readonly number[]): void {
  if (xs.length !== ys.length || xs.length < 2)
    throw new RangeError(
      `Interpolation needs at least two points and as many x as y, not ${xs.length} x and ${ys.length} y.`,
    );
  xs.forEach((x, index) => {
    if (!Number.isFinite(x) || !Number.isFinite(ys[index]))
      throw new RangeError(`Point ${index + 1} (${x}, ${ys[index]}) of an interpolation is not finite.`);
    if (index > 0 && !(x > xs[index - 1]!))
      throw new RangeError(`The x of interpolation points must rise: ${x} follows ${xs[index - 1]}.`);
  });
}

/** Slopes of the chords and widths between neighbouring points. */
function chords(xs: readonly number[], ys: readonly number[]) {
  const widths = Float64Array.from({ length: xs.length - 1 }, (_, i) => xs[i + 1]! - xs[i]!);
  return { widths, slopes: widths.map((width, i) => (ys[i + 1]! - ys[i]!) / width) };
}

/** Straight lines between points with rising x. Throws RangeError on points that are no curve. */
export function linearInterpolator(xs: readonly number[], ys: readonly number[]): Interpolator {
  requirePoints(xs, ys);
  const { slopes } = chords(xs, ys);
  const zero = new Float64Array(slopes.length);
  return new PiecewiseCubic(Float64Array.from(xs), Float64Array.from(ys), slopes, zero, zero);
}

/**
 * Monotone cubic through points with rising x: slopes by the weighted harmonic mean of F. N. Fritsch and J. Butland,
 * SIAM J. Sci. Stat. Comput. 5 (1984) 300, within the region that F. N. Fritsch and R. E. Carlson, SIAM J. Numer. Anal.
 * 17 (1980) 238, show to be monotone; ends by the three-point formula kept within it. The curve has no extremum that the
 * points do not have. Throws RangeError on points that are no curve.
 */
export function monotoneCubic(xs: readonly number[], ys: readonly number[]): Interpolator {
  requirePoints(xs, ys);
  if (xs.length === 2) return linearInterpolator(xs, ys);
  const { widths: h, slopes: delta } = chords(xs, ys);
  const n = xs.length;
  const m = new Float64Array(n);
  for (let i = 1; i < n - 1; i += 1) {
    const left = delta[i - 1]!;
    const right = delta[i]!;
    if (Math.sign(left) * Math.sign(right) <= 0) continue;
    const leftWeight = 2 * h[i]! + h[i - 1]!;
    const rightWeight = h[i]! + 2 * h[i - 1]!;
    m[i] = (leftWeight + rightWeight) / (leftWeight / left + rightWeight / right);
  }
  m[0] = endSlope(h[0]!, h[1]!, delta[0]!, delta[1]!);
  m[n - 1] = endSlope(h[n - 2]!, h[n - 3]!, delta[n - 2]!, delta[n - 3]!);
  return new PiecewiseCubic(
    Float64Array.from(xs),
    Float64Array.from(ys),
    m.slice(0, n - 1),
    h.map((width, i) => (3 * delta[i]! - 2 * m[i]! - m[i + 1]!) / width),
    h.map((width, i) => (m[i]! + m[i + 1]! - 2 * delta[i]!) / width / width),
  );
}

/** Slope at an end from its chord and the next one, without leaving the monotone region. */
function endSlope(width: number, nextWidth: number, chord: number, nextChord: number): number {
  const slope = ((2 * width + nextWidth) * chord - width * nextChord) / (width + nextWidth);
  if (Math.sign(slope) !== Math.sign(chord)) return 0;
  const turns = Math.sign(chord) !== Math.sign(nextChord);
  return turns && Math.abs(slope) > 3 * Math.abs(chord) ? 3 * chord : slope;
}
