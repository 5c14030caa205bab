import { nearlyEqual } from "@/lib/language/runtime/comparison";
import { parseUnit, type Quantity, quantityByName, toSi, type Unit } from "@/lib/units";
import { amountText } from "./amount-text";
import type { NumberColumn, NumberInput } from "./definition";
import type { z } from "zod";

export type NumberDeclaration = NumberInput | z.infer<typeof NumberColumn>;

/** A declared number with its unit read and its bounds in SI. */
export interface DeclaredNumber {
  readonly declaration: NumberDeclaration;
  readonly label: string;
  readonly quantity: Quantity;
  readonly unit: Unit;
  /** Declared default in SI, NaN without one. */
  readonly defaultSi: number;
  /** Strictly between these a value is within its bounds and usual range, with no further look. */
  readonly clearAbove: number;
  readonly clearBelow: number;
}

/** Values nearer to a bound than this count as on it, so only clearly inside is passed without a closer look. */
const margin = 2e-9;

/** null when quantity or unit cannot be read or do not fit; the check of the definition tells why. */
export function declaredNumber(declaration: NumberDeclaration): DeclaredNumber | null {
  const quantity = quantityByName(declaration.quantity);
  const reading = quantity && parseUnit(declaration.unit, { expect: quantity });
  if (!quantity || !reading?.ok) return null;
  const unit = reading.value;
  const si = (value: number | undefined): number =>
    value === undefined ? NaN : toSi(value, unit, quantity.kind);
  const inside = (values: (number | undefined)[], sign: 1 | -1, none: number): number =>
    values.reduce<number>((edge, value) => {
      const bound = si(value);
      if (Number.isNaN(bound)) return edge;
      const moved = bound + sign * margin * Math.abs(bound);
      return sign > 0 ? Math.max(edge, moved) : Math.min(edge, moved);
    }, none);
  const { min, max, above, below, usualMin, usualMax } = declaration;
  return {
    declaration,
    label: declaration.label,
    quantity,
    unit,
    defaultSi: si(declaration.default),
    clearAbove: inside([min, above, usualMin], 1, quantity.kind === "absolute" ? 0 : -Infinity),
    clearBelow: inside([max, below, usualMax], -1, Infinity),
  };
}

/** A bound in words; a zero needs no unit unless zero is a place on a scale. */
function boundText(value: number, { unit, quantity }: DeclaredNumber): string {
  return value === 0 && quantity.kind !== "absolute" && unit.shift === 0
    ? "0"
    : amountText(value, unit.symbol);
}

/** What a value must be, in words and as the bound that is broken. */
export interface BrokenBound {
  readonly expected: string;
  readonly limit: number;
}

/** Every bound in words: "greater than 0 and at most 10 mm". */
export function boundsText(number: DeclaredNumber): string {
  const { min, max, above, below } = number.declaration;
  const parts: string[] = [];
  if (above !== undefined) parts.push(`greater than ${boundText(above, number)}`);
  if (min !== undefined) parts.push(`at least ${boundText(min, number)}`);
  if (below !== undefined) parts.push(`less than ${boundText(below, number)}`);
  if (max !== undefined) parts.push(`at most ${boundText(max, number)}`);
  return parts.join(" and ");
}

/**
 * The bound that a value (SI) breaks, or null. Values within 1e-9 of a bound count as equal to it: `min` and `max`
 * then hold, `above` and `below` do not.
 */
export function brokenBound(number: DeclaredNumber, si: number): BrokenBound | null {
  const { declaration, unit, quantity } = number;
  const broken = (bound: number | undefined, holds: (bound: number) => boolean): number | null =>
    bound !== undefined && !holds(toSi(bound, unit, quantity.kind)) ? bound : null;
  const limit =
    broken(declaration.above, (bound) => si > bound && !nearlyEqual(si, bound)) ??
    broken(declaration.min, (bound) => si > bound || nearlyEqual(si, bound)) ??
    broken(declaration.below, (bound) => si < bound && !nearlyEqual(si, bound)) ??
    broken(declaration.max, (bound) => si < bound || nearlyEqual(si, bound));
  return limit === null ? null : { expected: boundsText(number), limit };
}

/** The usual range in words when a value (SI) lies outside it, else null. */
export function outsideUsual(number: DeclaredNumber, si: number): string | null {
  const { declaration, unit, quantity } = number;
  const { usualMin, usualMax } = declaration;
  const low = usualMin === undefined ? -Infinity : toSi(usualMin, unit, quantity.kind);
  const high = usualMax === undefined ? Infinity : toSi(usualMax, unit, quantity.kind);
  if ((si >= low && si <= high) || nearlyEqual(si, low) || nearlyEqual(si, high)) return null;
  if (usualMin === undefined) return `at most ${boundText(usualMax ?? 0, number)}`;
  if (usualMax === undefined) return `at least ${boundText(usualMin, number)}`;
  return `between ${boundText(usualMin, number)} and ${boundText(usualMax, number)}`;
}

/** Below this (kelvin) a temperature is below absolute zero, not merely rounded. */
export const absoluteZeroTolerance = -1e-9;

/** Absolute zero in a unit, in words. */
export function absoluteZeroText(unit: Unit): string {
  return amountText(0 - unit.shift, unit.symbol);
}
