import type { ScaleKind, Unit } from "./types";

/**
 * 1/1000 is no double and neither is 0.0254, so a value is multiplied by a whole number and divided by another where a
 * factor is such a fraction: 35 mm are then the double nearest to 0.035 m, 3 in the one nearest to 0.0762 m, and both
 * come back as they were typed.
 */
interface Fraction {
  readonly n: number;
  readonly d: number;
}

function fractionOf(factor: number): Fraction | null {
  if (factor >= 1) return null;
  const inverse = Math.round(1 / factor);
  if (Math.abs(inverse * factor - 1) < 1e-15) return { n: 1, d: inverse };
  for (let d = 1e3; d <= 1e9; d *= 10) {
    const n = Math.round(factor * d);
    if (n >= 1 && Math.abs(n - factor * d) < 1e-12 * n) return { n, d };
  }
  return null;
}

/** A temperature is counted in hundredths, in which its zero is whole: 302 °F are 423.15 K to the last digit, as 150 °C are. */
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
  const fraction = fractionOf(unit.factor);
  return fraction === null ? steps * unit.factor : (steps * fraction.n) / fraction.d;
}

/** Value in `unit` of a coherent SI number; the inverse of `toSi`. */
export function fromSi(si: number, unit: Unit, kind: ScaleKind): number {
  const zero = unit.factor === 1 ? null : zeroOf(unit, kind);
  if (zero) return (si * zero.perSi - zero.hundredths) / 100;
  const fraction = fractionOf(unit.factor);
  const steps = fraction === null ? si / unit.factor : (si * fraction.d) / fraction.n;
  return kind === "difference" ? steps : steps - unit.shift;
}
