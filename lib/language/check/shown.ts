import { isDimensionless, quantityByName, siUnitSymbol, type Quantity } from "@/lib/units";
import type { NumberType, ResultSource } from "../types";
import { quantityOf } from "./words";

/** Name and unit in which a line is shown: those declared of a result, else the catalogue's preferred ones. */
export function shownIn(
  type: NumberType | null,
  results: readonly ResultSource[],
  symbol: string,
): { readonly quantity: Quantity | null; readonly unit: string | null } {
  if (!type) return { quantity: null, unit: null };
  const result = results.find((each) => each.symbol === symbol);
  if (result) return { quantity: quantityByName(result.quantity) ?? null, unit: result.unit };
  const quantity = quantityOf(type);
  if (quantity) return { quantity, unit: quantity.unit };
  return { quantity: null, unit: isDimensionless(type.dimension) ? "1" : siUnitSymbol(type.dimension) };
}
