import { unit as mathUnit } from "mathjs";
import { describe, expect, it } from "vitest";
import {
  dimensionKey,
  parseUcum,
  parseUnit,
  quantities,
  quantityForDimension,
  siUnitSymbol,
  unitNotices,
  type Unit,
} from "@/lib/units";
import { units } from "@/lib/units/catalogue";
import { prefixes } from "@/lib/units/catalogue/prefixes";
import type { UnitRow } from "@/lib/units/catalogue/row";
import gnu from "@/tests/reference/data/gnu-units.json";

function unit(text: string): Unit {
  const read = parseUnit(text);
  if (!read.ok) throw new Error(`${text}: ${read.fault.message}`);
  return read.value;
}

const deviation = (a: number, b: number): number => Math.abs(a / b - 1);

/** Every spelling of a row, prefixed ones with the power of ten they stand for. */
function spellings(row: UnitRow): { word: string; ten: number }[] {
  const allowed = prefixes.filter((prefix) => row.prefixes.includes(prefix.symbol));
  const signs = [row.symbol, ...row.signs];
  return [
    ...[...signs, ...row.names].map((word) => ({ word, ten: 0 })),
    ...allowed.flatMap((prefix) => [
      ...[prefix.symbol, ...prefix.signs].flatMap((sign) =>
        signs.map((word) => ({ word: sign + word, ten: prefix.exponent })),
      ),
      ...row.names.map((word) => ({ word: prefix.name + word, ten: prefix.exponent })),
    ]),
  ];
}

describe("the table of units", () => {
  it("holds about two hundred units and sixty quantities or more", () => {
    expect(units.length).toBeGreaterThanOrEqual(200);
    expect(quantities.length).toBeGreaterThanOrEqual(60);
  });

  it("gives every symbol, sign, name and prefixed form to one unit only", () => {
    const owners = new Map<string, string>();
    const clashes: string[] = [];
    for (const row of units) {
      for (const { word, ten } of spellings(row)) {
        const owner = `${row.symbol} 1e${ten}`;
        const other = owners.get(word);
        if (other !== undefined && other !== owner) clashes.push(`${word}: ${other} and ${owner}`);
        owners.set(word, owner);
      }
    }
    expect(clashes).toEqual([]);
  });

  it("gives every UCUM code to one unit only", () => {
    const codes = units.flatMap((row) => (row.ucum === null ? [] : [row.ucum]));
    expect(new Set(codes).size).toBe(codes.length);
  });

  it.each(units.map((row) => [row.symbol, row] as const))("%s names its source", (_symbol, row) => {
    expect(row.source).not.toBe("");
  });

  it.each(units.map((row) => [row.symbol, row] as const))(
    "%s is read in every spelling with its size",
    (_, row) => {
      const plain = unit(row.symbol);
      for (const { word, ten } of spellings(row)) {
        const read = unit(word);
        expect(deviation(read.factor, plain.factor * 10 ** ten)).toBeLessThan(1e-14);
        expect(dimensionKey(read.dimension)).toBe(dimensionKey(row.dimension));
        expect(read.shift).toBe(row.shift);
      }
    },
  );

  it.each(units.map((row) => [row.symbol, row] as const))("%s survives print and UCUM", (_, row) => {
    for (const { word } of spellings(row)) {
      const read = unit(word);
      expect(parseUnit(read.symbol)).toMatchObject({ ok: true, value: read });
      expect(unitNotices(read)).toEqual(row.notice === undefined ? [] : [row.notice]);
      if (read.ucum === null) continue;
      const back = parseUcum(read.ucum);
      expect(back).toMatchObject({ ok: true, value: { dimension: read.dimension, shift: read.shift } });
      expect(back.ok && deviation(back.value.factor, read.factor)).toBeLessThan(1e-15);
    }
  });

  it("has a shift only for scales with a zero of their own", () => {
    expect(units.filter((row) => row.shift !== 0).map((row) => row.symbol)).toEqual([
      "°C",
      "°F",
      "barg",
      "mbarg",
      "Pag",
      "kPag",
      "MPag",
      "psig",
    ]);
  });
});

describe("factors against GNU units (tests/reference/data/gnu-units.json names version and command)", () => {
  // Measured constants: CODATA 2022 here, 2018 there; and there the magnetic constant is measured, here 4π·10⁻⁷.
  const measured: Readonly<Record<string, number>> = { u: 1.5e-9, Oe: 6e-10 };

  it.each(gnu.rows as [string, string, string, number][])("%s", (symbol, _expression, _si, factor) => {
    expect(deviation(unit(symbol).factor, factor)).toBeLessThan(measured[symbol] ?? 1e-12);
  });

  it("covers every unit but those that GNU units does not have", () => {
    const covered = new Set(gnu.rows.map(([symbol]) => symbol));
    const uncovered = units.filter((row) => !covered.has(row.symbol)).map((row) => row.symbol);
    expect(uncovered.filter((symbol) => !/^(?:\[Btu|\[Cal|cal_|m\[Hg|\[in_i'Hg|a_t)/.test(symbol))).toEqual([
      "met",
      "ε",
      "EUR",
    ]);
  });
});

describe("factors against mathjs", () => {
  it.each(
    (
      "m angstrom in ft yd mi mil hectare sqin sqft sqyd L litre cc cuin cuft cuyd gal qt pt floz s min h day week year Hz K degC degF " +
      "degR g t lb oz gr stone N dyn kgf lbf Pa kPa MPa bar atm mmH2O cmH2O mol J Wh kWh BTU MMBTU erg W VA A C Ah V ohm S F H Wb T " +
      "rad deg arcmin arcsec grad cd"
    ).split(" "),
  )("%s", (word) => {
    // The step from 1 to 2 leaves the zero of a temperature scale aside.
    const inSi = (value: number): number => Number(mathUnit(value, word).toSI().toJSON().value);
    expect(deviation(unit(word).factor, inSi(2) - inSi(1))).toBeLessThan(1e-12);
  });
});

describe("the table of quantities", () => {
  it("has unique names", () => {
    const names = quantities.map(({ name }) => name);
    expect(new Set(names).size).toBe(names.length);
  });

  it.each(quantities.map((quantity) => [quantity.name, quantity] as const))(
    "%s offers units of its dimension, the default first and the coherent one among them",
    (_, quantity) => {
      expect(quantity.units[0]).toBe(quantity.unit);
      expect(new Set(quantity.units).size).toBe(quantity.units.length);
      for (const text of quantity.units) {
        const read = parseUnit(text, { expect: quantity });
        expect(read).toMatchObject({ ok: true, value: { symbol: text } });
        expect(read.ok && dimensionKey(read.value.dimension)).toBe(dimensionKey(quantity.dimension));
      }
      expect(quantity.units.some((text) => unit(text).factor === 1 && unit(text).shift === 0)).toBe(true);
      expect(unit(siUnitSymbol(quantity.dimension))).toMatchObject({ factor: 1, shift: 0 });
      expect(quantityForDimension(quantity.dimension, quantity.kind)).toBeDefined();
      if (quantity.typical) expect(quantity.typical[0]).toBeLessThan(quantity.typical[1]);
    },
  );
});
