/** Functions of the language that read or make lists, other than element by element. */

/** They move or pick elements and compute nothing, so their value needs no judgement of its own. */
const structural: ReadonlySet<string> = new Set([
  "first",
  "last",
  "at",
  "count",
  "prepend",
  "append",
  "drop_first",
  "drop_last",
  "reverse",
]);

export function isStructural(name: string): boolean {
  return structural.has(name);
}
