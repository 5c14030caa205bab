import { describe, expect, it } from "vitest";
import { makeApplies } from "@/app/(work)/templates/[slug]/_components/applies";
import { buildRequest, fieldOfPointer } from "@/app/(work)/templates/[slug]/_components/build-request";
import { definition, formWith } from "./form-fixtures";

const applies = makeApplies(definition);

function built(changes: Record<string, object>) {
  const values = formWith({
    A: { text: "2" },
    case: { option: "convection" },
    strut: { slug: "ss304" },
    ...changes,
  });
  return buildRequest(definition, values, applies(values));
}

describe("the request of a form", () => {
  it("leaves untouched defaults out, so that the answer names them", () => {
    const { inputs, faults } = built({});
    expect(Object.keys(inputs).sort()).toEqual(["A", "case", "strut"]);
    expect(faults).toEqual({});
  });

  it("takes a number in the field's unit, and a unit typed with the number before that", () => {
    expect(built({ A: { text: "2.5" } }).inputs.A).toEqual({ value: 2.5, unit: "m²" });
    expect(built({ A: { text: "4 ft2" } }).inputs.A).toEqual({ value: 4, unit: "ft²" });
    expect(built({ T_hot: { text: "480 °F" } }).inputs.T_hot).toEqual({ value: 480, unit: "°F" });
  });

  it("leaves out what does not apply to the chosen option", () => {
    expect(built({ case: { option: "held" }, h: { text: "no number" } }).faults).toEqual({});
    expect(built({ h: { text: "12" } }).inputs.h).toEqual({ value: 12, unit: "W/(m²·K)" });
  });

  it.each([
    ["", "Area is empty. Type a number, with a unit if it is not in m²."],
    ["about two", /about two/],
    ["1,250", /1,250/],
    ["3 kg", /area/i],
    ["1e999", /too large|finite|range/i],
    ["8 furlongs/K", /furlong/],
  ])("answers %j with a sentence at the field and sends nothing for it", (text, sentence) => {
    const { inputs, faults } = built({ A: { text } });
    if (typeof sentence === "string") expect(faults.A).toBe(sentence);
    else expect(faults.A).toMatch(sentence);
    expect(inputs.A).toBeNull();
  });

  it("names the cell of a table whose text cannot be read", () => {
    const row = (t: string, material: object) => ({
      cells: {
        name: { kind: "text", text: "Brick" },
        t: { kind: "number", text: t, unit: "mm" },
        material: { kind: "material", slug: "", constant: null, ...material },
        bond: { kind: "choice", option: "dry" },
      },
    });
    const { inputs, faults } = built({
      layers: {
        rows: [row("2 in", { constant: { text: "0.05 W/(m·K)", unit: "W/(m·K)" } }), row("thick", {})],
      },
    });
    expect(Object.keys(faults)).toEqual(["layers.1.t", "layers.1.material"]);
    expect((inputs.layers as unknown[])[0]).toEqual({
      name: "Brick",
      t: { value: 2, unit: "in" },
      material: { value: 0.05, unit: "W/(m·K)" },
      bond: "dry",
    });
  });

  it("asks for a material and an option where none is chosen", () => {
    const { faults } = built({ case: { option: "" }, strut: { slug: "" } });
    expect(faults.case).toBe("Surface is not chosen.");
    expect(faults.strut).toBe("Material of the strut is not chosen. Pick a material from the library.");
  });
});

describe("the field of a problem", () => {
  it.each([
    ["#/inputs/T_hot", "T_hot"],
    ["#/inputs/T_hot/unit", "T_hot"],
    ["#/inputs/layers", "layers"],
    ["#/inputs/layers/2", "layers.2"],
    ["#/inputs/layers/2/t", "layers.2.t"],
    ["#/inputs/layers/2/material/unit", "layers.2.material"],
  ])("%s belongs to %s", (pointer, field) => {
    expect(fieldOfPointer(definition, pointer)).toBe(field);
  });

  it.each(["#/units/Q", "#/inputs/nobody", "#/title", "#", ""])("%j belongs to none", (pointer) => {
    expect(fieldOfPointer(definition, pointer)).toBeNull();
  });
});

describe("whether an input applies", () => {
  const h = definition.inputs.find((input) => input.symbol === "h");
  const judged = (appliesWhen: string, option: string) => {
    if (!h) throw new Error("The fixture has no h.");
    const own = { ...h, appliesWhen };
    const values = formWith({ case: { option } });
    return makeApplies({ ...definition, inputs: [own] })(values)(own);
  };

  it.each([
    ['case == "convection"', true, false],
    ['"convection" == case', true, false],
    ['case != "convection"', false, true],
    ['not (case == "held")', true, false],
    ['case == "held" or case == "convection"', true, true],
    ['case == "held" and case == "convection"', false, false],
  ])("follows %s", (condition, inFluid, held) => {
    expect(judged(condition, "convection")).toBe(inFluid);
    expect(judged(condition, "held")).toBe(held);
  });

  it("is left to the server where the browser cannot tell", () => {
    expect(judged("T_hot > 0", "held")).toBe(true);
    expect(judged("case ==", "held")).toBe(true);
  });
});
