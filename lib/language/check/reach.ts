import { multiply, power, rational, type Dimension } from "@/lib/units";
import { limits } from "../limits";
import type { Expression, NumberType } from "../types";
import type { Context } from "./context";
import { exactOrNull, productReading } from "./reading";
import { numberType } from "./value";

/** Dimensions of roots and products, as far as their exponents stay within the limit. */

/** Root of a dimension, for `sqrt` and `cbrt`. */
export function rootType(type: NumberType, degree: number): NumberType | null {
  if (type.literalZero) return type;
  const dimension = exactOrNull(() => power(type.dimension, rational(1, degree)));
  if (!dimension || !withinReach(dimension)) return null;
  return numberType(dimension, productReading(dimension, [type]), type.length);
}

/** Type of a product of two values without literals, for integrals. */
export function productOf(a: NumberType, b: NumberType): NumberType | null {
  const dimension = exactOrNull(() => multiply(a.dimension, b.dimension));
  if (!dimension || !withinReach(dimension)) return null;
  return numberType(dimension, productReading(dimension, [a, b]));
}

export function withinReach(dimension: Dimension): boolean {
  return dimension.every(({ n, d }) => Math.abs(n) <= limits.exponent && d <= limits.exponent);
}

export function beyondReach(expression: Expression, context: Context): null {
  return context.place.fault(
    expression.span,
    "dimension-limit",
    `${context.place.quote(expression.span)} has a dimension with an exponent above ${limits.exponent}. ` +
      `The limit is ${limits.exponent}.`,
  );
}
