import { describe, expect, it } from "vitest";
import { findings, places, typeOf } from "./language-inputs";

describe("weights of temperatures", () => {
  it.each([
    ["T1", "temperature"],
    ["T1 - T2", "temperature difference"],
    ["T1 + dT", "temperature"],
    ["dT + T1", "temperature"],
    ["T1 - dT", "temperature"],
    ["(T1 + T2)/2", "temperature"],
    ["2*T1 - T2", "temperature"],
    ["-T1 + 2*T2", "temperature"],
    ["(2*T1 + T2)/3", "temperature"],
    ["0.3333*T1 + 0.6667*T2", "temperature"],
    ["(1/3)*T1 + (2/3)*T2", "temperature"],
    ["0.5*(T1 + T2)", "temperature"],
    ["mean(T1, T2)", "temperature"],
    ["max(T1, T2)", "temperature"],
    ["n > 0 ? T1 : T2", "temperature"],
    ['clamp(T1, "0 °C", "100 °C")', "temperature"],
    ["abs(T1 - T2)", "temperature difference"],
    ["3*dT", "temperature difference"],
    ["n*dT", "temperature difference"],
    ["q/h", "temperature difference"],
    ["T1 + n*(T2 - T1)", "temperature"],
    ["T1 + q/h", "temperature"],
    ["T_ice + dT", "temperature"],
    ['"60 °C" - T1', "temperature difference"],
    ['T1 + "10 Δ°C"', "temperature"],
    ["T1 - T2 > 0 ? 1 : 2", "ratio"],
    ['T1 > "60 °C" ? 1 : 2', "ratio"],
    ["T1/T2", "ratio"],
    ["(T1 + T2)*(T1^2 + T2^2)*L/A", "K³/m"],
    ["eps*sigma_SB*(T1^4 - T2^4)", "heat flux"],
    ["eps*sigma_SB*(T1^2 + T2^2)*(T1 + T2)", "heat transfer coefficient"],
    ["T2 + eps*sigma_SB*(T1^4 - T2^4)/h", "temperature"],
    ['number_in(T1, "K")^1.5/(number_in(T1, "K") + 110.4)', "ratio"],
    ['T1^1.5/(T1 + "110.4 K")', "K^(1/2)"],
    ["n*T1", "no reading"],
    ["sqrt(T1*T2)", "no reading"],
    ["T1*T2/T1", "no reading"],
    ["(q/(eps*sigma_SB) + T1^4)^(1/4)", "no reading"],
    ["as_temperature((q/(eps*sigma_SB) + T1^4)^(1/4))", "temperature"],
    ["as_temperature(n*T1) - T2", "temperature difference"],
    ["as_temperature(q/h)", "temperature"],
    ["n*T1 > n*T2 ? 1 : 2", "ratio"],
    ['number_in(n*T1, "K")', "ratio"],
    ["n*T1*h*A/(n*T2)", "thermal conductance"],
    ["0*T1 + 1", "ratio"],
    ["balance(x, T1, T2, x - T1)", "temperature"],
    ["balance(x, 0, dT, x - dT)", "temperature difference"],
    ["fixed_point(x, T1, (x + T2)/2)", "temperature"],
    ["integral(x, T1, T2, wall.k(x))", "linear heat flow rate"],
  ])("%s is %s", (expression, expected) => {
    const found = typeOf(expression);
    expect(found).toBe(expected);
  });

  it.each([
    ["T1 + T2", "absolute-sum"],
    ["dT - T1", "absolute-from-difference"],
    ["2*T1", "absolute-sum"],
    ["-T1", "absolute-sum"],
    ["T1 + T2 - dT", "absolute-sum"],
    ["0.3*T1 + 0.6*T2", "absolute-sum"],
    ["max(T1 + T2, T1)", "absolute-sum"],
    ["max(T1, dT)", "temperature-kinds"],
    ["T1 > dT ? 1 : 2", "temperature-kinds"],
    ["n > 0 ? T1 : dT", "temperature-kinds"],
    ["n > 0 ? T1 : 0", "zero-temperature"],
    ["T1 > 0 ? 1 : 2", "zero-temperature"],
    ["T1 + dT - 5", "bare-number"],
    ["n*T1 + T2", "no-temperature"],
    ["n*T1 + dT", "no-temperature"],
    ["sqrt(T1*T2) - T1", "no-temperature"],
    ["max(n*T1, T2)", "temperature-kinds"],
    ["n*T1 > T2 ? 1 : 2", "temperature-kinds"],
    ['number_in(n*T1, "°C")', "no-temperature"],
    ['number_in(T1, "Δ°C")', "temperature-kinds"],
    ["wall.k(dT)", "temperature-wanted"],
    ["wall.k(0)", "zero-temperature"],
    ["wall.k(L)", "temperature-wanted"],
    ["wall.k(n*T1)", "temperature-wanted"],
    ["as_temperature(L)", "temperature-wanted"],
    ["balance(x, T1, T2, x)", "absolute-balance"],
    ["balance(x, T1, dT, x - T1)", "temperature-kinds"],
    ["balance(x, 0, T1, x - T1)", "zero-temperature"],
    ["series(i, 1, 3, T1)", "absolute-sum"],
    ["sum(layers.T)", "absolute-sum"],
    ["cumsum(layers.T)", "absolute-sum"],
    ['"-300 °C"', "below-absolute-zero"],
  ])("%s is refused as %s", (expression, code) => {
    expect(typeOf(expression)).toBe(code);
  });

  it.each([
    ["y = T1 + T2", "(T1 + T2)/2"],
    ["y = dT - T1", "T1 - dT"],
    ["y = (dT + dT) - T1", "T1 - (dT + dT)"],
    ["y = (1 - n)*T1 + n*T2", "T1 + n*(T2 - T1)"],
    ["y = n*T2 + T1*(1 - n)", "T1 + n*(T2 - T1)"],
    ["y = sqrt(T1*T2) - dT", "as_temperature(sqrt(T1*T2))"],
    ["y = T1 > 0 ? 1 : 2", '"0 °C"'],
    ["y = sum(layers.T)", "mean(layers.T)"],
  ])("%s offers %s", (working, mend) => {
    expect(findings(working)[0]?.mend?.text).toBe(mend);
  });

  it("says what an unfinished sum is, at its place", () => {
    expect(findings("s = T1 + T2")).toMatchObject([
      { line: 1, column: 5, endColumn: 12, message: "Line 1: `T1 + T2` adds two absolute temperatures." },
    ]);
  });

  it("judges the arguments and results of functions as well", () => {
    expect(places("f(s) = s + T1\ny = f(T2)")).toEqual(["1:8-14 absolute-sum"]);
    expect(places("f(s) = s\ny = f(T1 + T2)")).toEqual(["2:7-14 absolute-sum"]);
    expect(places("film(s) = (s + T1)/2\ny = film(T2)")).toEqual([]);
  });
});

describe("an absolute temperature times something per kelvin", () => {
  it.each(["h*T1", "T1*h", "k*T1", "h*A*T1", "T1/(1/(h*A))", "wall.k(T1)*T1", "wall.c(T1)*T1"])(
    "%s is warned of",
    (expression) => {
      expect(findings(`y = ${expression}`)).toMatchObject([
        { severity: "warning", code: "absolute-product" },
      ]);
    },
  );

  it.each([
    "h*(T1 - T2)",
    "R_gas*T1",
    "k_B*T1/e_charge",
    "k*R_gas*T1",
    '"2.44e-8 W·Ω/K²"*T1',
    "T1/T2",
    "1/T1*T2",
    "(1/T1)*dT",
    "eps*sigma_SB*T1^3*T2",
    "sigma_SB*T1^4",
    "h*dT",
  ])("%s is not", (expression) => {
    expect(findings(`y = ${expression}`)).toEqual([]);
  });

  it("is forgiven to a line that holds the gas constant", () => {
    expect(findings('R_air = R_gas/"28.9644 g/mol"\nf(r) = r*T1\ny = R_air*T1\nz = f(R_air)')).toEqual([]);
  });

  it("names both in the warning", () => {
    expect(findings("y = h*T1")[0]?.message).toBe(
      "Line 1: `h*T1` multiplies the absolute temperature `T1` with heat transfer coefficient (W/(m²·K)).",
    );
  });
});
