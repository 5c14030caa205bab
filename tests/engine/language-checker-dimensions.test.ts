import { describe, expect, it } from "vitest";
import { checkProgram } from "@/lib/language";
import { findings, places, sourceOf, typeOf } from "./language-inputs";

describe("dimensions", () => {
  it.each([
    ["q*A", "heat flow rate"],
    ["k/L", "heat transfer coefficient"],
    ["h*L/k", "ratio"],
    ["L^2", "area"],
    ["sqrt(A)", "length"],
    ["cbrt(A*L)", "length"],
    ["A^0.5", "length"],
    ["(L^3)^(2/3)", "area"],
    ["-L", "length"],
    ["+L", "length"],
    ["abs(L)", "length"],
    ["L + 0", "length"],
    ["n > 0 ? L : 0", "length"],
    ['L + "25 mm"', "length"],
    ['"25 %"*n', "ratio"],
    ["n^n", "ratio"],
    ["exp(h*L/k)", "ratio"],
    ["atan2(L, sqrt(A))", "ratio"],
    ["max(L, 0, sqrt(A))", "length"],
    ['clamp(L, 0, "1 m")', "length"],
    ['number_in(L, "mm")', "ratio"],
    ['round(number_in(L, "mm"))', "ratio"],
    ["sign(dT)", "ratio"],
    ["bessel_i(0, n)", "ratio"],
    ["bessel_j_zero(1, n)", "ratio"],
    ["R_gas*T_ice", "molar energy"],
    ["integral(x, 0, L, x)", "area"],
    ["balance(x, 0, L, x - L/2)", "length"],
    ["argmin(x, 0, L, (x - L)^2)", "length"],
    ["series(i, 1, 10, L/i)", "length"],
    ["fixed_point(x, L, x/2)", "length"],
  ])("%s is %s", (expression, expected) => {
    expect(typeOf(expression)).toBe(expected);
  });

  it.each([
    ["q + T1", "unit-mismatch"],
    ["L + 5", "bare-number"],
    ["L > 3 ? 1 : 2", "bare-number"],
    ["min(L, q)", "unit-mismatch"],
    ["n > 0 ? L : q", "unit-mismatch"],
    ["sin(L)", "bare-number-wanted"],
    ["round(L)", "bare-number-wanted"],
    ["L^n", "exponent"],
    ["L^0.3333", "exponent"],
    ["n^L", "exponent"],
    ["L^pi", "exponent"],
    ["((L^100)^100)", "dimension-limit"],
    ["bessel_j(n, 2)", "order"],
    ["bessel_j(0.5, 2)", "order"],
    ["bessel_j(101, 2)", "order"],
    ['number_in(L, "kg")', "unit-mismatch"],
    ["number_in(L, 3)", "unit-wanted"],
    ['"8 flurbs"', "unreadable-unit"],
    ['"25" + 1', "text-without-unit"],
    ["balance(x, 0, L, x - q)", "unit-mismatch"],
    ["balance(x, 0, 1)", "argument-count"],
    ["series(i, 1, L, 1)", "bare-number"],
    ["L > 0", "condition-as-value"],
    ["(n > 1) + 2", "condition-as-value"],
    ["n ? 1 : 2", "value-as-condition"],
    ["n and 1 > 0 ? 1 : 2", "value-as-condition"],
    ["sqrt(1, 2)", "argument-count"],
    ["clamp(L, 0)", "argument-count"],
  ])("%s is refused as %s", (expression, code) => {
    expect(typeOf(expression)).toBe(code);
  });

  it("says in the trade's words what is added, where", () => {
    expect(findings("a = 1\nb = 2\nc = a*b\nd = c*q + T1")).toEqual([
      expect.objectContaining({
        path: "#/working",
        line: 4,
        column: 5,
        endLine: 4,
        endColumn: 13,
        severity: "error",
        code: "unit-mismatch",
        message: "Line 4: `c*q + T1` adds heat flux (W/m²) and temperature (K).",
      }),
    ]);
  });

  it("names a bare number in a sum and offers it with a unit", () => {
    const [found] = findings("y = L - 5");
    expect(found?.message).toBe("Line 1: `L - 5` subtracts the bare number `5` from length (m).");
    expect(found?.mend).toMatchObject({ text: '"5 mm"', span: { line: 1, column: 9, endColumn: 10 } });
  });

  it("points into the unit that cannot be read", () => {
    expect(places('y = L + "8 flurbs"')).toEqual(["1:12-18 unreadable-unit"]);
  });

  it("refuses a sum across a line break with the span of both lines", () => {
    const [found] = findings("y = (L # a comment\n  + q)");
    expect(found).toMatchObject({ line: 1, column: 6, endLine: 2, endColumn: 6 });
    expect(found?.message).toBe("Line 1: `L + q` adds length (m) and heat flux (W/m²).");
  });

  it("folds literals and writes number_in as arithmetic on constants", () => {
    const { program } = checkProgram(
      sourceOf({
        working:
          'a = L^(1/4 + 3/4)\nb = number_in(T1, "°C")\nc = number_in(dT, "°C")\nd = number_in(L, "mm")',
      }),
    );
    expect(program?.lines[0]?.expression).toMatchObject({
      node: "arithmetic",
      right: { node: "constant", value: 1 },
    });
    expect(program?.lines[1]?.expression).toMatchObject({
      node: "arithmetic",
      operator: "-",
      left: { node: "input", symbol: "T1" },
      right: { node: "constant", value: 273.15 },
    });
    expect(program?.lines[2]?.expression).toMatchObject({ node: "input", symbol: "dT" });
    expect(program?.lines[3]?.expression).toMatchObject({
      node: "arithmetic",
      operator: "/",
      right: { node: "constant", value: 0.001 },
    });
  });

  it("reads a text as SI", () => {
    const { program } = checkProgram(sourceOf({ working: 'a = "60 °C"\nb = "10 Δ°C"\nc = "0.5 mm"' }));
    expect(program?.lines.map((line) => line.expression)).toMatchObject([
      { node: "constant", value: 333.15 },
      { node: "constant", value: 10 },
      { node: "constant", value: 0.0005 },
    ]);
  });

  it("tells what a unit means as a remark", () => {
    expect(findings('y = "25 BTU"')).toMatchObject([{ severity: "remark", code: "unit-notice", column: 5 }]);
  });
});

describe("names", () => {
  it.each([
    ["y = Lx", "1:5-7 unknown-name"],
    ["y = z\nz = 1", "1:5-6 defined-below"],
    ["y = y + 1", "1:5-6 self-reference"],
    ["f(x) = f(x)\ny = f(1)", "1:8-9 self-reference"],
    ["L = 1", "1:1-2 name-taken"],
    ["y = 1\ny = 2", "2:1-2 name-taken"],
    ["sqrt = 1", "1:1-5 name-taken"],
    ["balance = 1", "1:1-8 name-taken"],
    ["pi = 3", "1:1-3 name-taken"],
    ["constructor = 1", "1:1-12 name-taken"],
    ["f(L) = L\ny = f(1)", "1:3-4 name-taken"],
    ["f(z) = z\ny = f(1)\nz = 2", "1:3-4 name-taken"],
    ["f(a, a) = a\ny = f(1, 2)", "1:6-7 name-taken"],
    ["y = series(n, 1, 2, n)", "1:12-13 name-taken"],
    ["f(u) = series(u, 1, 2, u)\ny = f(1)", "1:15-16 name-taken"],
    ["y = balance(3, 0, 1, 2)", "1:13-14 variable-wanted"],
    ["y = n(2)", "1:5-6 not-a-function"],
    ["y = pi(2)", "1:5-7 not-a-function"],
    ["y = sqrt", "1:5-9 function-as-value"],
    ["f(x) = x\ny = f", "2:5-6 function-as-value"],
    ["f(x) = x\ny = f(1, 2)", "2:5-12 argument-count"],
    ["y = log(2)", "1:5-8 unknown-function"],
    ["y = layers", "1:5-11 table-as-value"],
    ["f(x) = x + zz", "1:12-14 unknown-name"],
    ["f(x) = g(x)", "1:8-9 unknown-function"],
    ["y = toString", "1:5-13 unknown-name"],
    ["y = tip.constructor", "1:9-20 unknown-field"],
    ["y = layers.constructor", "1:12-23 unknown-column"],
    ["y = hasOwnProperty(1)", "1:5-19 unknown-function"],
  ])("%j has %s", (working, expected) => {
    expect(places(working)[0]).toBe(expected);
  });

  it("keeps E, PI, length and case ordinary names", () => {
    expect(places("E = 1\nPI = E\nlength = PI\ncase = length")).toEqual([]);
  });

  it("suggests the name that was meant", () => {
    const [found] = findings("y = sqr(n) + epps");
    expect(found).toMatchObject({ hint: "Did you mean `sqrt`?", mend: { text: "sqrt" } });
    expect(findings("y = epps")[0]?.mend?.text).toBe("eps");
    expect(findings("y = log(n)")[0]?.hint).toContain("`ln(x)` is the natural logarithm");
  });

  it("does not accuse the readers of a line that has an error", () => {
    expect(places("a = q + T1\nb = a + 1\nc = b*L\nd = 1 +\ne = d + L")).toEqual([
      "1:5-11 unit-mismatch",
      "4:7-8 missing-operand",
    ]);
  });

  it("tells the errors of working, conditions and results together, the working first", () => {
    const found = findings("a = q + T1\nb = L + 5\nc = L", {
      requires: ["L > q"],
      limits: ["zz > 1"],
      results: [
        ["c", "mass", "kg"],
        ["d", "length", "mm"],
      ],
    });
    expect(found.map(({ path, code }) => `${path} ${code}`)).toEqual([
      "#/working unit-mismatch",
      "#/working bare-number",
      "#/limits/0/when unknown-name",
      "#/requires/0/that unit-mismatch",
      "#/results/0 unit-mismatch",
      "#/results/1 unknown-name",
    ]);
  });

  it("remarks on what nothing reads", () => {
    const { diagnostics } = checkProgram(
      sourceOf({
        inputs: sourceOf({ working: "" }).inputs.slice(6, 8),
        working: "f(x) = x\na = L\nb = a",
        uses: ["a"],
      }),
    );
    expect(
      diagnostics.map(({ severity, code, path, line }) => `${severity} ${code} ${path} ${line ?? ""}`),
    ).toEqual([
      "remark unused-function #/working 1",
      "remark unused-line #/working 3",
      "remark unused-input #/inputs/1 ",
    ]);
  });

  it("counts what conditions, results and figures read as used", () => {
    const codes = checkProgram(
      sourceOf({
        working: "a = L\nb = n\nc = eps",
        limits: ["a > L"],
        results: [["b", "ratio", "1"]],
        uses: ["c", "layers.t"],
      }),
    ).diagnostics.filter((each) => each.code === "unused-line");
    expect(codes).toEqual([]);
  });

  it("refuses symbols of inputs that clash", () => {
    const inputs = sourceOf({ working: "" }).inputs.slice(0, 1);
    const clash = [...inputs, ...inputs, { ...inputs[0], symbol: "pi" }, { ...inputs[0], symbol: "valueOf" }];
    const source = { ...sourceOf({ working: "y = 1" }), inputs: clash as typeof inputs };
    expect(
      checkProgram(source)
        .diagnostics.filter((each) => each.severity === "error")
        .map((each) => each.path),
    ).toEqual(["#/inputs/1/symbol", "#/inputs/2/symbol", "#/inputs/3/symbol"]);
  });
});

describe("functions of the working", () => {
  it("are checked at each call with the types of the arguments", () => {
    const { program, diagnostics } = checkProgram(
      sourceOf({ working: "twice(x) = 2*x\na = twice(L)\nb = twice(q)\nc = twice(layers.t)\nd = twice(L)" }),
    );
    expect(diagnostics.filter((each) => each.severity === "error")).toEqual([]);
    // Once for length, once for heat flux, once for the column.
    expect(program?.functions).toHaveLength(3);
  });

  it("tell a fault in their text once, with the call that has it", () => {
    const found = findings("f(x) = x + L\na = f(L)\nb = f(q)\nc = f(q)");
    expect(found).toMatchObject([
      {
        line: 1,
        column: 8,
        message: "Line 1: `x + L` adds heat flux (W/m²) and length (m) (in the call `f(q)`).",
      },
    ]);
  });

  it("see inputs and what is above them, not what is below", () => {
    expect(places("a = L\nf(x) = x + a\nb = f(L)")).toEqual([]);
    expect(places("f(x) = x + a\na = L\nb = f(L)")).toEqual(["1:12-13 defined-below"]);
  });

  it("count their nodes at every call", () => {
    const size = (working: string) => checkProgram(sourceOf({ working })).program?.size ?? 0;
    const once = size("f(x) = x*x + 1\na = f(n)");
    expect(size("f(x) = x*x + 1\na = f(n) + f(n)")).toBe(2 * once + 1);
  });
});
