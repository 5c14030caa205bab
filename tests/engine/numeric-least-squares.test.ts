import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { leastSquares } from "@/lib/numeric/least-squares";

/* J. W. Longley's data of 1967 as the NIST Statistical Reference Datasets give them, with NIST's certified values:
   seven coefficients whose columns are nearly dependent. Numbers from memory, confirmed by an exact solution of the
   normal equations in 60-digit arithmetic. */
const longley = [
  [60323, 83, 234289, 2356, 1590, 107608],
  [61122, 88.5, 259426, 2325, 1456, 108632],
  [60171, 88.2, 258054, 3682, 1616, 109773],
  [61187, 89.5, 284599, 3351, 1650, 110929],
  [63221, 96.2, 328975, 2099, 3099, 112075],
  [63639, 98.1, 346999, 1932, 3594, 113270],
  [64989, 99, 365385, 1870, 3547, 115094],
  [63761, 100, 363112, 3578, 3350, 116219],
  [66019, 101.2, 397469, 2904, 3048, 117388],
  [67857, 104.6, 419180, 2822, 2857, 118734],
  [68169, 108.4, 442769, 2936, 2798, 120445],
  [66513, 110.8, 444546, 4681, 2637, 121950],
  [68655, 112.6, 482704, 3813, 2552, 123366],
  [69564, 114.2, 502601, 3931, 2514, 125368],
  [69331, 115.7, 518173, 4806, 2572, 127852],
  [70551, 116.9, 554894, 4007, 2827, 130081],
];
const certified = {
  coefficients: [
    -3482258.63459582, 15.0618722713733, -0.35819179292591e-1, -2.02022980381683, -1.03322686717359,
    -0.511041056535807e-1, 1829.15146461355,
  ],
  standardErrors: [
    890420.383607373, 84.9149257747669, 0.334910077722432e-1, 0.488399681651699, 0.214274163161675,
    0.22607320006937, 455.478499142212,
  ],
  residualDeviation: 304.854073561965,
};

const closeTo = (relative: number, expected: number) => (got: number | undefined) =>
  Math.abs((got ?? Number.NaN) - expected) <= relative * Math.abs(expected);

describe("least squares", () => {
  it("gives NIST's certified values for Longley's nearly dependent columns", () => {
    const fit = leastSquares(
      [
        longley.map(() => 1),
        ...[1, 2, 3, 4, 5].map((j) => longley.map((row) => row[j]!)),
        longley.map((_, year) => 1947 + year),
      ],
      longley.map(([y]) => y!),
    );
    certified.coefficients.forEach((value, j) => {
      expect(fit.coefficients[j]).toSatisfy(closeTo(1e-8, value), `coefficient ${j}`);
    });
    certified.standardErrors.forEach((value, j) => {
      expect(fit.standardErrors[j]).toSatisfy(closeTo(1e-8, value), `standard error ${j}`);
    });
    expect(fit.residualStandardDeviation).toSatisfy(closeTo(1e-10, certified.residualDeviation));
  });

  it("fits a line with the standard errors and the covariance of the textbook formulas", () => {
    const xs = [293, 373, 473, 573, 673];
    const ys = [16.2, 17.4, 18.9, 20.1, 21.8];
    const fit = leastSquares([xs.map(() => 1), xs], ys);
    // Slope S_xy/S_xx, its variance s²/S_xx, covariance −x̄·s²/S_xx, variance of the intercept s²·(1/n + x̄²/S_xx).
    const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
    const [xMean, yMean] = [mean(xs), mean(ys)];
    const sxx = xs.reduce((sum, x) => sum + (x - xMean) ** 2, 0);
    const slope = xs.reduce((sum, x, i) => sum + (x - xMean) * (ys[i]! - yMean), 0) / sxx;
    const variance =
      xs.reduce((sum, x, i) => sum + (ys[i]! - yMean - slope * (x - xMean)) ** 2, 0) / (xs.length - 2);
    expect(fit.coefficients[1]).toBeCloseTo(slope, 14);
    expect(fit.coefficients[0]).toBeCloseTo(yMean - slope * xMean, 11);
    expect(fit.covariance[1]![1]).toSatisfy(closeTo(1e-11, variance / sxx));
    expect(fit.covariance[0]![1]).toSatisfy(closeTo(1e-11, (-xMean * variance) / sxx));
    expect(fit.covariance[1]![0]).toSatisfy(closeTo(1e-11, (-xMean * variance) / sxx));
    expect(fit.standardErrors[0]).toSatisfy(
      closeTo(1e-11, Math.sqrt(variance * (1 / xs.length + xMean ** 2 / sxx))),
    );
  });

  it("leaves residuals that no column can explain further", () => {
    const row = fc.tuple(
      fc.double({ min: -1, max: 1, noNaN: true }),
      fc.double({ min: -9, max: 9, noNaN: true }),
    );
    fc.assert(
      fc.property(fc.array(row, { minLength: 6, maxLength: 20 }), (points) => {
        const xs = points.map(([x], i) => x + 3 * i);
        const columns = [xs.map(() => 1), xs, xs.map((x) => x * x)];
        const fit = leastSquares(
          columns,
          points.map(([, y]) => y),
        );
        for (const column of columns) {
          const product = column.reduce((sum, value, i) => sum + value * fit.residuals[i]!, 0);
          expect(Math.abs(product)).toBeLessThan(1e-8);
        }
      }),
    );
  });

  it("does not depend on the units of a column", () => {
    const ys = [1, 2.2, 2.9, 4.1];
    const ones = [1, 1, 1, 1];
    const plain = leastSquares([ones, [1, 2, 3, 4]], ys);
    const tiny = leastSquares([ones, [1e-200, 2e-200, 3e-200, 4e-200]], ys);
    expect(tiny.coefficients[1]! * 1e-200).toBeCloseTo(plain.coefficients[1]!, 13);
    expect(tiny.standardErrors[1]! * 1e-200).toBeCloseTo(plain.standardErrors[1]!, 13);
  });

  it("passes through the points when there are as many coefficients, and has no standard error then", () => {
    const fit = leastSquares(
      [
        [1, 1],
        [2, 5],
      ],
      [7, 1],
    );
    expect(fit.coefficients[0]).toBeCloseTo(11, 13);
    expect(fit.coefficients[1]).toBeCloseTo(-2, 13);
    expect(fit.residualStandardDeviation).toBeNaN();
    expect(fit.standardErrors).toEqual([Number.NaN, Number.NaN]);
  });

  it("takes a hundred thousand points", () => {
    const xs = Array.from({ length: 100_000 }, (_, i) => i / 1000);
    const fit = leastSquares(
      [xs.map(() => 1), xs],
      xs.map((x) => 3 - 0.25 * x),
    );
    // Plain sums of n terms round to about n·2⁻⁵³.
    expect(fit.coefficients[0]).toBeCloseTo(3, 9);
    expect(fit.coefficients[1]).toBeCloseTo(-0.25, 10);
  });

  it("names the column that those before it already say", () => {
    const xs = [1, 2, 3, 4];
    const dependent = [xs.map(() => 1), xs, xs.map((x) => 3 * x - 2)];
    expect(() => leastSquares(dependent, [1, 2, 3, 5])).toThrow("Column 3");
    expect(() => leastSquares([xs, [0, 0, 0, 0]], [1, 2, 3, 5])).toThrow("Column 2");
  });

  it("refuses shapes that do not fit and numbers that are not finite", () => {
    expect(() => leastSquares([], [])).toThrow(RangeError);
    expect(() => leastSquares([[1], [2]], [1])).toThrow("at least as many points");
    expect(() => leastSquares([[1, 2], [1]], [1, 2])).toThrow("Column 2 of the fit has 1 values");
    expect(() => leastSquares([[1, Number.NaN]], [1, 2])).toThrow("not finite");
    expect(() => leastSquares([[1, 1]], [Infinity, 2])).toThrow("must be finite");
  });
});
