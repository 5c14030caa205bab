import { describe, expect, it } from "vitest";
import { checkProgram } from "@/lib/language";
import { workings } from "./language-workings";

describe("the eight hardest workings of the shelf", () => {
  it.each(Object.entries(workings))("%s checks without a finding and gives a program", (_, source) => {
    const { diagnostics, program, lines } = checkProgram(source);
    expect(diagnostics).toEqual([]);
    expect(program).not.toBeNull();
    expect(program?.conditions).toHaveLength(source.conditions.length);
    for (const line of lines) if (!line.isFunction) expect(line.unit, line.symbol).not.toBeNull();
  });

  it("shows results in their declared units and other lines in the catalogue's", () => {
    const source = workings["pipe-surface-balance"];
    if (!source) throw new Error("The working is missing.");
    const units = Object.fromEntries(checkProgram(source).lines.map((line) => [line.symbol, line.unit]));
    expect(units).toMatchObject({
      D_o: "mm",
      T_surface: "°C",
      q_l: "W/m",
      k_mean: "W/(m·K)",
      Ra: "1",
      film: null,
    });
  });

  it("knows which of them iterate", () => {
    const iterating = Object.entries(workings)
      .filter(([, source]) => checkProgram(source).program?.iterates)
      .map(([slug]) => slug);
    expect(iterating.sort()).toEqual([
      "cylinder-step",
      "economic-thickness",
      "furnace-lining",
      "pipe-surface-balance",
      "wall-step",
    ]);
  });

  it("checks the formulas of a material's `working` property", () => {
    const { diagnostics } = checkProgram({
      inputs: [{ kind: "number", symbol: "T", label: "T", quantity: "temperature", unit: "K" }],
      // Stephan & Laesecke (1985) and US Standard Atmosphere (1976), dry air.
      working: `y = number_in(T, "K")/132.52
k = ("1 W/(m·K)"*4.358e-3*(33.9729025/y - 164.702679/y^(2/3) + 262.108546/y^(1/3) - 21.5346955
  - 443.455815*y^(1/3) + 607.339582*y^(2/3) - 368.790121*y + 111.296674*y^(4/3) - 13.4122465*y^(5/3)))
mu = "1 Pa·s"*1.458e-6*number_in(T, "K")^1.5/(number_in(T, "K") + 110.4)`,
      conditions: [],
      results: [
        { symbol: "k", quantity: "thermal conductivity", unit: "W/(m·K)", list: false, path: "#/results/0" },
        { symbol: "mu", quantity: "dynamic viscosity", unit: "Pa·s", list: false, path: "#/results/1" },
      ],
      uses: [],
    });
    expect(diagnostics).toEqual([]);
  });
});
