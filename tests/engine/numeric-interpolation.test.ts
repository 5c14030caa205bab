import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { linearInterpolator, monotoneCubic } from "@/lib/numeric/interpolation";
import { integrate } from "@/lib/numeric/quadrature";

/** Points with rising x, at least two. */
const points = fc
  .array(
    fc.tuple(fc.double({ min: 0.01, max: 5, noNaN: true }), fc.double({ min: -100, max: 100, noNaN: true })),
    { minLength: 2, maxLength: 12 },
  )
  .map((pairs) => {
    let x = -3;
    return { xs: pairs.map(([step]) => (x += step)), ys: pairs.map(([, y]) => y) };
  });
const part = fc.double({ min: 0, max: 1, noNaN: true });
const kinds = [
  ["broken line", linearInterpolator],
  ["monotone cubic", monotoneCubic],
] as const;

describe.each(kinds)("%s", (_, make) => {
  it("meets its points exactly", () => {
    fc.assert(
      fc.property(points, ({ xs, ys }) => {
        const curve = make(xs, ys);
        expect(xs.every((x, i) => curve.value(x) === ys[i])).toBe(true);
      }),
    );
  });

  it("stays between neighbouring points, so it makes no extremum of its own", () => {
    fc.assert(
      fc.property(points, part, part, ({ xs, ys }, where, inside) => {
        const i = Math.min(xs.length - 2, Math.floor(where * (xs.length - 1)));
        const value = make(xs, ys).value(xs[i]! + inside * (xs[i + 1]! - xs[i]!));
        expect(value).toBeGreaterThanOrEqual(Math.min(ys[i]!, ys[i + 1]!) - 1e-11);
        expect(value).toBeLessThanOrEqual(Math.max(ys[i]!, ys[i + 1]!) + 1e-11);
      }),
    );
  });

  it("has the integral that quadrature finds, signed and additive", () => {
    fc.assert(
      fc.property(points, part, part, ({ xs, ys }, first, second) => {
        const curve = make(xs, ys);
        const span = xs.at(-1)! - xs[0]!;
        const [a, b] = [xs[0]! + first * span, xs[0]! + second * span];
        const exact = curve.integral(a, b);
        // Piece by piece, because quadrature alone is slow at the knots.
        const knots = [
          Math.min(a, b),
          ...xs.filter((x) => x > Math.min(a, b) && x < Math.max(a, b)),
          Math.max(a, b),
        ];
        const pieces = knots
          .slice(1)
          .map((x, i) => integrate((u) => curve.value(u), knots[i]!, x, { absTol: 1e-10 }).value);
        const sum = pieces.reduce((total, piece) => total + piece, 0);
        expect(Math.abs(exact - (a < b ? sum : -sum))).toBeLessThan(1e-9);
        expect(Math.abs(curve.integral(b, a) + exact)).toBe(0);
      }),
    );
  });

  it("keeps the digits of a short interval far out", () => {
    const curve = make([0, 1e6, 2e6, 3e6], [1, 2, 3, 4]);
    const width = 1e-3;
    for (const x of [1.5e6, 2e6 - width / 2]) {
      const actual = x + width - x;
      expect(curve.integral(x, x + width) / (actual * curve.value(x + width / 2))).toBeCloseTo(1, 12);
    }
  });

  it("has the slope of its values", () => {
    fc.assert(
      fc.property(points, part, part, ({ xs, ys }, where, inside) => {
        const i = Math.min(xs.length - 2, Math.floor(where * (xs.length - 1)));
        const width = xs[i + 1]! - xs[i]!;
        const curve = make(xs, ys);
        const x = xs[i]! + (0.1 + 0.8 * inside) * width;
        const h = 1e-4 * width;
        const difference = (curve.value(x + h) - curve.value(x - h)) / (2 * h);
        expect(Math.abs(curve.slope(x) - difference)).toBeLessThan((1e-6 * 200) / width);
      }),
    );
  });

  it("goes on along its end pieces beyond the ends", () => {
    const curve = make([0, 1], [1, 3]);
    expect([curve.value(-1), curve.value(2), curve.slope(5), curve.integral(1, 2)]).toEqual([-1, 5, 2, 4]);
  });

  it("refuses points that are no curve", () => {
    expect(() => make([1], [1])).toThrow("at least two points");
    expect(() => make([1, 2], [1])).toThrow("as many x as y");
    expect(() => make([1, 1], [1, 2])).toThrow("must rise");
    expect(() => make([2, 1], [1, 2])).toThrow("must rise");
    expect(() => make([1, NaN], [1, 2])).toThrow("not finite");
    expect(() => make([1, 2], [1, Infinity])).toThrow("not finite");
  });
});

describe("monotone cubic", () => {
  it("has the slopes of Fritsch and Butland", () => {
    // By hand: chords 1, 3, −2 of widths 1, 2, 1: m_1 = (5 + 4)/(5/1 + 4/3) = 27/19, m_2 = 0 (turn),
    // m_0 = ((2 + 2)·1 − 1·3)/3 = 1/3, m_3 = ((2 + 2)·(−2) − 1·3)/3 = −11/3.
    const curve = monotoneCubic([0, 1, 3, 4], [0, 1, 7, 5]);
    const slopes = [0, 1, 3].map((x) => curve.slope(x));
    [1 / 3, 27 / 19, 0].forEach((slope, i) => expect(slopes[i]).toBeCloseTo(slope, 14));
    expect(curve.slope(4)).toBeCloseTo(-11 / 3, 14);
  });

  it("is smooth at its points", () => {
    fc.assert(
      fc.property(points, ({ xs, ys }) => {
        const curve = monotoneCubic(xs, ys);
        for (const x of xs.slice(1, -1)) {
          const before = curve.slope(x - 1e-9);
          expect(Math.abs(curve.slope(x) - before)).toBeLessThan(0.1);
        }
      }),
    );
  });

  it("is exact for a straight line and near a smooth curve", () => {
    const line = monotoneCubic([0, 1, 4, 9], [2, 5, 14, 29]);
    expect(line.value(6)).toBeCloseTo(20, 13);
    const xs = Array.from({ length: 41 }, (_, i) => i / 10);
    const curve = monotoneCubic(xs, xs.map(Math.exp));
    expect(curve.value(2.345) / Math.exp(2.345)).toBeCloseTo(1, 5);
  });
});

describe("broken line", () => {
  it("integrates a table by trapezoids", () => {
    const curve = linearInterpolator([0, 2, 3], [1, 5, 4]);
    expect(curve.integral(0, 3)).toBeCloseTo(6 + 4.5, 14);
    expect(curve.integral(1, 2.5)).toBeCloseTo(4 + 2.375, 14);
    expect([curve.slope(0), curve.slope(1.9), curve.slope(2), curve.slope(3)]).toEqual([2, 2, -1, -1]);
  });
});
