import { describe, expect, it } from "vitest";
import { formatExact, formatSignificant, parseAmount, parseNumber, quantityByName } from "@/lib/units";

describe("numbers that people type", () => {
  it.each([
    ["3", 3],
    [" 3 ", 3],
    ["0.25", 0.25],
    ["0,25", 0.25],
    [".5", 0.5],
    [",5", 0.5],
    ["5.", 5],
    ["12,5", 12.5],
    ["0,250", 0.25],
    ["1250,500", 1250.5],
    ["1.250", 1.25],
    ["1.250,5", 1250.5],
    ["1,250.5", 1250.5],
    ["1,250,000", 1250000],
    ["1.250.000", 1250000],
    ["1.250.000,75", 1250000.75],
    ["1 250", 1250],
    ["1\u00a0250", 1250],
    ["1\u2009250,5", 1250.5],
    ["1\u202f250.5", 1250.5],
    ["1’250’000", 1250000],
    ["1e-3", 0.001],
    ["1E+3", 1000],
    ["2,5e3", 2500],
    ["1.2·10⁻³", 0.0012],
    ["1.2 × 10^-3", 0.0012],
    ["1.2*10^(-3)", 0.0012],
    ["1.2x10^3", 1200],
    ["1,2·10−3", 0.0012],
    ["10⁻³", 0.001],
    ["−5", -5],
    ["-5", -5],
    ["–5", -5],
    ["+5", 5],
    ["- 5", -5],
    ["-0", 0],
    ["0", 0],
    ["0.1", 0.1],
    ["1.7976931348623157e308", Number.MAX_VALUE],
    ["5e-324", Number.MIN_VALUE],
  ])("%j is %d", (text, value) => {
    expect(parseNumber(text)).toEqual({ ok: true, value, notices: [] });
  });

  it.each(["1,250", "12,345", "-1,250", "1,250e3"])("%s is refused with both readings", (text) => {
    const read = parseNumber(text);
    expect(read).toMatchObject({ ok: false, fault: { code: "invalid-input" } });
    if (!read.ok) {
      expect(read.fault.suggestions).toHaveLength(2);
      for (const suggestion of read.fault.suggestions) expect(parseNumber(suggestion).ok).toBe(true);
    }
  });

  it("names both readings of 1,250", () => {
    expect(parseNumber("1,250")).toMatchObject({
      fault: {
        message: "1,250 can be read as 1.250 or as 1250. Write the one that is meant, without the comma.",
        suggestions: ["1.250", "1250"],
      },
    });
  });

  it.each([
    ["", "missing-input", "No number is given."],
    ["   ", "missing-input", "No number is given."],
    ["abc", "invalid-input", '"abc" is not a number.'],
    ["NaN", "invalid-input", '"NaN" is not a finite number.'],
    ["Infinity", "invalid-input", '"Infinity" is not a finite number.'],
    ["-∞", "invalid-input", '"-∞" is not a finite number.'],
    ["1e999", "invalid-input", "1e999 is too large to calculate with."],
    ["1e-999", "invalid-input", "1e-999 is too small to calculate with."],
    ["12 34", "invalid-input", '"12 34" has blanks that do not separate groups of three digits.'],
    ["1.2.3", "invalid-input", "1.2.3 has points and commas that do not separate groups of three digits."],
    ["1,2,3", "invalid-input", "1,2,3 has points and commas that do not separate groups of three digits."],
    ["5,", "invalid-input", "5, ends with a comma."],
    ["0x10", "invalid-input", '"x10" after the number cannot be read as part of it.'],
    ["1e5e3", "invalid-input", '"e3" after the number cannot be read as part of it.'],
    ["--5", "invalid-input", '"--5" is not a number.'],
    ["5 mm", "invalid-input", '"mm" after the number cannot be read as part of it.'],
    ["true", "invalid-input", '"true" is not a number.'],
    ["٣", "invalid-input", '"٣" is not a number.'],
  ])("%j is refused in a sentence", (text, code, message) => {
    expect(parseNumber(text)).toMatchObject({ ok: false, fault: { code, message } });
  });
});

describe("amounts", () => {
  it.each([
    ["3 in", 3, "in"],
    ["25mm", 25, "mm"],
    ["480°F", 480, "°F"],
    ["480 deg F", 480, "°F"],
    ["−20 °C", -20, "°C"],
    ["0,035 W/(m·K)", 0.035, "W/(m·K)"],
    ["1 250 W", 1250, "W"],
    ["1.2·10⁻³ m²/s", 0.0012, "m²/s"],
    ["3·10⁻⁸ Ω·m", 3e-8, "Ω·m"],
    ["1 1/2 in", 1.5, "in"],
    ["3/8 in", 0.375, "in"],
    ["-1/2 in", -0.5, "in"],
    ["2½ in", 2.5, "in"],
    ["¾in", 0.75, "in"],
    ["5 eV", 5, "eV"],
    ["5 %", 5, "%"],
    ["2 1/K", 2, "1/K"],
    ["10 psig", 10, "psig"],
    ["120 [degF]", 120, "°F"],
  ])("%j is %d %s", (text, value, symbol) => {
    expect(parseAmount(text)).toMatchObject({ ok: true, value: { value, unit: { symbol } } });
  });

  it("has no unit where none was typed", () => {
    expect(parseAmount("3")).toEqual({ ok: true, value: { value: 3, unit: null }, notices: [] });
  });

  it("reads shorthand where a quantity is expected, and passes the notice on", () => {
    const expected = quantityByName("temperature");
    const read = parseAmount("68 F", { ...(expected && { expect: expected }), shorthand: true });
    expect(read).toMatchObject({
      ok: true,
      value: { value: 68, unit: { symbol: "°F" } },
      notices: ['"F" is read as °F.'],
    });
  });

  it.each([
    ["8 furlongs/K", "unreadable-unit", 2, 10],
    ["1,250 mm", "invalid-input", 0, 5],
    ["mm", "invalid-input", 0, 2],
    ["", "missing-input", 0, 0],
    ["1/0 in", "invalid-input", 0, 3],
    ["3  W/m2K", "unreadable-unit", 7, 8],
    ["NaN mm", "invalid-input", 0, 6],
  ])("%j is refused at its place in the whole text", (text, code, start, end) => {
    expect(parseAmount(text)).toMatchObject({ ok: false, fault: { code, start, end } });
  });
});

describe("numbers for people", () => {
  it.each([
    [0, 3, "0"],
    [1, 3, "1.00"],
    [1234.5, 3, "1230"],
    [1234.5, 5, "1234.5"],
    [25000, 2, "25000"],
    [-3.14159, 3, "−3.14"],
    [0.00026, 2, "2.6·10⁻⁴"],
    [0.001, 2, "0.0010"],
    [0.00099996, 3, "0.00100"],
    [999999.4, 3, "1.00·10⁶"],
    [1e6, 3, "1.00·10⁶"],
    [-1.5e-9, 2, "−1.5·10⁻⁹"],
    [6.02214076e23, 4, "6.022·10²³"],
    [0.1 + 0.2, 3, "0.300"],
    [2.5, 1, "3"],
  ])("%d with %d digits is %s", (value, digits, text) => {
    expect(formatSignificant(value, digits)).toBe(text);
  });

  it("writes numbers for machines in full and never NaN or infinity", () => {
    for (const value of [0.1, 1 / 3, -2.5e-300, 1e21, 5e-324, Number.MAX_VALUE])
      expect(Number(formatExact(value))).toBe(value);
    expect(formatExact(-0)).toBe("0");
    for (const value of [Number.NaN, Infinity]) {
      expect(() => formatExact(value)).toThrow(RangeError);
      expect(() => formatSignificant(value, 3)).toThrow(RangeError);
    }
  });
});
