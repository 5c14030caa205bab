import type { Entry } from "./lookup";

export const longestWord = 12;

/** Every way to cut a word into at most `most` units: `kgK` is kg and K, `hft` is h and ft. */
export function cuts(
  word: string,
  most: number,
  read: (piece: string) => readonly Entry[],
): (readonly Entry[])[] {
  if (word === "") return [[]];
  if (most === 0 || word.length > longestWord) return [];
  const found: (readonly Entry[])[] = [];
  for (let length = 1; length <= word.length; length += 1) {
    const rest = cuts(word.slice(length), most - 1, read);
    for (const entry of rest.length > 0 ? read(word.slice(0, length)) : [])
      for (const pieces of rest) found.push([entry, ...pieces]);
  }
  return found;
}
