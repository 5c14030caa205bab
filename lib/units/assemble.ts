import { prefixes } from "./catalogue/prefixes";
import { dimensionless, multiply, power } from "./dimension";
import { exact, exactOne, exactToNumber, multiplyExact, powerExact, type Exact } from "./exact";
import { unreadable, type Place } from "./fault";
import { entryCode, entrySymbol, type Entry } from "./lookup";
import { addRational, rational, rationalText, rationalToNumber } from "./rational";
import type { Dimension, Rational, Unit } from "./types";

/** A unit of the catalogue raised to a power, at its place in the text. */
export interface Term extends Place {
  readonly entry: Entry;
  readonly exponent: Rational;
}

/** Powers of ten inside a unit (`10⁻⁸ Ω·m`) behave like a unit named 10. */
export const tenEntry: Entry = {
  prefix: null,
  row: {
    symbol: "10",
    signs: [],
    names: [],
    dimension: dimensionless,
    factor: exact("10"),
    shift: 0,
    prefixes: [],
    ucum: "10*",
    codes: ["10^"],
    source: "",
  },
};

export interface Assembled {
  readonly unit: Unit;
  /** What the echo of these units says: `BTU is the International Table one …`. */
  readonly notices: readonly string[];
}

const highestPower = 24;

/** Multiplies the terms into one unit. Throws `ReadError` where a unit may not stand in a product. */
export function assemble(given: readonly Term[]): Assembled {
  const terms = merged(given);
  const [first] = terms;
  const single = terms.length === 1 && first && isOne(first.exponent) ? first : null;
  if (!single) terms.forEach(refuseInProduct);

  let dimension: Dimension = dimensionless;
  let ratio: Exact = exactOne;
  let broken = 1;
  for (const { entry, exponent } of terms) {
    dimension = multiply(dimension, power(entry.row.dimension, exponent));
    const factor = entryFactor(entry);
    if (exponent.d === 1) ratio = multiplyExact(ratio, powerExact(factor, exponent.n));
    else broken *= exactToNumber(factor) ** rationalToNumber(exponent);
  }
  const factor = exactToNumber(ratio) * broken;
  if (!(factor > 0 && factor < Infinity))
    throw unreadable(span(given), "The unit is too large or too small to calculate with.");

  return {
    unit: {
      symbol: symbolOf(terms),
      ucum: codeOf(terms, single),
      dimension,
      factor,
      shift: single?.entry.row.shift ?? 0,
      ...(single?.entry.row.differenceOnly && { differenceOnly: true }),
    },
    notices: [
      ...new Set(terms.map(({ entry }) => entry.row.notice).filter((notice) => notice !== undefined)),
    ],
  };
}

const isOne = (exponent: Rational): boolean => exponent.n === 1 && exponent.d === 1;

const tens: ReadonlyMap<string, Exact> = new Map(
  prefixes.map((prefix) => [prefix.symbol, exact(`1e${prefix.exponent}`)]),
);

function entryFactor({ row, prefix }: Entry): Exact {
  const ten = prefix && tens.get(prefix.symbol);
  return ten ? multiplyExact(row.factor, ten) : row.factor;
}

/** Equal units on the same side of the stroke become one with the sum of their powers. */
function merged(given: readonly Term[]): Term[] {
  const terms: Term[] = [];
  for (const term of given) {
    if (term.exponent.n === 0) continue;
    const ten = term.entry.row === tenEntry.row;
    const index = terms.findIndex(
      (other) =>
        other.entry.row === term.entry.row &&
        other.entry.prefix === term.entry.prefix &&
        (ten || Math.sign(other.exponent.n) === Math.sign(term.exponent.n)),
    );
    const other = terms[index];
    if (other) terms[index] = { ...other, exponent: addRational(other.exponent, term.exponent) };
    else terms.push(term);
  }
  for (const term of terms)
    if (Math.abs(term.exponent.n) > highestPower * (term.entry.row === tenEntry.row ? 10 : term.exponent.d))
      throw unreadable(term, `The power of ${entrySymbol(term.entry)} is beyond ${highestPower}.`);
  return terms.filter(({ exponent }) => exponent.n !== 0);
}

function refuseInProduct(term: Term): void {
  const { row, prefix } = term.entry;
  if (row.alone)
    throw unreadable(
      term,
      `${row.symbol} counts from atmospheric pressure and has no meaning inside a product. Use an absolute pressure unit.`,
      [],
      true,
    );
  // W/mK nearly always means W/(m·K); read as millikelvin it would be wrong by a factor of 1000.
  if (row.symbol === "K" && prefix?.symbol === "m")
    throw unreadable(
      term,
      "mK is read as millikelvin by some and as m·K by others. Write m·K.",
      ["m·K"],
      true,
    );
}

const span = (terms: readonly Term[]): Place => ({
  start: terms[0]?.start ?? 0,
  end: terms.at(-1)?.end ?? 0,
});

// ───────────────────────────── writing

const superscript = (text: string): string =>
  text.replace("-", "⁻").replace(/\d/g, (digit) => "⁰¹²³⁴⁵⁶⁷⁸⁹".charAt(Number(digit)));

function raised(symbol: string, exponent: Rational): string {
  if (isOne(exponent)) return symbol;
  return symbol + (exponent.d === 1 ? superscript(String(exponent.n)) : `^(${rationalText(exponent)})`);
}

const positive = (exponent: Rational): Rational => rational(Math.abs(exponent.n), exponent.d);
const isAbove = (term: Term): boolean => term.exponent.n > 0 || term.entry.row === tenEntry.row;

/** `BTU·in/(h·ft²·°F)`; a bare number is `1`. */
function symbolOf(terms: readonly Term[]): string {
  const above = [...terms].filter(isAbove).sort(tensFirst);
  const below = terms.filter((term) => !isAbove(term));
  const top = above.map(({ entry, exponent }) => raised(entrySymbol(entry), exponent)).join("·") || "1";
  const bottom = below.map(({ entry, exponent }) => raised(entrySymbol(entry), positive(exponent))).join("·");
  if (below.length === 0) return top;
  return below.length === 1 ? `${top}/${bottom}` : `${top}/(${bottom})`;
}

const tensFirst = (a: Term, b: Term): number =>
  Number(b.entry.row === tenEntry.row) - Number(a.entry.row === tenEntry.row);

/** UCUM forbids units with a zero of their own in products: there a degree is written as its difference. */
const productCodes: ReadonlyMap<string, string> = new Map([
  ["Cel", "K"],
  ["[degF]", "[degR]"],
]);

function codeOf(terms: readonly Term[], single: Term | null): string | null {
  if (terms.length === 0) return "1";
  if (single) return entryCode(single.entry);
  const above: string[] = [];
  const below: string[] = [];
  for (const term of terms) {
    const code = raisedCode(term);
    if (code === null) return null;
    (isAbove(term) ? above : below).push(code);
  }
  const bottom = below.join(".");
  if (below.length === 0) return above.join(".");
  return `${above.join(".")}/${/[./]/.test(bottom) ? `(${bottom})` : bottom}`;
}

function raisedCode(term: Term): string | null {
  const plain = entryCode(term.entry);
  if (plain === null || term.exponent.d !== 1) return null;
  const code = productCodes.get(plain) ?? plain;
  const exponent = isAbove(term) ? term.exponent : positive(term.exponent);
  if (isOne(exponent)) return code.includes("/") ? `(${code})` : code;
  return /[./]/.test(code) ? null : `${code}${exponent.n}`;
}
