import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { NumericFault } from "@/lib/numeric/fault";
import { integrate } from "@/lib/numeric/quadrature";

describe("integrate", () => {
  it.each<[string, (x: number) => number, number, number, number]>([
    ["eˣ", Math.exp, 0, 1, Math.E - 1],
    ["√x, whose slope is infinite at an end", Math.sqrt, 0, 1, 2 / 3],
    ["ln x, infinite at an end", Math.log, 0, 1, -1],
    ["1/√x, infinite at an end", (x) => 1 / Math.sqrt(x), 0, 1, 2],
    ["|x − 1/3|, with a kink inside", (x) => Math.abs(x - 1 / 3), 0, 1, 5 / 18],
    ["a step", (x) => (x < 1 / 3 ? 0 : 1), 0, 1, 2 / 3],
    ["95 waves", (x) => Math.sin(200 * x), 0, 3, (1 - Math.cos(600)) / 200],
    ["1/(1 + x²)", (x) => 1 / (1 + x * x), -50, 80, Math.atan(80) + Math.atan(50)],
    [
      "a Lorentz peak of width 1e-4",
      (x) => 1 / (1e-8 + (x - 0.4) ** 2),
      0,
      1,
      1e4 * (Math.atan(6e3) + Math.atan(4e3)),
    ],
    // ∫₀^∞ x³/(eˣ − 1) dx = π⁴/15 (DLMF 25.5.1 with ζ(4) = π⁴/90).
    [
      "Planck's law over a far too wide interval",
      (x) => x ** 3 / Math.expm1(x),
      1e-9,
      700,
      Math.PI ** 4 / 15,
    ],
    [
      "a peak hidden between the first points",
      (x) => Math.exp(-(((x - 0.3) / 1e-3) ** 2)),
      0,
      1,
      Math.sqrt(Math.PI) * 1e-3,
    ],
    ["a constant", () => 3, 0, 2, 6],
    ["an interval the wrong way round", Math.exp, 1, 0, 1 - Math.E],
  ])("integrates %s to 1e-11", (_, f, lo, hi, exact) => {
    const { value, error } = integrate(f, lo, hi);
    expect(Math.abs(value / exact - 1)).toBeLessThan(1e-11);
    expect(Math.abs(value - exact)).toBeLessThanOrEqual(error + 1e-14 * Math.abs(exact));
  });

  it("takes halves that cancel for 0", () => {
    expect(Math.abs(integrate((x) => x ** 3, -1, 1).value)).toBeLessThan(1e-15);
    expect(Math.abs(integrate(Math.sin, 0, 2 * Math.PI).value)).toBeLessThan(1e-14);
    expect(integrate(Math.exp, 2, 2)).toEqual({ value: 0, error: 0 });
  });

  it("is exact for polynomials to degree 22 within one look", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 22 }),
        fc.double({ min: 0.1, max: 2, noNaN: true }),
        (power, hi) => {
          const exact = hi ** (power + 1) / (power + 1);
          const { value } = integrate((x) => x ** power, 0, hi, { relTol: 1, maxEvaluations: 200 });
          expect(Math.abs(value / exact - 1)).toBeLessThan(1e-13);
        },
      ),
    );
  });

  it("adds up over a point between", () => {
    const end = fc.double({ min: 0, max: 4, noNaN: true });
    fc.assert(
      fc.property(end, end, end, (a, b, c) => {
        const f = (x: number) => Math.exp(Math.sin(3 * x)) / (1 + x);
        const whole = integrate(f, a, c).value;
        expect(integrate(f, a, b).value + integrate(f, b, c).value).toBeCloseTo(whole, 10);
        expect(integrate(f, c, a).value).toBeCloseTo(-whole, 12);
      }),
    );
  });

  it("keeps an absolute tolerance and asks less for it", () => {
    const count = (options: { relTol?: number; absTol?: number }) => {
      let calls = 0;
      integrate(
        (x) => {
          calls += 1;
          return Math.sqrt(x);
        },
        0,
        1,
        options,
      );
      return calls;
    };
    expect(count({ absTol: 1e-4 })).toBeLessThan(count({ relTol: 1e-11 }));
  });

  it("says what it knows when its evaluations run out", () => {
    let calls = 0;
    try {
      integrate(
        (x) => {
          calls += 1;
          return 1 / x;
        },
        0,
        1,
        { maxEvaluations: 1000 },
      );
      expect.fail("∫ 1/x from 0 has no value.");
    } catch (fault) {
      expect(fault).toBeInstanceOf(NumericFault);
      expect(fault).toMatchObject({ code: "not-converged" });
      expect((fault as NumericFault).details.error).toBeGreaterThan(0.1);
    }
    expect(calls).toBeLessThanOrEqual(1000);
  });

  it("refuses an integrand or an end that is not finite", () => {
    const refused = expect.objectContaining({ code: "not-finite" }) as unknown as NumericFault;
    expect(() => integrate((x) => Math.sqrt(x - 0.5), 0, 1)).toThrow(refused);
    expect(() => integrate((x) => Math.exp(-x), 0, Infinity)).toThrow(refused);
    expect(() => integrate((x) => 1 / x, -1, 1)).toThrow(refused);
    expect(() => integrate(() => 1e300, 0, 1e300)).toThrow(refused);
  });
});
