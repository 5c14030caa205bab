import {
  addRational,
  isTemperature,
  multiplyRational,
  rational,
  type Dimension,
  type Rational,
} from "@/lib/units";
import type { NumberType, TemperatureReading } from "../types";

/**
 * The weight of temperatures: 1 absolute, 0 difference. Sums add weights, factors built of literals multiply them, and
 * what is finished must weigh 0 or 1. `none` marks what came from an absolute temperature by a product or a power and
 * has no reading; powers of temperature (T⁴) keep the mark, so that their roots have it as well.
 */

const zeroWeight: Rational = rational(0);
export const plain: TemperatureReading = { weight: zeroWeight };
export const absolute: TemperatureReading = { weight: rational(1) };

/** Exponent of temperature where the dimension has no other part, else null. 0 for a bare number. */
function temperatureExponent(dimension: Dimension): Rational | null {
  let found: Rational | null = zeroWeight;
  dimension.forEach((exponent, base) => {
    if (exponent.n === 0) return;
    found = base === temperatureBase && found !== null ? exponent : null;
  });
  return found;
}

/** Place of temperature among the base quantities. */
const temperatureBase = 3;

export function exponentOfTemperature(dimension: Dimension): Rational {
  return dimension[temperatureBase] ?? zeroWeight;
}

/** A power of temperature and nothing else: K, K², 1/K. */
export function isPowerOfTemperature(dimension: Dimension): boolean {
  const exponent = temperatureExponent(dimension);
  return exponent !== null && exponent.n !== 0;
}

export function isAbsolute(type: NumberType): boolean {
  return type.temperature !== "none" && type.temperature.weight.n === 1 && type.temperature.weight.d === 1;
}

export function isDifference(type: NumberType): boolean {
  return type.temperature !== "none" && type.temperature.weight.n === 0;
}

export function isFinished(type: NumberType): boolean {
  return type.temperature === "none" || isAbsolute(type) || isDifference(type);
}

/** An absolute temperature is in it: weighed, or marked as a product or power of one. */
export function holdsAbsolute(type: NumberType): boolean {
  return type.temperature === "none" || type.temperature.weight.n !== 0;
}

export function sameReading(a: TemperatureReading, b: TemperatureReading): boolean {
  if (a === "none" || b === "none") return a === b;
  return a.weight.n === b.weight.n && a.weight.d === b.weight.d;
}

/** Reading of a sum; null where one has none and both are temperatures. */
export function addReadings(a: NumberType, b: NumberType): TemperatureReading | null {
  if (a.temperature === "none" || b.temperature === "none") return isTemperature(a.dimension) ? null : "none";
  return exactly(() => addRational(weightOf(a), weightOf(b)));
}

/** Reading of a value times a factor built of literals only. */
export function scaleReading(reading: TemperatureReading, factor: Rational): TemperatureReading {
  return reading === "none" ? reading : exactly(() => multiplyRational(reading.weight, factor));
}

/** Reading of a product, quotient or power with this dimension. */
export function productReading(dimension: Dimension, operands: readonly NumberType[]): TemperatureReading {
  return isPowerOfTemperature(dimension) && operands.some(holdsAbsolute) ? "none" : plain;
}

function weightOf(type: NumberType): Rational {
  return type.temperature === "none" ? zeroWeight : type.temperature.weight;
}

/** Fractions that whole doubles cannot hold leave the value without a reading. */
function exactly(weight: () => Rational): TemperatureReading {
  try {
    return { weight: weight() };
  } catch (error) {
    if (error instanceof RangeError) return "none";
    throw error;
  }
}

/** Exact arithmetic that answers null where fractions grow beyond what can be held. */
export function exactOrNull<T>(compute: () => T): T | null {
  try {
    return compute();
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}
