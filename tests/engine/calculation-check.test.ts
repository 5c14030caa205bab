import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Definition, TableInput } from "@/lib/calculation/definition";
import { checkDefinition } from "@/lib/calculation/program";
import {
  definitionOf,
  numberInput,
  suppliedSlugs,
  suppliedTemplate,
  wall,
  workedCase,
} from "./calculation-fixtures";

const errors = (raw: unknown) =>
  checkDefinition(raw)
    .diagnostics.filter(({ severity }) => severity === "error")
    .map(({ path, code }) => `${path} ${code}`);

const layersInput = (more: Partial<TableInput> = {}): TableInput => ({
  kind: "table",
  symbol: "layers",
  label: "Layers",
  columns: [
    { kind: "text", symbol: "name", label: "Name", maxLength: 10 },
    numberInput("t", "length", "mm", { above: 0 }),
    { kind: "material", symbol: "m", label: "Material", needs: ["k"], orConstant: true },
  ],
  minRows: 1,
  maxRows: 3,
  default: [{ name: "a", t: 1, m: "brick" }],
  ...more,
});

const tableDefinition = (more: Partial<TableInput>): Definition =>
  definitionOf({
    inputs: [layersInput(more)],
    working: 'R = sum(layers.t/layers.m.k("300 K"))',
    results: [{ symbol: "R", label: "R", quantity: "thermal insulance", unit: "m²·K/W" }],
  });

describe("checkDefinition", () => {
  it.each(suppliedSlugs)("finds no error in %s", (slug) => {
    expect(errors(suppliedTemplate(slug))).toEqual([]);
  });

  it("answers definition, program and line reports for a sound one", () => {
    const { definition, check, diagnostics } = checkDefinition(wall());
    expect(diagnostics).toEqual([]);
    expect(definition?.title).toBe("Test");
    expect(check?.program?.lines.map(({ symbol }) => symbol)).toEqual(["q"]);
    expect(check?.lines[0]).toMatchObject({ symbol: "q", unit: "W/m²" });
  });

  it.each<[string, unknown, string[]]>([
    ["no object", 7, ["# invalid-member"]],
    ["a missing part", { ...wall(), working: undefined }, ["#/working missing-member"]],
    ["an unknown part", { ...wall(), worknig: "" }, ["#/worknig unknown-member"]],
    [
      "an unknown member of an input",
      wall({ inputs: [{ ...wall().inputs[0]!, defalt: 1 } as never] }),
      ["#/inputs/0/defalt unknown-member"],
    ],
    [
      "an unknown kind of input",
      wall({ inputs: [{ ...wall().inputs[0]!, kind: "numbr" } as never] }),
      ["#/inputs/0/kind invalid-member"],
    ],
    ["an unknown category", wall({ category: "wall" as never }), ["#/category invalid-member"]],
    ["no inputs", wall({ inputs: [] }), ["#/inputs size"]],
    [
      "a symbol with a blank",
      wall({ results: [{ ...wall().results[0]!, symbol: "q 1" }] }),
      ["#/results/0/symbol invalid-member"],
    ],
    ["256 kB and more", wall({ summary: "x".repeat(300_000) }), ["# too-large"]],
    ["what JSON cannot hold", undefined, ["# not-json"]],
  ])("names the place of %s", (_, raw, expected) => {
    expect(errors(raw)).toEqual(expected);
  });

  it("suggests the member that was meant", () => {
    const { diagnostics } = checkDefinition({ ...wall(), worknig: "" });
    expect(diagnostics[0]?.hint).toBe("Did you mean `working`?");
  });

  it("takes a definition with a cycle for no JSON", () => {
    const cyclic: Record<string, unknown> = { ...wall() };
    cyclic.self = cyclic;
    expect(errors(cyclic)).toEqual(["# not-json"]);
  });

  it("tells faults of every part together", () => {
    const broken = wall({
      inputs: [
        numberInput("t", "lenght", "mm"),
        numberInput("k", "thermal conductivity", "W/K", { default: 1 }),
        numberInput("T_hot", "temperature", "°C", { default: 20, max: 10 }),
        numberInput("T_cold", "temperature", "°C", { default: -300 }),
      ],
      results: [
        { symbol: "q", label: "q", quantity: "heat flux", unit: "W" },
        { symbol: "z", label: "z", quantity: "heat flux", unit: "W/m²" },
      ],
      cases: [workedCase({})],
    });
    expect(errors(broken)).toEqual(
      expect.arrayContaining([
        "#/inputs/0/quantity unknown-quantity",
        "#/inputs/1/unit unit-mismatch",
        "#/inputs/2/default out-of-range",
        "#/inputs/3/default out-of-range",
        "#/results/0/unit unit-mismatch",
        "#/cases/0 case-without-end",
      ]),
    );
    expect(errors(broken).some((found) => found.startsWith("#/results/1"))).toBe(true);
  });
});

describe("inputs", () => {
  const withInput = (more: Parameters<typeof numberInput>[3]) =>
    errors(wall({ inputs: [numberInput("t", "length", "mm", more), ...wall().inputs.slice(1)] }));

  it.each<[string, Parameters<typeof numberInput>[3], string[]]>([
    ["crossed bounds", { min: 5, max: 3 }, ["#/inputs/0 crossed-bounds"]],
    ["bounds that leave nothing", { above: 5, max: 5 }, ["#/inputs/0 crossed-bounds"]],
    ["one value between bounds", { min: 5, max: 5 }, []],
    ["a crossed usual range", { usualMin: 5, usualMax: 3 }, ["#/inputs/0/usualMin crossed-bounds"]],
    ["a default on an excluded bound", { default: 0, above: 0 }, ["#/inputs/0/default out-of-range"]],
    ["a default on an included bound", { default: 0, min: 0 }, []],
    [
      "an uncertainty in another unit",
      { uncertainty: { standard: 1, distribution: "normal", unit: "kg" } },
      ["#/inputs/0/uncertainty/unit unit-mismatch"],
    ],
    ["a unit that is none", { unit: "furlong" }, ["#/inputs/0/unit unreadable-unit"]],
  ])("%s", (_, more, expected) => {
    expect(withInput(more)).toEqual(expected);
  });

  it("may not use names of the language, or one name twice", () => {
    const named = (symbol: string) =>
      errors(wall({ inputs: [...wall().inputs, numberInput(symbol, "length", "mm", { default: 1 })] }));
    for (const symbol of ["sqrt", "pi", "balance", "not", "constructor", "t"]) {
      expect(named(symbol), symbol).toContain("#/inputs/4/symbol name-taken");
    }
    expect(named("E")).toEqual([]);
  });

  it("that apply only at times need a default", () => {
    const more = { appliesWhen: 'T_hot > "50 °C"' };
    expect(errors(wall({ inputs: [...wall().inputs, numberInput("d", "length", "mm", more)] }))).toContain(
      "#/inputs/4 default-needed",
    );
  });

  it.each<[string, Partial<TableInput>, string[]]>([
    ["sound", {}, []],
    [
      "more rows than allowed",
      {
        maxRows: 1,
        default: [
          { t: 1, m: "a" },
          { t: 1, m: "a" },
        ],
      },
      ["#/inputs/0/default default-rows"],
    ],
    ["crossed numbers of rows", { minRows: 4 }, ["#/inputs/0/minRows crossed-bounds"]],
    ["an unknown column", { default: [{ t: 1, m: "a", k: 3 }] }, ["#/inputs/0/default/0/k unknown-column"]],
    ["a missing cell", { default: [{ m: "a" }] }, ["#/inputs/0/default/0/t missing-cell"]],
    ["a number as text", { default: [{ t: "1", m: "a" }] }, ["#/inputs/0/default/0/t cell-kind"]],
    ["a value out of bounds", { default: [{ t: 0, m: "a" }] }, ["#/inputs/0/default/0/t out-of-range"]],
    [
      "a long text",
      { default: [{ t: 1, m: "a", name: "x".repeat(11) }] },
      ["#/inputs/0/default/0/name cell-kind"],
    ],
    ["a number for a material", { default: [{ t: 1, m: 3 }] }, ["#/inputs/0/default/0/m cell-kind"]],
    ["a constant", { default: [{ t: 1, m: { value: 1, unit: "W/(m·K)" } }] }, []],
    [
      "a constant of another quantity",
      { default: [{ t: 1, m: { value: 1, unit: "m" } }] },
      ["#/inputs/0/default/0/m/unit unit-mismatch"],
    ],
  ])("default rows: %s", (_, more, expected) => {
    expect(errors(tableDefinition(more))).toEqual(expected);
  });

  it("choices have distinct keys, readable units and a default among them", () => {
    const definition = wall({
      inputs: [
        ...wall().inputs,
        {
          kind: "choice",
          symbol: "side",
          label: "Side",
          default: "lft",
          options: [
            { key: "left", label: "Left", values: { h: { value: 1, unit: "W/(m2K" } } },
            { key: "left", label: "Again" },
          ],
        },
      ],
    });
    expect(errors(definition)).toEqual(
      expect.arrayContaining([
        "#/inputs/4/options/0/values/h/unit unreadable-unit",
        "#/inputs/4/options/1/key duplicate-option",
        "#/inputs/4/default unknown-option",
      ]),
    );
  });

  it("a constant can stand for one property only, and a fixed material must be named", () => {
    const definition = wall({
      inputs: [
        ...wall().inputs,
        { kind: "material", symbol: "m", label: "M", needs: ["k", "rho"], orConstant: true, fixed: true },
      ],
    });
    expect(errors(definition)).toEqual(
      expect.arrayContaining([
        "#/inputs/4/orConstant constant-for-several",
        "#/inputs/4/default fixed-without-material",
      ]),
    );
  });
});

describe("what reads the working", () => {
  it.each<[string, Partial<Definition>, string[]]>([
    [
      "a message names what does not exist",
      { limits: [{ code: "a", label: "L", when: "q > q", level: "stop", message: "{zz}" }] },
      ["#/limits/0/message unknown-name"],
    ],
    [
      "two limits share a code",
      {
        limits: [1, 2].map(() => ({
          code: "a",
          label: "L",
          when: "q > 2*q",
          level: "stop" as const,
          message: "m",
        })),
      },
      ["#/limits/1/code duplicate-code"],
    ],
    [
      "a requirement shows a line",
      { requires: [{ that: "T_hot > T_cold", message: "{q}" }] },
      ["#/requires/0/message unknown-name"],
    ],
    [
      "a requirement reads a line",
      { requires: [{ that: 'q > "1 W/m²"', message: "m" }] },
      ["#/requires/0/that inputs-only"],
    ],
    [
      "a result is listed twice",
      { results: [wall().results[0]!, wall().results[0]!] },
      ["#/results/1/symbol duplicate-result"],
    ],
    ["a result is called a list", { results: [{ ...wall().results[0]!, list: true }] }, ["#/results/0"]],
    [
      "a section reads a missing line",
      {
        figures: [
          { kind: "section", shape: "plane", layers: [{ thickness: "t" }], temperatures: ["T_hot", "T_x"] },
        ],
      },
      ["#/figures/0/temperatures/1 unknown-name"],
    ],
    [
      "a section lacks a temperature",
      {
        figures: [
          {
            kind: "section",
            shape: "plane",
            layers: [{ thickness: "t" }, { thickness: "t" }],
            temperatures: ["T_hot", "T_cold"],
          },
        ],
      },
      ["#/figures/0/temperatures figure-length"],
    ],
    [
      "a round section lacks its bore",
      {
        figures: [
          {
            kind: "section",
            shape: "round",
            layers: [{ thickness: "t" }],
            temperatures: ["T_hot", "T_cold"],
          },
        ],
      },
      ["#/figures/0/inner figure-symbol"],
    ],
    [
      "a curve draws an input",
      { figures: [{ kind: "curve", title: "c", x: { symbol: "t", from: 1, to: 2 }, y: ["k"] }] },
      ["#/figures/0/y/0 figure-symbol"],
    ],
    [
      "a curve varies a line",
      { figures: [{ kind: "curve", title: "c", x: { symbol: "q", from: 1, to: 2 }, y: ["q"] }] },
      ["#/figures/0/x/symbol figure-symbol"],
    ],
    [
      "a logarithmic curve begins at 0",
      {
        figures: [{ kind: "curve", title: "c", x: { symbol: "t", from: 0, to: 2, scale: "log" }, y: ["q"] }],
      },
      ["#/figures/0/x/from figure-range"],
    ],
  ])("%s", (_, parts, expected) => {
    const found = errors(wall(parts));
    for (const place of expected)
      expect(
        found.some((one) => one.startsWith(place)),
        `${place} in ${found.join(", ")}`,
      ).toBe(true);
  });
});

describe("worked cases", () => {
  const q = { value: 52, unit: "W/m²", relTol: 1e-9 };
  it.each<[string, Parameters<typeof workedCase>[0], string[]]>([
    ["sound", { inputs: { t: { value: 1, unit: "in" } }, expected: { q } }, []],
    ["refused", { inputs: { t: { value: 1, unit: "kg" } }, refused: "unit-mismatch" }, []],
    ["nothing expected", {}, ["#/cases/0 case-without-end"]],
    ["both", { expected: { q }, refused: "out-of-range" }, ["#/cases/0 case-without-end"]],
    ["an unknown input", { inputs: { thick: 1 }, expected: { q } }, ["#/cases/0/inputs/thick unknown-input"]],
    [
      "a unit that does not fit",
      { inputs: { t: { value: 1, unit: "kg" } }, expected: { q } },
      ["#/cases/0/inputs/t/unit unit-mismatch"],
    ],
    ["a line that is no result", { expected: { R: q } }, ["#/cases/0/expected/R unknown-result"]],
    ["another unit", { expected: { q: { ...q, unit: "W" } } }, ["#/cases/0/expected/q/unit unit-mismatch"]],
    [
      "no tolerance",
      { expected: { q: { value: 1, unit: "W/m²" } } },
      ["#/cases/0/expected/q tolerance-missing"],
    ],
    [
      "a list for a number",
      { expected: { q: { values: [1], unit: "W/m²", absTol: 1 } } },
      ["#/cases/0/expected/q case-value"],
    ],
  ])("%s", (_, parts, expected) => {
    expect(errors(wall({ cases: [workedCase(parts)] }))).toEqual(expected);
  });

  it("take a difference, no share, as tolerance of an absolute temperature", () => {
    const definition = wall({
      working: "T = (T_hot + T_cold)/2\nq = k*(T_hot - T_cold)/t",
      results: [
        { symbol: "T", label: "Mean", quantity: "temperature", unit: "°C" },
        { symbol: "q", label: "Heat flux", quantity: "heat flux", unit: "W/m²" },
      ],
      cases: [workedCase({ expected: { T: { value: 85, unit: "°C", relTol: 1e-3 } } })],
    });
    expect(errors(definition)).toEqual(["#/cases/0/expected/T/relTol relative-temperature"]);
  });
});

describe("anything at all", () => {
  it("is answered with diagnostics, never thrown", () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        const { definition, diagnostics } = checkDefinition(value);
        expect(definition !== null || diagnostics.length > 0).toBe(true);
      }),
      { numRuns: 300 },
    );
  });

  it("in place of one part of a sound definition is answered with diagnostics", () => {
    const parts = Object.keys(wall()) as (keyof Definition)[];
    fc.assert(
      fc.property(fc.constantFrom(...parts), fc.jsonValue(), (part, value) => {
        expect(() => checkDefinition({ ...wall(), [part]: value })).not.toThrow();
      }),
      { numRuns: 300 },
    );
  });
});
