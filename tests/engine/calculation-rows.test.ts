import { describe, expect, it } from "vitest";
import type { GivenInputs } from "@/lib/calculation/evaluation";
import { evaluate, evaluateRows } from "@/lib/calculation/execute";
import { preparedTemplate, problemsOf, suppliedMaterials, suppliedSlugs } from "./calculation-fixtures";

const plain = preparedTemplate("plane-wall");

describe("evaluateRows", () => {
  it.each(suppliedSlugs)("%s gives the digits of single runs", (slug) => {
    const prepared = preparedTemplate(slug);
    const varied = prepared.definition.inputs.flatMap((input) =>
      input.kind === "number" &&
      input.default !== undefined &&
      input.default > 0 &&
      input.appliesWhen === undefined
        ? [{ [input.symbol]: input.default * 1.001 } as GivenInputs]
        : [],
    );
    const rows: GivenInputs[] = [{}, ...varied];
    const outcome = evaluateRows(prepared, { rows }, suppliedMaterials);
    outcome.rows.forEach((row, i) => {
      if ("problem" in row) {
        expect(() => evaluate(prepared, { inputs: rows[i]! }, suppliedMaterials)).toThrow(row.problem.detail);
        return;
      }
      const single = evaluate(prepared, { inputs: rows[i]! }, suppliedMaterials);
      for (const [symbol, result] of Object.entries(single.results)) {
        expect(row.results[symbol]).toEqual(result.value ?? result.values);
        expect(outcome.units[symbol]).toEqual({ unit: result.unit, ucum: result.ucum });
      }
      expect(row.status).toBe(single.status);
    });
  });

  it("answers a bad row in its place and spoils no other", () => {
    const rows: GivenInputs[] = [
      { t: 50 },
      { t: 0, T_hot: -300 },
      { t: { value: 2, unit: "furlongs/K" } },
      { thick: 1 },
      { t: { value: 2, unit: "in" } },
    ];
    const outcome = evaluateRows(plain, { rows }, {});
    expect(
      outcome.rows.map((row) =>
        "problem" in row ? row.problem.errors?.map(({ pointer, code }) => `${pointer} ${code}`) : row.status,
      ),
    ).toEqual([
      "ok",
      ["#/rows/1/t out-of-range", "#/rows/1/T_hot out-of-range"],
      ["#/rows/2/t/unit unreadable-unit"],
      ["#/rows/3/thick unknown-member"],
      "ok",
    ]);
    expect(outcome.rows[0]).toMatchObject({ results: { q: 104 } });
  });

  it("takes what a row leaves out from the common inputs, and points there when they are wrong", () => {
    const common = { k: { value: 0.08, unit: "W/(m·K)" } };
    const { rows } = evaluateRows(plain, { rows: [{}, { k: 0.04 }], common }, {});
    expect(rows.map((row) => ("results" in row ? row.results.q : null))).toEqual([104, 52]);
    const bad = evaluateRows(plain, { rows: [{}, { k: 1 }], common: { k: -1 } }, {});
    expect(bad.rows[0]).toMatchObject({
      problem: { code: "out-of-range", errors: [{ pointer: "#/common/k" }] },
    });
    expect(bad.rows[1]).toMatchObject({ status: "ok" });
  });

  it("refuses the whole request for units and common members that no row could use", () => {
    const request = { rows: [{}], common: { thick: 1 }, units: { q: "kg", z: "m" } };
    expect(problemsOf(() => evaluateRows(plain, request, {}))).toEqual([
      "#/units/q unit-mismatch",
      "#/units/z unknown-member",
      "#/common/thick unknown-member",
    ]);
  });

  it("gives results in the units asked for, stated once", () => {
    const { units, rows } = evaluateRows(plain, { rows: [{}], units: { q: "kW/m²" } }, {});
    expect(units.q).toEqual({ unit: "kW/m²", ucum: "kW/m2" });
    expect(rows[0]).toMatchObject({ results: { q: expect.closeTo(0.052, 15) } });
  });

  it("marks rows with cautions and stops, and says why", () => {
    const lining = preparedTemplate("furnace-lining");
    const hot = { layers: [{ t: 50, material: "stone-wool-mat" }], T_hot: 700 };
    const { rows } = evaluateRows(lining, { rows: [{}, hot], allowExtrapolation: true }, suppliedMaterials);
    expect(rows[0]).toMatchObject({ status: "caution", cautions: [{ code: "shell-temperature" }] });
    expect(rows[1]).toMatchObject({ status: "stop" });
    const codes = "cautions" in rows[1]! ? rows[1].cautions?.map(({ code }) => code) : [];
    expect(codes).toEqual(expect.arrayContaining(["service-stone-wool-mat", "extrapolation"]));
  });

  it("does not let the tables of one row reach the next", () => {
    const lining = preparedTemplate("furnace-lining");
    const one = { t: 100, material: "insulating-brick-23" };
    const { rows } = evaluateRows(
      lining,
      { rows: [{ layers: [one, one, one, one] }, { layers: [one] }] },
      suppliedMaterials,
    );
    expect(rows.map((row) => ("results" in row ? (row.results.T_face as number[]).length : 0))).toEqual([
      5, 2,
    ]);
  });
});
