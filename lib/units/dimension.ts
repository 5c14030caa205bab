import {
  addRational,
  multiplyRational,
  negateRational,
  one,
  rational,
  rationalText,
  sameRational,
  zero,
} from "./rational";
import { baseQuantities, type BaseQuantity, type Dimension, type Rational } from "./types";

export const dimensionless: Dimension = baseQuantities.map(() => zero);

/** From whole or fractional exponents: `dimension({ length: 1, time: -1 })`. */
export function dimension(exponents: Partial<Record<BaseQuantity, number | Rational>>): Dimension {
  return baseQuantities.map((base) => {
    const exponent = exponents[base] ?? zero;
    return typeof exponent === "number" ? rational(exponent) : exponent;
  });
}

export function multiply(a: Dimension, b: Dimension): Dimension {
  return a.map((exponent, i) => addRational(exponent, b[i] ?? zero));
}

export function divide(a: Dimension, b: Dimension): Dimension {
  return a.map((exponent, i) => addRational(exponent, negateRational(b[i] ?? zero)));
}

export function power(a: Dimension, exponent: Rational): Dimension {
  return sameRational(exponent, one) ? a : a.map((each) => multiplyRational(each, exponent));
}

export function sameDimension(a: Dimension, b: Dimension): boolean {
  return a.every((exponent, i) => sameRational(exponent, b[i] ?? zero));
}

export function isDimensionless(a: Dimension): boolean {
  return a.every((exponent) => exponent.n === 0);
}

/** One text per dimension, for maps: `1,0,-1,0,0,0,0,0`. */
export function dimensionKey(a: Dimension): string {
  return a.map(rationalText).join(",");
}

const temperatureDimension = dimension({ temperature: 1 });

/** Is it temperature itself (the one dimension with an absolute and a difference reading)? */
export function isTemperature(a: Dimension): boolean {
  return sameDimension(a, temperatureDimension);
}
