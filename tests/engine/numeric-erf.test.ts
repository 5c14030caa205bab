import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { erf, erfc, erfcx } from "@/lib/numeric/erf";

const argument = fc.double({ min: -6, max: 26, noNaN: true });

describe("error function", () => {
  it("is odd, rises and makes 1 with its complement", () => {
    fc.assert(
      fc.property(argument, fc.double({ min: 1e-6, max: 1, noNaN: true }), (x, step) => {
        expect(erf(-x)).toBe(-erf(x));
        expect(erf(x + step)).toBeGreaterThanOrEqual(erf(x));
        expect(erfc(x + step)).toBeLessThanOrEqual(erfc(x));
        // Far to the left erf is 1 to the last place, far to the right erfc keeps its digits.
        if (x > 0) expect(erfc(x + step)).toBeLessThan(erfc(x));
        expect(erf(x) + erfc(x)).toBeCloseTo(1, 14);
      }),
    );
  });

  it("goes over from table to table without a step", () => {
    for (const seam of [0.5, 1, 2, 5, 6]) {
      const [before, after] = [seam * (1 - 2 ** -52), seam * (1 + 2 ** -52)];
      for (const f of [erf, erfc, erfcx]) {
        // Two sides of rounding, and what erfc itself falls by over the distance: 2x·Δx.
        expect(Math.abs(f(after) / f(before) - 1)).toBeLessThan(1e-15 + 2 * seam * (after - before));
      }
    }
  });

  it("scaled, is the complement times e^(x²)", () => {
    fc.assert(
      fc.property(fc.double({ min: -5, max: 5, noNaN: true }), (x) => {
        expect(Math.abs((erfcx(x) * Math.exp(-x * x)) / erfc(x) - 1)).toBeLessThan(1e-14);
      }),
    );
  });

  it("keeps the bounds 1/(x + √(x² + 2)) < √π/2·erfcx x ≤ 1/(x + √(x² + 4/π)) (DLMF 7.8.2)", () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1e3, noNaN: true }), (x) => {
        const middle = (Math.sqrt(Math.PI) / 2) * erfcx(x);
        expect(middle).toBeGreaterThanOrEqual((1 - 1e-15) / (x + Math.sqrt(x * x + 2)));
        expect(middle).toBeLessThanOrEqual((1 + 1e-15) / (x + Math.sqrt(x * x + 4 / Math.PI)));
      }),
    );
  });

  it("reaches its limits", () => {
    expect([erf(0), erf(Infinity), erf(-Infinity), erf(7)]).toEqual([0, 1, -1, 1]);
    expect(erf(5e-324)).toBe(5e-324);
    expect([erfc(Infinity), erfc(-Infinity), erfc(28), erfc(-28)]).toEqual([0, 2, 0, 2]);
    // 5.237048923789256e-319 (mpmath), which a denormal double holds to 6 digits.
    expect(erfc(27) / 5.237048923789256e-319).toBeCloseTo(1, 5);
    expect([erfcx(0), erfcx(Infinity), erfcx(-Infinity), erfcx(-27)]).toEqual([1, 0, Infinity, Infinity]);
    expect(erfcx(-26.6)).toBeLessThan(Infinity);
    expect([erf(NaN), erfc(NaN), erfcx(NaN)]).toEqual([NaN, NaN, NaN]);
  });
});
