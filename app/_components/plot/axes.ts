import { formatSignificant } from "@/lib/units";
import { niceTicks } from "./ticks";

/* What all plots share: axes with round numbers, units beside them, and a quiet box for the value under the pointer. */

export const plotMargin = { top: 22, right: 16, bottom: 22, left: 12 };

export const tooltipStyle = {
  background: "var(--sheet)",
  border: "1px solid var(--ink)",
  borderRadius: 2,
  fontSize: 12,
};

export function tickText(value: number): string {
  return formatSignificant(value, 3).replace(/\.0+(?=$|·)/, "");
}

/** Texts of one axis, all with the same decimals: 0.05, 0.10, 0.15. Beyond plain reading the power of ten takes over. */
export function tickTexts(ticks: readonly number[]): (value: number) => string {
  const largest = Math.max(0, ...ticks.map(Math.abs));
  const clean = (value: number) => (Math.abs(value) < 1e-9 * largest ? 0 : Number(value.toPrecision(6)));
  const plain = ticks
    .map(clean)
    .every((tick) => tick === 0 || (Math.abs(tick) >= 1e-4 && Math.abs(tick) < 1e5));
  const decimals = Math.max(0, ...ticks.map((tick) => String(clean(tick)).split(".")[1]?.length ?? 0));
  return (value) => (plain ? clean(value).toFixed(decimals).replace("-", "\u2212") : tickText(clean(value)));
}

const look = {
  stroke: "var(--muted)",
  tick: { fontSize: 12, fill: "var(--ink)", fontFamily: "var(--font-mono)" },
};
const caption = { fontSize: 12, fill: "var(--muted)" };

/** A quantity's name with its unit: "Thickness, mm". */
export function withUnit(text: string, unit: string): string {
  return unit === "" || unit === "1" ? text : `${text}, ${unit}`;
}

/** Axis along the bottom, from `low` to `high` exactly. */
export function argumentAxis(
  low: number,
  high: number,
  label: string,
  unit: string,
  scale: "linear" | "log" = "linear",
) {
  const ticks = niceTicks(low, high, 7).filter((tick) => tick >= low && tick <= high);
  return {
    ...look,
    type: "number" as const,
    scale,
    domain: [low, high] as [number, number],
    ...(scale === "log" ? { tickFormatter: tickText } : { ticks, tickFormatter: tickTexts(ticks) }),
    label: { ...caption, value: withUnit(label, unit), position: "insideBottom" as const, offset: -14 },
  };
}

/** Axis on the left that spans the values with round ends, its unit on top. */
export function valueAxis(values: readonly number[], unit: string) {
  const ticks = values.length > 0 ? niceTicks(Math.min(...values), Math.max(...values), 6) : [];
  return {
    ...look,
    width: 66,
    ticks,
    tickFormatter: tickTexts(ticks),
    domain: [ticks[0] ?? 0, ticks.at(-1) ?? 1] as [number, number],
    label: { ...caption, value: unit === "1" ? "" : unit, position: "top" as const, offset: 8, dx: 18 },
  };
}
