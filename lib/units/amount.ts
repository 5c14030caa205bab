import { missingNumber, notANumber, scanNumber, unreadableNumber, type ScannedNumber } from "./number";
import { reading, ReadError } from "./fault";
import { parseUnit } from "./parse-unit";
import type { ReadOptions, Reading, Unit } from "./types";

export interface Amount {
  readonly value: number;
  /** null when no unit was typed. */
  readonly unit: Unit | null;
}

const slashFraction = /([+\-−–]?)(?:(\d{1,6})[ \u00a0-])?(\d{1,4})[/⁄](\d{1,4})(?=\s|$|\p{L})/uy;
const signFraction = /([+\-−–]?)(\d{0,6})\s?([¼½¾⅛⅜⅝⅞⅓⅔])/y;
const fractionSigns: ReadonlyMap<string, number> = new Map([
  ["¼", 1 / 4],
  ["½", 1 / 2],
  ["¾", 3 / 4],
  ["⅛", 1 / 8],
  ["⅜", 3 / 8],
  ["⅝", 5 / 8],
  ["⅞", 7 / 8],
  ["⅓", 1 / 3],
  ["⅔", 2 / 3],
]);

/** `1 1/2`, `3/8`, `2½`: how sizes in inches are written. */
function scanFraction(text: string, from: number): ScannedNumber | null {
  slashFraction.lastIndex = from;
  signFraction.lastIndex = from;
  const slash = slashFraction.exec(text);
  const single = slash ? null : signFraction.exec(text);
  const found = slash ?? single;
  if (!found) return null;
  const end = from + found[0].length;
  const part = slash
    ? Number(slash[3]) / Number(slash[4])
    : (fractionSigns.get(single?.[3] ?? "") ?? Number.NaN);
  if (!Number.isFinite(part)) throw unreadableNumber({ start: from, end }, `${found[0]} divides by zero.`);
  const size = Number(found[2] || 0) + part;
  return { value: found[1] === "" || found[1] === "+" ? size : 0 - size, end };
}

/**
 * Reads a number with its unit: `25 mm`, `480 °F`, `1 1/2 in`, `3`. Faults as `parseNumber` and `parseUnit`, places in
 * the whole text.
 */
export function parseAmount(text: string, options: ReadOptions = {}): Reading<Amount> {
  return reading<Amount>(() => {
    const start = text.length - text.trimStart().length;
    const end = text.trimEnd().length;
    if (end <= start) throw missingNumber(text);
    const scanned = scanFraction(text, start) ?? scanNumber(text, start);
    if (!scanned) throw notANumber(text, { start, end });
    const unitText = text.slice(scanned.end, end);
    if (unitText.trim() === "") return { value: { value: scanned.value, unit: null }, notices: [] };
    const unit = parseUnit(unitText, options);
    if (unit.ok) return { value: { value: scanned.value, unit: unit.value }, notices: unit.notices };
    const by = scanned.end;
    throw new ReadError({ ...unit.fault, start: unit.fault.start + by, end: unit.fault.end + by });
  });
}
