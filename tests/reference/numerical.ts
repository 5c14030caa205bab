/** Plain numerical methods for the tests, sharing no code with the product. */

/** Solves a tridiagonal system: `lower[i]` couples row i to i − 1, `upper[i]` to i + 1. */
export function tridiagonal(
  lower: readonly number[],
  diagonal: readonly number[],
  upper: readonly number[],
  right: readonly number[],
): number[] {
  const n = diagonal.length;
  const c: number[] = [];
  const d: number[] = [];
  for (let i = 0; i < n; i += 1) {
    const below = i === 0 ? 0 : lower[i]!;
    const pivot = diagonal[i]! - below * (c[i - 1] ?? 0);
    c.push(upper[i]! / pivot);
    d.push((right[i]! - below * (d[i - 1] ?? 0)) / pivot);
  }
  for (let i = n - 2; i >= 0; i -= 1) d[i] = d[i]! - c[i]! * d[i + 1]!;
  return d;
}

/** Gauss elimination with partial pivoting. */
export function solve(matrix: readonly (readonly number[])[], right: readonly number[]): number[] {
  const rows = matrix.map((row, i) => [...row, right[i]!]);
  const n = rows.length;
  for (let k = 0; k < n; k += 1) {
    let best = k;
    for (let i = k + 1; i < n; i += 1) if (Math.abs(rows[i]![k]!) > Math.abs(rows[best]![k]!)) best = i;
    [rows[k], rows[best]] = [rows[best]!, rows[k]!];
    for (let i = k + 1; i < n; i += 1) {
      const factor = rows[i]![k]! / rows[k]![k]!;
      for (let j = k; j <= n; j += 1) rows[i]![j] = rows[i]![j]! - factor * rows[k]![j]!;
    }
  }
  const x = new Array<number>(n).fill(0);
  for (let i = n - 1; i >= 0; i -= 1) {
    let sum = rows[i]![n]!;
    for (let j = i + 1; j < n; j += 1) sum -= rows[i]![j]! * x[j]!;
    x[i] = sum / rows[i]![i]!;
  }
  return x;
}

export function bisect(low: number, high: number, f: (x: number) => number, steps = 200): number {
  const negative = f(low) < 0;
  let [a, b] = [low, high];
  for (let i = 0; i < steps; i += 1) {
    const middle = (a + b) / 2;
    if (f(middle) < 0 === negative) a = middle;
    else b = middle;
  }
  return (a + b) / 2;
}

/** Composite Simpson rule with an even number of intervals. */
export function simpson(f: (x: number) => number, from: number, to: number, intervals = 2000): number {
  const h = (to - from) / intervals;
  let sum = f(from) + f(to);
  for (let i = 1; i < intervals; i += 1) sum += (i % 2 === 1 ? 4 : 2) * f(from + i * h);
  return (sum * h) / 3;
}

/** J_n by its integral over a period; the trapezoidal rule converges exponentially. */
export function besselJ(n: number, x: number): number {
  const points = 80 + Math.ceil(4 * Math.abs(x));
  let sum = 0;
  for (let i = 0; i < points; i += 1) {
    const u = (2 * Math.PI * (i + 0.5)) / points;
    sum += Math.cos(n * u - x * Math.sin(u));
  }
  return sum / points;
}

/** Zeros of J_1 from the first on, found between the extremes that lie about π apart. */
export function besselJ1Zeros(count: number): number[] {
  return Array.from({ length: count }, (_, i) =>
    bisect((i + 1.25) * Math.PI - 0.6, (i + 1.25) * Math.PI + 0.6, (x) => besselJ(1, x), 60),
  );
}

export interface Circle {
  readonly x: number;
  readonly y: number;
  readonly radius: number;
  readonly potential: number;
  /** Sources lie on the circle's radius times this: below 1 inside, above 1 outside. */
  readonly sources: number;
}

/**
 * Potential between circles by superposition of line sources near each boundary (method of fundamental solutions).
 * Answers the flux out of each circle per unit conductivity and length. With `mirror` the line y = 0 is held at 0.
 */
export function superposition(circles: readonly Circle[], mirror = false, count = 40): number[] {
  const ring = (circle: Circle, scale: number, shift: number) =>
    Array.from({ length: count }, (_, i) => {
      const u = (2 * Math.PI * (i + shift)) / count;
      return {
        x: circle.x + scale * circle.radius * Math.cos(u),
        y: circle.y + scale * circle.radius * Math.sin(u),
      };
    });
  const sources = circles.flatMap((circle) => ring(circle, circle.sources, 0));
  const points = circles.flatMap((circle) =>
    ring(circle, 1, 0).map((point) => ({ ...point, potential: circle.potential })),
  );
  const influence = (p: { x: number; y: number }, s: { x: number; y: number }) => {
    const direct = -Math.log(Math.hypot(p.x - s.x, p.y - s.y));
    return mirror ? direct + Math.log(Math.hypot(p.x - s.x, p.y + s.y)) : direct;
  };
  // without a mirror plane: a constant, and the strengths add up to nothing at infinity
  const extra = mirror ? 0 : 1;
  const matrix = points.map((p) => [...sources.map((s) => influence(p, s)), ...(extra === 1 ? [1] : [])]);
  const right = points.map(({ potential }) => potential);
  if (extra === 1) {
    matrix.push([...sources.map(() => 1), 0]);
    right.push(0);
  }
  const strengths = solve(matrix, right);
  return circles.map(
    (_, i) => 2 * Math.PI * strengths.slice(i * count, (i + 1) * count).reduce((sum, q) => sum + q, 0),
  );
}
