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
import { argumentAxis, plotMargin, tickText, tooltipStyle, valueAxis } from "@/app/_components/plot/axes";
import { formatSignificant } from "@/lib/units";

interface PropertyPlotProps {
  label: string;
  /** Argument and value, in the property's own units. */
  points: { argument: number; value: number }[];
  unit: string;
  argumentUnit: string;
  relativeUncertainty: number | null;
}

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
  return (
    <div
      className="h-[300px]"
      role="img"
      aria-label={`${label} from ${tickText(low)} to ${tickText(high)} ${argumentUnit}`}
    >
      <ResponsiveContainer width="100%" height="100%">
        <ComposedChart data={rows} margin={plotMargin} accessibilityLayer={false}>
          <CartesianGrid stroke="var(--soft)" />
          <XAxis dataKey="argument" {...argumentAxis(low, high, "Temperature", argumentUnit)} />
          <YAxis {...valueAxis(values, unit)} />
          <Tooltip
            contentStyle={tooltipStyle}
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
