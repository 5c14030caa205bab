import type { ScaleKind, Unit } from "./types";

/** The whole number that a factor's inverse is, when it is one. */
function wholeInverse(factor: number): number | null {
  const inverse = Math.round(1 / factor);
  return factor < 1 && Math.abs(inverse * factor - 1) < 1e-15 ? inverse : null;
}

/**
 * 1/1000 is no double, so a thousandth is divided by 1000 instead: 35 mm are then the double nearest to 0.035 m and
 * come back as 35. Likewise a temperature is counted in hundredths, in which its zero is whole: 302 °F are 423.15 K to
 * the last digit, the same as 150 °C.
 */
interface Zero {
  readonly hundredths: number;
  /** Hundredths of the unit in one unit of SI. */
  readonly perSi: number;
}

function zeroOf(unit: Unit, kind: ScaleKind): Zero | null {
  if (kind === "difference" || unit.shift === 0) return null;
  const hundredths = Math.round(unit.shift * 100);
  const perSi = Math.round(100 / unit.factor);
  const whole = Math.abs(hundredths - unit.shift * 100) < 1e-6 && Math.abs(perSi * unit.factor - 100) < 1e-10;
  return whole ? { hundredths, perSi } : null;
}

/** Value in coherent SI. A difference leaves the unit's zero aside: 5 °C is 278.15 K as `absolute`, 5 K as `difference`. */
export function toSi(value: number, unit: Unit, kind: ScaleKind): number {
  const zero = zeroOf(unit, kind);
  if (zero) return (value * 100 + zero.hundredths) / zero.perSi;
  const steps = kind === "difference" ? value : value + unit.shift;
  const inverse = wholeInverse(unit.factor);
  return inverse === null ? steps * unit.factor : steps / inverse;
}

/** Value in `unit` of a coherent SI number; the inverse of `toSi`. */
export function fromSi(si: number, unit: Unit, kind: ScaleKind): number {
  const zero = unit.factor === 1 ? null : zeroOf(unit, kind);
  if (zero) return (si * zero.perSi - zero.hundredths) / 100;
  const inverse = wholeInverse(unit.factor);
  const steps = inverse === null ? si / unit.factor : si * inverse;
  return kind === "difference" ? steps : steps - unit.shift;
}
