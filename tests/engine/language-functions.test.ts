import { describe, expect, it } from "vitest";
import {
  languageConstants,
  languageFunctions,
  reservedWords,
  specialForms,
  type TypeRule,
} from "@/lib/language";
import { parseUnit } from "@/lib/units";
import { typeOf } from "./language-inputs";

/** Arguments that fit each rule, with what comes out. */
const calls: Readonly<Record<TypeRule, readonly [args: string, expected: string]>> = {
  dimensionless: ["n", "ratio"],
  whole: ["n", "ratio"],
  root: ["n", "ratio"],
  keep: ["q", "heat flux"],
  sign: ["q", "ratio"],
  ratio: ["L, L", "ratio"],
  alike: ["q, q", "heat flux"],
  clamp: ["q, 0, q", "heat flux"],
  interpolate: ["L, layers.t, layers.T", "temperature"],
  bessel: ["2, n", "ratio"],
  sum: ["layers.t", "length"],
  cumsum: ["layers.t", "length × layers"],
  product: ["layers.finish.e", "ratio"],
  element: ["layers.T", "temperature"],
  at: ["layers.T, 1", "temperature"],
  count: ["layers.T", "ratio"],
  extend: ["layers.T, T1", "temperature × layers+1"],
  shorten: ["layers.t", "length × layers-1"],
  reverse: ["layers.t", "length × layers"],
  "weighted-mean": ["layers.T, layers.t", "temperature"],
  "number-in": ['L, "mm"', "ratio"],
  "as-temperature": ["n*T1", "temperature"],
};

describe("functions of the language", () => {
  const names = [...languageFunctions, ...specialForms, ...languageConstants].map((row) => row.name);

  it("share one namespace without a name given twice", () => {
    expect(new Set([...names, ...reservedWords]).size).toBe(names.length + reservedWords.length);
    for (const name of names) expect(name).toMatch(/^[A-Za-z][A-Za-z0-9_]*$/);
  });

  it.each(languageFunctions.map((row) => [row.name, row] as const))(
    "%s passes types by its rule",
    (name, row) => {
      const [args, expected] = calls[row.rule];
      expect(typeOf(`${name}(${args})`)).toBe(expected);
      expect(row.help.endsWith(".")).toBe(true);
    },
  );

  it.each(languageFunctions.map((row) => [row.name, row] as const))(
    "%s counts its arguments",
    (name, row) => {
      const many = Array.from({ length: row.parameters.length + 1 }, () => "n").join(", ");
      if (!row.variadic) expect(typeOf(`${name}(${many})`)).toBe("argument-count");
    },
  );
});

describe("constants", () => {
  it.each(languageConstants.map((row) => [row.name, row] as const))(
    "%s has a unit that is read",
    (_, row) => {
      const unit = parseUnit(row.unit);
      expect(unit.ok && unit.value.factor).toBe(1);
    },
  );

  it("agree with each other where one follows from others", () => {
    const value = Object.fromEntries(languageConstants.map((row) => [row.name, row.value]));
    const { k_B = 0, h_planck = 1, c_0 = 1, N_A = 0 } = value;
    // Stefan-Boltzmann and gas constant from the exact constants of the SI (BIPM brochure, 9th edition).
    expect(value.sigma_SB).toBeCloseTo((2 * Math.PI ** 5 * k_B ** 4) / (15 * h_planck ** 3 * c_0 ** 2), 21);
    expect(value.R_gas).toBeCloseTo(k_B * N_A, 13);
    // CODATA 2022, as printed.
    expect(value.sigma_SB?.toPrecision(10)).toBe("5.670374419e-8");
    expect(value.R_gas?.toPrecision(10)).toBe("8.314462618");
  });
});
