/** Edits (insert, delete, replace, swap of neighbours) between two short texts; stops counting above `most`. */
function editDistance(a: string, b: string, most: number): number {
  if (Math.abs(a.length - b.length) > most) return most + 1;
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const replace = (last[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1);
      let best = Math.min(replace, (last[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) {
        best = Math.min(best, (beforeLast[j - 2] ?? 0) + 1);
      }
      row.push(best);
    }
    beforeLast = last;
    last = row;
  }
  return last[b.length] ?? 0;
}

/** The known name that was most likely meant, or null when none is near. */
export function nearestName(name: string, known: Iterable<string>): string | null {
  const most = Math.max(1, Math.min(3, Math.floor(name.length / 2)));
  const wanted = name.toLowerCase().slice(0, 80);
  let best: string | null = null;
  let bestDistance = most + 1;
  for (const candidate of known) {
    const distance = editDistance(wanted, candidate.toLowerCase(), most);
    if (distance < bestDistance) {
      best = candidate;
      bestDistance = distance;
    }
  }
  return best;
}
