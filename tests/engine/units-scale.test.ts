import { describe, expect, it } from "vitest";
import { fromSi, parseUnit, toSi, unitNotices, type Unit } from "@/lib/units";

function unit(text: string): Unit {
  const read = parseUnit(text);
  if (!read.ok) throw new Error(read.fault.message);
  return read.value;
}

describe("temperatures", () => {
  it("makes 20 °C − 15 °C a difference of 5 K", () => {
    const celsius = unit("°C");
    const difference = toSi(20, celsius, "absolute") - toSi(15, celsius, "absolute");
    expect(difference).toBeCloseTo(5, 12);
    expect(fromSi(5, celsius, "difference")).toBe(5);
  });

  // Fixed points of the scales: 0 °C = 273.15 K, 212 °F = 373.15 K, −40 °C = −40 °F, 491.67 °R = 273.15 K (NIST SP 811).
  it.each([
    [0, "°C", "absolute", 273.15],
    [212, "°F", "absolute", 373.15],
    [-40, "°F", "absolute", 233.15],
    [491.67, "°R", "absolute", 273.15],
    [300, "K", "absolute", 300],
    [9, "°F", "difference", 5],
    [9, "Δ°F", "difference", 5],
    [10, "Δ°C", "difference", 10],
    [5, "°C", "difference", 5],
  ] as const)("%d %s as %s is %d K", (value, text, kind, kelvin) => {
    expect(toSi(value, unit(text), kind)).toBeCloseTo(kelvin, 11);
    expect(fromSi(kelvin, unit(text), kind)).toBeCloseTo(value, 10);
  });

  it("takes a degree in a product for a difference", () => {
    expect(unit("W/°C")).toMatchObject({ factor: 1, shift: 0 });
    expect(unit("BTU/°F").shift).toBe(0);
    expect(unit("°C²").shift).toBe(0);
  });
});

describe("gauge pressures", () => {
  it.each([
    [0, "barg", 101325],
    [1, "barg", 201325],
    [0, "psig", 101325],
    [100, "psig", 101325 + 100 * 6894.757293168361],
    [50, "kPag", 151325],
    [1, "MPag", 1101325],
  ])("%d %s counts from 101 325 Pa", (value, text, pascal) => {
    expect(toSi(value, unit(text), "plain")).toBeCloseTo(pascal, 7);
    expect(fromSi(pascal, unit(text), "plain")).toBeCloseTo(value, 10);
    expect(unitNotices(unit(text))[0]).toContain("101 325 Pa");
  });

  it("leaves the zero aside for a difference, such as an uncertainty", () => {
    expect(toSi(0.1, unit("barg"), "difference")).toBe(10000);
  });
});

describe("conversion keeps what was typed", () => {
  it.each(["mm", "µm", "nm", "cm", "g", "mW", "kPa", "%", "min", "in", "L", "mW/(m·K)", "mm²"])(
    "in %s",
    (text) => {
      for (const value of [1.1, 3, 7, 12.5, 35, 0.3, 99.9]) {
        const back = fromSi(toSi(value, unit(text), "plain"), unit(text), "plain");
        expect(Math.abs(back / value - 1)).toBeLessThanOrEqual(2 * Number.EPSILON);
      }
    },
  );

  it("gives the nearest double for decimal submultiples", () => {
    expect(toSi(1.1, unit("mm"), "plain")).toBe(0.0011);
    expect(toSi(35, unit("mW/(m·K)"), "plain")).toBe(0.035);
    expect(toSi(12.7, unit("%"), "plain")).toBe(0.127);
  });

  it("rounds compound factors once", () => {
    expect(unit("kcal/(h·m·°C)").factor).toBe(1.163);
    expect(unit("BTU/(lb·°F)").factor).toBe(4186.8);
    expect(unit("kgf/cm²").factor).toBe(98066.5);
    expect(unit("mm⁴").factor).toBe(1e-12);
    expect(unit("W·s^(1/2)/(cm²·K)").factor).toBe(1e4);
  });
});

describe("temperatures to the last digit", () => {
  const pairs = [
    [302, 150],
    [140, 60],
    [212, 100],
    [-40, -40],
    [68, 20],
  ] as const;

  it.each(pairs)("reads %d °F as the same double as %d °C", (fahrenheit, celsius) => {
    const f = parseUnit("°F");
    const c = parseUnit("°C");
    if (!f.ok || !c.ok) throw new Error("°F and °C are read");
    expect(toSi(fahrenheit, f.value, "absolute")).toBe(toSi(celsius, c.value, "absolute"));
    expect(fromSi(toSi(fahrenheit, f.value, "absolute"), f.value, "absolute")).toBeCloseTo(fahrenheit, 11);
  });
});

describe("lengths to the last digit", () => {
  // 1 in = 25.4 mm, 1 ft = 304.8 mm, 1 mil = 25.4 µm exactly (NIST SP 811).
  it.each([
    [3, "in", 0.0762],
    [0.1, "in", 0.00254],
    [7, "ft", 2.1336],
    [11, "mil", 0.0002794],
    [35, "mm", 0.035],
  ] as const)("reads %d %s as the double nearest to its metres", (value, symbol, metres) => {
    expect(toSi(value, unit(symbol), "plain")).toBe(metres);
    expect(fromSi(metres, unit(symbol), "plain")).toBeCloseTo(value, 13);
  });
});
