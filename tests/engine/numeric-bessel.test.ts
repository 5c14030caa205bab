import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  besselI,
  besselIScaled,
  besselJ,
  besselJZero,
  besselK,
  besselKScaled,
  besselY,
} from "@/lib/numeric/bessel";

const order = fc.integer({ min: 0, max: 40 });
/** Arguments over nine decades. */
const argument = fc.double({ min: -5, max: 4, noNaN: true }).map((power) => 10 ** power);
const relative = (got: number, expected: number) => Math.abs(got - expected) / Math.abs(expected);
const finite = (...values: number[]) => values.every((v) => Number.isFinite(v) && Math.abs(v) > 1e-290);

describe("modified Bessel functions", () => {
  it("keep their Wronskian I_n·K_(n+1) + I_(n+1)·K_n = 1/x (DLMF 10.28.2)", () => {
    fc.assert(
      fc.property(order, argument, (n, x) => {
        const [i, above] = [besselIScaled(n, x), besselIScaled(n + 1, x)];
        const [k, next] = [besselKScaled(n, x), besselKScaled(n + 1, x)];
        fc.pre(finite(i, above, k, next));
        expect(relative((i * next + above * k) * x, 1)).toBeLessThan(1e-14);
      }),
      { numRuns: 2000 },
    );
  });

  it("keep the recurrence I_(n−1) = I_(n+1) + (2n/x)·I_n across the methods (DLMF 10.29.1)", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 40 }), argument, (n, x) => {
        const [below, here, above] = [n - 1, n, n + 1].map((k) => besselIScaled(k, x)) as [
          number,
          number,
          number,
        ];
        fc.pre(finite(below, here, above));
        expect(relative(above + ((2 * n) / x) * here, below)).toBeLessThan(1e-14);
      }),
      { numRuns: 2000 },
    );
  });

  it("scaled and plain forms agree where neither overflows", () => {
    fc.assert(
      fc.property(order, fc.double({ min: 1e-3, max: 300, noNaN: true }), (n, x) => {
        const [i, k] = [besselI(n, x), besselK(n, x)];
        fc.pre(finite(i, k));
        // Each of the two may take its 2e-15.
        expect(relative(besselIScaled(n, x) * Math.exp(x), i)).toBeLessThan(4e-15);
        expect(relative(besselKScaled(n, x) * Math.exp(-x), k)).toBeLessThan(4e-15);
      }),
    );
  });

  it("fall with the order for I, rise with it for K", () => {
    fc.assert(
      fc.property(order, argument, (n, x) => {
        const [i, above] = [besselIScaled(n, x), besselIScaled(n + 1, x)];
        fc.pre(finite(i, above) && (n + 1) ** 2 > 1e-12 * x);
        expect(above).toBeLessThan(i);
        expect(besselKScaled(n + 1, x)).toBeGreaterThan(besselKScaled(n, x));
      }),
    );
  });

  it("stay finite, or become infinite as they must, at the ends of the range", () => {
    // Fin of mL = 700: the ratio of the scaled forms is finite where I alone would overflow beyond 713.
    expect(besselIScaled(1, 700) / besselIScaled(0, 700)).toBeCloseTo(0.9992854589, 9);
    expect(besselI(0, 713)).toBeLessThan(Number.MAX_VALUE);
    expect(besselI(0, 714)).toBe(Infinity);
    // Denormal results keep what digits they have: K_0(740) = 1.94e-323 (mpmath).
    expect(besselK(0, 740)).toBe(2e-323);
    expect(besselK(0, 800)).toBe(0);
    for (const n of [0, 1, 2, 20, 100]) {
      expect(besselIScaled(n, 1e300) / 3.989422804014327e-151).toBeCloseTo(1, 14);
      expect(besselKScaled(n, 1e300) / 1.2533141373155003e-150).toBeCloseTo(1, 14);
      expect([besselIScaled(n, Infinity), besselKScaled(n, Infinity), besselK(n, Infinity)]).toEqual([
        0, 0, 0,
      ]);
      expect(besselI(n, Infinity)).toBe(Infinity);
    }
    // −ln(x/2) − γ at the smallest double, whose half is no double.
    expect(besselK(0, 5e-324)).toBeCloseTo(744.5560034370396, 9);
    expect(besselK(1, 5e-324)).toBe(Infinity);
    expect(besselK(1, 1e-300) * 1e-300).toBeCloseTo(1, 14);
    expect([besselI(1, 1e-320), besselI(0, 1e-320), besselI(2, 1e-320)]).toEqual([5e-321, 1, 0]);
  });

  it("reach to where I overflows and K vanishes themselves, not only e^x", () => {
    // mpmath, 40 digits.
    expect(relative(besselI(0, 712), 2.4684110577627523e307)).toBeLessThan(2e-15);
    expect(relative(besselK(0, 705), 3.135297023712879e-308)).toBeLessThan(2e-15);
  });

  it("give an annular fin of any size an efficiency between 0 and 1", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -6, max: 8, noNaN: true }).map((power) => 10 ** power),
        fc.double({ min: 1.01, max: 50, noNaN: true }),
        (inner, ratio) => {
          const outer = inner * ratio;
          const decay = Math.exp(2 * (inner - outer));
          const up =
            besselKScaled(1, inner) * besselIScaled(1, outer) -
            besselIScaled(1, inner) * besselKScaled(1, outer) * decay;
          const down =
            besselKScaled(0, inner) * besselIScaled(1, outer) +
            besselIScaled(0, inner) * besselKScaled(1, outer) * decay;
          const efficiency = (2 * inner * (up / down)) / ((outer - inner) * (outer + inner));
          expect(efficiency).toBeGreaterThan(0);
          // The difference in `up` leaves about 1/(ratio² − 1) roundings of a short fin.
          expect(efficiency).toBeLessThan(1 + 1e-13);
        },
      ),
      { numRuns: 500 },
    );
  });

  it("continue I to negative x by parity and leave K undefined there", () => {
    fc.assert(
      fc.property(order, argument, (n, x) => {
        const sign = n % 2 === 0 ? 1 : -1;
        expect(besselI(n, -x)).toBe(sign * besselI(n, x));
        expect(besselIScaled(n, -x)).toBe(sign * besselIScaled(n, x));
        expect(besselK(n, -x)).toBeNaN();
        expect(besselKScaled(n, -x)).toBeNaN();
      }),
    );
    expect([besselI(0, 0), besselI(3, 0), besselK(0, 0), besselKScaled(4, 0)]).toEqual([
      1,
      0,
      Infinity,
      Infinity,
    ]);
  });
});

describe("Bessel functions J and Y", () => {
  it("keep their Wronskian J_(n+1)·Y_n − J_n·Y_(n+1) = 2/(πx) (DLMF 10.5.2)", () => {
    fc.assert(
      fc.property(order, argument, (n, x) => {
        const [j, above] = [besselJ(n, x), besselJ(n + 1, x)];
        const [y, next] = [besselY(n, x), besselY(n + 1, x)];
        fc.pre(finite(y, next) && (x > n || finite(j, above)));
        // Relative to the sizes of the products, which exceed 2/(πx) near the turning point.
        const size = Math.hypot(j, y) * Math.hypot(above, next);
        const error = Math.abs(above * y - j * next - 2 / (Math.PI * x));
        expect(error / (x > n ? size : 2 / (Math.PI * x))).toBeLessThan(2e-14);
      }),
      { numRuns: 2000 },
    );
  });

  it("sum to Neumann's J_0² + 2·Σ J_k² = 1 (DLMF 10.23.3)", () => {
    for (const x of [0.1, 1, 3.9, 4.1, 9.9, 10.1, 25, 60, 99.5]) {
      let sum = besselJ(0, x) ** 2;
      for (let n = 1; n < 160; n += 1) sum += 2 * besselJ(n, x) ** 2;
      expect(sum).toBeCloseTo(1, 13);
    }
  });

  it("keep the amplitude √(2/(πx)) and the phase at huge arguments", () => {
    // cos and sin of x themselves carry the phase; at 1e15 a phase made by subtraction would have no digit.
    for (const x of [1e6, 1e15, 1e300]) {
      const amplitude = Math.sqrt(2 / Math.PI) / Math.sqrt(x);
      expect(besselJ(0, x) / amplitude).toBeCloseTo(Math.SQRT1_2 * (Math.cos(x) + Math.sin(x)), 6);
      expect(besselY(0, x) / amplitude).toBeCloseTo(Math.SQRT1_2 * (Math.sin(x) - Math.cos(x)), 6);
      expect(besselJ(1, x) / amplitude).toBeCloseTo(Math.SQRT1_2 * (Math.sin(x) - Math.cos(x)), 6);
    }
    expect([besselJ(0, Infinity), besselJ(5, Infinity), besselY(2, Infinity)]).toEqual([0, 0, 0]);
  });

  it("continue J to negative x by parity and leave Y undefined there", () => {
    fc.assert(
      fc.property(order, argument, (n, x) => {
        expect(besselJ(n, -x)).toBe((n % 2 === 0 ? 1 : -1) * besselJ(n, x));
        expect(besselY(n, -x)).toBeNaN();
      }),
    );
    expect([besselJ(0, 0), besselJ(2, 0), besselY(0, 0), besselY(7, 0)]).toEqual([
      1,
      0,
      -Infinity,
      -Infinity,
    ]);
    expect([besselY(1, 1e-310), besselY(30, 1e-20)]).toEqual([-Infinity, -Infinity]);
  });

  it("answer NaN to an order that is not whole or below 0 and to an argument that is no number", () => {
    for (const f of [besselI, besselIScaled, besselK, besselKScaled, besselJ, besselY]) {
      expect([f(0.5, 1), f(-1, 1), f(NaN, 1), f(Infinity, 1), f(0, NaN), f(3, NaN)]).toEqual(
        Array(6).fill(NaN),
      );
    }
    expect([besselJZero(0, 0), besselJZero(0, 1.5), besselJZero(-1, 1), besselJZero(0.5, 1)]).toEqual(
      Array(4).fill(NaN),
    );
  });
});

describe("zeros of J", () => {
  it("interlace and leave no residual, orders to 50 and the first 200", () => {
    for (let n = 0; n <= 50; n += 1) {
      for (let m = 1; m <= 200; m += 1) {
        const zero = besselJZero(n, m);
        const amplitude = Math.hypot(besselJ(n, zero), besselY(n, zero));
        // What half a unit in the last place of x and the error of J leave.
        if (Math.abs(besselJ(n, zero)) / amplitude > 2.3e-16 * zero + 2e-15)
          expect.fail(`J_${n} is ${besselJ(n, zero)} at its zero ${m}, ${zero}`);
        // j_(n,m) < j_(n+1,m) < j_(n,m+1) (DLMF 10.21.2): none is missed, none is counted twice.
        const above = besselJZero(n + 1, m);
        if (!(zero < above && above < besselJZero(n, m + 1)))
          expect.fail(`zeros ${m} of J_${n} and J_${n + 1} are out of order: ${zero}, ${above}`);
      }
    }
  });

  it("tend to McMahon's π apart for a large number", () => {
    expect(besselJZero(0, 1_000_001) - besselJZero(0, 1_000_000)).toBeCloseTo(Math.PI, 9);
    expect(besselJZero(100, 1)).toBeCloseTo(108.83616589840976, 9);
  });
});
