import { assemble, tenEntry, type Assembled, type Term } from "./assemble";
import { cuts, longestWord } from "./cuts";
import { sameDimension } from "./dimension";
import { ReadError } from "./fault";
import { parseProduct, type Factor } from "./grammar";
import { lookup, type Entry } from "./lookup";
import { one } from "./rational";
import { tokens } from "./tokens";
import type { Quantity } from "./types";

/** Letters that stand for a degree where a temperature is expected. */
const degreeLetters: ReadonlyMap<string, string> = new Map([
  ["C", "°C"],
  ["c", "°C"],
  ["F", "°F"],
  ["f", "°F"],
  ["R", "°R"],
]);

const mostPieces = 4;
const mostReadings = 200;

function pieceReadings(piece: string): Entry[] {
  const degree = degreeLetters.get(piece);
  return [lookup(piece), degree === undefined ? null : lookup(degree)].filter((entry) => entry !== null);
}

/** The exponent belongs to the last piece: `hft²` is h·ft². A word that is joined keeps its side of the stroke. */
function termsOf(factor: Factor): Term[][] {
  if (factor.kind === "ten") return [[{ ...factor, entry: tenEntry }]];
  if (factor.word.length > longestWord) {
    const entry = lookup(factor.word);
    return entry ? [[{ ...factor, entry }]] : [];
  }
  const side = factor.exponent.n < 0 ? { n: -1, d: 1 } : one;
  return cuts(factor.word, mostPieces, pieceReadings).map((pieces) =>
    pieces.map((entry, i) => ({
      ...factor,
      entry,
      exponent: i === pieces.length - 1 ? factor.exponent : side,
    })),
  );
}

/**
 * Readings of shorthand that measure `expect`, one per size: `W/mK`, `W/m2K`, `C/W`, `F`. A text that is no product at
 * all has none.
 */
export function shorthandReadings(text: string, expect: Quantity): Assembled[] {
  try {
    const product = parseProduct(
      tokens(text, (word) => lookup(word) !== null),
      text.length,
    );
    let readings: Term[][] = [[]];
    for (const factor of product.factors) {
      const options = termsOf(factor);
      readings = readings.flatMap((begin) => options.map((end) => [...begin, ...end])).slice(0, mostReadings);
    }
    const bySize = new Map<number, Assembled>();
    for (const terms of readings) {
      const made = assembled(terms);
      if (!made || !sameDimension(made.unit.dimension, expect.dimension)) continue;
      const size = Number(made.unit.factor.toPrecision(12));
      if (!bySize.has(size)) bySize.set(size, made);
    }
    return [...bySize.values()];
  } catch (error) {
    if (error instanceof ReadError) return [];
    throw error;
  }
}

function assembled(terms: readonly Term[]): Assembled | null {
  try {
    return assemble(terms);
  } catch (error) {
    if (error instanceof ReadError) return null;
    throw error;
  }
}
