/** Arithmetic mean, corrected by the mean of the deviations from it. Throws RangeError on no values. */
export function mean(values: ArrayLike<number>): number {
  if (values.length === 0) throw new RangeError("A mean needs at least one value.");
  let sum = 0;
  for (let i = 0; i < values.length; i += 1) sum += values[i]!;
  const rough = sum / values.length;
  // An infinite value or an overflow has no deviations to correct by.
  if (!Number.isFinite(rough)) return rough;
  let rest = 0;
  for (let i = 0; i < values.length; i += 1) rest += values[i]! - rough;
  return rough + rest / values.length;
}

/**
 * Standard deviation of a sample, √(Σ(x − mean)²/(n − 1)), in two passes so that a large mean costs no digits (T. F. Chan,
 * G. H. Golub and R. J. LeVeque, Amer. Statist. 37 (1983) 242). Throws RangeError on fewer than two values.
 */
export function standardDeviation(values: ArrayLike<number>): number {
  if (values.length < 2) throw new RangeError("A standard deviation needs at least two values.");
  const centre = mean(values);
  let squares = 0;
  for (let i = 0; i < values.length; i += 1) squares += (values[i]! - centre) ** 2;
  return Math.sqrt(squares / (values.length - 1));
}

/**
 * Quantile p of values in rising order, 0 ≤ p ≤ 1, linear between them: definition 7 of R. J. Hyndman and Y. Fan, Amer.
 * Statist. 50 (1996) 361. Throws RangeError on no values or another p.
 */
export function quantile(sorted: ArrayLike<number>, p: number): number {
  if (sorted.length === 0) throw new RangeError("A quantile needs at least one value.");
  if (!(p >= 0 && p <= 1))
    throw new RangeError(`The probability of a quantile is ${p}. It must lie from 0 to 1.`);
  const place = p * (sorted.length - 1);
  const below = Math.floor(place);
  const low = sorted[below]!;
  const high = sorted[Math.min(below + 1, sorted.length - 1)]!;
  return low === high ? low : low + (place - below) * (high - low);
}
