import { readFile } from "node:fs/promises";
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
import { erf, erfc, erfcx } from "@/lib/numeric/erf";
import { tableFiles } from "@/lib/numeric/tables/generate";
import reference from "@/tests/reference/data/special-functions.json";

/* The table holds values that mpmath computed with 40 digits, rounded to double. */
const column = (name: string): readonly (readonly [x: number, value: number])[] => {
  const index = reference.columns.indexOf(name);
  return reference.rows.map((row) => [row[0]!, row[index]!] as const);
};
const relativeError = (got: number, exact: number) => (got === exact ? 0 : Math.abs(got / exact - 1));
const worst = (errors: number[]) =>
  errors.reduce((most, error) => (error > most || error !== error ? error : most), 0);
const positive = (exponents: number) =>
  fc.double({ min: -exponents, max: exponents, noNaN: true }).map((e) => 10 ** e);

describe("special functions against 40-digit values", () => {
  const relative: [string, string, number, (x: number) => number][] = [
    ["I₀", "i0", 2e-15, (x) => besselI(0, x)],
    ["I₁", "i1", 2e-15, (x) => besselI(1, x)],
    ["I₂", "iv2", 2e-15, (x) => besselI(2, x)],
    ["I₃", "iv3", 2e-15, (x) => besselI(3, x)],
    ["I₅", "iv5", 2e-15, (x) => besselI(5, x)],
    ["I₁₀", "iv10", 2e-15, (x) => besselI(10, x)],
    ["scaled I₀", "i0e", 2e-15, (x) => besselIScaled(0, x)],
    ["scaled I₁", "i1e", 2e-15, (x) => besselIScaled(1, x)],
    ["K₀", "k0", 2e-15, (x) => besselK(0, x)],
    ["K₁", "k1", 2e-15, (x) => besselK(1, x)],
    ["K₂", "kn2", 2e-15, (x) => besselK(2, x)],
    ["K₃", "kn3", 2e-15, (x) => besselK(3, x)],
    ["K₅", "kn5", 2e-15, (x) => besselK(5, x)],
    ["K₁₀", "kn10", 2e-15, (x) => besselK(10, x)],
    ["scaled K₀", "k0e", 2e-15, (x) => besselKScaled(0, x)],
    ["scaled K₁", "k1e", 2e-15, (x) => besselKScaled(1, x)],
    ["erf", "erf", 2e-15, erf],
    ["erfc", "erfc", 1e-14, erfc],
  ];

  it.each(relative)("%s is exact to its budget at every point", (_, name, budget, f) => {
    const points = column(name).filter(([, value]) => value !== 0 && Number.isFinite(value));
    expect(points.length).toBeGreaterThan(40);
    expect(worst(points.map(([x, value]) => relativeError(f(x), value)))).toBeLessThan(budget);
  });

  it.each([
    [0, "j0"],
    [1, "j1"],
    [2, "jn2"],
    [3, "jn3"],
    [5, "jn5"],
    [10, "jn10"],
  ])("J of order %i is exact to 2e-15 of its amplitude at every point", (n, name) => {
    const errors = column(name).map(([x, value]) => {
      // Below x = n there are no waves: the value is its own measure.
      const amplitude = x > Math.max(n, 1) ? Math.sqrt(2 / (Math.PI * x)) : Math.abs(value);
      return Math.abs(besselJ(n, x) - value) / amplitude;
    });
    expect(worst(errors)).toBeLessThan(2e-15);
  });
});

describe("modified Bessel functions", () => {
  it("keep I and K together by the Wronskian I_n·K_(n+1) + I_(n+1)·K_n = 1/x up to order 20", () => {
    fc.assert(
      fc.property(positive(4), fc.integer({ min: 0, max: 20 }), (x, n) => {
        const sum =
          besselIScaled(n, x) * besselKScaled(n + 1, x) + besselIScaled(n + 1, x) * besselKScaled(n, x);
        fc.pre(besselIScaled(n + 1, x) > 1e-290 && besselKScaled(n + 1, x) < Infinity);
        expect(relativeError(sum * x, 1)).toBeLessThan(6e-15);
      }),
      { numRuns: 2000 },
    );
  });

  it("stay finite and positive to the ends of the doubles", () => {
    // √(2πx)·e^−x·I → 1, √(2x/π)·e^x·K → 1 for large x; K_1 → 1/x, K_0 → −ln(x/2) − γ for small x.
    for (const n of [0, 1, 2, 7, 20]) {
      for (const x of [1e6, 1e15, 1e300, Number.MAX_VALUE]) {
        const tolerance = (n * n + 1) / x + 4e-16;
        expect(relativeError(besselIScaled(n, x) * Math.sqrt(2 * Math.PI) * Math.sqrt(x), 1)).toBeLessThan(
          tolerance,
        );
        expect(relativeError(besselKScaled(n, x) * Math.sqrt(2 / Math.PI) * Math.sqrt(x), 1)).toBeLessThan(
          tolerance,
        );
      }
    }
    expect(relativeError(besselKScaled(1, 1e-300), 1e300)).toBeLessThan(4e-16);
    // mpmath: −ln(5e-301) − γ
    expect(relativeError(besselKScaled(0, 1e-300), 690.8914594138721)).toBeLessThan(4e-16);
    expect(besselKScaled(0, Number.MIN_VALUE)).toBeGreaterThan(744);
    expect(besselIScaled(1, 1e-300)).toBe(5e-301);
    expect(besselIScaled(0, 1e-300)).toBe(1);
  });

  it("never leave NaN where they overflow or vanish", () => {
    expect(besselK(20, 1e-300)).toBe(Infinity);
    expect(besselKScaled(5, Number.MIN_VALUE)).toBe(Infinity);
    expect(besselI(20, 1e-300)).toBe(0);
    expect(besselI(0, 1e4)).toBe(Infinity);
    expect(besselI(3, -1e4)).toBe(-Infinity);
    expect(besselK(0, 1e4)).toBe(0);
    expect(besselI(2, Infinity)).toBe(Infinity);
    expect(besselK(2, Infinity)).toBe(0);
    expect(besselIScaled(2, Infinity)).toBe(0);
    expect(besselKScaled(2, Infinity)).toBe(0);
  });

  it("reach to where I itself overflows and K itself vanishes, not only e^x", () => {
    // mpmath, 40 digits.
    expect(relativeError(besselI(0, 712), 2.4684110577627523e307)).toBeLessThan(1e-14);
    expect(relativeError(besselK(0, 705), 3.135297023712879e-308)).toBeLessThan(1e-14);
  });

  it("give finite ratios for an annular fin of any size", () => {
    fc.assert(
      fc.property(positive(8), fc.double({ min: 1.0001, max: 50, noNaN: true }), (a, ratio) => {
        const b = a * ratio;
        const decay = Math.exp(2 * (a - b));
        const up =
          besselKScaled(1, a) * besselIScaled(1, b) - besselIScaled(1, a) * besselKScaled(1, b) * decay;
        const down =
          besselKScaled(0, a) * besselIScaled(1, b) + besselIScaled(0, a) * besselKScaled(1, b) * decay;
        const efficiency = ((2 * a) / (b * b - a * a)) * (up / down);
        expect(efficiency).toBeGreaterThan(0);
        expect(efficiency).toBeLessThan(1 + 1e-3);
      }),
    );
  });

  it("have the parity of their order, and K no value below 0", () => {
    for (const n of [0, 1, 2, 3, 6, 11]) {
      const sign = n % 2 === 0 ? 1 : -1;
      for (const x of [0.3, 4, 33, 500]) {
        expect(besselI(n, -x)).toBe(sign * besselI(n, x));
        expect(besselIScaled(n, -x)).toBe(sign * besselIScaled(n, x));
        expect(besselJ(n, -x)).toBe(sign * besselJ(n, x));
      }
      expect(besselK(n, -1)).toBeNaN();
      expect(besselKScaled(n, -1)).toBeNaN();
      expect(besselY(n, -1)).toBeNaN();
      expect(besselK(n, 0)).toBe(Infinity);
      expect(besselY(n, 0)).toBe(-Infinity);
      expect(besselI(n, 0)).toBe(n === 0 ? 1 : 0);
      expect(besselJ(n, 0)).toBe(n === 0 ? 1 : 0);
    }
  });
});

describe("Bessel functions J and Y", () => {
  it("keep together by the Wronskian J_(n+1)·Y_n − J_n·Y_(n+1) = 2/(πx) up to order 20", () => {
    fc.assert(
      fc.property(fc.double({ min: -2, max: 5, noNaN: true }), fc.integer({ min: 0, max: 20 }), (e, n) => {
        const x = 10 ** e;
        const [first, second] = [besselJ(n + 1, x) * besselY(n, x), besselJ(n, x) * besselY(n + 1, x)];
        fc.pre(Number.isFinite(second));
        expect(Math.abs(((first - second) * Math.PI * x) / 2 - 1)).toBeLessThan(
          6e-15 * Math.max(1, Math.abs(second) * x),
        );
      }),
      { numRuns: 2000 },
    );
  });

  it("keep their amplitude and phase for large x", () => {
    // mpmath, 40 digits, at the doubles written.
    const exact: [x: number, j0: number, j1: number, y0: number, y1: number][] = [
      [551.25, -0.026303111130127416, -0.021541572494771583, -0.021517705965939514, 0.026283604772325865],
      [1234.5, -0.013550379618035721, 0.0182175083373925, 0.018222995047412552, 0.013557761447180334],
      [
        98765.4321, 0.0018694734249184702, -0.001717792709691443, -0.0017178021738786437,
        -0.0018694821213159315,
      ],
      [
        10000000.125, -0.0001156951641941852, 0.0002242244474380427, 0.00022422445322280057,
        0.00011569517540540786,
      ],
    ];
    for (const [x, j0, j1, y0, y1] of exact) {
      const amplitude = Math.sqrt(2 / (Math.PI * x));
      for (const [got, value] of [
        [besselJ(0, x), j0],
        [besselJ(1, x), j1],
        [besselY(0, x), y0],
        [besselY(1, x), y1],
      ] as const) {
        expect(Math.abs(got - value) / amplitude).toBeLessThan(2e-15);
      }
    }
    expect(besselJ(0, Infinity)).toBe(0);
    expect(besselY(3, Infinity)).toBe(0);
  });

  it("hold Y to 2e-15 of the amplitude √(J² + Y²)", () => {
    // mpmath, 40 digits.
    const exact: [n: number, x: number, y: number, amplitude: number][] = [
      [0, 0.001, -4.471416611375923, 4.58187],
      [0, 0.5, -0.44451873350670656, 1.03842],
      [0, 3.9, 0.023375908198718962, 0.402505],
      [0, 4.5, -0.19470500862950454, 0.375043],
      [0, 12.75, -0.12824200354074158, 0.223367],
      [0, 60.5, -0.002284801030573988, 0.102578],
      [1, 0.001, -636.6221672311394, 636.622],
      [1, 0.5, -1.471472392670243, 1.49128],
      [1, 3.9, 0.4078200195265379, 0.408729],
      [1, 4.5, 0.3009973230696546, 0.379458],
      [1, 12.75, -0.18804588535941155, 0.223709],
      [1, 60.5, 0.10253734416809376, 0.102585],
      [2, 0.001, -1273239.8630456675, 1.27324e6],
      [2, 0.5, -5.441370837174266, 5.44146],
      [2, 3.9, 0.18576256335335176, 0.430045],
      [2, 4.5, 0.3284815966604621, 0.394155],
      [2, 12.75, 0.0987446097588731, 0.224748],
      [2, 60.5, 0.005674465300593617, 0.102606],
      [5, 0.001, -2.4446200786802637e17, 2.44462e17],
      [5, 0.5, -7946.301478807473, 7946.3],
      [5, 3.9, -0.849498521830837, 0.858033],
      [5, 4.5, -0.5963193651358759, 0.627304],
      [5, 12.75, -0.21631036913036936, 0.232749],
      [5, 60.5, 0.10007209012592687, 0.102754],
      [10, 0.001, -1.1828049377990414e38, 1.1828e38],
      [10, 0.5, -121963623349.56963, 1.21964e11],
      [10, 3.9, -224.41602265471468, 224.416],
      [10, 4.5, -62.34502461978147, 62.345],
      [10, 12.75, 0.104576751483926, 0.279514],
      [10, 60.5, 0.07763379190703476, 0.103291],
    ];
    for (const [n, x, y, amplitude] of exact) {
      expect(Math.abs(besselY(n, x) - y) / amplitude).toBeLessThan(2e-15);
    }
  });

  it("have no value for an order that is not whole or below 0", () => {
    for (const n of [-1, 0.5, Number.NaN]) {
      for (const f of [besselI, besselIScaled, besselK, besselKScaled, besselJ, besselY]) {
        expect(f(n, 1)).toBeNaN();
      }
      expect(besselJZero(n, 1)).toBeNaN();
    }
    expect(besselJZero(0, 0)).toBeNaN();
    expect(besselJZero(0, 1.5)).toBeNaN();
  });
});

describe("zeros of J", () => {
  it("are those of Abramowitz & Stegun, table 9.5", () => {
    // From memory, confirmed with mpmath.
    const table: [n: number, m: number, zero: number][] = [
      [0, 1, 2.404825557695773],
      [0, 2, 5.520078110286311],
      [0, 3, 8.653727912911013],
      [1, 1, 3.8317059702075125],
      [1, 2, 7.015586669815619],
      [2, 1, 5.135622301840683],
      [5, 1, 8.771483815959954],
      [8, 1, 12.225092264004655],
    ];
    for (const [n, m, zero] of table) {
      expect(besselJZero(n, m)).toSatisfy((x: number) => relativeError(x, zero) < 4e-16);
    }
  });

  it("lie between one another's neighbours and change the sign of J, up to order 50 and number 200", () => {
    for (let n = 0; n <= 50; n += 1) {
      let last = 0;
      for (let m = 1; m <= 200; m += 1) {
        const zero = besselJZero(n, m);
        expect(zero).toBeGreaterThan(last);
        if (n < 50) {
          // j_(n,m) < j_(n+1,m) < j_(n,m+1) (A&S 9.5.2): none is left out or named twice.
          const above = besselJZero(n + 1, m);
          expect(above).toBeGreaterThan(zero);
          expect(above).toBeLessThan(besselJZero(n, m + 1));
        }
        const step = 4e-15 * zero;
        expect(besselJ(n, zero - step) * besselJ(n, zero + step)).toBeLessThan(0);
        last = zero;
      }
      expect(besselJ(n, besselJZero(n, 1) / 2)).toBeGreaterThan(0);
    }
  });
});

describe("error functions", () => {
  it("keep erfc and e^(x²)·erfc x together and their limits", () => {
    fc.assert(
      fc.property(fc.double({ min: -5, max: 20, noNaN: true }), (x) => {
        // e^(x²) itself carries the rounding of x².
        expect(relativeError(erfcx(x) * Math.exp(-x * x), erfc(x))).toBeLessThan(4e-16 * (x * x + 5));
        expect(erf(-x)).toBe(-erf(x));
      }),
    );
    expect(erfcx(1e300)).toSatisfy(
      (value: number) => relativeError(value, 1e-300 / Math.sqrt(Math.PI)) < 1e-15,
    );
    expect(erfcx(0)).toBe(1);
    expect(erfc(-Infinity)).toBe(2);
    expect(erfc(30)).toBe(0);
    expect([erf(Infinity), erf(-Infinity), erf(0)]).toEqual([1, -1, 0]);
    expect([erf(Number.NaN), erfc(Number.NaN), erfcx(Number.NaN)]).toEqual([
      Number.NaN,
      Number.NaN,
      Number.NaN,
    ]);
    expect(erfcx(-30)).toBe(Infinity);
    expect(erfcx(Infinity)).toBe(0);
  });
});

describe("Chebyshev tables", () => {
  it("are the numbers that their generator computes", async () => {
    const folder = new URL("../../lib/numeric/tables/", import.meta.url);
    for (const [name, text] of Object.entries(tableFiles())) {
      expect(await readFile(new URL(name, folder), "utf8")).toBe(text);
    }
  });
});
