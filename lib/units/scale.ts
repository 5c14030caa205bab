import type { ScaleKind, Unit } from "./types";

/**
 * 1/1000 is no double, so a thousandth is divided by 1000 instead: 35 mm are then the double nearest to 0.035 m and
 * come back as 35.
 */
function wholeInverse(factor: number): number | null {
  const inverse = 1 / factor;
  return factor < 1 && Number.isInteger(inverse) ? inverse : null;
}

/** Value in coherent SI. A difference leaves the unit's zero aside: 5 °C is 278.15 K as `absolute`, 5 K as `difference`. */
export function toSi(value: number, unit: Unit, kind: ScaleKind): number {
  const steps = kind === "difference" ? value : value + unit.shift;
  const inverse = wholeInverse(unit.factor);
  return inverse === null ? steps * unit.factor : steps / inverse;
}

/** Value in `unit` of a coherent SI number; the inverse of `toSi`. */
export function fromSi(si: number, unit: Unit, kind: ScaleKind): number {
  const inverse = wholeInverse(unit.factor);
  const steps = inverse === null ? si / unit.factor : si * inverse;
  return kind === "difference" ? steps : steps - unit.shift;
}
