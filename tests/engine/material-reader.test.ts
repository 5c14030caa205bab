import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { compileMaterial } from "@/lib/calculation/compiled-material";
import type { Material, Piece } from "@/lib/calculation/material";
import { MaterialReader } from "@/lib/calculation/material-reader";
import { propertyCurve } from "@/lib/calculation/property-curve";
import { RunFault, type PropertyName } from "@/lib/language";
import { suppliedMaterial } from "./calculation-fixtures";

function readerOf(material: Material, allowExtrapolation = false): MaterialReader {
  const reader = new MaterialReader();
  reader.useMaterial(compileMaterial(material, "test", 1), "#/inputs/wall", allowExtrapolation);
  return reader;
}

const kelvin = (min: number, max: number) => ({ min, max, unit: "K" });

function withPieces(
  pieces: Piece[],
  more: Partial<Material> = {},
  units = { argumentUnit: "K", unit: "W/(m·K)" },
): Material {
  return {
    name: "Test material",
    class: "other",
    condition: "",
    properties: {
      k: { pieces, ...units, source: "Made for a test.", basis: "from memory", status: "typical" },
    },
    ...more,
  };
}

function faultOf(read: () => unknown): RunFault {
  try {
    read();
  } catch (error) {
    expect(error).toBeInstanceOf(RunFault);
    return error as RunFault;
  }
  throw new Error("No fault.");
}

/** Composite Simpson rule, independent of the quadrature under test. */
function simpson(f: (x: number) => number, from: number, to: number, panels = 20_000): number {
  const h = (to - from) / panels;
  let sum = f(from) + f(to);
  for (let i = 1; i < panels; i++) sum += (i % 2 === 1 ? 4 : 2) * f(from + i * h);
  return (sum * h) / 3;
}

describe("published values", () => {
  // NIST cryogenic fits evaluated independently of this code to 10 digits.
  it.each([
    ["ss304", 4, 0.272396189],
    ["ss304", 77, 7.920651602],
    ["ss304", 300, 15.30865382],
    ["al6061t6", 20, 28.42754763],
    ["g10-warp", 150, 0.5677344782],
    ["ptfe", 300, 0.2728024843],
    ["nylon", 4, 0.01244681994],
    ["kapton", 77, 0.125521904],
    ["cu-rrr50", 20, 1367.854811],
    ["cu-rrr300", 4, 1888.379311],
    // Hust & Lankford, NBSIR 84-3007, evaluated independently.
    ["hl-cu-rrr30", 20, 841.1591309],
    ["hl-cu-rrr300", 300, 399.8506544],
    ["hl-fe-rrr23-5", 300, 76.04435809],
    ["hl-w-rrr75", 300, 174.9166062],
    ["hl-al-rrr100", 300, 233.8719584],
    // IAPWS SR6-08(2011) and Stephan & Laesecke (1985), evaluated independently.
    ["water-liq", 298.15, 0.6071982372],
    ["water-liq", 323.15, 0.6435963321],
    ["air", 300, 0.02614800966],
    ["air", 1000, 0.06785840266],
    // IRMM-440 certificate, °C argument.
    ["irmm440", 263.15, 0.02835537],
    ["irmm440", 297.15, 0.0320568072],
    ["irmm440", 323.15, 0.03520665],
  ])("%s conducts %f K as its source says", (slug, temperature, expected) => {
    const value = readerOf(suppliedMaterial(slug)).value("k", temperature, true);
    expect(value / expected).toBeCloseTo(1, 6);
  });

  it.each([
    ["ss304", 4, 300, 3030.843583],
    ["ss304", 77, 300, 2704.713066],
    ["al6061t6", 4, 300, 32325.18629],
    ["ptfe", 4, 300, 71.42690289],
    ["cu-rrr50", 4, 300, 161223.8132],
    ["cu-rrr300", 77, 300, 95380.74766],
  ])("integral of %s from %f K to %f K", (slug, from, to, expected) => {
    const reader = readerOf(suppliedMaterial(slug));
    expect(reader.integral("k", from, to, true) / expected).toBeCloseTo(1, 8);
  });

  it("agrees with the handbook integral of stainless steel within its 2 % (Johnson, NBS WADD 60-56, from memory)", () => {
    const integral = readerOf(suppliedMaterial("ss304")).integral("k", 4, 300, true);
    expect(Math.abs(integral / 3060 - 1)).toBeLessThan(0.02);
  });
});

const smooth: [string, Material, PropertyName, number, number][] = [
  ["log10-polynomial", suppliedMaterial("ss304"), "k", 4, 300],
  ["log10-ratio", suppliedMaterial("cu-rrr100"), "k", 4, 300],
  ["working", suppliedMaterial("hl-cu-rrr100"), "k", 4, 300],
  ["polynomial with °C argument", suppliedMaterial("irmm440"), "k", 265, 320],
  ["working with constants", suppliedMaterial("srm1450c-rho160"), "k", 280, 340],
  ["viscosity of air", suppliedMaterial("air"), "mu", 200, 1000],
];

describe("mean and integral", () => {
  it.each(smooth)("%s: equal to Simpson's rule to 1e-10", (_, material, name, from, to) => {
    const reader = readerOf(material);
    const expected = simpson((T) => reader.value(name, T, true), from, to) / (to - from);
    expect(reader.mean(name, from, to, true) / expected - 1).toBeCloseTo(0, 10);
  });

  it.each(smooth)(
    "%s: the mean of an ever shorter interval tends to the value",
    (_, material, name, from, to) => {
      const reader = readerOf(material);
      const T = (from + to) / 2;
      const value = reader.value(name, T, true);
      expect(reader.mean(name, T, T, true)).toBe(value);
      for (const width of [1e-2, 1e-4, 1e-6, 1e-8, 1e-10, 1e-12]) {
        const mean = reader.mean(name, T - width / 2, T + width / 2, true);
        expect(Math.abs(mean / value - 1), `width ${width}`).toBeLessThan(1e-12 + width * width);
      }
    },
  );

  it("is signed: the integral turns with its ends, the mean does not", () => {
    const reader = readerOf(suppliedMaterial("ss304"));
    expect(reader.integral("k", 300, 77, true)).toBe(-reader.integral("k", 77, 300, true));
    expect(reader.mean("k", 300, 77, true)).toBe(reader.mean("k", 77, 300, true));
    expect(reader.integral("k", 77, 77, true)).toBe(0);
  });

  it("is additive over any three temperatures, for every form", () => {
    const materials = ["ss304", "cu-rrr100", "stone-wool-mat", "fireclay-brick", "irmm440"].map(
      suppliedMaterial,
    );
    fc.assert(
      fc.property(
        fc.nat(4),
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (which, u, v) => {
          const material = materials[which]!;
          const reader = readerOf(material);
          const { min, max } = compileMaterial(material, "test", 1).properties.k!;
          const [a, b] = [min + u * (max - min), min + v * (max - min)];
          const whole = reader.integral("k", min, max, true);
          const parts =
            reader.integral("k", min, a, true) +
            reader.integral("k", a, b, true) +
            reader.integral("k", b, max, true);
          expect(Math.abs(parts / whole - 1)).toBeLessThan(1e-10);
        },
      ),
      { numRuns: 200 },
    );
  });

  it("of a polynomial is that of the antiderivative", () => {
    // k = 2 + 3·10⁻³ T − 10⁻⁶ T², by hand: ∫ from 300 to 500 = 400 + 0.0015·160000 − 10⁻⁶/3·98·10⁶.
    const reader = readerOf(
      withPieces([{ form: "polynomial", coefficients: [2, 3e-3, -1e-6], range: kelvin(200, 600) }]),
    );
    expect(reader.integral("k", 300, 500, true)).toBeCloseTo(400 + 240 - 98 / 3, 9);
  });

  it("of a broken line is the sum of its trapezia", () => {
    const points: [number, number][] = [
      [300, 1],
      [400, 3],
      [600, 4],
    ];
    const reader = readerOf(
      withPieces([{ form: "table", interpolation: "linear", points, range: kelvin(300, 600) }]),
    );
    expect(reader.value("k", 350, true)).toBe(2);
    expect(reader.integral("k", 350, 500, true)).toBeCloseTo(50 * 2.5 + 100 * 3.25, 10);
  });

  it("of pieces is the sum over the pieces", () => {
    const reader = readerOf(
      withPieces([
        { form: "constant", value: 5, range: kelvin(400, 500) },
        { form: "polynomial", coefficients: [1, 0.01], range: kelvin(200, 400) },
      ]),
    );
    // ∫ (1 + 0.01 T) from 300 to 400 = 450; 5·50.
    expect(reader.integral("k", 300, 450, true)).toBeCloseTo(450 + 250, 9);
  });
});

describe("units of a property", () => {
  it("take °F as absolute temperatures and convert the value", () => {
    const reader = readerOf(
      withPieces(
        [{ form: "polynomial", coefficients: [0.2, 0.001], range: { min: 0, max: 500, unit: "°F" } }],
        {},
        {
          argumentUnit: "°F",
          unit: "BTU·in/(h·ft²·°F)",
        },
      ),
    );
    // 212 °F is 373.15 K; 1 BTU·in/(h·ft²·°F) is 0.1442278889 W/(m·K) (GNU units).
    expect(reader.value("k", 373.15, true)).toBeCloseTo(0.412 * 0.1442278889, 9);
    const mean = simpson((T) => reader.value("k", T, true), 300, 400, 200) / 100;
    expect(reader.mean("k", 300, 400, true)).toBeCloseTo(mean, 12);
  });
});

describe("valid range", () => {
  it("refuses beyond it and names material, property, temperature, range and source", () => {
    const fault = faultOf(() => readerOf(suppliedMaterial("ss304")).value("k", 350, true));
    expect(fault.code).toBe("outside-validity");
    expect(fault.message).toBe(
      "The thermal conductivity of Stainless steel 304, 304L, 316 was asked at 350 K. It is valid from 1 K to 300 K " +
        "(NIST Cryogenic Materials property pages, after Marquardt, Le & Radebaugh (2000)). " +
        "Choose a material whose range holds this temperature, or allow extrapolation.",
    );
    expect(fault.details.pointer).toBe("#/inputs/wall");
  });

  it("speaks in the unit of the data", () => {
    const fault = faultOf(() => readerOf(suppliedMaterial("irmm440")).value("k", 343.15, true));
    expect(fault.message).toContain("was asked at 70 °C. It is valid from −10 °C to 50 °C");
  });

  it("counts a temperature within 1e-9 of an end as inside", () => {
    const reader = readerOf(suppliedMaterial("ss304"));
    expect(() => reader.value("k", 300 * (1 + 5e-10), true)).not.toThrow();
    expect(() => reader.value("k", 300 * (1 + 5e-9), true)).toThrow(RunFault);
  });

  it("judges both ends of a mean and of an integral", () => {
    const reader = readerOf(suppliedMaterial("ss304"));
    expect(faultOf(() => reader.mean("k", 250, 320, true)).code).toBe("outside-validity");
    expect(faultOf(() => reader.integral("k", 0.5, 200, true)).code).toBe("outside-validity");
  });

  it("answers with the value at its end while a solver iterates", () => {
    const reader = readerOf(suppliedMaterial("ss304"));
    const end = reader.value("k", 300, true);
    expect(reader.value("k", 5000, false)).toBe(end);
    const inside = reader.integral("k", 200, 300, true);
    expect(reader.integral("k", 200, 500, false)).toBeCloseTo(inside + 200 * end, 9);
    expect(reader.mean("k", 400, 500, false)).toBe(end);
    expect(reader.highest).toBe(300);
  });

  it("extrapolates the form when allowed, and remembers how far", () => {
    const reader = readerOf(suppliedMaterial("irmm440"), true);
    // 0.0293949 + 0.000106·60 + 2.047e-7·3600, the certificate's form at 60 °C.
    expect(reader.value("k", 333.15, true)).toBeCloseTo(0.0293949 + 0.00636 + 2.047e-7 * 3600, 12);
    reader.value("k", 253.15, true);
    expect(reader.extrapolations).toEqual([expect.objectContaining({ lowest: 253.15, highest: 333.15 })]);
  });

  it("continues a table along its end", () => {
    const points: [number, number][] = [
      [300, 1],
      [400, 3],
    ];
    const material = withPieces([
      { form: "table", interpolation: "linear", points, range: kelvin(300, 400) },
    ]);
    const reader = readerOf(material, true);
    expect(reader.value("k", 450, true)).toBeCloseTo(4, 12);
    expect(reader.mean("k", 350, 450, true)).toBeCloseTo(3, 12);
  });

  it("refuses within and across a gap between pieces", () => {
    const material = withPieces([
      { form: "constant", value: 1, range: kelvin(200, 300) },
      { form: "constant", value: 2, range: kelvin(350, 400) },
    ]);
    const reader = readerOf(material);
    expect(faultOf(() => reader.value("k", 320, true)).message).toContain(
      "from 200 K to 300 K and from 350 K to 400 K",
    );
    expect(faultOf(() => reader.mean("k", 250, 380, true)).code).toBe("outside-validity");
    expect(readerOf(material, true).mean("k", 300, 350, true)).toBeCloseTo(1.5, 12);
    expect(reader.value("k", 310, false)).toBe(1);
    expect(reader.value("k", 340, false)).toBe(2);
  });

  it("names the material when its own working has no finite value", () => {
    const material = withPieces([
      { form: "working", working: 'k = "1 W/(m·K)"/(number_in(T, "K") - 300)', range: kelvin(200, 400) },
    ]);
    const fault = faultOf(() => readerOf(material).value("k", 300, true));
    expect(fault.code).toBe("not-finite");
    expect(fault.symbol).toBeNull();
    expect(fault.message).toMatch(/^Test material, thermal conductivity: Line 1/);
  });
});

describe("limits of use", () => {
  const service = { max: { value: 640, unit: "°C" }, note: "" };

  it("are judged on the temperatures that were read, not on those that a solver tried", () => {
    const reader = readerOf(
      withPieces([{ form: "constant", value: 1, range: kelvin(200, 2000) }], { service }),
    );
    reader.value("k", 1500, false);
    reader.mean("k", 300, 913.15, true);
    expect(reader.serviceBroken()).toBeNull();
    reader.value("k", 914, true);
    expect(reader.serviceBroken()).toEqual({ temperature: 914, limit: 913.15 });
  });
});

describe("a constant in place of a material", () => {
  it("is the same at every temperature, and its integral is signed", () => {
    const reader = new MaterialReader();
    reader.useConstant(0.5, "#/inputs/wall");
    expect([
      reader.value("k", 1, true),
      reader.mean("k", 1, 9, true),
      reader.integral("k", 9, 1, true),
    ]).toEqual([0.5, 0.5, -4]);
    expect(reader.serviceBroken()).toBeNull();
  });
});

describe("propertyCurve", () => {
  it("covers the valid range in the property's own units, joints included", () => {
    const curve = propertyCurve(suppliedMaterial("irmm440"), "k", 25);
    expect([curve.min, curve.max]).toEqual([expect.closeTo(-10, 9), expect.closeTo(50, 9)]);
    expect(curve.points.length).toBeGreaterThanOrEqual(25);
    expect(curve.points[0]?.value).toBeCloseTo(0.02835537, 8);
    const mat = propertyCurve(suppliedMaterial("stone-wool-mat"), "k", 10);
    expect(mat.points.map(({ argument }) => argument)).toEqual(expect.arrayContaining([323.15, 873.15]));
    const ascending = mat.points.every(({ argument }, i, all) => i === 0 || argument > all[i - 1]!.argument);
    expect(ascending).toBe(true);
  });
});
