import type { Assembled } from "./assemble";
import { sameDimension } from "./dimension";
import { ReadError, reading, unreadable, type Place } from "./fault";
import { knownUnits } from "./known-units";
import { attempt, readUnit } from "./read-unit";
import { shorthandReadings } from "./shorthand";
import type { Quantity, ReadOptions, Reading, Unit } from "./types";

/**
 * Reads a unit as engineers type it, or a UCUM code; the engineers' reading wins where a text is both (`W/m.K`).
 * Faults: `unreadable-unit` with the place and texts that would be read, `unit-mismatch` when `expect` is given and the
 * dimension is another, `missing-input` for an empty text. Notices say how a text with two readings was read.
 */
export function parseUnit(text: string, options: ReadOptions = {}): Reading<Unit> {
  return reading(() => {
    const { expect } = options;
    const strict = attempt(() => knownUnits.get(text) ?? readUnit(text));
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
  const read = attempt(() => knownUnits.get(unit.symbol) ?? readUnit(unit.symbol));
  if (!read.read) throw new RangeError(`${unit.symbol} was not made by parseUnit.`);
  return read.read.notices;
}
