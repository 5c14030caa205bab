import { assemble, tenEntry, type Assembled, type Term } from "./assemble";
import { reading, unreadable } from "./fault";
import { lookupCode } from "./lookup";
import { rational } from "./rational";
import type { Reading, Unit } from "./types";

/** A power of ten, then a number, then an atom: letters, `%`, quotes and square brackets, as in `m[H2O]`, `[in_i'H2O]`. */
const component = /(10[*^])|(\d+)|((?:[A-Za-z%'"_]|\[[^\]\s]*\])+)/y;
const exponentPart = /[+-]?\d+/y;
const annotation = /\{[^{}]*\}/y;

const deepest = 20;
export const longestText = 256;

/** Reads the case-sensitive UCUM grammar (left to right: `W/m.K` is W·K/m here). Throws `ReadError`. */
export function readUcum(code: string): Assembled {
  if (code.length > longestText)
    throw unreadable({ start: 0, end: code.length }, `A unit has at most ${longestText} characters.`);
  const terms: Term[] = [];
  let at = 0;

  function match(pattern: RegExp): RegExpExecArray | null {
    pattern.lastIndex = at;
    const found = pattern.exec(code);
    if (found) at = pattern.lastIndex;
    return found;
  }

  function term(sign: number, depth: number): void {
    if (depth > deepest)
      throw unreadable({ start: at, end: code.length }, `Brackets are nested more than ${deepest} deep.`);
    let side = sign;
    if (depth === 0 && code.startsWith("/", at)) {
      at += 1;
      side = -sign;
    }
    for (;;) {
      one(side, depth);
      const operator = code.charAt(at);
      if (operator !== "." && operator !== "/") return;
      at += 1;
      side = operator === "/" ? -sign : sign;
    }
  }

  function one(sign: number, depth: number): void {
    const start = at;
    if (code.charAt(at) === "(") {
      at += 1;
      term(sign, depth + 1);
      if (code.charAt(at) !== ")") throw unreadable({ start, end: at }, "This bracket is not closed.");
      at += 1;
      return;
    }
    if (match(annotation)) return;
    const found = match(component);
    if (!found) {
      const end = Math.min(at + 1, code.length);
      throw unreadable({ start: at, end }, `A UCUM code is expected at "${code.slice(at) || "the end"}".`);
    }
    const [text, ten, digits, atom] = found;
    if (digits !== undefined) return whole(Number(digits), digits, start, sign);
    const entry = ten === undefined ? lookupCode(atom ?? "") : tenEntry;
    if (!entry) throw unreadable({ start, end: at }, `"${text}" is not a UCUM code known here.`);
    const exponent = Number(match(exponentPart)?.[0] ?? 1);
    match(annotation);
    terms.push({ entry, exponent: power(exponent * sign, start), start, end: at });
  }

  function whole(value: number, digits: string, start: number, sign: number): void {
    if (!/^10*$/.test(digits))
      throw unreadable(
        { start, end: at },
        `${digits} is a number, and only powers of ten may stand inside a unit.`,
      );
    if (value > 1)
      terms.push({ entry: tenEntry, exponent: power((digits.length - 1) * sign, start), start, end: at });
    match(annotation);
  }

  function power(exponent: number, start: number) {
    if (Math.abs(exponent) > 999) throw unreadable({ start, end: at }, `The power ${exponent} is too high.`);
    return rational(exponent);
  }

  term(1, 0);
  if (at < code.length)
    throw unreadable(
      { start: at, end: at + 1 },
      `"${code.charAt(at)}" has no meaning at this place of a UCUM code.`,
    );
  return assemble(terms.length > 1 ? terms.map(asTyped) : terms);
}

/** `[degR]` in a product is the step that engineers write `°F`. */
function asTyped(term: Term): Term {
  const step = term.entry.row.ucum === "[degR]" ? lookupCode("[degF]") : null;
  return step ? { ...term, entry: step } : term;
}

/** Reads a UCUM code, annotations tolerated. Codes with a zero of their own (`[degF]`, `Cel`) are read in products too. */
export function parseUcum(code: string): Reading<Unit> {
  return reading(() => {
    if (code === "") throw unreadable({ start: 0, end: 0 }, "No UCUM code is given. A bare number is 1.");
    const { unit, notices } = readUcum(code);
    return { value: unit, notices };
  });
}
