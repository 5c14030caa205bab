/** Round numbers that span a range: steps of 1, 2, 2.5 or 5 times a power of ten, at most about `count` of them. */
export function niceTicks(low: number, high: number, count: number): number[] {
  const magnitude = Math.max(Math.abs(low), Math.abs(high));
  const room = magnitude > 1e-300 ? magnitude : 1;
  // A range that only rounding has opened is one of no width.
  const span = high - low > 1e-9 * room ? high - low : room;
  const raw = span / Math.max(1, count - 1);
  const power = 10 ** Math.floor(Math.log10(raw));
  const step = ([1, 2, 2.5, 5, 10].find((factor) => factor * power >= raw * 0.999) ?? 10) * power;
  const first = Math.floor(low / step + 1e-9);
  const last = Math.max(Math.ceil(high / step - 1e-9), first + 1);
  return Array.from({ length: last - first + 1 }, (_, index) => (first + index) * step);
}
