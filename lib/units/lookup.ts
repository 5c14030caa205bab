import { units } from "./catalogue";
import { prefixes, type Prefix } from "./catalogue/prefixes";
import type { UnitRow } from "./catalogue/row";

/** A word of the catalogue: a unit, perhaps with a prefix. */
export interface Entry {
  readonly row: UnitRow;
  readonly prefix: Prefix | null;
}

const bySign = new Map<string, UnitRow>();
const byName = new Map<string, UnitRow>();
const byCode = new Map<string, UnitRow>();
/** Codes that take a prefix: `cal` alone is the trade's row, with prefix the thermochemical one that UCUM means. */
const metricByCode = new Map<string, UnitRow>();
for (const row of units) {
  for (const sign of [row.symbol, ...row.signs]) bySign.set(sign, row);
  for (const name of row.names) byName.set(name, row);
  if (row.ucum !== null) byCode.set(row.ucum, row);
  for (const code of row.codes) if (!byCode.has(code)) byCode.set(code, row);
  if (row.prefixes.length > 0 && row.ucum !== null)
    for (const code of [row.ucum, ...row.codes]) metricByCode.set(code, row);
}

const allPrefixes: readonly Prefix[] = prefixes;

function prefixed(
  word: string,
  spellings: (prefix: Prefix) => readonly string[],
  table: ReadonlyMap<string, UnitRow>,
): Entry | null {
  for (const prefix of allPrefixes) {
    for (const spelling of spellings(prefix)) {
      if (!word.startsWith(spelling)) continue;
      const row = table.get(word.slice(spelling.length));
      if (row?.prefixes.includes(prefix.symbol)) return { row, prefix };
    }
  }
  return null;
}

const signsOf = (prefix: Prefix): readonly string[] => [prefix.symbol, ...prefix.signs];
const nameOf = (prefix: Prefix): readonly string[] => [prefix.name];
const codeOf = (prefix: Prefix): readonly string[] => [prefix.ucum];

/** The unit that engineers mean by this word, or null. Case counts. */
export function lookup(word: string): Entry | null {
  const row = bySign.get(word) ?? byName.get(word);
  if (row) return { row, prefix: null };
  return prefixed(word, signsOf, bySign) ?? prefixed(word, nameOf, byName);
}

/** The unit of a UCUM atom with or without prefix, or null. */
export function lookupCode(code: string): Entry | null {
  const row = byCode.get(code);
  return row ? { row, prefix: null } : prefixed(code, codeOf, metricByCode);
}

/** Every word read without a prefix, for completion and for suggestions. */
export const plainWords: readonly string[] = [...bySign.keys(), ...byName.keys()];

export function entrySymbol(entry: Entry): string {
  return (entry.prefix?.symbol ?? "") + entry.row.symbol;
}

export function entryCode(entry: Entry): string | null {
  return entry.row.ucum === null ? null : (entry.prefix?.ucum ?? "") + entry.row.ucum;
}
