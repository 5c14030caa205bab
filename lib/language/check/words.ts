import {
  isDimensionless,
  isTemperature,
  quantityForDimension,
  siUnitSymbol,
  type Dimension,
  type Quantity,
} from "@/lib/units";
import type { ListLength, NumberType } from "../types";
import { isAbsolute, isDifference } from "./reading";

/** Words for types, as an engineer would say them. */

/** `heat flux (W/m²)`, `temperature difference (K)`, `a bare number`. */
export function describe(type: NumberType): string {
  const single = describeElement(type);
  return type.length ? `a list of ${single}` : single;
}

function describeElement(type: NumberType): string {
  if (isDimensionless(type.dimension)) return "a bare number";
  if (isTemperature(type.dimension)) {
    if (isAbsolute(type)) return "temperature (K)";
    if (isDifference(type)) return "temperature difference (K)";
    return type.temperature === "none"
      ? "a product of temperatures (K)"
      : "an unfinished sum of temperatures (K)";
  }
  return describeDimension(type.dimension);
}

export function describeDimension(dimension: Dimension): string {
  const unit = siUnitSymbol(dimension);
  const quantity = quantityForDimension(dimension, "plain");
  return quantity ? `${quantity.name} (${unit})` : `a quantity in ${unit}`;
}

/** The catalogue's name for what a type is, where it has one. */
export function quantityOf(type: NumberType): Quantity | null {
  if (!isTemperature(type.dimension)) return quantityForDimension(type.dimension, "plain") ?? null;
  if (isAbsolute(type)) return quantityForDimension(type.dimension, "absolute") ?? null;
  return isDifference(type) ? (quantityForDimension(type.dimension, "difference") ?? null) : null;
}

/** `one number`, `as many as layers has rows`, `layers + 1 numbers`. */
export function describeLength(length: ListLength | null): string {
  if (!length) return "one number";
  if (length.table === null) return `${length.plus} numbers`;
  if (length.plus === 0) return `one for each row of ${length.table}`;
  return `${length.table} ${length.plus > 0 ? "+" : "−"} ${Math.abs(length.plus)} numbers`;
}
