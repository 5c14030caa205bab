/** Words of a text for searching: small letters without accents, split at everything that is not a letter or digit. */
export function searchWords(text: string): string[] {
  return text
    .normalize("NFKD")
    .replace(/\p{Mark}/gu, "")
    .toLowerCase()
    .split(/[^\p{Letter}\p{Number}]+/u)
    .filter((word) => word !== "");
}

/** Whether every wanted word begins some word of the text. */
export function matchesWords(words: ReadonlySet<string>, wanted: readonly string[]): boolean {
  return wanted.every((start) => {
    if (words.has(start)) return true;
    for (const word of words) if (word.startsWith(start)) return true;
    return false;
  });
}
