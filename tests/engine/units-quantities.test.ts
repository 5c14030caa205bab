import { describe, expect, it } from "vitest";
import {
  addRational,
  compatibleUnits,
  dimension,
  dimensionKey,
  dimensionless,
  divide,
  isDimensionless,
  multiply,
  multiplyRational,
  parseUnit,
  power,
  quantities,
  quantityByName,
  quantityForDimension,
  rational,
  rationalFromNumber,
  sameDimension,
  siUnitSymbol,
  type Quantity,
} from "@/lib/units";

function quantity(name: string): Quantity {
  const found = quantityByName(name);
  if (!found) throw new Error(`no quantity ${name}`);
  return found;
}

describe("quantities", () => {
  // Every quantity that the supplied templates declare, with a unit that they use.
  it.each([
    ["angle", "°"],
    ["area", "cm²"],
    ["conductivity integral", "W/m"],
    ["cost per area", "EUR/m²"],
    ["count", "1"],
    ["density", "kg/m³"],
    ["electrical resistivity", "µΩ·cm"],
    ["emissivity", "1"],
    ["energy", "J"],
    ["energy price", "EUR/MWh"],
    ["heat flow rate", "W"],
    ["heat flux", "W/m²"],
    ["heat transfer coefficient", "W/(m²·K)"],
    ["length", "nm"],
    ["linear cost", "EUR/m"],
    ["linear heat flow rate", "W/m"],
    ["linear thermal resistance", "m·K/W"],
    ["lorenz number", "W·Ω/K²"],
    ["pressure", "GPa"],
    ["ratio", "1"],
    ["specific energy", "kJ/kg"],
    ["specific heat capacity", "J/(kg·K)"],
    ["temperature", "°C"],
    ["temperature coefficient", "1/K"],
    ["temperature difference", "K"],
    ["thermal conductivity", "W/(m·K)"],
    ["thermal diffusivity", "m²/s"],
    ["thermal insulance", "mm²·K/W"],
    ["thermal resistance", "K/W"],
    ["thermal transmittance", "W/(m²·K)"],
    ["time", "h"],
    ["velocity", "m/s"],
    ["volume", "cm³"],
    ["volumetric cost", "EUR/m³"],
    ["volumetric heat generation", "W/m³"],
    ["wavenumber", "1/m"],
    ["force", "kN"],
    ["power", "hp"],
    ["dynamic viscosity", "Pa·s"],
    ["electric current", "A"],
    ["electric potential difference", "V"],
    ["electric resistance", "Ω"],
    ["thermal conductance", "W/K"],
    ["relative humidity", "%"],
  ])("%s is measured in %s", (name, text) => {
    expect(parseUnit(text, { expect: quantity(name) })).toMatchObject({ ok: true });
  });

  it.each([
    ["mm", "plain", "length", "mm"],
    ["W/(m·K)", "plain", "thermal conductivity", "W/(m·K)"],
    ["m·K/W", "plain", "linear thermal resistance", "m·K/W"],
    ["m²·K/W", "plain", "thermal insulance", "m²·K/W"],
    ["W/(m²·K)", "plain", "heat transfer coefficient", "W/(m²·K)"],
    ["K/W", "plain", "thermal resistance", "K/W"],
    ["W/m", "plain", "linear heat flow rate", "W/m"],
    ["J", "plain", "energy", "J"],
    ["Pa", "plain", "pressure", "Pa"],
    ["1", "plain", "ratio", "1"],
    ["1/s", "plain", "rate", "1/s"],
    ["K", "absolute", "temperature", "°C"],
    ["K", "difference", "temperature difference", "K"],
  ] as const)("a result in %s (%s) is called %s in %s", (text, kind, name, preferred) => {
    const read = parseUnit(text);
    expect(read.ok && quantityForDimension(read.value.dimension, kind)).toMatchObject({
      name,
      unit: preferred,
    });
  });

  it("has no name for a value in kelvin that is neither a temperature nor a difference", () => {
    expect(quantityForDimension(dimension({ temperature: 1 }), "plain")).toBeUndefined();
  });

  it("marks temperature absolute and temperature difference a difference, everything else plain", () => {
    expect(quantities.filter(({ kind }) => kind === "absolute").map(({ name }) => name)).toEqual([
      "temperature",
    ]);
    expect(quantities.filter(({ kind }) => kind === "difference").map(({ name }) => name)).toEqual([
      "temperature difference",
    ]);
  });

  it("offers units in both systems, the default first, without Δ for absolute temperatures", () => {
    expect(compatibleUnits(quantity("length")).slice(0, 2)).toEqual(["mm", "m"]);
    expect(compatibleUnits(quantity("length"))).toContain("yd");
    expect(compatibleUnits(quantity("temperature"))).not.toContain("Δ°C");
    expect(compatibleUnits(quantity("temperature difference"))).toContain("Δ°C");
  });
});

describe("dimensions", () => {
  const length = dimension({ length: 1 });
  const speed = dimension({ length: 1, time: -1 });

  it("multiplies, divides and raises exactly", () => {
    expect(sameDimension(divide(length, dimension({ time: 1 })), speed)).toBe(true);
    expect(isDimensionless(divide(speed, speed))).toBe(true);
    expect(sameDimension(power(power(speed, rational(1, 3)), rational(3)), speed)).toBe(true);
    expect(dimensionKey(multiply(length, dimensionless))).toBe(dimensionKey(length));
  });

  it.each([
    ["W/(m·K)", "W/(m·K)"],
    ["BTU/(h·ft²·°F)", "W/(m²·K)"],
    ["in", "m"],
    ["bar", "Pa"],
    ["%", "1"],
    ["lb", "kg"],
    ["EUR/kWh", "EUR/J"],
    ["m^(1/2)·kg/mol²", "m^(1/2)·kg/mol²"],
  ])("the coherent unit of %s is %s", (text, coherent) => {
    const read = parseUnit(text);
    expect(read.ok && siUnitSymbol(read.value.dimension)).toBe(coherent);
  });
});

describe("rationals", () => {
  it("stay in lowest terms", () => {
    expect(addRational(rational(1, 6), rational(1, 3))).toEqual({ n: 1, d: 2 });
    expect(multiplyRational(rational(-2, 3), rational(3, 4))).toEqual({ n: -1, d: 2 });
    expect(rational(0, -5)).toEqual({ n: 0, d: 1 });
    expect(() => rational(1, 0)).toThrow(RangeError);
    expect(() => rational(0.5)).toThrow(RangeError);
  });

  it.each([
    [0.5, { n: 1, d: 2 }],
    [2 / 3, { n: 2, d: 3 }],
    [-0.25, { n: -1, d: 4 }],
    [2.7, { n: 27, d: 10 }],
    [9 / 16, { n: 9, d: 16 }],
    [0, { n: 0, d: 1 }],
    [-3, { n: -3, d: 1 }],
    [Math.PI, null],
    [0.123456789, null],
    [Number.NaN, null],
  ])("recognises %d", (value, fraction) => {
    expect(rationalFromNumber(value)).toEqual(fraction);
  });
});
