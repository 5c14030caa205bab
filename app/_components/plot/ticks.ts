/** Round numbers that span a range: steps of 1, 2, 2.5 or 5 times a power of ten, at most about `count` of them. */
export function niceTicks(low: number, high: number, count: number): number[] {
  const span = high - low || Math.abs(high) || 1;
  const raw = span / Math.max(1, count - 1);
  const power = 10 ** Math.floor(Math.log10(raw));
  const step = ([1, 2, 2.5, 5, 10].find((factor) => factor * power >= raw * 0.999) ?? 10) * power;
  const first = Math.floor(low / step + 1e-9);
  const last = Math.max(Math.ceil(high / step - 1e-9), first + 1);
  return Array.from({ length: last - first + 1 }, (_, index) => (first + index) * step);
}
