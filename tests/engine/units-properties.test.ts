import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  formatExact,
  formatSignificant,
  fromSi,
  parseAmount,
  parseNumber,
  parseUcum,
  parseUnit,
  quantities,
  sameDimension,
  toSi,
} from "@/lib/units";
import { units } from "@/lib/units/catalogue";

const pieces = [
  ..."mKWJsghF°ΔΩµ·.*/^()-− ²³⁻¹[]{}1e5,",
  "W",
  "BTU",
  "ft",
  "°C",
  "degF",
  "per",
  "sq ",
  "[Btu_IT]",
  "10*",
  "1/2",
  "(g)",
];
const unitLike = fc.array(fc.constantFrom(...pieces), { maxLength: 40 }).map((parts) => parts.join(""));
const anyText = fc.oneof(
  unitLike,
  fc.string({ unit: "binary", maxLength: 300 }),
  fc.string({ unit: "grapheme", maxLength: 80 }),
);
const anyQuantity = fc.constantFrom(...quantities);

/** Products of units that may stand in one, in the form that engineers type. */
const compound = fc
  .array(
    fc.record({
      row: fc.constantFrom(...units.filter((row) => !row.alone)),
      exponent: fc.integer({ min: -3, max: 3 }).filter((exponent) => exponent !== 0),
    }),
    { minLength: 1, maxLength: 5 },
  )
  .map((factors) => factors.map(({ row, exponent }) => `${row.symbol}^${exponent}`).join("·"));

describe("any text", () => {
  it("is read or refused with a place inside it, never thrown at", () => {
    fc.assert(
      fc.property(anyText, anyQuantity, fc.boolean(), (text, expected, shorthand) => {
        const readings = [
          parseUnit(text),
          parseUnit(text, { expect: expected, shorthand }),
          parseUcum(text),
          parseNumber(text),
          parseAmount(text, { expect: expected, shorthand }),
        ];
        for (const read of readings) {
          if (read.ok) continue;
          const { start, end, message } = read.fault;
          expect(start).toBeGreaterThanOrEqual(0);
          expect(end).toBeGreaterThanOrEqual(start);
          expect(end).toBeLessThanOrEqual(text.length);
          expect(message).toMatch(/\.$/);
        }
      }),
      { numRuns: 1500 },
    );
  });

  it("of any length is answered at once", () => {
    for (const piece of ["(", "m·", "m^2", "W/", "1 000", "[", "°", "10⁻³", "µ", "mK", "1,", "a.a"]) {
      const long = piece.repeat(20_000);
      expect(parseUnit(long).ok).toBe(false);
      expect(parseUcum(long).ok).toBe(false);
      expect(parseNumber(`${long}x`).ok).toBe(false);
      expect(parseAmount(long).ok).toBe(false);
    }
  });

  it("has suggestions that are read themselves", () => {
    fc.assert(
      fc.property(unitLike, anyQuantity, (text, expected) => {
        const read = parseUnit(text, { expect: expected });
        if (read.ok) return;
        for (const suggestion of read.fault.suggestions) expect(parseUnit(suggestion).ok).toBe(true);
      }),
      { numRuns: 500 },
    );
  });
});

describe("any compound unit", () => {
  it("comes back from its own symbol", () => {
    fc.assert(
      fc.property(compound, (text) => {
        const read = parseUnit(text);
        if (!read.ok) return expect(read.fault.message).toContain("too large or too small");
        expect(parseUnit(read.value.symbol)).toMatchObject({ ok: true, value: read.value });
      }),
    );
  });

  it("comes back from its UCUM code", () => {
    fc.assert(
      fc.property(compound, (text) => {
        const read = parseUnit(text);
        if (!read.ok || read.value.ucum === null) return;
        const back = parseUcum(read.value.ucum);
        if (!back.ok) throw new Error(`${read.value.ucum}: ${back.fault.message}`);
        expect(Math.abs(back.value.factor / read.value.factor - 1)).toBeLessThan(1e-14);
        expect(sameDimension(back.value.dimension, read.value.dimension)).toBe(true);
      }),
    );
  });
});

describe("any value", () => {
  // Magnitudes that occur: where a number is subnormal in SI no conversion can keep its digits.
  const value = fc
    .double({ noNaN: true, noDefaultInfinity: true, min: -1e12, max: 1e12 })
    .filter((given) => given === 0 || Math.abs(given) > 1e-200);

  it("comes back from SI within two roundings", () => {
    fc.assert(
      fc.property(value, fc.constantFrom(...units), (given, row) => {
        const read = parseUnit(row.symbol);
        if (!read.ok) throw new Error(read.fault.message);
        const kind = read.value.differenceOnly ? "difference" : "plain";
        const back = fromSi(toSi(given, read.value, kind), read.value, kind);
        const size = Math.abs(given) + Math.abs(read.value.shift);
        expect(Math.abs(back - given)).toBeLessThanOrEqual(4 * Number.EPSILON * size + Number.MIN_VALUE);
      }),
    );
  });

  it("comes back from its exact text, and from what people read to the digits shown", () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e300, max: 1e300 }),
        fc.integer({ min: 1, max: 15 }),
        (given, digits) => {
          expect(Number(formatExact(given))).toBe(given + 0);
          expect(parseNumber(formatExact(given))).toMatchObject({ ok: true, value: given + 0 });
          const shown = parseNumber(formatSignificant(given, digits));
          if (!shown.ok) throw new Error(shown.fault.message);
          expect(Math.abs(shown.value - given)).toBeLessThanOrEqual(
            Math.abs(given) * 10 ** (1 - digits) * 0.5000001 + Number.MIN_VALUE,
          );
        },
      ),
    );
  });
});
