import { describe, expect, it } from "vitest";
import type { WorkedCase } from "@/lib/calculation/definition";
import { prepare } from "@/lib/calculation/execute";
import { runAllCases, runCase } from "@/lib/calculation/worked-case";
import { preparedTemplate, suppliedMaterials, suppliedSlugs, wall, workedCase } from "./calculation-fixtures";

const prepared = prepare(
  wall({
    working: "q = k*(T_hot - T_cold)/t\nT_mean = (T_hot + T_cold)/2",
    results: [
      { symbol: "q", label: "Heat flux", quantity: "heat flux", unit: "W/m²" },
      { symbol: "T_mean", label: "Mean", quantity: "temperature", unit: "°C" },
    ],
  }),
);
const outcome = (parts: Partial<WorkedCase>) => runCase(prepared, workedCase(parts), {});

describe("runCase", () => {
  it("passes within the tolerance and tells the deviation in the case's unit", () => {
    const result = outcome({ expected: { q: { value: 0.0521, unit: "kW/m²", absTol: 0.0001 } } });
    expect(result.passed).toBe(true);
    expect(result.deviations).toEqual([
      {
        symbol: "q",
        expected: 0.0521,
        found: expect.closeTo(0.052, 15),
        unit: "kW/m²",
        tolerance: 0.0001,
        passed: true,
      },
    ]);
  });

  it("fails outside it", () => {
    const result = outcome({ expected: { q: { value: 52.2, unit: "W/m²", relTol: 0.001 } } });
    expect(result.passed).toBe(false);
    expect(result.deviations[0]).toMatchObject({ passed: false, tolerance: expect.closeTo(0.0522, 12) });
  });

  it("takes the larger of both tolerances, and each end of a band as inside", () => {
    expect(outcome({ expected: { q: { value: 50, unit: "W/m²", absTol: 1, relTol: 0.05 } } }).passed).toBe(
      true,
    );
    expect(outcome({ expected: { q: { value: 50, unit: "W/m²", absTol: 2 } } }).passed).toBe(true);
  });

  it("reads the tolerance of an absolute temperature as a difference in its degree", () => {
    // Mean of 150 °C and 20 °C: 85 °C = 185 °F.
    const within = (value: number, absTol: number) =>
      outcome({ expected: { T_mean: { value, unit: "°F", absTol } } }).passed;
    expect(within(186, 1)).toBe(true);
    expect(within(186.1, 1)).toBe(false);
  });

  it("passes a case that must be refused only with its code", () => {
    const inputs = { t: -1 };
    expect(outcome({ inputs, refused: "out-of-range" }).passed).toBe(true);
    expect(outcome({ inputs, refused: "unit-mismatch" })).toMatchObject({
      passed: false,
      refused: { code: "out-of-range", problems: [{ pointer: "#/inputs/t" }] },
    });
    expect(outcome({ refused: "out-of-range" })).toMatchObject({ passed: false, refused: null });
  });

  it("fails a case that was refused unexpectedly, and says why", () => {
    const result = outcome({ inputs: { t: -1 }, expected: { q: { value: 1, unit: "W/m²", absTol: 1 } } });
    expect(result).toMatchObject({
      passed: false,
      refused: { message: "Thickness is −1 mm. It must be greater than 0." },
    });
  });

  it("compares lists element by element and notices a wrong length", () => {
    const lining = preparedTemplate("furnace-lining");
    const inputs = { layers: [{ t: 100, material: { value: 1, unit: "W/(m·K)" } }], T_hot: 100, T_amb: 100 };
    const faces = (values: number[]) =>
      runCase(
        lining,
        workedCase({ inputs, expected: { T_face: { values, unit: "°C", absTol: 1e-6 } } }),
        suppliedMaterials,
      );
    expect(faces([100, 100]).passed).toBe(true);
    expect(faces([100, 101]).deviations.map(({ index, passed }) => [index, passed])).toEqual([
      [0, true],
      [1, false],
    ]);
    expect(faces([100]).passed).toBe(false);
    expect(faces([100, 100, 100]).passed).toBe(false);
  });
});

describe("the supplied worked cases", () => {
  it.each(suppliedSlugs)("%s runs every case to an end", (slug) => {
    const cases = runAllCases(preparedTemplate(slug), suppliedMaterials);
    for (const { title, deviations, refused } of cases) {
      expect(refused !== null || deviations.length > 0, title).toBe(true);
    }
  });
});
