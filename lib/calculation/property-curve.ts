import type { PropertyName } from "@/lib/language";
import { fromSi, parseUnit, quantityByName } from "@/lib/units";
import { compileMaterial } from "./compiled-material";
import type { Material } from "./material";
import { propertyQuantities } from "./property-quantity";

interface PropertyPoint {
  /** In the property's `argumentUnit`. */
  readonly argument: number;
  /** In the property's `unit`. */
  readonly value: number;
}

export interface PropertyCurve {
  /** Ascending, over the valid range; gaps between pieces hold no points. */
  readonly points: PropertyPoint[];
  /** Valid range in the property's `argumentUnit`. */
  readonly min: number;
  readonly max: number;
}

/** Temperatures over a range in kelvin: evenly, and where it spans decades also by equal ratios. */
function temperaturesOver(min: number, max: number, points: number): number[] {
  const count = Math.max(2, Math.round(points));
  const steps = Array.from({ length: count }, (_, i) => i / (count - 1));
  const even = steps.map((share) => min + share * (max - min));
  const ratios = min > 0 && max / min > 10 ? steps.map((share) => min * (max / min) ** share) : [];
  return [...even, ...ratios];
}

/**
 * Points of a property over its valid range, for a plot; the ends of every piece are among them. About `points` of
 * them. Throws `CodedError` for a material that cannot be compiled, `RangeError` for a property that it lacks.
 */
export function propertyCurve(material: Material, name: PropertyName, points: number): PropertyCurve {
  const property = compileMaterial(material, "material", 1).properties[name];
  const declared = material.properties[name];
  if (!property || !declared) throw new RangeError(`${material.name} has no ${propertyQuantities[name]}.`);
  const temperature = quantityByName("temperature");
  const argument = parseUnit(property.argumentUnit, temperature ? { expect: temperature } : {});
  const unit = parseUnit(property.unit);
  if (!argument.ok || !unit.ok) throw new RangeError(`${material.name} has units that cannot be read.`);

  const kelvins = new Set(temperaturesOver(property.min, property.max, points));
  for (const piece of property.pieces) kelvins.add(piece.min).add(piece.max);
  const shown = [...kelvins]
    .filter((kelvin) => property.validity(kelvin) === "inside")
    .sort((a, b) => a - b)
    .map((kelvin) => ({
      argument: fromSi(kelvin, argument.value, "absolute"),
      value: fromSi(property.value(kelvin, false), unit.value, "plain"),
    }))
    .filter(({ value }) => Number.isFinite(value));
  return {
    points: shown,
    min: fromSi(property.min, argument.value, "absolute"),
    max: fromSi(property.max, argument.value, "absolute"),
  };
}
