/** The known name that is most like a mistyped one, or null when none is near. */
export function nearest(name: string, known: readonly string[]): string | null {
  const allowed = name.length < 3 ? 1 : name.length < 7 ? 2 : 3;
  const folded = name.toLowerCase();
  let best: string | null = null;
  let least = allowed + 1;
  for (const candidate of known) {
    if (Math.abs(candidate.length - name.length) > allowed) continue;
    const distance = candidate.toLowerCase() === folded ? 0 : editDistance(name, candidate);
    // A name of one or two letters is near to every other one: there only the case may differ.
    if (distance < least && (distance === 0 || distance < Math.min(name.length, candidate.length))) {
      best = candidate;
      least = distance;
    }
  }
  return best;
}

/** Levenshtein distance. */
function editDistance(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, i) => i);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++)
      next.push(
        Math.min(
          (row[j] ?? 0) + 1,
          (next[j - 1] ?? 0) + 1,
          (row[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1),
        ),
      );
    row = next;
  }
  return row[b.length] ?? 0;
}
