import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { NumericFault } from "@/lib/numeric/fault";
import { brent } from "@/lib/numeric/root";

function faultOf(run: () => unknown): NumericFault {
  try {
    run();
  } catch (fault) {
    if (fault instanceof NumericFault) return fault;
    throw fault;
  }
  throw new Error("No fault was thrown.");
}

describe("brent", () => {
  it.each<[string, (x: number) => number, number, number, number]>([
    // Dottie number: OEIS A003957.
    ["cos x = x", (x) => Math.cos(x) - x, 0, 1, 0.7390851332151607],
    ["ζ·tan ζ = 1 of a wall with Bi = 1", (x) => x * Math.tan(x) - 1, 0, 1.5, 0.8603335890193797],
    [
      "a surface radiating 1000 W/m² at ε = 1",
      (t) => 5.670374419e-8 * t ** 4 - 1000,
      1,
      5000,
      (1000 / 5.670374419e-8) ** 0.25,
    ],
    ["the left one of equal arms", (x) => x * x - 2, -2, 0, -Math.SQRT2],
    ["a zero twenty decades below the end", (x) => x - 1e-20, 0, 1000, 1e-20],
    ["a steep exponential", (x) => Math.exp(50 * x) - Math.exp(25), -100, 1, 0.5],
    ["a vertical tangent", (x) => Math.cbrt(x - 1 / 3), 0, 1, 1 / 3],
    ["a triple zero", (x) => (x - 1) ** 3, -10, 2.3, 1],
    ["an infinite end", (x) => 1 / x - 5, 0, 1, 0.2],
    ["a zero thirty decades within the ends", (x) => x - 1, -1e30, 1e30, 1],
    ["a bracket of a few units in the last place", (x) => x * x - 90_000, 300 - 1e-12, 300 + 2e-12, 300],
  ])("finds %s", (_, f, lo, hi, x) => {
    expect(brent(f, lo, hi).x / x).toBeCloseTo(1, 14);
  });

  it("finds a zero at 0 without walking through the denormals", () => {
    let calls = 0;
    const root = brent(
      (x) => {
        calls += 1;
        return x ** 3;
      },
      -1,
      2,
    );
    expect(Math.abs(root.x)).toBeLessThan(1e-39);
    expect(calls).toBeLessThan(500);
  });

  it("answers an end that is exactly zero, the lower one first", () => {
    expect(brent((x) => x * (x - 1), 0, 1)).toEqual({ x: 0, fx: 0, iterations: 0 });
    expect(brent((x) => x - 1, 0, 1)).toEqual({ x: 1, fx: 0, iterations: 0 });
    expect(brent((x) => x - 1, 1, 1)).toEqual({ x: 1, fx: 0, iterations: 0 });
  });

  it("names both ends with their values when the sign does not change", () => {
    const fault = faultOf(() => brent((x) => x * x + 1, -1, 2));
    expect(fault.code).toBe("no-sign-change");
    expect(fault.details).toEqual({ lo: -1, hi: 2, atLo: 2, atHi: 5 });
    expect(faultOf(() => brent((x) => x, 1, 1)).code).toBe("no-sign-change");
  });

  it.each<[string, (x: number) => number, number, number]>([
    ["1/(x − 1)", (x) => 1 / (x - 1), 0, 3],
    ["1/(x − 1)³", (x) => (x - 1) ** -3, 0, 3.1],
    ["tan x over π/2", Math.tan, 1, 2],
    ["a pole very near the end", (x) => 1 / (x - 1), 1 - 1e-10, 2],
    ["1/x about 0", (x) => 1 / x, -1, 1],
    ["1/x with the pole at the end", (x) => 1 / x, -1, 0],
    ["a logarithmic pole", (x) => Math.sign(x - 0.3) * (1 - Math.log(Math.abs(x - 0.3))), 0, 1],
    ["values infinite on both sides", (x) => (x < 0 ? -Infinity : Infinity), -1, 2],
  ])("tells the pole of %s from a zero", (_, f, lo, hi) => {
    expect(faultOf(() => brent(f, lo, hi)).code).toBe("pole");
  });

  it("tells a jump over zero from a zero", () => {
    const steps: ((x: number) => number)[] = [
      (x) => (x < 1 / 3 ? -1 : 1),
      (x) => (x < 1 / 3 ? -1e4 * (1 + x) : 1),
      (x) => (x < 0.3 ? x - 1 : x + 1),
    ];
    for (const step of steps) {
      const fault = faultOf(() => brent(step, 0, 1));
      expect(fault.code).toBe("not-converged");
      expect(fault.message).toContain("jumps over zero");
    }
  });

  it("stops at a value that is not a number and names the place", () => {
    expect(faultOf(() => brent((x) => Math.sqrt(x - 0.5), 0, 1))).toMatchObject({
      code: "not-finite",
      details: { x: 0 },
    });
    expect(faultOf(() => brent((x) => (x > 0.2 && x < 0.8 ? NaN : x - 0.5), 0, 1)).code).toBe("not-finite");
  });

  it("stops when its steps run out", () => {
    const fault = faultOf(() => brent((x) => (x - 1) ** 3, -10, 2.3, { maxIterations: 5 }));
    expect(fault.code).toBe("not-converged");
    expect(fault.message).toContain("within 5 steps");
  });

  it("finds the zero of any rising cubic to the last places within the bracket", () => {
    const coefficient = fc.double({ min: 0.01, max: 10, noNaN: true });
    fc.assert(
      fc.property(fc.double({ min: -8, max: 8, noNaN: true }), coefficient, coefficient, (zero, a, b) => {
        const f = (x: number) => (x - zero) * (a + b * (x - zero) ** 2);
        const { x } = brent(f, -9, 9.5);
        expect(Math.abs(x - zero)).toBeLessThanOrEqual(1e-15 * Math.abs(zero) + 1e-38);
        expect(x).toBeGreaterThanOrEqual(-9);
        expect(x).toBeLessThanOrEqual(9.5);
      }),
    );
  });

  it("does not leave the bracket and does not ask twice as often as bisection", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 60 }),
        fc.double({ min: 0.02, max: 0.98, noNaN: true }),
        (power, zero) => {
          let calls = 0;
          const f = (x: number) => {
            calls += 1;
            if (x < 0 || x > 1) throw new RangeError(`asked at ${x}`);
            return x ** power - zero ** power;
          };
          expect(brent(f, 0, 1).x / zero).toBeCloseTo(1, 13);
          expect(calls).toBeLessThan(120);
        },
      ),
    );
  });

  it("stops at the width asked for", () => {
    let calls = 0;
    const f = (x: number) => {
      calls += 1;
      return Math.exp(x) - 2;
    };
    expect(Math.abs(brent(f, 0, 5, { absTol: 1e-3 }).x - Math.LN2)).toBeLessThan(1e-3);
    const rough = calls;
    calls = 0;
    brent(f, 0, 5);
    expect(rough).toBeLessThan(calls);
  });
});
