import { cuts } from "./cuts";
import { entrySymbol, lookup, plainWords } from "./lookup";

interface Explanation {
  readonly message: string;
  readonly suggestions: readonly string[];
}

/** Words that the trade uses for several units, where a reading would be a guess, and a few that it has given up. */
const explanations: ReadonlyMap<string, Explanation> = new Map(
  explained([
    [
      "ton tons",
      "can be a tonne, a short ton, a long ton or a ton of refrigeration",
      ["t", "ton_short", "ton_long", "ton_refrigeration"],
    ],
    ["MBTU MBtu", "means 1000 BTU to some and 10⁶ BTU to others", ["kBTU", "MMBTU"]],
    ["Cal Cals", "means a kilocalorie to some and a calorie to others", ["kcal", "cal"]],
    ["' ′", "is not read, because it means foot to some and arc minute to others", ["ft", "arcmin"]],
    [`" ″ ''`, "is not read, because it means inch to some and arc second to others", ["in", "arcsec"]],
    ["USD GBP CHF $ £", "is not converted: EUR is the only money here", ["EUR"]],
    ["R", "is read neither as Rankine nor as röntgen nor as the gas constant", ["°R"]],
    ["furlong furlongs chain chains rod rods league leagues", "is not a unit known here", ["m", "ft", "mi"]],
    ["month months", "has no fixed length", ["d", "a"]],
  ]),
);

function explained(
  rows: readonly (readonly [words: string, text: string, suggestions: readonly string[]])[],
): [string, Explanation][] {
  return rows.flatMap(([words, text, suggestions]) =>
    words
      .split(" ")
      .map((word): [string, Explanation] => [
        word,
        { message: `"${word}" ${text}. Write ${suggestions.join(" or ")}.`, suggestions },
      ]),
  );
}

export function explain(word: string): Explanation | null {
  return explanations.get(word) ?? null;
}

const mostSuggestions = 3;

/** Known words nearest to one that is not known: other capitals first, then two units joined, then few changed letters. */
export function nearestUnits(word: string): readonly string[] {
  const typed = word.slice(0, 40);
  const lower = typed.toLowerCase();
  const otherCase = [...caseVariants(typed), ...plainWords.filter((known) => known.toLowerCase() === lower)];
  if (otherCase.length > 0) return [...new Set(otherCase)].slice(0, mostSuggestions);
  const most = Math.ceil(typed.length / 3);
  const near = plainWords
    .map((known) => ({ known, distance: editDistance(lower, known.toLowerCase(), most) }))
    .filter(({ known, distance }) => distance <= most && distance < Math.max(known.length, typed.length))
    .sort((a, b) => a.distance - b.distance || a.known.length - b.known.length)
    .map(({ known }) => known);
  return [...new Set([...joinedUnits(typed), ...near])].slice(0, mostSuggestions);
}

/** `kgK` → kg·K: two units without a sign between them. Shorter words are typing errors as a rule. */
function joinedUnits(word: string): string[] {
  if (word.length < 3) return [];
  const read = (piece: string) => [lookup(piece)].filter((entry) => entry !== null);
  return cuts(word, 2, read).map((pieces) => pieces.map(entrySymbol).join("·"));
}

/** `KG` → kg, `mpa` → MPa and mPa, `Kw` → kW: every spelling with other capitals that is read. */
function caseVariants(word: string): string[] {
  if (word.length > 6) return [];
  let variants = [""];
  for (const letter of word) {
    const spellings = [...new Set([letter.toLowerCase(), letter, letter.toUpperCase()])];
    variants = variants.flatMap((begin) => spellings.map((spelling) => begin + spelling));
  }
  return variants.filter((variant) => lookup(variant) !== null);
}

/** Insertions, deletions, changes and swaps of neighbours between two words; `most` + 1 stands for "more". */
function editDistance(a: string, b: string, most: number): number {
  if (Math.abs(a.length - b.length) > most) return most + 1;
  let before: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i += 1) {
    const row = [i];
    for (let j = 1; j <= b.length; j += 1) {
      const change = (last[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1);
      let best = Math.min(change, (last[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1);
      if (a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1] && j > 1 && i > 1)
        best = Math.min(best, (before[j - 2] ?? 0) + 1);
      row.push(best);
    }
    [before, last] = [last, row];
  }
  return last[b.length] ?? most + 1;
}
