import { RunFault } from "../types";

/** Element `position` (from 1) of the first `n` values. Throws `RunFault` `out-of-range`. */
export function elementAt(list: Float64Array, n: number, position: number): number {
  const value = Number.isInteger(position) && position >= 1 && position <= n ? list[position - 1] : undefined;
  if (value === undefined) {
    const message = Number.isInteger(position)
      ? `Element ${position} was asked of a list of ${n}. The elements are counted from 1 to ${n}.`
      : `The place ${position} was asked of a list. It must be a whole number from 1 to ${n}.`;
    throw new RunFault("out-of-range", message, {}, { position, length: n });
  }
  return value;
}

/** Refuses the first or last element of a list without elements. */
export function requireElements(n: number): void {
  if (n < 1) {
    throw new RunFault(
      "out-of-range",
      "The first or last element of an empty list was asked. Give the table at least one row.",
      {},
      { length: n },
    );
  }
}

/**
 * Value at `x` on the straight lines through (xs[i], ys[i]), first `n` points; xs must rise. Throws `RunFault`
 * `out-of-range` outside the points: there is no extrapolation. Not a number answers not a number.
 */
export function interpolateLinear(x: number, xs: Float64Array, ys: Float64Array, n: number): number {
  if (x !== x) return x;
  for (let i = 1; i < n; i++) {
    if (!(xs[i]! > xs[i - 1]!)) {
      throw new RunFault(
        "out-of-range",
        `The points of interpolate must rise: point ${i + 1} (${xs[i]}) does not lie above point ${i} (${xs[i - 1]}).`,
        {},
        { point: i + 1 },
      );
    }
  }
  const first = xs[0];
  const last = xs[n - 1];
  if (n < 1 || first === undefined || last === undefined || x < first || x > last) {
    throw new RunFault(
      "out-of-range",
      n < 1
        ? "interpolate was given no points."
        : `interpolate was asked at ${x}, outside its points from ${first} to ${last} (SI).`,
      {},
      n < 1 ? { at: x } : { at: x, from: first!, to: last! },
    );
  }
  let low = 0;
  let high = n - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (xs[middle]! <= x) low = middle;
    else high = middle;
  }
  if (low === high || x === xs[low]) return ys[low]!;
  if (x === xs[high]) return ys[high]!;
  return ys[low]! + ((x - xs[low]!) / (xs[high]! - xs[low]!)) * (ys[high]! - ys[low]!);
}

/** Refuses to combine lists of different lengths element by element. */
export function sameLength(left: number, right: number): void {
  if (left !== right) {
    throw new RunFault(
      "out-of-range",
      `Lists of ${left} and ${right} elements cannot be combined element by element. Give both tables equally many rows.`,
      {},
      { left, right },
    );
  }
}

/** Refuses a list that would have fewer than no elements (a first or last one dropped from an empty list). */
export function requireLength(n: number): void {
  if (n < 0) {
    throw new RunFault("out-of-range", "An element is dropped from a list that has none.", {}, { length: n });
  }
}

/** The frame's own list of exactly `n` values for line `index`, made anew only when the length has changed. */
export function room(values: (number | Float64Array)[], index: number, n: number): Float64Array {
  const present = values[index];
  if (present instanceof Float64Array && present.length === n) return present;
  requireLength(n);
  const made = new Float64Array(n);
  values[index] = made;
  return made;
}
