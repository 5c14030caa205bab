/** SI prefixes (SI Brochure, 9th edition with the 2022 additions): sign, signs read besides, word, power of ten, UCUM. */
export const prefixes = [
  { symbol: "Q", signs: [], name: "quetta", exponent: 30, ucum: "Q" },
  { symbol: "R", signs: [], name: "ronna", exponent: 27, ucum: "R" },
  { symbol: "Y", signs: [], name: "yotta", exponent: 24, ucum: "Y" },
  { symbol: "Z", signs: [], name: "zetta", exponent: 21, ucum: "Z" },
  { symbol: "E", signs: [], name: "exa", exponent: 18, ucum: "E" },
  { symbol: "P", signs: [], name: "peta", exponent: 15, ucum: "P" },
  { symbol: "T", signs: [], name: "tera", exponent: 12, ucum: "T" },
  { symbol: "G", signs: [], name: "giga", exponent: 9, ucum: "G" },
  { symbol: "M", signs: [], name: "mega", exponent: 6, ucum: "M" },
  { symbol: "k", signs: [], name: "kilo", exponent: 3, ucum: "k" },
  { symbol: "h", signs: [], name: "hecto", exponent: 2, ucum: "h" },
  { symbol: "da", signs: [], name: "deca", exponent: 1, ucum: "da" },
  { symbol: "d", signs: [], name: "deci", exponent: -1, ucum: "d" },
  { symbol: "c", signs: [], name: "centi", exponent: -2, ucum: "c" },
  { symbol: "m", signs: [], name: "milli", exponent: -3, ucum: "m" },
  { symbol: "µ", signs: ["u"], name: "micro", exponent: -6, ucum: "u" },
  { symbol: "n", signs: [], name: "nano", exponent: -9, ucum: "n" },
  { symbol: "p", signs: [], name: "pico", exponent: -12, ucum: "p" },
  { symbol: "f", signs: [], name: "femto", exponent: -15, ucum: "f" },
  { symbol: "a", signs: [], name: "atto", exponent: -18, ucum: "a" },
  { symbol: "z", signs: [], name: "zepto", exponent: -21, ucum: "z" },
  { symbol: "y", signs: [], name: "yocto", exponent: -24, ucum: "y" },
  { symbol: "r", signs: [], name: "ronto", exponent: -27, ucum: "r" },
  { symbol: "q", signs: [], name: "quecto", exponent: -30, ucum: "q" },
] as const;

export type PrefixSymbol = (typeof prefixes)[number]["symbol"];
export interface Prefix {
  readonly symbol: PrefixSymbol;
  readonly signs: readonly string[];
  readonly name: string;
  readonly exponent: number;
  readonly ucum: string;
}

/** What a unit's row allows. Only prefixes that its users write, so that no sign can be read in two ways. */
export const none: readonly PrefixSymbol[] = [];
export const milli: readonly PrefixSymbol[] = ["m"];
export const kiloMega: readonly PrefixSymbol[] = ["k", "M"];
export const upward: readonly PrefixSymbol[] = ["k", "M", "G", "T"];
export const downward: readonly PrefixSymbol[] = ["m", "µ", "n", "p", "f"];
export const micro: readonly PrefixSymbol[] = ["m", "µ"];
export const wide: readonly PrefixSymbol[] = ["E", "P", "T", "G", "M", "k", "m", "µ", "n", "p", "f", "a"];
export const metric: readonly PrefixSymbol[] = [...wide, "h", "da", "d", "c"];
