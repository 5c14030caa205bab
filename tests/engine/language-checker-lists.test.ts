import { describe, expect, it } from "vitest";
import { checkProgram } from "@/lib/language";
import { choice, findings, number, places, sourceOf, table, typeOf } from "./language-inputs";

describe("columns and lists", () => {
  it.each([
    ["layers.t", "length × layers"],
    ["2*layers.t", "length × layers"],
    ["L + layers.t", "length × layers"],
    ["layers.t*layers.finish.e", "length × layers"],
    ["sqrt(layers.t*L)", "length × layers"],
    ["cumsum(layers.t)", "length × layers"],
    ["reverse(layers.T)", "temperature × layers"],
    ["prepend(layers.T, T1)", "temperature × layers+1"],
    ["append(prepend(layers.t, 0), L)", "length × layers+2"],
    ["drop_last(prepend(layers.T, T1))", "temperature × layers"],
    ["drop_first(layers.t)", "length × layers-1"],
    ["max(layers.t, L)", "length × layers"],
    ["n > 0 ? layers.t : 0", "length × layers"],
    ["n > 0 ? layers.T : T1", "temperature × layers"],
    ["sum(layers.t)", "length"],
    ["min(layers.t)", "length"],
    ["mean(layers.T)", "temperature"],
    ["first(layers.T) - last(layers.T)", "temperature difference"],
    ["at(layers.t, 2)", "length"],
    ["count(layers.t)", "ratio"],
    ["product(layers.t/L)", "ratio"],
    ["weighted_mean(layers.T, layers.t)", "temperature"],
    ["interpolate(T1, layers.T, layers.t)", "length"],
    ["interpolate(layers.t, layers.t, layers.T)", "temperature × layers"],
    ["layers.material.k(layers.T)", "thermal conductivity × layers"],
    ["layers.material.k(T1)", "thermal conductivity × layers"],
    ["wall.k(layers.T)", "thermal conductivity × layers"],
    ["wall.k_mean(T1, T2)", "thermal conductivity"],
    ["wall.k_integral(T1, T2)", "linear heat flow rate"],
    ["wall.c(T1)", "specific heat capacity"],
    ["fixed_point(f, layers.T, (f + T1)/2)", "temperature × layers"],
    ["tip.e", "ratio"],
    ["tip.d", "length"],
  ])("%s is %s", (expression, expected) => {
    expect(typeOf(expression)).toBe(expected);
  });

  it.each([
    ["layers.t + prepend(layers.t, 0)", "length-mismatch"],
    ["layers.t + pipes.d", "length-mismatch"],
    ["layers.material.k(prepend(layers.T, T1))", "length-mismatch"],
    ["weighted_mean(layers.T, drop_first(layers.t))", "length-mismatch"],
    ["fixed_point(f, T1, layers.T)", "length-mismatch"],
    ["fixed_point(f, layers.T, drop_last(prepend(f, T1)) + layers.t/L*dT - pipes.d)", "length-mismatch"],
    ["sum(L)", "list-wanted"],
    ["max(n)", "list-wanted"],
    ["first(L)", "list-wanted"],
    ["prepend(L, L)", "list-wanted"],
    ["at(layers.t, layers.t)", "number-wanted"],
    ["prepend(layers.t, layers.t)", "number-wanted"],
    ["balance(x, 0, layers.t, x)", "number-wanted"],
    ["series(i, 1, 2, layers.t)", "number-wanted"],
    ["prepend(layers.t, T1)", "unit-mismatch"],
    ["prepend(layers.T, 0)", "zero-temperature"],
    ["product(layers.t)", "bare-number-wanted"],
    ["layers.t > L ? 1 : 2", "list-compared"],
    ["drop_first(drop_first(layers.t))", "empty-list"],
    ["drop_first(pipes.d)", "empty-list"],
    ["interpolate(n, layers.T, layers.t)", "bare-number"],
    ["layers.x", "unknown-column"],
    ["layers.name", "text-column"],
    ["layers.finish", "choice-as-value"],
    ['layers.finish == "dull" ? 1 : 2', "list-compared"],
    ["layers.material", "material-as-value"],
    ["tip + 1", "choice-as-value"],
    ["tip.x", "unknown-field"],
    ['tip == "none" ? 1 : 2', "unknown-option"],
    ["tip == 3 ? 1 : 2", "choice-as-value"],
    ['tip < "bare" ? 1 : 2', "choice-order"],
    ["wall", "material-as-value"],
    ["wall.k", "property-without-argument"],
    ["wall.rho(T1)", "property-not-needed"],
    ["wall.lambda(T1)", "unknown-property"],
    ["wall.k(T1, T2)", "argument-count"],
    ["wall.k_mean(T1)", "argument-count"],
    ["L.t", "no-member"],
    ["tip.e(1)", "not-a-function"],
  ])("%s is refused as %s", (expression, code) => {
    expect(typeOf(expression)).toBe(code);
  });

  it("points at the member that is wrong and suggests the near one", () => {
    const [found] = findings("y = layers.finnish.e");
    expect(found).toMatchObject({
      column: 12,
      endColumn: 19,
      code: "unknown-column",
      mend: { text: "finish" },
    });
  });

  it("says how the lengths differ", () => {
    expect(findings("y = layers.t + prepend(layers.t, 0)")[0]?.message).toBe(
      "Line 1: `layers.t + prepend(layers.t, 0)` joins lists of different length: one for each row of layers, and layers + 1 numbers.",
    );
  });

  it("writes columns, fields and materials as places in the frame", () => {
    const { program } = checkProgram(
      sourceOf({
        inputs: [
          number("a", "ratio", "1"),
          table("rows", [number("x", "length", "mm"), choice("c", { p: { z: [1, "mm"] }, q: {} })]),
          choice("pick", { one: { z: [5, "mm"] }, two: {} }),
        ],
        working: 'u = rows.x + a*pick.z + rows.c.z\nv = pick != "two" ? 1 : 0',
      }),
    );
    expect(program?.layout).toEqual({
      numbers: ["a"],
      columns: [{ table: "rows", column: "x" }],
      choices: ["pick"],
      choiceColumns: [{ table: "rows", column: "c" }],
      materials: [],
      columnMaterials: [],
    });
    expect(program?.lines[0]?.expression).toMatchObject({
      left: {
        left: { node: "column", index: 0 },
        right: { right: { node: "option-field", values: [0.005, NaN] } },
      },
      right: { node: "column-option-field", choiceColumn: 0, values: [0.001, NaN] },
    });
    expect(program?.lines[1]?.expression).toMatchObject({
      condition: { node: "option-test", choice: 0, option: 1, equal: false },
    });
  });
});

describe("conditions", () => {
  it("see inputs only before the working, and every line in a limit", () => {
    const short = { requires: ["y > 1"], limits: ["y > 1 and f(L) > L"] };
    expect(findings("f(x) = x\ny = n", short)).toMatchObject([
      { code: "inputs-only", path: "#/requires/0/that" },
    ]);
  });

  it("compare tolerantly, where a working compares exactly", () => {
    const { program } = checkProgram(
      sourceOf({ working: "y = n > 1 ? 1 : 2", limits: ["y >= n"], requires: ["n > 0"] }),
    );
    expect(program?.lines[0]?.expression).toMatchObject({ condition: { tolerant: false } });
    expect(program?.conditions.map((condition) => condition.expression)).toMatchObject([
      { tolerant: true },
      { tolerant: true },
    ]);
  });

  it("name the inputs in them and show value and bound of one comparison", () => {
    const { program } = checkProgram(
      sourceOf({
        working: "y = n*L",
        requires: ["L > 0 and n < 5"],
        limits: ["0.1 < y/L", "y > sum(layers.t)"],
        appliesWhen: { q: 'tip == "bare"' },
      }),
    );
    expect(program?.conditions.map(({ role, owner, inputs }) => ({ role, owner, inputs }))).toEqual([
      { role: "requires", owner: 0, inputs: ["L", "n"] },
      { role: "applies-when", owner: "q", inputs: ["tip"] },
      { role: "limit", owner: 0, inputs: ["L"] },
      { role: "limit", owner: 1, inputs: ["layers"] },
    ]);
    expect(program?.conditions.map(({ compared }) => compared)).toMatchObject([
      null,
      null,
      { value: { node: "arithmetic", operator: "/" }, bound: { node: "constant", value: 0.1 } },
      { value: { node: "line" }, bound: { node: "call", function: "sum" } },
    ]);
  });

  it("are conditions, and a line is none", () => {
    expect(places("y = n", { limits: ["y", "y + 1"] })).toEqual([
      "1:1-2 value-as-condition",
      "1:1-6 value-as-condition",
    ]);
    expect(places("y = n > 1")).toEqual(["1:5-10 condition-as-value"]);
  });

  it("have sentences without a line number, and places in their own text", () => {
    expect(findings("y = n", { limits: ["y > L"] })).toMatchObject([
      { line: 1, column: 1, endColumn: 2, message: "`y > L` compares the bare number `y` with length (m)." },
    ]);
  });
});

describe("declared results", () => {
  const result = (working: string, ...declared: [string, string, "list"?]) =>
    findings(working, { results: [["y", ...declared]] }).map(({ path, code }) => `${path} ${code}`);

  it("accept what the line is", () => {
    expect(result("y = q*A", "heat flow rate", "W")).toEqual([]);
    expect(result("y = T1", "temperature", "°F")).toEqual([]);
    expect(result("y = T1 - T2", "temperature difference", "K")).toEqual([]);
    expect(result("y = layers.T", "temperature", "°C", "list")).toEqual([]);
  });

  it("refuse another dimension, reading or shape", () => {
    expect(result("y = q", "heat flow rate", "W")).toEqual(["#/results/0 unit-mismatch"]);
    expect(result("y = T1 - T2", "temperature", "°C")).toEqual(["#/results/0 temperature-kinds"]);
    expect(result("y = T1", "temperature difference", "K")).toEqual(["#/results/0 temperature-kinds"]);
    expect(result("y = layers.t", "length", "mm")).toEqual(["#/results/0 list-mismatch"]);
    expect(result("y = L", "length", "mm", "list")).toEqual(["#/results/0 list-mismatch"]);
    expect(result("y(x) = x", "length", "mm")).toEqual(["#/results/0 unknown-name"]);
    expect(result("y = 1", "grumpiness", "1")).toEqual(["#/results/0 unknown-quantity"]);
  });

  it("name the cast for a product that is declared a temperature", () => {
    expect(findings("y = sqrt(T1*T2)", { results: [["y", "temperature", "°C"]] })).toMatchObject([
      {
        path: "#/working",
        line: 1,
        column: 5,
        code: "no-temperature",
        mend: { text: "as_temperature(sqrt(T1*T2))" },
      },
    ]);
  });

  it("look for the symbols that figures read", () => {
    expect(findings("y = n", { uses: ["y", "L", "layers.t", "layers.zz", "nothing"] })).toMatchObject([
      { path: "#/figures/3", code: "unknown-name" },
      { path: "#/figures/4", code: "unknown-name" },
    ]);
  });
});
