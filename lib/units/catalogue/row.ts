import { dimension } from "../dimension";
import { exact, type Exact } from "../exact";
import type { BaseQuantity, Dimension } from "../types";
import type { PrefixSymbol } from "./prefixes";

/** One unit of the catalogue. SI value = (value + shift) · factor. */
export interface UnitRow {
  /** As we print it. */
  readonly symbol: string;
  /** Other signs for it, read only. Like the symbol they take the prefix signs. */
  readonly signs: readonly string[];
  /** English words, plurals included; they take prefix words (`kilowatt`). */
  readonly names: readonly string[];
  readonly dimension: Dimension;
  readonly factor: Exact;
  readonly shift: number;
  readonly prefixes: readonly PrefixSymbol[];
  /** UCUM code, may be an expression such as `W.h`; null where UCUM has none of exactly this size. */
  readonly ucum: string | null;
  /** Further UCUM codes of exactly this size, read only. */
  readonly codes: readonly string[];
  /** Where the definition stands. */
  readonly source: string;
  /** Said at each echo, where the same text means something else elsewhere. */
  readonly notice?: string;
  readonly differenceOnly?: true;
  /** A scale with a zero of its own that has no meaning inside a product (gauge pressure). */
  readonly alone?: true;
}

type Extras = Partial<Pick<UnitRow, "notice" | "shift" | "codes" | "differenceOnly" | "alone">>;

/**
 * symbol, other signs (blank-separated), names (singular, blank-separated), exact definition in coherent SI units,
 * prefixes allowed (blank-separated), UCUM code, source, extras.
 */
export type RowText = readonly [
  symbol: string,
  signs: string,
  names: string,
  definition: string,
  prefixes: readonly PrefixSymbol[],
  ucum: string | null,
  source: string,
  extras?: Extras,
];

const words = (text: string): string[] => (text === "" ? [] : text.split(" "));
const plural = (name: string): string => (/(?:s|x|z|ch|sh)$/.test(name) ? `${name}es` : `${name}s`);

/** Rows of one dimension. */
export function unitRows(
  exponents: Partial<Record<BaseQuantity, number>>,
  rows: readonly RowText[],
): readonly UnitRow[] {
  const common = dimension(exponents);
  return rows.map(([symbol, signs, names, definition, prefixes, ucum, source, extras]) => ({
    symbol,
    signs: words(signs),
    names: words(names).flatMap((name) => [name, plural(name)]),
    dimension: common,
    factor: exact(definition),
    shift: 0,
    prefixes,
    ucum,
    codes: [],
    source,
    ...extras,
  }));
}
