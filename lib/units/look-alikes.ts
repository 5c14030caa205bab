/** Signs that look the same to an engineer and not to a computer. */
const alike: ReadonlyMap<string, string> = new Map([
  ["\u03bc", "µ"], // Greek small mu
  ["\u2126", "Ω"], // ohm sign
  ["\u212a", "K"], // kelvin sign
  ["\u212b", "Å"], // ångström sign
  ["\u00ba", "°"], // masculine ordinal
  ["\u02da", "°"], // ring above
  ["\u2206", "Δ"], // increment
  ["\u03f5", "ε"],
  ["\u2103", "°C"],
  ["\u2109", "°F"],
  ["₂", "2"], // inH₂O
]);

/** The word in the catalogue's own characters. */
export function plainWord(word: string): string {
  let plain = "";
  for (const character of word.normalize("NFC")) plain += alike.get(character) ?? character;
  return plain;
}
