"use client";

import {
  Area,
  CartesianGrid,
  ComposedChart,
  Line,
  ResponsiveContainer,
  Tooltip,
  XAxis,
  YAxis,
} from "recharts";
import { niceTicks } from "@/app/_components/plot/ticks";
import { formatSignificant } from "@/lib/units";

interface PropertyPlotProps {
  label: string;
  /** Argument and value, in the property's own units. */
  points: { argument: number; value: number }[];
  unit: string;
  argumentUnit: string;
  relativeUncertainty: number | null;
}

const tickText = (value: number) => formatSignificant(value, 3).replace(/\.0+$/, "");
const tickStyle = { fontSize: 12, fill: "var(--ink)", fontFamily: "var(--font-mono)" };

/** A property over its valid range, with the band of its stated uncertainty. */
export function PropertyChart({ label, points, unit, argumentUnit, relativeUncertainty }: PropertyPlotProps) {
  const rows = points.map(({ argument, value }) => ({
    argument,
    value,
    ...(relativeUncertainty === null
      ? {}
      : { band: [value * (1 - relativeUncertainty), value * (1 + relativeUncertainty)] }),
  }));
  const values = rows.flatMap((row) => ("band" in row && row.band ? row.band : [row.value]));
  const low = points[0]?.argument ?? 0;
  const high = points.at(-1)?.argument ?? 1;
  const yTicks = niceTicks(Math.min(...values), Math.max(...values), 6);
  return (
    <div
      className="h-[300px]"
      role="img"
      aria-label={`${label} from ${tickText(low)} to ${tickText(high)} ${argumentUnit}`}
    >
      <ResponsiveContainer width="100%" height="100%">
        <ComposedChart
          data={rows}
          margin={{ top: 20, right: 16, bottom: 22, left: 12 }}
          accessibilityLayer={false}
        >
          <CartesianGrid stroke="var(--soft)" />
          <XAxis
            dataKey="argument"
            type="number"
            domain={[low, high]}
            ticks={niceTicks(low, high, 7).filter((tick) => tick >= low && tick <= high)}
            tickFormatter={tickText}
            stroke="var(--muted)"
            tick={tickStyle}
            label={{
              value: `Temperature, ${argumentUnit}`,
              position: "insideBottom",
              offset: -14,
              fontSize: 12,
              fill: "var(--muted)",
            }}
          />
          <YAxis
            domain={[yTicks[0] ?? 0, yTicks.at(-1) ?? 1]}
            ticks={yTicks}
            tickFormatter={tickText}
            stroke="var(--muted)"
            width={68}
            tick={tickStyle}
            label={{ value: unit, position: "top", offset: 8, dx: 20, fontSize: 12, fill: "var(--muted)" }}
          />
          <Tooltip
            contentStyle={{
              background: "var(--sheet)",
              border: "1px solid var(--ink)",
              borderRadius: 2,
              fontSize: 12,
            }}
            labelFormatter={(value) => `${formatSignificant(Number(value), 4)} ${argumentUnit}`}
            formatter={(value, key) =>
              key === "band" && Array.isArray(value)
                ? [value.map((end) => formatSignificant(Number(end), 4)).join(" to "), "uncertainty band"]
                : [`${formatSignificant(Number(value), 5)} ${unit}`, label]
            }
          />
          {relativeUncertainty === null ? null : (
            <Area
              dataKey="band"
              stroke="none"
              fill="var(--hatch)"
              fillOpacity={0.22}
              isAnimationActive={false}
            />
          )}
          <Line dataKey="value" stroke="var(--ink)" strokeWidth={1.8} dot={false} isAnimationActive={false} />
        </ComposedChart>
      </ResponsiveContainer>
    </div>
  );
}
