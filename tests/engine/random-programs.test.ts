import { describe, expect, it } from "vitest";
import { disagreements } from "./oracle/compare";

const groups = 20;
const programs = 25;

describe("random programs agree with the oracle interpreter", () => {
  it.each(Array.from({ length: groups }, (_, group) => group * programs + 1))(
    `seeds from %d, ${programs} programs of two runs each`,
    (first) => {
      const seeds = Array.from({ length: programs }, (_, i) => first + i);
      expect(seeds.flatMap((seed) => disagreements(seed).map((text) => `seed ${seed}: ${text}`))).toEqual([]);
    },
    120_000,
  );
});
