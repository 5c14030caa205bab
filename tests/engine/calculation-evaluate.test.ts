import { describe, expect, it } from "vitest";
import { Evaluation } from "@/lib/calculation/evaluation";
import { evaluate, prepare } from "@/lib/calculation/execute";
import {
  definitionOf,
  numberInput,
  preparedTemplate,
  refusalOf,
  suppliedMaterials,
  suppliedSlugs,
  wall,
} from "./calculation-fixtures";

describe("a run", () => {
  it("answers the demo: 480 °F on three inches", () => {
    const prepared = preparedTemplate("plane-wall");
    const inputs = { t: { value: 3, unit: "in" }, T_hot: { value: 480, unit: "°F" } };
    const run = evaluate(prepared, { inputs, units: { Q: "BTU/h" } }, {});
    expect(run.status).toBe("ok");
    expect(run.inputs.t).toEqual({ value: 3, unit: "in", ucum: "[in_i]", si: expect.closeTo(0.0762, 15) });
    expect(run.inputs.T_hot).toMatchObject({ value: 480, unit: "°F", ucum: "[degF]" });
    // q = k·ΔT/t = 0.04·(480 °F − 20 °C)/76.2 mm, by hand; 1 BTU/h = 0.29307107 W.
    const flux = (0.04 * (((480 - 32) * 5) / 9 - 20)) / 0.0762;
    expect(run.results.q).toMatchObject({
      unit: "W/m²",
      ucum: "W/m2",
      label: "Heat flux",
      quantity: "heat flux",
    });
    expect(run.results.q?.value).toBeCloseTo(flux, 9);
    expect(run.results.Q).toMatchObject({ unit: "BTU/h", ucum: "[Btu_IT]/h" });
    expect(run.results.Q?.value).toBeCloseTo(flux / 0.29307107017222, 7);
    expect(run.notices.map(({ message }) => message)).toContain("h is the hour.");
    expect(run.defaulted).toEqual(["A", "k", "T_cold"]);
  });

  it("lists lines with source text, unit and value when steps are asked, and not otherwise", () => {
    const prepared = preparedTemplate("plane-wall");
    expect(evaluate(prepared, {}, {})).not.toHaveProperty("steps");
    expect(evaluate(prepared, { steps: true, units: { Q: "kW" } }, {}).steps).toEqual([
      { symbol: "R", expression: "t/(k*A)", value: 2.5, unit: "K/W" },
      { symbol: "q", expression: "k*(T_hot - T_cold)/t", value: expect.closeTo(52, 12), unit: "W/m²" },
      { symbol: "Q", expression: "q*A", value: expect.closeTo(0.052, 15), unit: "kW" },
    ]);
  });

  it.each(suppliedSlugs)("%s runs finite on its defaults, in the shape of the contract", (slug) => {
    const run = evaluate(preparedTemplate(slug), { steps: true }, suppliedMaterials);
    expect(Evaluation.strict().parse(run)).toEqual(run);
    expect(JSON.parse(JSON.stringify(run))).toEqual(run);
    for (const { value, values } of Object.values(run.results)) {
      expect([value ?? 0, ...(values ?? [])].every(Number.isFinite)).toBe(true);
    }
  });

  it("gives the same bits again, whatever ran in between", () => {
    const prepared = preparedTemplate("furnace-lining");
    const first = evaluate(prepared, { steps: true }, suppliedMaterials);
    evaluate(
      prepared,
      { inputs: { layers: [{ t: 200, material: "fireclay-brick" }] }, allowExtrapolation: true },
      suppliedMaterials,
    );
    refusalOf(() => evaluate(prepared, { inputs: { T_hot: 5000 } }, suppliedMaterials));
    expect(evaluate(prepared, { steps: true }, suppliedMaterials)).toEqual(first);
  });

  it("tells an absolute temperature from a difference by the declared quantity of the result", () => {
    const prepared = prepare(
      wall({
        working: "dT = T_hot - T_cold\nT_mid = T_cold + dT/2\nq = k*dT/t",
        results: [
          { symbol: "dT", label: "Difference", quantity: "temperature difference", unit: "K" },
          { symbol: "T_mid", label: "Middle", quantity: "temperature", unit: "°C" },
          { symbol: "q", label: "Heat flux", quantity: "heat flux", unit: "W/m²" },
        ],
      }),
    );
    const { results } = evaluate(prepared, { units: { dT: "°F", T_mid: "°F" } }, {});
    expect(results.dT?.value).toBeCloseTo(234, 10);
    expect(results.T_mid?.value).toBeCloseTo(185, 10);
  });

  it("tells what a declared unit means even when nothing was typed in it", () => {
    const prepared = prepare(
      wall({ results: [{ symbol: "q", label: "Heat flux", quantity: "heat flux", unit: "BTU/(h·ft²)" }] }),
    );
    const notices = evaluate(prepared, {}, {}).notices.filter(({ code }) => code === "unit-reading");
    expect(notices.map(({ message }) => message).join(" ")).toContain("International Table");
  });

  it("tells how a unit with one stroke was read", () => {
    const prepared = preparedTemplate("plane-wall");
    const run = evaluate(prepared, { inputs: { k: { value: 1, unit: "W/m·K" } } }, {});
    expect(run.inputs.k).toMatchObject({ unit: "W/(m·K)", ucum: "W/(m.K)" });
    expect(run.notices.some(({ message }) => message.includes("everything after the stroke"))).toBe(true);
  });
});

describe("limits", () => {
  const prepared = prepare(
    wall({
      inputs: [...wall().inputs, numberInput("T_allow", "temperature", "°C", { default: 60 })],
      working: 'q = k*(T_hot - T_cold)/t\nT_surface = T_cold + q/"10 W/(m²·K)"',
      results: [
        { symbol: "q", label: "Heat flux", quantity: "heat flux", unit: "W/m²" },
        { symbol: "T_surface", label: "Surface", quantity: "temperature", unit: "°C", digits: 5 },
      ],
      limits: [
        {
          code: "surface",
          label: "Surface at most {T_allow}",
          when: "T_surface > T_allow",
          level: "caution",
          message: "The surface reaches {T_surface}; {T_allow} is allowed.",
        },
        {
          code: "flux",
          label: "Flux at most 1 kW/m²",
          when: 'q > "1 kW/m²" or T_hot > "900 °C"',
          level: "stop",
          message: "The flux is {q}.",
        },
      ],
    }),
  );

  it("are all listed, with value and bound where the condition is one comparison", () => {
    const run = evaluate(prepared, {}, {});
    expect(run.status).toBe("ok");
    expect(run.limits).toEqual([
      {
        code: "surface",
        level: "caution",
        label: "Surface at most 60 °C",
        broken: false,
        value: expect.closeTo(25.2, 10),
        bound: 60,
        unit: "°C",
      },
      { code: "flux", level: "stop", label: "Flux at most 1 kW/m²", broken: false },
    ]);
  });

  it("say what is broken with values in the units asked for and inputs as typed", () => {
    const inputs = { t: 5, T_allow: { value: 80, unit: "°F" } };
    const run = evaluate(prepared, { inputs, units: { T_surface: "°F" } }, {});
    expect(run.status).toBe("stop");
    expect(run.limits[0]).toMatchObject({
      broken: true,
      label: "Surface at most 80 °F",
      message: "The surface reaches 255.20 °F; 80 °F is allowed.",
      bound: expect.closeTo(80, 10),
      unit: "°F",
    });
    expect(run.limits[1]).toMatchObject({ broken: true, message: "The flux is 1040 W/m²." });
    expect(run.cautions).toEqual([
      { code: "surface", message: "The surface reaches 255.20 °F; 80 °F is allowed." },
    ]);
  });

  it("count 140 °F as 60 °C", () => {
    const run = evaluate(
      prepared,
      { inputs: { t: 100, T_hot: 150, T_allow: { value: 25.2, unit: "°C" } } },
      {},
    );
    expect(run.limits[0]?.broken).toBe(false);
  });

  it("stop when a material is used beyond its limit of use, named after it", () => {
    const lining = preparedTemplate("furnace-lining");
    const layers = [{ t: 50, material: "stone-wool-mat" }];
    const run = evaluate(
      lining,
      { inputs: { layers, T_hot: 700 }, allowExtrapolation: true },
      suppliedMaterials,
    );
    expect(run.status).toBe("stop");
    expect(run.limits.find(({ code }) => code === "service-stone-wool-mat")).toMatchObject({
      level: "stop",
      broken: true,
      label: "Stone-wool wired mat used at most at 640 °C",
      message: expect.stringContaining(
        "Stone-wool wired mat is used at 700.0 °C; its limit of use is 640 °C.",
      ),
      value: expect.closeTo(700, 9),
      bound: expect.closeTo(640, 9),
      unit: "°C",
    });
  });

  it("list one limit of use for a material in several layers", () => {
    const lining = preparedTemplate("furnace-lining");
    const mat = { t: 30, material: "stone-wool-mat" };
    const run = evaluate(lining, { inputs: { layers: [mat, mat, mat], T_hot: 500 } }, suppliedMaterials);
    expect(run.limits.filter(({ code }) => code.startsWith("service"))).toHaveLength(1);
    expect(run.materials).toEqual([{ slug: "stone-wool-mat", revision: 1 }]);
  });
});

describe("extrapolation", () => {
  const lining = preparedTemplate("furnace-lining");
  const inputs = { T_hot: 1400 };

  it("is refused at the cell of the material, with line, range and source", () => {
    const error = refusalOf(() => evaluate(lining, { inputs }, suppliedMaterials));
    expect(error.problems).toEqual([
      expect.objectContaining({
        code: "outside-validity",
        pointer: "#/inputs/layers/0/material",
        received: "1673.15 K",
        expected: "from 478 K to 1478 K",
      }),
    ]);
    expect(error.message).toMatch(/^Line \d+ \(\w+\): .*Fireclay brick.*1673\.15 K.*Incropera/);
  });

  it("cautions when it is allowed", () => {
    const run = evaluate(lining, { inputs, allowExtrapolation: true }, suppliedMaterials);
    expect(run.cautions).toContainEqual({
      code: "extrapolation",
      message: expect.stringMatching(
        /^The thermal conductivity of Fireclay brick was extrapolated .* it is valid from 478 K to 1478 K\.$/,
      ),
      pointer: "#/inputs/layers/0/material",
    });
  });
});

describe("what stops a run", () => {
  const one = (working: string, more: Parameters<typeof numberInput>[3] = {}) =>
    prepare(
      definitionOf({
        inputs: [numberInput("x", "ratio", "1", { default: 1, ...more })],
        working,
        results: [{ symbol: "y", label: "y", quantity: "ratio", unit: "1" }],
      }),
    );
  const faultOf = (working: string, x?: number) =>
    refusalOf(() => evaluate(one(working), { inputs: x === undefined ? {} : { x } }, {}));

  it.each<[string, string, string]>([
    ["y = 1/(x - 1)", "not-finite", "Line 1"],
    ["a = x + 1\ny = ln(x - 2) + a", "not-finite", "Line 2"],
    ["y = balance(u, 0, 10, u + x)", "no-solution", "Line 1"],
    ["y = balance(u, 10, 0, u - x)", "crossed-bounds", "Line 1"],
    ["y = fixed_point(u, x, 2*u)", "not-converged", "Line 1"],
    ["y = series(n, 1, 1e9, x/n)", "budget-exceeded", "Line 1"],
  ])("%j is %s and names its line", (working, code, words) => {
    const error = faultOf(working);
    expect(error.code).toBe(code);
    expect(error.message).toContain(words);
    expect(error.problems).toHaveLength(1);
  });

  it("is a temperature that comes out below absolute zero", () => {
    const prepared = prepare(
      wall({
        working: 'T_x = T_cold - t*"10 K/mm"\nq = k*(T_hot - T_x)/t',
        results: [
          { symbol: "q", label: "Heat flux", quantity: "heat flux", unit: "W/m²" },
          { symbol: "T_x", label: "Elsewhere", quantity: "temperature", unit: "°C" },
        ],
      }),
    );
    const error = refusalOf(() => evaluate(prepared, {}, {}));
    expect(error.code).toBe("out-of-range");
    expect(error.message).toContain("Line 1: T_x comes out at −980.0 °C, below absolute zero.");
  });

  it("is a definition with errors, with all its diagnostics", () => {
    const error = refusalOf(() => prepare(wall({ working: "q = k*T_hott/t" })));
    expect(error.code).toBe("definition-invalid");
    expect(error.extra.diagnostics).toEqual(
      expect.arrayContaining([expect.objectContaining({ path: "#/working", line: 1, severity: "error" })]),
    );
  });
});
