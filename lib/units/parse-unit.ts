import { assemble, tenEntry, type Assembled, type Term } from "./assemble";
import { sameDimension } from "./dimension";
import { ReadError, reading, unreadable, type Place } from "./fault";
import { parseProduct, type Factor, type Product } from "./grammar";
import { lookup } from "./lookup";
import { shorthandReadings } from "./shorthand";
import { explain, nearestUnits } from "./suggest";
import { tokens } from "./tokens";
import type { Quantity, ReadOptions, Reading, Unit } from "./types";
import { longestText, readUcum } from "./ucum";

/** Texts with blanks or brackets that the grammar would take for a product. */
const phrases: ReadonlyMap<string, string> = new Map(
  ["bar", "mbar", "Pa", "kPa", "MPa", "psi"].flatMap((unit): [string, string][] => [
    [`${unit} (g)`, `${unit}g`],
    [`${unit}(g)`, `${unit}g`],
    [`${unit} g`, `${unit}g`],
    [`${unit} gauge`, `${unit}g`],
    [`${unit} (a)`, unit],
    [`${unit}(a)`, unit],
    [`${unit} (abs)`, unit],
    [`${unit} abs`, unit],
  ]),
);

const noUnit: readonly string[] = ["1", "-", "–", "—", "[-]", "(-)"];

const isKnown = (word: string): boolean => lookup(word) !== null;

/**
 * Reads a unit as engineers type it, or a UCUM code; the engineers' reading wins where a text is both (`W/m.K`).
 * Faults: `unreadable-unit` with the place and texts that would be read, `unit-mismatch` when `expect` is given and the
 * dimension is another, `missing-input` for an empty text. Notices say how a text with two readings was read.
 */
export function parseUnit(text: string, options: ReadOptions = {}): Reading<Unit> {
  return reading(() => {
    const { expect } = options;
    const strict = attempt(() => readStrict(text));
    if (strict.read && (!expect || sameDimension(strict.read.unit.dimension, expect.dimension))) {
      if (expect) refuseDifference(strict.read.unit, expect, text);
      return { value: strict.read.unit, notices: strict.read.notices };
    }
    const short = expect ? readShorthand(text, expect, options.shorthand === true) : null;
    if (short) return { value: short.unit, notices: short.notices };
    if (strict.error) throw expect ? withUsualUnits(strict.error, expect) : strict.error;
    throw mismatch(strict.read.unit, expect!, text);
  });
}

type Attempt = { read: Assembled; error: null } | { read: null; error: ReadError };

function attempt(read: () => Assembled): Attempt {
  try {
    return { read: read(), error: null };
  } catch (error) {
    if (error instanceof ReadError) return { read: null, error };
    throw error;
  }
}

function readStrict(text: string): Assembled {
  const trimmed = text.trim();
  const place: Place = { start: 0, end: text.length };
  if (trimmed === "")
    throw new ReadError({ code: "missing-input", message: "No unit is given.", ...place, suggestions: [] });
  if (text.length > longestText) throw unreadable(place, `A unit has at most ${longestText} characters.`);
  if (noUnit.includes(trimmed)) return assemble([]);

  const typed = attempt(() => readTyped(phrases.get(trimmed.replace(/\s+/g, " ")) ?? text));
  if (typed.read) return typed.read;
  if (typed.error.final) throw typed.error;
  const code = attempt(() => readUcum(trimmed));
  if (code.read) return code.read;
  throw code.error.final || /[[{]/.test(trimmed) ? shifted(code.error, text.indexOf(trimmed)) : typed.error;
}

function shifted({ fault, final }: ReadError, by: number): ReadError {
  return new ReadError({ ...fault, start: fault.start + by, end: fault.end + by }, final);
}

function readTyped(text: string): Assembled {
  const product = parseProduct(tokens(text, isKnown), text.length);
  const terms = product.factors.map(strictTerm);
  const { unit, notices } = assemble(terms);
  if (product.touching) throw touching(product, unit.symbol);
  if (!product.openDenominator) return { unit, notices };
  return {
    unit,
    notices: [
      ...notices,
      `"${text.trim()}" is read as ${unit.symbol}: everything after the stroke is denominator.`,
    ],
  };
}

function strictTerm(factor: Factor): Term {
  if (factor.kind === "ten") return { ...factor, entry: tenEntry };
  const entry = lookup(factor.word);
  if (entry) return { ...factor, entry };
  const explanation = explain(factor.word);
  if (explanation) throw unreadable(factor, explanation.message, explanation.suggestions, true);
  const nearest = nearestUnits(factor.word);
  const hint = nearest.length > 0 ? ` Nearest: ${nearest.join(", ")}.` : "";
  throw unreadable(factor, `"${factor.word}" is not a unit known here.${hint}`, nearest);
}

function touching(product: Product, symbol: string): ReadError {
  const place = product.touching ?? { start: 0, end: 0 };
  return unreadable(place, `A multiplication sign is missing here. Write ${symbol}.`, [symbol], true);
}

function readShorthand(text: string, expect: Quantity, allowed: boolean): Assembled | null {
  const readings = shorthandReadings(text, expect);
  const [only, other] = readings;
  if (!only) return null;
  const place: Place = { start: 0, end: text.length };
  const symbols = readings.map(({ unit }) => unit.symbol);
  const typed = text.trim();
  if (other)
    throw unreadable(
      place,
      `"${typed}" can be read as ${symbols.join(" or as ")}. Write the one that is meant.`,
      symbols,
    );
  if (!allowed)
    throw unreadable(
      place,
      `"${typed}" is shorthand that can be misread. Write ${only.unit.symbol}.`,
      symbols,
    );
  return { unit: only.unit, notices: [`"${typed}" is read as ${only.unit.symbol}.`, ...only.notices] };
}

/** Where nothing near is known, what is usual for the quantity is the best help. */
function withUsualUnits({ fault, final }: ReadError, expect: Quantity): ReadError {
  if (fault.suggestions.length > 0) return new ReadError(fault, final);
  const message = `${fault.message} Units of ${expect.name}: ${expect.units.slice(0, 3).join(", ")}.`;
  return new ReadError({ ...fault, message, suggestions: expect.units }, final);
}

function refuseDifference(unit: Unit, expect: Quantity, text: string): void {
  if (!unit.differenceOnly || expect.kind !== "absolute") return;
  const plain = unit.symbol.replace("Δ", "");
  throw new ReadError({
    code: "unit-mismatch",
    message: `${unit.symbol} is a difference, and ${expect.name} is an absolute value here. Write ${plain}.`,
    start: 0,
    end: text.length,
    suggestions: [plain],
  });
}

function mismatch(unit: Unit, expect: Quantity, text: string): ReadError {
  const usual = expect.units.slice(0, 3).join(", ");
  return new ReadError({
    code: "unit-mismatch",
    message: `${unit.symbol} does not measure ${expect.name}. Units that do: ${usual}.`,
    start: 0,
    end: text.length,
    suggestions: expect.units,
  });
}

/** What the echo of this unit has to say: which BTU or calorie, the hour, the year, the zero of a gauge pressure. */
export function unitNotices(unit: Unit): readonly string[] {
  const read = attempt(() => readStrict(unit.symbol));
  if (!read.read) throw new RangeError(`${unit.symbol} was not made by parseUnit.`);
  return read.read.notices;
}
