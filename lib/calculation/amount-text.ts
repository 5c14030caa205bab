import { formatExact, formatSignificant } from "@/lib/units";

/** A number as it was typed or declared, with a real minus. */
function plainNumber(value: number): string {
  return formatExact(value).replaceAll("-", "−");
}

function withUnit(number: string, unit: string): string {
  if (unit === "1") return number;
  return unit === "°" ? `${number}°` : `${number} ${unit}`;
}

/** A typed or declared value with its unit: `60 °C`, `0 mm`, `0.8`. */
export function amountText(value: number, unit: string): string {
  return withUnit(plainNumber(value), unit);
}

/** A calculated value with its unit, to significant digits: `61.34 °C`. */
export function resultText(value: number, unit: string, digits: number): string {
  return withUnit(formatSignificant(value, digits), unit);
}

/** A list of calculated values with its unit, shortened in the middle: `1100, 840.2, … 74.10 °C`. */
export function resultListText(values: ArrayLike<number>, unit: string, digits: number): string {
  const shown = Array.from(values, (value) => formatSignificant(value, digits));
  const numbers = shown.length > 8 ? [...shown.slice(0, 4), "…", ...shown.slice(-3)] : shown;
  return withUnit(numbers.join(", "), unit);
}
