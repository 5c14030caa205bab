import { unreadable, type Place } from "./fault";
import { multiplyRational, negateRational, one, rational, rationalFromNumber } from "./rational";
import type { Token } from "./tokens";
import type { Rational } from "./types";

/** One word (or power of ten) of a product with its whole exponent, strokes and brackets worked in. */
export interface Factor extends Place {
  readonly kind: "word" | "ten";
  readonly word: string;
  readonly exponent: Rational;
}

export interface Product {
  readonly factors: readonly Factor[];
  /** A stroke followed by a product without brackets: `W/m·K`. */
  readonly openDenominator: boolean;
  /** First place where two units touch without a sign between them: `m²K`. */
  readonly touching: Place | null;
}

const deepest = 20;
const powerWords: ReadonlyMap<string, number> = new Map([
  ["sq", 2],
  ["square", 2],
  ["cu", 3],
  ["cubic", 3],
]);

/** Reads the grammar of engineers: everything after one stroke is denominator until its bracket closes. */
export function parseProduct(found: readonly Token[], textLength: number): Product {
  let at = 0;
  let openDenominator = false;
  let touching: Place | null = null;
  const factors: Factor[] = [];

  const peek = (): Token | undefined => found[at];
  const endPlace: Place = { start: textLength, end: textLength };

  function sequence(outer: Rational, depth: number): void {
    if (depth > deepest)
      throw unreadable(peek() ?? endPlace, `Brackets are nested more than ${deepest} deep.`);
    let below = false;
    let joinedBelow = false;
    if (peek()?.kind === "per") {
      at += 1;
      below = true;
    }
    for (;;) {
      factor(below ? negateRational(outer) : outer, joinedBelow, depth);
      const next = peek();
      if (!next || next.kind === "close") return;
      if (next.kind === "per") {
        at += 1;
        below = true;
        joinedBelow = false;
        continue;
      }
      if (next.kind === "times") at += 1;
      else if (next.kind === "word" || next.kind === "number" || next.kind === "open") {
        if (!next.spaced) touching ??= { start: next.start, end: next.end };
      } else throw stray(next);
      joinedBelow = below;
      openDenominator ||= below;
    }
  }

  function factor(outer: Rational, joinedBelow: boolean, depth: number): void {
    const token = peek();
    if (!token) throw unreadable(endPlace, "A unit is missing at the end.");
    at += 1;
    if (token.kind === "open") return group(token, outer, joinedBelow, depth);
    if (token.kind === "number") return numeral(token, outer, joinedBelow);
    if (token.kind !== "word") throw stray(token);
    const raised = powerWords.get(token.text);
    const word = raised === undefined ? token : peek();
    if (word?.kind !== "word") throw unreadable(token, `A unit is missing after "${token.text}".`);
    if (raised !== undefined) at += 1;
    const exponent = exponentAfter(word, joinedBelow);
    push("word", word, multiplyRational(multiplyRational(outer, rational(raised ?? 1)), exponent));
  }

  function group(open: Token, outer: Rational, joinedBelow: boolean, depth: number): void {
    const exponent = exponentOfGroup(open, joinedBelow);
    sequence(multiplyRational(outer, exponent), depth + 1);
    if (peek()?.kind !== "close") throw unreadable(open, "This bracket is not closed.");
    at += 1;
    exponentAfter(open, joinedBelow);
  }

  /** The exponent stands behind the bracket, so the matching one is looked for first. */
  function exponentOfGroup(open: Token, joinedBelow: boolean): Rational {
    const begin = at;
    let depth = 1;
    while (depth > 0) {
      const token = peek();
      if (!token) throw unreadable(open, "This bracket is not closed.");
      if (token.kind === "open") depth += 1;
      if (token.kind === "close") depth -= 1;
      at += 1;
    }
    const exponent = exponentAfter(open, joinedBelow);
    at = begin;
    return exponent;
  }

  function numeral(token: Token, outer: Rational, joinedBelow: boolean): void {
    const value = Number(token.text);
    const ten = Math.log10(value);
    const exponent = exponentAfter(token, joinedBelow);
    if (value === 1) return;
    if (!Number.isInteger(ten) || Math.abs(ten) > 30)
      throw unreadable(
        token,
        `${token.text} is a number. A unit stands here without one; only powers of ten may be part of it.`,
      );
    push("ten", token, multiplyRational(multiplyRational(outer, rational(ten)), exponent));
  }

  function push(kind: Factor["kind"], token: Token, exponent: Rational): void {
    factors.push({ kind, word: token.text, exponent, start: token.start, end: token.end });
  }

  function exponentAfter(base: Token, joinedBelow: boolean): Rational {
    const token = peek();
    let exponent: Rational | null = null;
    if (token?.kind === "superscript" && !token.spaced) {
      at += 1;
      exponent = rational(Number(token.text));
    } else if (token?.kind === "power") {
      at += 1;
      exponent = writtenExponent(token);
    } else if (
      token?.kind === "number" &&
      !token.spaced &&
      base.kind === "word" &&
      /^\d+$/.test(token.text)
    ) {
      at += 1;
      exponent = rational(Number(token.text));
    }
    if (exponent && token && joinedBelow && exponent.n < 0)
      throw unreadable(
        token,
        "A negative power after the stroke can be read in two ways. Put the denominator in brackets, W/(m·K), or write powers only, W·m⁻¹·K⁻¹.",
        [],
        true,
      );
    return exponent ?? one;
  }

  function writtenExponent(sign: Token): Rational {
    const missing = () => unreadable(sign, "A number must follow the power sign.");
    const bracket = peek()?.kind === "open";
    if (bracket) at += 1;
    let exponent = signedNumber(missing);
    if (bracket && peek()?.kind === "per") {
      at += 1;
      const below = signedNumber(missing);
      if (below.n === 0) throw missing();
      exponent = multiplyRational(exponent, rational(below.d * Math.sign(below.n), Math.abs(below.n)));
    }
    if (bracket) {
      if (peek()?.kind !== "close") throw unreadable(sign, "The bracket of the power is not closed.");
      at += 1;
    }
    return exponent;
  }

  function signedNumber(missing: () => Error): Rational {
    const token = peek();
    if (token?.kind !== "number" && token?.kind !== "superscript") throw missing();
    at += 1;
    const fraction = rationalFromNumber(Number(token.text));
    if (!fraction) throw unreadable(token, `${token.text} is not a power that a unit can have.`);
    return fraction;
  }

  sequence(one, 0);
  const left = peek();
  if (left) throw unreadable(left, "This bracket was not opened.");
  return { factors, openDenominator, touching };
}

function stray(token: Token): Error {
  if (token.kind === "superscript" || token.kind === "power")
    return unreadable(token, "A power must stand directly behind its unit.");
  if (token.kind === "times" || token.kind === "per")
    return unreadable(token, `A unit is missing beside "${token.text}".`);
  if (token.kind === "close") return unreadable(token, "A unit is missing before this bracket.");
  return unreadable(token, `"${token.text}" has no meaning in a unit.`);
}
