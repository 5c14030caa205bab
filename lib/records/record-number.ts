/** Numbers as people write them: R-000001. */
export function recordName(number: number): string {
  return `R-${String(number).padStart(6, "0")}`;
}

/** The number in a name that has the pattern of one. */
export function recordNumber(name: string): number {
  return Number(name.slice(2));
}
