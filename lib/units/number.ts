import { ReadError, reading, type Place } from "./fault";
import type { Reading } from "./types";

/** A number at the beginning of a text. */
export interface ScannedNumber {
  readonly value: number;
  readonly end: number;
}

const gaps = " \\u00a0\\u2007\\u2009\\u202f";
const sign = /[+\-−–]?/y;
const grouped = new RegExp(`\\d{1,3}(?:[${gaps}'’]\\d{3})+(?!\\d)(?:[.,]\\d+)?`, "y");
const plain = /\d[\d.,]*|[.,]\d+/y;
const letterExponent = /[eE][+\-−–]?\d+/y;
const tenExponent = /\s*[·×*⋅x]\s*10(?:\s*\^\s*\(?([+\-−–]?\d+)\)?|([⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+)|([-−–]\d+))/y;
const tenAlone = /10(?:\s*\^\s*\(?([+\-−–]?\d+)\)?|([⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+))/y;
const blanks = /\s*/y;

function match(pattern: RegExp, text: string, at: number): RegExpExecArray | null {
  pattern.lastIndex = at;
  return pattern.exec(text);
}

export function unreadableNumber(
  place: Place,
  message: string,
  suggestions: readonly string[] = [],
): ReadError {
  return new ReadError({ code: "invalid-input", message, start: place.start, end: place.end, suggestions });
}

const asciiMinus = (text: string): string => text.replace(/[−–⁻]/, "-").replace(/[+⁺]/, "");
const plainDigits = (text: string): string =>
  text.replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹]/g, (digit) => String("⁰¹²³⁴⁵⁶⁷⁸⁹".indexOf(digit)));

/** Reads the number with which a text begins at `from`, or null when none begins there. Throws `ReadError`. */
export function scanNumber(text: string, from: number): ScannedNumber | null {
  const signText = match(sign, text, from)?.[0] ?? "";
  const afterSign = from + signText.length;
  const start = afterSign + (match(blanks, text, afterSign)?.[0].length ?? 0);
  const minus = signText === "" || signText === "+" ? "" : "-";

  const ten = match(tenAlone, text, start);
  if (ten) return finite(text, from, start + ten[0].length, `${minus}1e${exponentText(ten[1], ten[2])}`);

  const body = match(grouped, text, start) ?? match(plain, text, start);
  if (!body) return null;
  const bodyEnd = start + body[0].length;
  const letter = match(letterExponent, text, bodyEnd);
  const power = letter ? null : match(tenExponent, text, bodyEnd);
  const tail = (letter ?? power)?.[0] ?? "";
  const exponent = letter ? asciiMinus(tail.slice(1)) : exponentText(power?.[1], power?.[2] ?? power?.[3]);
  const mantissa = decimalText(body[0], { start, end: bodyEnd }, tail);
  return finite(text, from, bodyEnd + tail.length, `${minus}${mantissa}e${exponent}`);
}

function exponentText(plainText: string | undefined, raised: string | undefined): string {
  return asciiMinus(plainDigits(plainText ?? raised ?? "0"));
}

function finite(text: string, start: number, end: number, decimal: string): ScannedNumber {
  const value = Number(decimal);
  const typed = text.slice(start, end);
  if (!Number.isFinite(value))
    throw unreadableNumber({ start, end }, `${typed} is too large to calculate with.`);
  if (value === 0 && /[1-9]/.test(decimal.replace(/e.*/, "")))
    throw unreadableNumber({ start, end }, `${typed} is too small to calculate with.`);
  return { value: value + 0, end };
}

/** Settles what point, comma and blanks mean and returns the number with a point. */
function decimalText(typed: string, place: Place, tail: string): string {
  const ungrouped = typed.replace(new RegExp(`[${gaps}'’]`, "g"), "");
  if (ungrouped !== typed) return ungrouped.replace(",", ".");
  const commas = typed.split(",").length - 1;
  const points = typed.split(".").length - 1;

  if (commas === 0 && points <= 1) return typed;
  if (commas === 1 && points === 0) return singleComma(typed, place, tail);
  if (commas > 0 && points > 0) {
    const decimal = typed.lastIndexOf(",") > typed.lastIndexOf(".") ? "," : ".";
    const groups = decimal === "," ? "." : ",";
    const [whole = "", ...decimals] = typed.split(decimal);
    if (decimals.length === 1 && isGrouped(whole, groups))
      return `${whole.replaceAll(groups, "")}.${decimals[0]}`;
  } else {
    const groups = commas > 0 ? "," : ".";
    if (isGrouped(typed, groups)) return typed.replaceAll(groups, "");
  }
  throw unreadableNumber(
    place,
    `${typed} has points and commas that do not separate groups of three digits.`,
  );
}

function isGrouped(whole: string, separator: string): boolean {
  const [first = "", ...groups] = whole.split(separator);
  return /^[1-9]\d{0,2}$/.test(first) && groups.every((group) => /^\d{3}$/.test(group));
}

function singleComma(typed: string, place: Place, tail: string): string {
  const [whole = "", decimals = ""] = typed.split(",");
  if (decimals === "") throw unreadableNumber(place, `${typed} ends with a comma.`);
  if (isGrouped(typed, ",")) {
    const readings = [`${whole}.${decimals}${tail}`, `${whole}${decimals}${tail}`];
    throw unreadableNumber(
      place,
      `${typed}${tail} can be read as ${readings[0]} or as ${readings[1]}. Write the one that is meant, without the comma.`,
      readings,
    );
  }
  return `${whole}.${decimals}`;
}

const notFinite = /^[+\-−–]?\s*(?:∞|inf|infinity|nan)$/i;

/** Throws the fault of a text that is no number at all. */
export function notANumber(text: string, place: Place): ReadError {
  const typed = text.slice(place.start, place.end);
  if (notFinite.test(typed)) return unreadableNumber(place, `"${typed}" is not a finite number.`);
  return unreadableNumber(place, `"${typed}" is not a number.`);
}

/**
 * Reads a number as people type it: point or comma as decimal sign, blanks, points or commas between groups of three,
 * `1e-3`, `1.2·10⁻³`, a real minus. `1,250` is refused with both readings. Faults: `missing-input`, `invalid-input`.
 */
export function parseNumber(text: string): Reading<number> {
  return reading(() => {
    const start = text.length - text.trimStart().length;
    const end = text.trimEnd().length;
    if (end <= start) throw missingNumber(text);
    const scanned = scanNumber(text, start);
    if (!scanned) throw notANumber(text, { start, end });
    if (scanned.end < end) {
      const rest = text.slice(scanned.end, end).trim();
      const message = /^\d/.test(rest)
        ? `"${text.slice(start, end)}" has blanks that do not separate groups of three digits.`
        : `"${rest}" after the number cannot be read as part of it.`;
      throw unreadableNumber({ start: scanned.end, end }, message);
    }
    return { value: scanned.value, notices: [] };
  });
}

export function missingNumber(text: string): ReadError {
  return new ReadError({
    code: "missing-input",
    message: "No number is given.",
    start: 0,
    end: text.length,
    suggestions: [],
  });
}
