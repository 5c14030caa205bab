import { readdirSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { checkMaterial } from "@/lib/calculation/check-material";
import type { Material, Piece, Property } from "@/lib/calculation/material";
import { suppliedMaterial } from "./calculation-fixtures";

const found = (raw: unknown) => checkMaterial(raw).diagnostics.map(({ path, code }) => `${path} ${code}`);
const kelvin = (min: number, max: number) => ({ min, max, unit: "K" });

function made(pieces: Piece[], property: Partial<Property> = {}, more: Partial<Material> = {}): Material {
  return {
    name: "Test material",
    class: "other",
    condition: "",
    properties: {
      k: {
        pieces,
        argumentUnit: "K",
        unit: "W/(m·K)",
        source: "Test.",
        basis: "from memory",
        status: "typical",
        ...property,
      },
    },
    ...more,
  };
}

const constant = (min: number, max: number, value = 1): Piece => ({
  form: "constant",
  value,
  range: kelvin(min, max),
});
const table = (points: [number, number][], min: number, max: number): Piece => ({
  form: "table",
  interpolation: "linear",
  points,
  range: kelvin(min, max),
});

describe("checkMaterial", () => {
  it.each(readdirSync("db/seed/materials").map((name) => name.replace(".json", "")))(
    "finds nothing wrong with %s",
    (slug) => {
      expect(found(suppliedMaterial(slug))).toEqual([]);
    },
  );

  it.each<[string, unknown, string[]]>([
    ["no object", [], ["# invalid-member"]],
    [
      "an unknown form",
      made([{ form: "spline", range: kelvin(1, 2) } as never]),
      ["#/properties/k/pieces/0/form invalid-member"],
    ],
    ["no property", made([], {}, { properties: {} }), ["#/properties no-property"]],
    [
      "a unit of another quantity",
      made([constant(1, 2)], { unit: "W/K" }),
      ["#/properties/k/unit unit-mismatch"],
    ],
    [
      "an argument that is no temperature",
      made([constant(1, 2)], { argumentUnit: "m" }),
      ["#/properties/k/argumentUnit unit-mismatch"],
    ],
    [
      "a difference as argument",
      made([constant(1, 2)], { argumentUnit: "ΔK" }),
      ["#/properties/k/argumentUnit unit-mismatch"],
    ],
    [
      "a range below absolute zero",
      made([{ form: "constant", value: 1, range: { min: -300, max: 0, unit: "°C" } }]),
      ["#/properties/k/pieces/0/range/min out-of-range"],
    ],
    [
      "points that fall",
      made([
        table(
          [
            [300, 1],
            [200, 2],
          ],
          200,
          300,
        ),
      ]),
      ["#/properties/k/pieces/0/points/1 falling-points"],
    ],
    [
      "a range beyond the points",
      made([
        table(
          [
            [200, 1],
            [300, 2],
          ],
          200,
          400,
        ),
      ]),
      ["#/properties/k/pieces/0/range range-beyond-points"],
    ],
    [
      "a logarithm of 0 °C",
      made([{ form: "log10-polynomial", coefficients: [0, 1], range: { min: 0, max: 9, unit: "°C" } }], {
        argumentUnit: "°C",
      }),
      ["#/properties/k/pieces/0/range/min out-of-range"],
    ],
    ["a value of zero", made([constant(1, 2, 0)]), ["#/properties/k/pieces not-positive"]],
    [
      "a value that turns negative",
      made([{ form: "polynomial", coefficients: [1, -0.01], range: kelvin(50, 200) }]),
      ["#/properties/k/pieces not-positive"],
    ],
    [
      "overlapping pieces",
      made([constant(100, 300), constant(250, 400)]),
      ["#/properties/k/pieces overlapping-pieces"],
    ],
    [
      "a gap, which is only a warning",
      made([constant(100, 200), constant(250, 400)]),
      ["#/properties/k/pieces gap"],
    ],
    [
      "a jump, which is only a warning",
      made([constant(100, 200), constant(200, 400, 2)]),
      ["#/properties/k/pieces jump"],
    ],
    [
      "both kinds of uncertainty",
      made([constant(1, 2)], { uncertainty: { relative: 0.1, absolute: 1, kind: "unstated" } }),
      ["#/properties/k/uncertainty uncertainty"],
    ],
    [
      "crossed limits of use",
      made(
        [constant(1, 2)],
        {},
        { service: { min: { value: 20, unit: "°C" }, max: { value: 50, unit: "°F" }, note: "" } },
      ),
      ["#/service/min crossed-bounds"],
    ],
    [
      "a constant named like the temperature",
      made([constant(1, 2)], {}, { constants: { T: { value: 1, unit: "1" } } }),
      ["#/constants/T name-taken"],
    ],
    [
      "a constant with a unit that is none",
      made([constant(1, 2)], {}, { constants: { a: { value: 1, unit: "furlong" } } }),
      ["#/constants/a/unit unreadable-unit"],
    ],
    [
      "a constant of another quantity than named",
      made([constant(1, 2)], {}, { constants: { a: { value: 1, unit: "m", quantity: "mass" } } }),
      ["#/constants/a/quantity unknown-quantity"],
    ],
  ])("names the place of %s", (_, raw, expected) => {
    expect(found(raw)).toEqual(expected);
  });

  it("checks the lines of a working with their place", () => {
    const working = 'x = number_in(T, "K")\nk = x*"1 W/m"';
    const { diagnostics } = checkMaterial(made([{ form: "working", working, range: kelvin(200, 300) }]));
    expect(diagnostics.some(({ path }) => path.startsWith("#/properties/k"))).toBe(true);
    const unknown = checkMaterial(made([{ form: "working", working: "k = kk*T", range: kelvin(200, 300) }]));
    expect(unknown.diagnostics).toContainEqual(
      expect.objectContaining({
        path: "#/properties/k/pieces/0/working",
        line: 1,
        code: "unknown-name",
        severity: "error",
      }),
    );
  });

  it("finds a working that has no value at an end of its range", () => {
    const working = 'k = "1 W/(m·K)"/abs(number_in(T, "K") - 300)';
    expect(found(made([{ form: "working", working, range: kelvin(200, 300) }]))).toEqual([
      "#/properties/k/pieces not-finite",
    ]);
  });

  it("answers anything with diagnostics, never thrown", () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        expect(checkMaterial(value).diagnostics.length).toBeGreaterThan(0);
      }),
      { numRuns: 200 },
    );
  });
});
