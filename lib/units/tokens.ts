import { plainWord } from "./look-alikes";

type TokenKind = "word" | "number" | "power" | "superscript" | "times" | "per" | "open" | "close" | "other";

/** A piece of a unit's text. `spaced`: blanks stand before it. */
export interface Token {
  readonly kind: TokenKind;
  /** In the catalogue's characters; superscripts as plain digits. */
  readonly text: string;
  readonly start: number;
  readonly end: number;
  readonly spaced: boolean;
}

const blank = /[\s\u200b\u2060\u2062]+/y;
const letters = /[\p{L}°º˚℃℉℧Δ∆%‰_'"′″€$£]+/uy;
/** Words with digits or UCUM brackets inside them: `inH2O`, `m[Hg]`. */
const longWord = /[\p{L}°℧%_[][\p{L}℧\p{Nd}₀-₉°%_'[\]]*/uy;
const number = /\d+(?:\.\d+)?(?:[eE][+\-−]?\d+)?/y;
const superscripts = /[⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+/y;
const superscriptDigits = "⁰¹²³⁴⁵⁶⁷⁸⁹";

const signs: ReadonlyMap<string, TokenKind> = new Map([
  ...[..."·⋅∙•×*.\u2022\u22c5"].map((sign) => [sign, "times"] as const),
  ...[..."/÷∕⁄"].map((sign) => [sign, "per"] as const),
  ["^", "power"],
  ["(", "open"],
  [")", "close"],
]);

const degreeWords: readonly string[] = ["°", "deg", "degree", "degrees"];
const scaleLetters: ReadonlyMap<string, string> = new Map([
  ["C", "°C"],
  ["F", "°F"],
  ["K", "K"],
  ["R", "°R"],
  ["Celsius", "°C"],
  ["celsius", "°C"],
  ["Fahrenheit", "°F"],
  ["fahrenheit", "°F"],
  ["kelvin", "K"],
  ["Rankine", "°R"],
  ["rankine", "°R"],
]);

function match(pattern: RegExp, text: string, at: number): string {
  pattern.lastIndex = at;
  return pattern.exec(text)?.[0] ?? "";
}

function plainSuperscript(text: string): string {
  return text
    .replace("⁻", "-")
    .replace("⁺", "")
    .replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹]/g, (digit) => String(superscriptDigits.indexOf(digit)));
}

/** Cuts a unit's text into tokens. `known` says whether a word is one of the catalogue. */
export function tokens(text: string, known: (word: string) => boolean): Token[] {
  const found: Token[] = [];
  let at = 0;
  while (at < text.length) {
    const gap = match(blank, text, at);
    at += gap.length;
    if (at >= text.length) break;
    const token = (kind: TokenKind, length: number, plain: string): Token => {
      const made = { kind, text: plain, start: at, end: at + length, spaced: gap !== "" };
      at += length;
      return made;
    };
    found.push(nextToken(text, at, known, token));
  }
  return withoutStops(joinDegrees(found));
}

function nextToken(
  text: string,
  at: number,
  known: (word: string) => boolean,
  token: (kind: TokenKind, length: number, plain: string) => Token,
): Token {
  const long = match(longWord, text, at);
  if (long !== "" && known(plainWord(long))) return token("word", long.length, plainWord(long));
  const word = match(letters, text, at);
  if (word === "per") return token("per", 3, "/");
  if (word !== "") return token("word", word.length, plainWord(word));
  const digits = match(number, text, at);
  if (digits !== "") return token("number", digits.length, digits.replace("−", "-"));
  const raised = match(superscripts, text, at);
  if (raised !== "") return token("superscript", raised.length, plainSuperscript(raised));
  if (text.startsWith("**", at)) return token("power", 2, "^");
  const sign = String.fromCodePoint(text.codePointAt(at) ?? 0);
  if (/[-−‐‑–]/.test(sign)) return hyphen(text, at, token);
  return token(signs.get(sign) ?? "other", sign.length, sign);
}

/** `ft-lb` is a product, `m-1` a negative power, `-` alone stands for "no unit". */
function hyphen(
  text: string,
  at: number,
  token: (kind: TokenKind, length: number, plain: string) => Token,
): Token {
  const digits = match(/\d+/y, text, at + 1);
  if (digits !== "") return token("superscript", 1 + digits.length, `-${digits}`);
  return /[\p{L}°]/u.test(text.charAt(at + 1)) ? token("times", 1, "·") : token("other", 1, "-");
}

/** `° C` and `deg F` are one word; `Δ °C` is one as well. */
function joinDegrees(found: readonly Token[]): Token[] {
  const joined: Token[] = [];
  for (const token of found) {
    const before = joined.at(-1);
    const scale = token.kind === "word" ? scaleLetters.get(token.text) : undefined;
    const isDegree = before?.kind === "word" && degreeWords.includes(before.text);
    const isDelta = before?.kind === "word" && (before.text === "Δ" || before.text === "delta");
    if (before && isDegree && scale !== undefined) {
      joined.splice(-1, 1, { ...before, text: scale, end: token.end });
    } else if (before && isDelta && token.kind === "word") {
      joined.splice(-1, 1, { ...before, text: `Δ${scale ?? token.text}`, end: token.end });
    } else {
      joined.push(token);
    }
  }
  return joined;
}

/** `in.`, `sq. ft`: a full stop of an abbreviation is no sign of multiplication. */
function withoutStops(found: readonly Token[]): Token[] {
  return found.filter((token, i) => {
    if (token.kind !== "times" || token.text !== ".") return true;
    const before = found[i - 1]?.text;
    return i === 0 || (i < found.length - 1 && before !== "sq" && before !== "cu");
  });
}
