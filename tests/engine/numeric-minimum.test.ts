import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { NumericFault } from "@/lib/numeric/fault";
import { globalMinimum } from "@/lib/numeric/minimum";

describe("globalMinimum", () => {
  it.each<[string, (x: number) => number, number, number, number]>([
    ["a parabola", (x) => (x - 1) ** 2, -3, 7, 1],
    ["a shallow valley on a large value", (x) => 1000 + (x - 1) ** 2, -3, 7, 1],
    ["a kink", (x) => Math.abs(x - Math.PI), 0, 10, Math.PI],
    ["the lower end", (x) => x, 2, 3, 2],
    ["the upper end", (x) => -x, 2, 3, 3],
    ["the deeper of two valleys", (x) => (x * x - 4) ** 2 - x, -4, 4, 2.0305459],
    ["a valley of 1/50 of the interval", (x) => -Math.exp(-(((x - 0.71) / 0.02) ** 2)), 0, 1, 0.71],
    ["a valley beside an infinite end", (x) => 1 / x + x, 0, 10, 1],
    // d/dr of ln(r/r_i)/(2πk) + 1/(2πrh): the critical radius k/h.
    ["the critical radius of insulation", (r) => -(Math.log(r) / 0.05 + 1 / (r * 10)) * -1, 1e-3, 0.1, 0.005],
  ])("finds %s", (_, f, lo, hi, x) => {
    expect(globalMinimum(f, lo, hi).x / x).toBeCloseTo(1, 6);
  });

  it("answers the smallest x of equal minima", () => {
    expect(globalMinimum(Math.cos, 0, 20).x).toBeCloseTo(Math.PI, 6);
    expect(globalMinimum(() => 3, 1, 2)).toEqual({ x: 1, fx: 3 });
    expect(globalMinimum((x) => Math.abs(Math.abs(x) - 1), -2, 2).x).toBeCloseTo(-1, 6);
    expect(globalMinimum((x) => x * (1 - x), 0, 1).x).toBe(0);
  });

  it("answers the left end of a level stretch", () => {
    expect(globalMinimum((x) => Math.max(1, Math.abs(x - 5)), 0, 10).x).toBeCloseTo(4, 12);
    expect(globalMinimum((x) => Math.abs(Math.ceil(x) - 4), 0, 10).x).toBeCloseTo(3, 12);
  });

  it("answers the only point of an empty interval", () => {
    expect(globalMinimum((x) => x * x, 3, 3)).toEqual({ x: 3, fx: 9 });
  });

  it("refuses values that are not numbers, −∞, and a function that is nowhere finite", () => {
    for (const f of [() => NaN, () => Infinity, (x: number) => -1 / x]) {
      expect(() => globalMinimum(f, 0, 1)).toThrow(
        expect.objectContaining({ code: "not-finite" }) as unknown as NumericFault,
      );
    }
    expect(() => globalMinimum(() => Infinity, 1, 1)).toThrow(NumericFault);
  });

  it("is not above any value of the function", () => {
    const wave = fc.tuple(
      fc.double({ min: -1, max: 1, noNaN: true }),
      fc.double({ min: 0, max: 20, noNaN: true }),
    );
    fc.assert(
      fc.property(
        fc.array(wave, { minLength: 1, maxLength: 4 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (waves, at) => {
          const f = (x: number) => waves.reduce((sum, [a, w]) => sum + a * Math.sin(w * x + a), 0);
          const { x, fx } = globalMinimum(f, 0, 3);
          expect(fx).toBe(f(x));
          expect(fx).toBeLessThanOrEqual(f(3 * at) + 1e-12);
        },
      ),
    );
  });
});
