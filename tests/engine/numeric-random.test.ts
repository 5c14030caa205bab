import { describe, expect, it } from "vitest";
import { erf } from "@/lib/numeric/erf";
import { seededRandom, splitMix64, xoshiro128 } from "@/lib/numeric/random";
import { mean, quantile, standardDeviation } from "@/lib/numeric/statistics";

const take = <T>(count: number, next: () => T): T[] => Array.from({ length: count }, () => next());

/** Largest distance of the sample's distribution from the one given, times √n (Kolmogorov). */
function kolmogorov(sample: number[], distribution: (x: number) => number): number {
  const n = sample.length;
  const sorted = sample.toSorted((a, b) => a - b);
  const distances = sorted.map((x, i) => Math.max((i + 1) / n - distribution(x), distribution(x) - i / n));
  return Math.max(...distances) * Math.sqrt(n);
}

describe("random numbers", () => {
  it("are the words of xoshiro128** for a known state", () => {
    // Output of D. Blackman's and S. Vigna's xoshiro128starstar.c for the state 1, 2, 3, 4, as the tests of Rust's
    // rand_xoshiro hold it.
    expect(take(10, xoshiro128([1, 2, 3, 4]))).toEqual([
      11520, 0, 5927040, 70819200, 2031721883, 1637235492, 1287239034, 3734860849, 3729100597, 4258142804,
    ]);
  });

  it("are seeded by the words of splitmix64", () => {
    // Output of S. Vigna's splitmix64.c for the seed 1234567, as Rosetta Code holds it.
    expect(take(5, splitMix64(1234567n))).toEqual([
      6457827717110365317n,
      3203168211198807973n,
      9817491932198370423n,
      4593380528125082431n,
      16408922859458223821n,
    ]);
  });

  it("repeat for the same seed and differ for another", () => {
    const [first, again, other] = [7, 7, 8].map((seed) => take(20, seededRandom(seed).normal));
    expect(again).toEqual(first);
    expect(other).not.toEqual(first);
    // Beyond 32 bits a seed still counts.
    expect(take(20, seededRandom(7 + 2 ** 40).normal)).not.toEqual(first);
  });

  it("keep their bits: issued records are replayed with them", () => {
    const { uniform, normal } = seededRandom(2024);
    // The same in Python, whose whole numbers have no limit, to the last digit or the one before it.
    expect([uniform(), uniform()]).toEqual([0.12948979913634473, 0.7847239677837939]);
    expect([normal(), normal(), normal()]).toEqual([
      0.512636870542684, 0.7217487385041621, 0.38361096984621323,
    ]);
  });

  it("fill (0, 1) evenly without its ends", () => {
    const sample = take(100_000, seededRandom(1).uniform);
    expect(Math.min(...sample)).toBeGreaterThan(0);
    expect(Math.max(...sample)).toBeLessThan(1);
    // 1.95 is passed by one sample of a thousand.
    expect(kolmogorov(sample, (x) => x)).toBeLessThan(1.95);
    expect(mean(sample)).toBeCloseTo(0.5, 2);
  });

  it("follow the normal distribution, tails included", () => {
    const sample = take(100_000, seededRandom(2).normal);
    expect(kolmogorov(sample, (x) => 0.5 * (1 + erf(x / Math.SQRT2)))).toBeLessThan(1.95);
    expect(mean(sample)).toBeCloseTo(0, 1);
    expect(standardDeviation(sample)).toBeCloseTo(1, 1);
    // 270 of 100 000 lie beyond three standard deviations; the count varies by 16.
    const beyond = sample.filter((x) => Math.abs(x) > 3).length;
    expect(Math.abs(beyond - 270)).toBeLessThan(60);
    expect(
      quantile(
        sample.toSorted((a, b) => a - b),
        0.025,
      ),
    ).toBeCloseTo(-1.96, 1);
  });

  it("show no link between neighbours", () => {
    const sample = take(100_000, seededRandom(3).normal);
    const product = mean(sample.slice(1).map((x, i) => x * sample[i]!));
    expect(Math.abs(product)).toBeLessThan(4 / Math.sqrt(sample.length));
  });

  it("refuse a seed that is not whole or below 0", () => {
    expect(() => seededRandom(-1)).toThrow(RangeError);
    expect(() => seededRandom(0.5)).toThrow(RangeError);
    expect(() => seededRandom(Number.NaN)).toThrow(RangeError);
    expect(() => seededRandom(2 ** 53)).toThrow("whole number");
  });
});
