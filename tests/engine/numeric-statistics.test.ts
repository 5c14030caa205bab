import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { mean, quantile, standardDeviation } from "@/lib/numeric/statistics";

const finite = fc.double({ min: -1e6, max: 1e6, noNaN: true });

describe("statistics", () => {
  it("give mean and sample standard deviation", () => {
    const values = [2, 4, 4, 4, 5, 5, 7, 9];
    expect(mean(values)).toBe(5);
    // Σ (x − 5)² = 32, divisor 7.
    expect(standardDeviation(values)).toBeCloseTo(Math.sqrt(32 / 7), 14);
  });

  it("keep the digits of small deviations from a large mean", () => {
    // NIST Statistical Reference Datasets, NumAcc4 in kind: 1e7 + 0.1, 0.2, 0.3 … deviates by 0.1 exactly.
    const values = [
      10000000.2,
      ...Array.from({ length: 1000 }, (_, i) => (i % 2 === 0 ? 10000000.1 : 10000000.3)),
    ];
    expect(mean(values)).toBeCloseTo(10000000.2, 8);
    expect(standardDeviation(values)).toBeCloseTo(0.1, 8);
  });

  it("refuse too few values and pass on one that is not a number", () => {
    expect(mean([3])).toBe(3);
    expect(mean([1, Number.NaN])).toBeNaN();
    expect(() => mean([])).toThrow(RangeError);
    expect(() => standardDeviation([3])).toThrow("at least two values");
    expect(() => quantile([], 0.5)).toThrow(RangeError);
  });

  it("take quantiles linearly between ranks 1 + (n − 1)·p", () => {
    // Definition 7 of Hyndman and Fan, the default of R's quantile; worked by hand.
    const expected = [
      [0, 10],
      [0.25, 17.5],
      [0.5, 25],
      [0.9, 37],
      [1, 40],
    ] as const;
    for (const [p, value] of expected) expect(quantile([10, 20, 30, 40], p)).toBeCloseTo(value, 14);
    expect(quantile(Float64Array.of(1, 9, 10), 0.5)).toBe(9);
    expect(quantile([5], 0.3)).toBe(5);
  });

  it("give quantiles that rise with the probability and stay within the values", () => {
    fc.assert(
      fc.property(fc.array(finite, { minLength: 1 }), (values) => {
        const sorted = values.toSorted((a, b) => a - b);
        const taken = [0, 0.1, 0.3, 0.5, 0.8, 1].map((p) => quantile(sorted, p));
        expect(taken[0]).toBe(sorted[0]);
        expect(taken.at(-1)).toBe(sorted.at(-1));
        taken.slice(1).forEach((value, i) => expect(value).toBeGreaterThanOrEqual(taken[i]! - 1e-9));
      }),
    );
  });

  it("refuse a probability beyond 0 to 1", () => {
    expect(() => quantile([1, 2], 1.5)).toThrow(RangeError);
    expect(() => quantile([1, 2], Number.NaN)).toThrow(RangeError);
  });
});
