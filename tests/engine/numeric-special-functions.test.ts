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
import table from "../reference/data/special-functions.json";

/* Reference values: mpmath at 40 digits and more, rounded to doubles; the file names them. */

const budget = 2e-15;

const columns: Record<string, (x: number) => number> = {
  i0: (x) => besselI(0, x),
  i1: (x) => besselI(1, x),
  k0: (x) => besselK(0, x),
  k1: (x) => besselK(1, x),
  i0e: (x) => besselIScaled(0, x),
  i1e: (x) => besselIScaled(1, x),
  k0e: (x) => besselKScaled(0, x),
  k1e: (x) => besselKScaled(1, x),
  erf,
  erfc,
  ...Object.fromEntries(
    [2, 3, 5, 10].flatMap((n) => [
      [`iv${n}`, (x: number) => besselI(n, x)],
      [`kn${n}`, (x: number) => besselK(n, x)],
    ]),
  ),
};

/** Largest relative deviation, an expected 0 being met by 0 only. */
function worst(pairs: readonly (readonly [got: number, expected: number])[]): number {
  return Math.max(
    ...pairs.map(([got, expected]) => (got === expected ? 0 : Math.abs(got - expected) / Math.abs(expected))),
  );
}

const column = (name: string): [number, number][] => {
  const index = table.columns.indexOf(name);
  return table.rows.map((row) => [row[0]!, row[index]!]);
};

describe("special functions against the table", () => {
  it.each(Object.keys(columns).filter((name) => name !== "erfc"))("%s holds 2e-15", (name) => {
    expect(worst(column(name).map(([x, value]) => [columns[name]!(x), value]))).toBeLessThan(budget);
  });

  it("erfc holds 1e-14", () => {
    expect(worst(column("erfc").map(([x, value]) => [erfc(x), value]))).toBeLessThan(1e-14);
  });

  it.each([
    ["j0", 0],
    ["j1", 1],
    ["jn2", 2],
    ["jn3", 3],
    ["jn5", 5],
    ["jn10", 10],
  ] as const)("%s holds 2e-15 of its amplitude", (name, order) => {
    for (const [x, value] of column(name)) {
      // Before its first maximum J has no zeros and is held to its own size; the amplitude tends to √(2/(πx)) from above.
      const scale = x > order ? Math.max(Math.abs(value), Math.sqrt(2 / (Math.PI * x))) : Math.abs(value);
      expect(Math.abs(besselJ(order, x) - value) / scale).toBeLessThan(budget);
    }
  });
});

describe("special functions against further values", () => {
  it("scaled I and K hold 2e-15 for orders to 20 and arguments to 1e300", () => {
    const { rows } = table.modified;
    expect(worst(rows.map(([n, x, i]) => [besselIScaled(n!, x!), i!]))).toBeLessThan(budget);
    expect(worst(rows.map(([n, x, , k]) => [besselKScaled(n!, x!), k!]))).toBeLessThan(budget);
  });

  it("J and Y hold 2e-15 of the amplitude for orders to 20, also at zeros", () => {
    for (const [n, x, j, y] of table.ordinary.rows as [number, number, number, number][]) {
      const amplitude = Math.hypot(j, y);
      expect(Math.abs(besselY(n, x) - y) / amplitude, `Y_${n}(${x})`).toBeLessThan(budget);
      const scale = x > n ? amplitude : Math.abs(j);
      expect(Math.abs(besselJ(n, x) - j) / scale, `J_${n}(${x})`).toBeLessThan(budget);
    }
  });

  it("erf, erfc and erfcx hold 2e-15 on both sides of 0", () => {
    const { rows } = table.error;
    expect(worst(rows.map(([x, value]) => [erf(x!), value!]))).toBeLessThan(budget);
    expect(worst(rows.map(([x, , value]) => [erfc(x!), value!]))).toBeLessThan(budget);
    expect(worst(rows.map(([x, , , value]) => [erfcx(x!), value!]))).toBeLessThan(budget);
  });

  it("zeros of J hold two units in the last place for orders to 50 and the first 200", () => {
    const pairs = table.zeros.rows.map(([n, m, zero]) => [besselJZero(n!, m!), zero!] as const);
    expect(worst(pairs)).toBeLessThan(4.5e-16);
  });

  it("zeros of J are those of Abramowitz and Stegun, table 9.5 (from memory)", () => {
    const printed: [number, number, number, number][] = [
      [0, 1, 2.4048255577, 10],
      [0, 2, 5.5200781103, 10],
      [0, 3, 8.6537279129, 10],
      [0, 5, 14.9309177085, 10],
      [1, 1, 3.83171, 5],
      [1, 2, 7.01559, 5],
      [1, 5, 16.47063, 5],
      [2, 1, 5.13562, 5],
      [3, 1, 6.38016, 5],
      [5, 1, 8.77148, 5],
    ];
    for (const [n, m, zero, digits] of printed) expect(besselJZero(n, m)).toBeCloseTo(zero, digits);
  });
});
