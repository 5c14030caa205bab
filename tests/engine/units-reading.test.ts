import { describe, expect, it } from "vitest";
import strings from "@/tests/reference/data/unit-strings.json";
import { parseUcum, parseUnit, quantityByName, sameDimension, type Quantity, type Unit } from "@/lib/units";

function quantity(name: string): Quantity {
  const found = quantityByName(name);
  if (!found) throw new Error(`no quantity ${name}`);
  return found;
}

function unit(text: string, options: Parameters<typeof parseUnit>[1] = {}): Unit {
  const read = parseUnit(text, options);
  if (!read.ok) throw new Error(`${text}: ${read.fault.message}`);
  return read.value;
}

function fault(text: string, options: Parameters<typeof parseUnit>[1] = {}) {
  const read = parseUnit(text, options);
  if (read.ok) throw new Error(`${text} was read as ${read.value.symbol}`);
  return read.fault;
}

function notices(text: string, options: Parameters<typeof parseUnit>[1] = {}): readonly string[] {
  const read = parseUnit(text, options);
  if (!read.ok) throw new Error(read.fault.message);
  return read.notices;
}

// The table's own header names its source: GNU units 2.22.
const shorthand: Readonly<Record<string, string>> = strings.shorthand;
describe("the 59 texts of heat engineers have the size that GNU units gives", () => {
  it.each(strings.rows as [string, string, string, number, string | null][])(
    "%s",
    (typed, _expression, si, factor, code) => {
      const wanted = shorthand[typed];
      const read =
        wanted === undefined ? unit(typed) : unit(typed, { expect: quantity(wanted), shorthand: true });
      expect(Math.abs(read.factor / factor - 1)).toBeLessThan(1e-12);
      expect(sameDimension(read.dimension, unit(si).dimension)).toBe(true);
      if (code === null) return;
      const byCode = parseUcum(code);
      expect(byCode.ok && Math.abs(byCode.value.factor / factor - 1) < 1e-12).toBe(true);
      expect(byCode.ok && sameDimension(byCode.value.dimension, read.dimension)).toBe(true);
    },
  );
});

describe("units of the supplied templates and of the published cases", () => {
  const written = [
    "1 1/K 1/m EUR/MWh EUR/m EUR/m² EUR/m³ GPa J J/(kg·K) K K/W MPa Pa W W/(m²·K) W/(m·K) W/m W/m² W/m³ W·Ω/K² cm² cm³ h",
    "kJ/kg kg/m³ m m/s min mm mm² mm²·K/W m² m²/s m²·K/W m·K/W nm s ° °C µm µΩ·cm MW/m³ km/h L/h g/m² kPa kJ/(m²·K)",
    "- 1/m^2 A Btu/(h*ft*degF) J/(kg*K) J/K J/m W*ohm/K^2 W*s^0.5/(m^2*K) W/(m*K^2.7) W/(m^2*Pa*K) cal_th/(s·cm·K) clo day degC",
    "degF foot^2/hour in kW kg/m kg/m^3 kg/mol kg/s mbar ohm·m psi rad tog tonref mW/(m*K) W/mm² A/mm² Ω·mm²/m g/mol ng/(m·s·Pa)",
  ].flatMap((line) => line.split(" "));
  const spaced = [
    "J/(kg K)",
    "W/(m^2 K)",
    "m^2 K/W",
    "btu inch/(hour foot^2 degF)",
    "btu/(hour foot degF)",
    "btu/(hour foot^3)",
    "btu/(lb degF)",
    "hour foot^2 degF/btu",
    "kilocal_IT/(hour m K)",
    "microohm cm",
    "ohm circularmil/foot",
    "1e-8 ohm*m",
  ];
  it.each([...written, ...spaced])("reads %s", (text) => {
    expect(parseUnit(text)).toMatchObject({ ok: true });
  });
});

describe("ways of writing", () => {
  it.each([
    ["W/m·K", "W/(m·K)"],
    ["W/m*K", "W/(m·K)"],
    ["W/m.K", "W/(m·K)"],
    ["W/m K", "W/(m·K)"],
    ["W/m/K", "W/(m·K)"],
    ["W / (m × K)", "W/(m·K)"],
    ["W m-1 K-1", "W/(m·K)"],
    ["W·m⁻¹·K⁻¹", "W/(m·K)"],
    ["(W)/((m)·(K))", "W/(m·K)"],
    ["W per m per K", "W/(m·K)"],
    ["m^2·K/W", "m²·K/W"],
    ["m2·K/W", "m²·K/W"],
    ["m**2 K/W", "m²·K/W"],
    ["(m·K)^2/W", "m²·K²/W"],
    ["square feet", "ft²"],
    ["cu ft/min", "ft³/min"],
    ["sq. in.", "in²"],
    ["BTU/(h·ft²-°F)", "BTU/(h·ft²·°F)"],
    ["ft-lbf", "ft·lbf"],
    ["ft·ft", "ft²"],
    ["μm", "µm"],
    ["um", "µm"],
    ["\u2126·m", "Ω·m"],
    ["kohm", "kΩ"],
    ["ºC", "°C"],
    ["\u2103", "°C"],
    ["deg C", "°C"],
    ["degC/W", "°C/W"],
    ["∆ °C", "Δ°C"],
    ["delta_degF", "Δ°F"],
    ["kilowatt", "kW"],
    ["millimetres", "mm"],
    ["bar(g)", "barg"],
    ["psi g", "psig"],
    ["W·s^0.5/(m²·K)", "W·s^(1/2)/(m²·K)"],
    ["1e-8 Ω·m", "10⁻⁸·Ω·m"],
    ["/K", "1/K"],
    ["-", "1"],
    ["m⁰", "1"],
  ])("%s is printed %s", (typed, printed) => {
    expect(unit(typed).symbol).toBe(printed);
  });

  it("says so when a stroke is followed by an open product, and not when brackets make it clear", () => {
    expect(notices("W/m·K")).toEqual([
      '"W/m·K" is read as W/(m·K): everything after the stroke is denominator.',
    ]);
    expect(notices("W/(m·K)")).toEqual([]);
    expect(notices("W/m/K")).toEqual([]);
    expect(notices("m²·K/W")).toEqual([]);
  });

  it("says what h, a, BTU, cal, kcal and gauge pressures mean", () => {
    expect(notices("kW·h")).toEqual(["h is the hour."]);
    expect(notices("EUR/a")).toEqual(["a is a year of 365.25 d."]);
    expect(notices("BTU")[0]).toContain("International Table");
    expect(notices("cal")[0]).toContain("4.184 J");
    expect(notices("kcal")[0]).toContain("4186.8 J");
    expect(notices("barg")[0]).toContain("101 325 Pa");
  });

  it("refuses a negative power after a stroke, which people read in two ways", () => {
    expect(fault("W/m·K⁻¹")).toMatchObject({ code: "unreadable-unit", start: 5, end: 7 });
    expect(unit("W/(m·K⁻¹)").symbol).toBe("W·K/m");
  });

  it("takes a prefix only where the unit has it", () => {
    expect(unit("min").factor).toBe(60);
    expect(unit("ft").factor).toBe(0.3048);
    expect(unit("Pa").factor).toBe(1);
    expect(unit("h").factor).toBe(3600);
    expect(unit("PS").factor).toBe(735.49875);
    for (const text of ["kft", "mmin", "kpsi·kh", "m°C", "kK"]) expect(parseUnit(text).ok).toBe(false);
  });
});

describe("texts that are refused", () => {
  it.each([
    ["KG", ["kg"], 0, 2],
    ["kw", ["kW"], 0, 2],
    ["mpa", ["mPa", "MPa"], 0, 3],
    ["W/(M·k)", ["m"], 3, 4],
    ["celcius", ["celsius"], 0, 7],
    ["8 furlongs", [], 0, 1],
    ["kg/furlongs", ["m", "ft", "mi"], 3, 11],
    ["kJ/kgK", ["kg·K"], 3, 6],
    ["µΩcm", ["µΩ·cm"], 0, 4],
    ["ton", ["t", "ton_short", "ton_long", "ton_refrigeration"], 0, 3],
    ["MBTU/h", ["kBTU", "MMBTU"], 0, 4],
    ["W/m2K", ["W/(m²·K)"], 4, 5],
    ["W/mK", ["m·K"], 2, 4],
    ["W/(m·K", [], 2, 3],
    ["W/m)", [], 3, 4],
    ["W//m", [], 2, 3],
    ["W·", [], 2, 2],
    ["m^", [], 1, 2],
    ["m^x", [], 1, 2],
    ["barg/m", [], 0, 4],
    ["25 mm", [], 0, 2],
    ["m#", [], 1, 2],
    ["m^99", [], 0, 1],
  ])("%s names the place and what would be read", (text, suggestions, start, end) => {
    const found = fault(text);
    expect(found).toMatchObject({ code: "unreadable-unit", start, end });
    expect(found.suggestions.slice(0, suggestions.length)).toEqual(suggestions);
    expect(found.message).toMatch(/\.$/);
  });

  it("offers the usual units of the quantity when nothing near is known", () => {
    expect(fault("xyzzy", { expect: quantity("length") }).suggestions).toEqual(quantity("length").units);
  });

  it("calls an empty text missing", () => {
    expect(fault("  ").code).toBe("missing-input");
  });

  it("refuses a unit of another quantity and names units that fit", () => {
    expect(fault("kg", { expect: quantity("length") })).toMatchObject({
      code: "unit-mismatch",
      message: "kg does not measure length. Units that do: mm, m, cm.",
    });
  });

  it("refuses Δ°C where an absolute temperature is wanted and takes it for a difference", () => {
    expect(fault("Δ°C", { expect: quantity("temperature") })).toMatchObject({
      code: "unit-mismatch",
      suggestions: ["°C"],
    });
    expect(unit("Δ°C", { expect: quantity("temperature difference") }).differenceOnly).toBe(true);
  });

  it("never reads mK inside a product as millikelvin, in UCUM neither", () => {
    expect(unit("mK").factor).toBe(0.001);
    for (const text of ["W/mK", "mK/W", "W/(mK)"]) expect(fault(text).code).toBe("unreadable-unit");
    expect(parseUcum("W/mK").ok).toBe(false);
  });
});

describe("shorthand", () => {
  const cases = [
    ["W/mK", "thermal conductivity", "W/(m·K)"],
    ["W/m2K", "heat transfer coefficient", "W/(m²·K)"],
    ["W/m²K", "thermal transmittance", "W/(m²·K)"],
    ["m²K/W", "thermal insulance", "m²·K/W"],
    ["C/W", "thermal resistance", "°C/W"],
    ["mK/W", "linear thermal resistance", "m·K/W"],
    ["F", "temperature", "°F"],
    ["C", "temperature", "°C"],
    ["BTU/hrft2F", "heat transfer coefficient", "BTU/(h·ft²·°F)"],
    ["Nm", "moment of force", "N·m"],
  ] as const;
  it.each(cases)("%s for %s is %s with a notice in a field", (typed, name, printed) => {
    expect(unit(typed, { expect: quantity(name), shorthand: true }).symbol).toBe(printed);
    expect(notices(typed, { expect: quantity(name), shorthand: true })[0]).toBe(
      `"${typed}" is read as ${printed}.`,
    );
  });
  it.each(cases)("%s for %s is refused in JSON with %s as hint", (typed, name, printed) => {
    expect(fault(typed, { expect: quantity(name) })).toMatchObject({
      code: "unreadable-unit",
      suggestions: [printed],
    });
  });
  it("leaves C a coulomb and F a farad where electricity is expected", () => {
    expect(unit("C", { expect: quantity("electric charge"), shorthand: true }).symbol).toBe("C");
    expect(unit("F", { expect: quantity("capacitance") }).symbol).toBe("F");
  });
});

describe("UCUM", () => {
  it.each([
    ["BTU/(h·ft·°F)", "[Btu_IT]/(h.[ft_i].[degR])"],
    ["W/(m·°C)", "W/(m.K)"],
    ["W/(m²·K)", "W/(m2.K)"],
    ["°C", "Cel"],
    ["°F", "[degF]"],
    ["1/K", "/K"],
    ["kWh", "kW.h"],
    ["1/kWh", "/(kW.h)"],
    ["kcal", "kcal_IT"],
    ["10⁻⁸·Ω·m", "10*-8.Ohm.m"],
    ["ksi", "10*3.[psi]"],
    ["%", "%"],
    ["1", "1"],
  ])("%s is written %s", (typed, code) => {
    expect(unit(typed).ucum).toBe(code);
  });

  it.each(["EUR/MWh", "clo", "tog", "mmHg", "W·s^(1/2)/(m²·K)", "barg"])("has no code for %s", (typed) => {
    expect(unit(typed).ucum).toBeNull();
  });

  it.each([
    ["W/m.K", "W·K/m"],
    ["W/m/K", "W/(m·K)"],
    ["[Btu_IT]/(h.[ft_i].[degF])", "BTU/(h·ft·°F)"],
    ["[Btu_IT]/(h.[ft_i].[degR])", "BTU/(h·ft·°F)"],
    ["W/(m.Cel)", "W/(m·°C)"],
    ["{count}", "1"],
    ["10*6.[Btu_IT]{heat}", "10⁶·BTU"],
    ["cm[H2O]", "cmH2O"],
    ["k[psi]", "ksi"],
    ["kcal", "kcal_th"],
  ])("%s is read as %s", (code, printed) => {
    const read = parseUcum(code);
    expect(read.ok && read.value.symbol).toBe(printed);
  });

  it("gives way to the engineers' reading where a text is both", () => {
    expect(unit("W/m.K").symbol).toBe("W/(m·K)");
    expect(unit("kcal").factor).toBe(4186.8);
    expect(unit("[Btu_IT]/(h.[ft_i].[degR])").factor).toBeCloseTo(1.73073466637139, 13);
  });

  it("keeps the rounded units that only UCUM has apart from those of the trade", () => {
    // UCUM 2.2: [Btu_th] = 1.05435 kJ, m[Hg] = 133.322 kPa
    expect(unit("[Btu_th]").factor).toBe(1054.35);
    expect(unit("BTU_th").factor).toBeCloseTo(1054.350264488889, 9);
    expect(unit("mm[Hg]").factor).toBeCloseTo(133.322, 12);
    expect(unit("mmHg").factor).toBe(133.322387415);
  });

  it.each(["", "W/(m", "[foo]", "m+", "W..m", "µm", "12.m", "m1e3"])("refuses %s", (code) => {
    expect(parseUcum(code)).toMatchObject({ ok: false, fault: { code: "unreadable-unit" } });
  });
});
