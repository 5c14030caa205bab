import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Definition } from "@/lib/calculation/definition";
import type { GivenInputs } from "@/lib/calculation/evaluation";
import { evaluate, materialsNeeded, materialsNeededForRows, prepare } from "@/lib/calculation/execute";
import { CodedError } from "@/lib/core/errors";
import {
  definitionOf,
  numberInput,
  preparedTemplate,
  problemsOf,
  refusalOf,
  suppliedMaterials,
  suppliedTemplate,
  wall,
} from "./calculation-fixtures";

const plain = prepare(wall());
const lining = preparedTemplate("furnace-lining");
const run = (inputs: GivenInputs) => evaluate(plain, { inputs }, {});
const line = (inputs: GivenInputs) => evaluate(lining, { inputs }, suppliedMaterials);
const layer = { t: 100, material: "insulating-brick-23" };

describe("bad input", () => {
  it.each<[string, unknown, string, string, string]>([
    [
      "a unit that is none",
      { value: 8, unit: "furlongs/K" },
      "#/inputs/t/unit",
      "unreadable-unit",
      "furlongs",
    ],
    [
      "a unit of another quantity",
      { value: 8, unit: "kg" },
      "#/inputs/t/unit",
      "unit-mismatch",
      "kg does not measure length",
    ],
    ["a text with two readings", "1,250", "#/inputs/t", "invalid-input", "1,250"],
    ["a number sent as text", "25 mm", "#/inputs/t", "invalid-input", '{ "value": 25, "unit": "mm" }'],
    ["a bare number sent as text", "25", "#/inputs/t", "invalid-input", "without quotes: 25"],
    ["a text", "thick", "#/inputs/t", "invalid-input", "Thickness is the text “thick”"],
    ["an empty text", "", "#/inputs/t", "invalid-input", "Send a number in mm"],
    ["null", null, "#/inputs/t", "missing-input", "Thickness is missing. Give it in mm"],
    ["infinity", Infinity, "#/inputs/t", "invalid-input", "not a finite number"],
    ["not a number", NaN, "#/inputs/t", "invalid-input", "not a finite number"],
    ["an infinity in SI", { value: 1e308, unit: "km" }, "#/inputs/t", "invalid-input", "not a finite number"],
    ["a list", [{ t: 1 }], "#/inputs/t", "invalid-input", "Send a number in mm"],
    [
      "zero where it must be positive",
      0,
      "#/inputs/t",
      "out-of-range",
      "Thickness is 0 mm. It must be greater than 0.",
    ],
    [
      "a negative value in another unit",
      { value: -2, unit: "in" },
      "#/inputs/t",
      "out-of-range",
      "Thickness is −2 in. It must be greater than 0.",
    ],
    ["shorthand", { value: 1, unit: "F" }, "#/inputs/T_hot/unit", "unreadable-unit", "°F"],
    [
      "a difference for a temperature",
      { value: 5, unit: "ΔK" },
      "#/inputs/T_hot/unit",
      "unit-mismatch",
      "difference",
    ],
    [
      "a temperature below 0 K",
      -300,
      "#/inputs/T_hot",
      "out-of-range",
      "Hot face is −300 °C. It must be at least −273.15 °C, absolute zero.",
    ],
    [
      "a temperature below 0 °R",
      { value: -1, unit: "°R" },
      "#/inputs/T_hot",
      "out-of-range",
      "at least 0 °R",
    ],
  ])("%s is refused at its place, with a sentence that tells the mend", (_, given, pointer, code, words) => {
    const symbol = pointer.split("/")[2]!;
    const error = refusalOf(() => run({ [symbol]: given } as GivenInputs));
    expect(error.problems.map((problem) => `${problem.pointer} ${problem.code}`)).toEqual([
      `${pointer} ${code}`,
    ]);
    expect(error.problems[0]?.message).toContain(words);
  });

  it("tells all faults of a request together, inputs and units", () => {
    const request = {
      inputs: { t: { value: 1, unit: "kg" }, k: -1, T_hot: -400, thickness: 3 },
      units: { q: "W", Q: "W" },
    };
    expect(problemsOf(() => evaluate(plain, request, {}))).toEqual([
      "#/inputs/thickness unknown-member",
      "#/inputs/t/unit unit-mismatch",
      "#/inputs/k out-of-range",
      "#/inputs/T_hot out-of-range",
      "#/units/q unit-mismatch",
      "#/units/Q unknown-member",
    ]);
  });

  it("names the nearest input, the accepted units, the limit and what was received", () => {
    const { problems } = refusalOf(() => run({ T_hott: 1, t: { value: 1, unit: "kg" }, k: 0 }));
    expect(problems[0]).toMatchObject({ pointer: "#/inputs/T_hott", expected: "T_hot" });
    expect(problems[1]).toMatchObject({ received: "kg", expected: "length" });
    expect(problems[1]?.acceptedUnits).toEqual(expect.arrayContaining(["mm", "m", "in", "ft"]));
    expect(problems[2]).toMatchObject({ received: 0, expected: "greater than 0", limit: 0 });
  });

  it("escapes what would break a pointer", () => {
    expect(problemsOf(() => run({ "a/b ~%": 1 }))).toEqual(["#/inputs/a~1b%20~0%25 unknown-member"]);
  });

  it("does not mistake members that every object has for inputs", () => {
    expect(problemsOf(() => run(JSON.parse('{"constructor": 1, "__proto__": 2}') as GivenInputs))).toEqual([
      "#/inputs/constructor unknown-member",
      "#/inputs/__proto__ unknown-member",
    ]);
  });
});

describe("any inputs at all", () => {
  const templates = ["plane-wall", "furnace-lining", "thick-body-step", "pipe-surface-balance"].map(
    preparedTemplate,
  );

  it("either run to finite results or are refused with problems that point into the request", () => {
    const value = fc.oneof(
      fc.double(),
      fc.string(),
      fc.constantFrom("convection", "fireclay-brick", "air", "", null, 0, -0, 1e308, 5e-324),
      fc.record({
        value: fc.double(),
        unit: fc.constantFrom("mm", "°F", "ΔK", "W/(m·K)", "furlong", "1", ""),
      }),
      fc.jsonValue({ maxDepth: 3 }),
    );
    fc.assert(
      fc.property(
        fc.constantFrom(...templates),
        fc.array(value, { maxLength: 6 }),
        fc.nat(),
        (prepared, values, shift) => {
          const symbols = [...prepared.known, "zz"];
          const inputs = Object.fromEntries(
            values.map((one, i) => [symbols[(i + shift) % symbols.length]!, one]),
          ) as GivenInputs;
          let outcome;
          try {
            outcome = evaluate(prepared, { inputs }, suppliedMaterials);
          } catch (error) {
            expect(error).toBeInstanceOf(CodedError);
            const { problems } = error as CodedError;
            expect(problems.length).toBeGreaterThan(0);
            for (const { pointer, message } of problems) {
              expect(pointer).toMatch(/^#\/inputs/);
              expect(message).not.toMatch(/undefined|NaN|\[object/);
            }
            return;
          }
          const numbers = Object.values(outcome.results).flatMap((one) => one.values ?? [one.value]);
          expect(numbers.every((one) => Number.isFinite(one))).toBe(true);
        },
      ),
      { numRuns: 400 },
    );
  });
});

describe("bounds", () => {
  const bounded = prepare(
    wall({
      inputs: [
        numberInput("t", "length", "mm", { default: 50, min: 10, max: 100 }),
        numberInput("k", "thermal conductivity", "W/(m·K)", { default: 1, above: 0, below: 2 }),
        numberInput("T_hot", "temperature", "°C", { default: 50, max: 60 }),
        numberInput("T_cold", "temperature", "°C", { default: 20 }),
      ],
    }),
  );
  const given = (inputs: GivenInputs) => () => evaluate(bounded, { inputs }, {});

  it.each<[GivenInputs]>([
    [{ t: 10 }],
    [{ t: 100 }],
    [{ T_hot: { value: 140, unit: "°F" } }],
    [{ t: 10 * (1 - 5e-10) }],
    [{ t: { value: 100 / 25.4, unit: "in" } }],
  ])("%j is on an included bound and passes", (inputs) => {
    expect(given(inputs)).not.toThrow();
  });

  it.each<[GivenInputs, string]>([
    [{ t: 9.99 }, "t is 9.99 mm. It must be at least 10 mm and at most 100 mm."],
    [{ t: 100.01 }, "t is 100.01 mm. It must be at least 10 mm and at most 100 mm."],
    [{ k: 2 }, "k is 2 W/(m·K). It must be greater than 0 and less than 2 W/(m·K)."],
    [{ k: 2 * (1 - 5e-10) }, "It must be greater than 0 and less than 2 W/(m·K)."],
    [{ T_hot: { value: 140.1, unit: "°F" } }, "T_hot is 140.1 °F. It must be at most 60 °C."],
  ])("%j is refused", (inputs, words) => {
    expect(refusalOf(given(inputs)).problems[0]?.message).toContain(words);
  });

  it("allows 0 K itself, in every scale", () => {
    for (const unit of ["K", "°C", "°F", "°R"]) {
      const value = { K: 0, "°C": -273.15, "°F": -459.67, "°R": 0 }[unit]!;
      expect(run({ T_cold: { value, unit } }).inputs.T_cold).toMatchObject({ unit });
    }
  });

  it("cautions outside the usual range, in the unit that was typed, and runs", () => {
    const outcome = run({ t: { value: 5, unit: "m" } });
    expect(outcome.status).toBe("caution");
    expect(outcome.cautions).toEqual([
      {
        code: "usual-range",
        message: "Thickness is 5 m; usual is between 1 mm and 2000 mm. Check the value and its unit.",
        pointer: "#/inputs/t",
      },
    ]);
  });
});

describe("defaults", () => {
  it("stand in for what is left out and are listed; the declared unit goes with a bare value", () => {
    const outcome = run({ t: { value: 50 } });
    expect(outcome.defaulted).toEqual(["k", "T_hot", "T_cold"]);
    expect(outcome.inputs.t).toEqual({ value: 50, unit: "mm", ucum: "mm", si: 0.05 });
    expect(outcome.inputs.T_hot).toEqual({ value: 150, unit: "°C", ucum: "Cel", si: 423.15 });
  });

  it("are missing inputs when the request refuses them", () => {
    expect(problemsOf(() => evaluate(plain, { inputs: { t: 1, k: 1 }, defaults: "refuse" }, {}))).toEqual([
      "#/inputs/T_hot missing-input",
      "#/inputs/T_cold missing-input",
    ]);
  });

  it("do not exist for an input without one", () => {
    const prepared = prepare(
      wall({ inputs: [...wall().inputs.slice(1), numberInput("t", "length", "mm", { above: 0 })] }),
    );
    expect(problemsOf(() => evaluate(prepared, {}, {}))).toEqual(["#/inputs/t missing-input"]);
  });
});

describe("choices and inputs that apply only at times", () => {
  const definition: Definition = definitionOf({
    inputs: [
      {
        kind: "choice",
        symbol: "side",
        label: "Outside",
        default: "air",
        options: [
          { key: "air", label: "still air", values: { h: { value: 5, unit: "W/(m²·K)" } } },
          { key: "wind", label: "wind", values: { h: { value: 1, unit: "W/(m²·K)" } } },
        ],
      },
      numberInput("v", "velocity", "m/s", {
        label: "Wind",
        default: 3,
        above: 0,
        appliesWhen: 'side == "wind"',
      }),
      numberInput("dT", "temperature difference", "K", { default: 10 }),
    ],
    requires: [{ that: 'v < "50 m/s"', message: "No wind reaches {v}." }],
    working: 'q = (side.h + (side == "wind" ? v*"4 J/(m³·K)" : "0 W/(m²·K)"))*dT',
    results: [{ symbol: "q", label: "Flux", quantity: "heat flux", unit: "W/m²" }],
  });
  const prepared = prepare(definition);
  const outcome = (inputs: GivenInputs) => evaluate(prepared, { inputs }, {});

  it("read an option by its key and echo it", () => {
    expect(outcome({}).inputs.side).toEqual({ option: "air" });
    expect(outcome({}).results.q?.value).toBe(50);
    expect(outcome({ side: "wind" }).results.q?.value).toBe(130);
  });

  it("refuse an unknown option and name the nearest, and anything that is no key", () => {
    const error = refusalOf(() => outcome({ side: "winds" }));
    expect(error.problems[0]).toMatchObject({
      code: "unknown-member",
      pointer: "#/inputs/side",
      expected: "wind",
    });
    expect(problemsOf(() => outcome({ side: 1 }))).toEqual(["#/inputs/side invalid-input"]);
  });

  it("leave out an input that does not apply, and say so when it was given", () => {
    const idle = outcome({ v: 7 });
    expect(idle.inputs).not.toHaveProperty("v");
    expect(idle.defaulted).not.toContain("v");
    expect(idle.notices[0]).toEqual({
      code: "input-ignored",
      message: "Wind (v) does not apply to this choice and was not used.",
    });
    expect(outcome({}).notices[0]?.code).not.toBe("input-ignored");
    expect(outcome({ side: "wind", v: 7 }).results.q?.value).toBe(50 - 40 + 280);
  });

  it("tell faults of an input only while it applies", () => {
    expect(outcome({ v: -1 }).results.q?.value).toBe(50);
    expect(problemsOf(() => outcome({ side: "wind", v: -1 }))).toEqual(["#/inputs/v out-of-range"]);
    expect(evaluate(prepared, { inputs: { side: "air", dT: 1 }, defaults: "refuse" }, {}).status).toBe("ok");
    expect(
      problemsOf(() => evaluate(prepared, { inputs: { side: "wind", dT: 1 }, defaults: "refuse" }, {})),
    ).toEqual(["#/inputs/v missing-input"]);
  });

  it("judge relations only between inputs that apply", () => {
    expect(outcome({ v: 60 }).status).toBe("ok");
    const error = refusalOf(() => outcome({ side: "wind", v: { value: 200, unit: "km/h" } }));
    expect(error.problems).toEqual([
      { pointer: "#/inputs/v", code: "out-of-range", message: "No wind reaches 200 km/h." },
    ]);
  });
});

describe("relations between inputs", () => {
  const prepared = prepare(
    definitionOf({
      inputs: [
        numberInput("D_in", "length", "mm", { default: 50, above: 0 }),
        numberInput("D_out", "length", "mm", { default: 60, above: 0 }),
        numberInput("x", "ratio", "1", { default: 1, max: 5 }),
      ],
      requires: [
        { that: "D_out > D_in", message: "The outside diameter {D_out} must exceed the bore {D_in}." },
      ],
      working: "r = ln(D_out/D_in)*x",
      results: [{ symbol: "r", label: "r", quantity: "ratio", unit: "1" }],
    }),
  );
  const given = (inputs: GivenInputs) => () => evaluate(prepared, { inputs }, {});

  it("are refused at every input named, with the values in words, together with other faults", () => {
    const error = refusalOf(given({ D_in: { value: 3, unit: "in" }, D_out: 60, x: 9 }));
    expect(error.problems.map(({ pointer, code }) => `${pointer} ${code}`)).toEqual([
      "#/inputs/x out-of-range",
      "#/inputs/D_out out-of-range",
      "#/inputs/D_in out-of-range",
    ]);
    expect(error.problems[1]?.message).toBe("The outside diameter 60 mm must exceed the bore 3 in.");
    expect(error.message).toBe("x is 9. It must be at most 5. (and 1 more problem)");
  });

  it("count values within 1e-9 as equal", () => {
    expect(given({ D_in: { value: 1, unit: "in" }, D_out: 25.4 })).toThrow("must exceed");
    expect(given({ D_in: 25.4, D_out: 25.4 * (1 + 1e-8) })).not.toThrow();
  });

  it("are not judged while one of their inputs is faulty", () => {
    expect(problemsOf(given({ D_in: 70, D_out: "60" }))).toEqual(["#/inputs/D_out invalid-input"]);
  });
});

describe("tables", () => {
  it("read cells in any unit and echo every row", () => {
    const brick = suppliedMaterials["insulating-brick-23"]!;
    const layers: GivenInputs["layers"] = [
      { name: "Brick", t: { value: 9, unit: "in" }, material: "insulating-brick-23@4" },
      { t: 50, material: { value: 0.1, unit: "W/(m·K)", at: { value: 300, unit: "°C" } } },
    ];
    const snapshots = { "insulating-brick-23@4": { ...brick, revision: 4 } };
    const outcome = evaluate(lining, { inputs: { layers } }, snapshots);
    expect(outcome.inputs.layers).toMatchObject({
      rows: [
        {
          name: { text: "Brick" },
          t: { value: 9, unit: "in" },
          material: { material: "insulating-brick-23", revision: 4 },
        },
        {
          name: { text: "" },
          t: { value: 50, unit: "mm" },
          material: { constant: { value: 0.1 }, at: { value: 300, unit: "°C" } },
        },
      ],
    });
    expect(outcome.results.k_eff?.values?.[1]).toBeCloseTo(0.1, 15);
    expect(outcome.defaulted).not.toContain("layers");
  });

  it.each<[string, GivenInputs["layers"], string[]]>([
    ["an unknown column", [{ ...layer, thickness: 3 }], ["#/inputs/layers/0/thickness unknown-member"]],
    ["a missing cell", [{ material: "fireclay-brick" }], ["#/inputs/layers/0/t missing-input"]],
    ["null in a cell", [{ ...layer, t: null }], ["#/inputs/layers/0/t missing-input"]],
    [
      "a bad unit in a cell",
      [layer, { ...layer, t: { value: 1, unit: "kg" } }],
      ["#/inputs/layers/1/t/unit unit-mismatch"],
    ],
    [
      "an unknown material",
      [{ ...layer, material: "ytong" }],
      ["#/inputs/layers/0/material unknown-material"],
    ],
    ["an empty material", [{ ...layer, material: "" }], ["#/inputs/layers/0/material unknown-material"]],
    ["a constant without unit", [{ ...layer, material: 0.3 }], ["#/inputs/layers/0/material invalid-input"]],
    [
      "a constant of another quantity",
      [{ ...layer, material: { value: 3, unit: "m" } }],
      ["#/inputs/layers/0/material/unit unit-mismatch"],
    ],
    [
      "a constant of zero",
      [{ ...layer, material: { value: 0, unit: "W/(m·K)" } }],
      ["#/inputs/layers/0/material out-of-range"],
    ],
    ["no rows", [], ["#/inputs/layers out-of-range"]],
    ["too many rows", Array.from({ length: 31 }, () => layer), ["#/inputs/layers out-of-range"]],
    ["no list", "layers", ["#/inputs/layers invalid-input"]],
    [
      "a name that is too long",
      [{ ...layer, name: "x".repeat(81) }],
      ["#/inputs/layers/0/name invalid-input"],
    ],
    ["null", null, ["#/inputs/layers missing-input"]],
  ])("%s is refused at its cell", (_, layers, problems) => {
    expect(problemsOf(() => line({ layers } as GivenInputs))).toEqual(problems);
  });

  it("say which row is meant", () => {
    const error = refusalOf(() => line({ layers: [layer, { ...layer, t: -1 }] }));
    expect(error.message).toBe(
      "Layers, hot face first, row 2: Thickness is −1 mm. It must be greater than 0.",
    );
  });
});

describe("materials", () => {
  it("are refused when they lack a property that is needed", () => {
    const error = refusalOf(() =>
      evaluate(
        preparedTemplate("cold-strut"),
        { inputs: { material: "mu-only" } },
        {
          ...suppliedMaterials,
          "mu-only": {
            slug: "mu-only",
            revision: 2,
            material: {
              ...suppliedMaterials.air!.material,
              name: "Oil",
              properties: { mu: suppliedMaterials.air!.material.properties.mu },
            },
          },
        },
      ),
    );
    expect(error.problems[0]).toMatchObject({ code: "invalid-input", pointer: "#/inputs/material" });
    expect(error.message).toContain("Oil has no thermal conductivity (k)");
  });

  it("that are fixed cannot be changed, and are shown", () => {
    const prepared = preparedTemplate("pipe-surface-balance");
    const error = refusalOf(() => evaluate(prepared, { inputs: { air: "water-liq" } }, suppliedMaterials));
    expect(error.problems[0]).toMatchObject({
      code: "invalid-input",
      pointer: "#/inputs/air",
      expected: "air",
    });
    const outcome = evaluate(prepared, { inputs: { air: "air" } }, suppliedMaterials);
    expect(outcome.inputs.air).toEqual({ material: "air", revision: 1 });
    expect(outcome.defaulted).not.toContain("air");
    expect(outcome.materials).toContainEqual({ slug: "air", revision: 1 });
  });

  it("needed by a run are its given, default and fixed ones", () => {
    const pipe = suppliedTemplate("pipe-surface-balance");
    expect(materialsNeeded(pipe, {}).sort()).toEqual(["air", "stone-wool-mat"]);
    expect(materialsNeeded(pipe, { insulation: "puf32@3" }).sort()).toEqual(["air", "puf32@3"]);
    const walls = suppliedTemplate("furnace-lining");
    expect(
      materialsNeeded(walls, {
        layers: [
          { t: 1, material: "kapton" },
          { t: 1, material: { value: 1, unit: "W/(m·K)" } },
        ],
      }),
    ).toEqual(["kapton"]);
    expect(materialsNeeded(walls, {}).sort()).toEqual([
      "fireclay-brick",
      "insulating-brick-23",
      "stone-wool-mat",
    ]);
    expect(materialsNeeded(suppliedTemplate("plane-wall"), {})).toEqual([]);
    const given: GivenInputs[] = [{}, { insulation: "puf32" }];
    const rows = { rows: given, common: { insulation: "kapton" } };
    expect(materialsNeededForRows(pipe, rows).sort()).toEqual(["air", "kapton", "puf32"]);
  });
});
