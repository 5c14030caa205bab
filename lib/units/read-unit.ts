import { assemble, tenEntry, type Assembled, type Term } from "./assemble";
import { ReadError, unreadable, type Place } from "./fault";
import { parseProduct, type Factor, type Product } from "./grammar";
import { lookup } from "./lookup";
import { explain, nearestUnits } from "./suggest";
import { tokens } from "./tokens";
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

export type Attempt = { read: Assembled; error: null } | { read: null; error: ReadError };

/** Keeps a `ReadError` for later; anything else is a fault of ours and goes on. */
export function attempt(read: () => Assembled): Attempt {
  try {
    return { read: read(), error: null };
  } catch (error) {
    if (error instanceof ReadError) return { read: null, error };
    throw error;
  }
}

/** Reads a unit without any expectation: engineers' text first, then UCUM. Throws `ReadError`. */
export function readUnit(text: string): Assembled {
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
  const { exponent, start, end } = factor;
  const entry = factor.kind === "ten" ? tenEntry : lookup(factor.word);
  if (entry) return { entry, exponent, start, end };
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
