"use client";

import { useQuery } from "@tanstack/react-query";
import {
  CartesianGrid,
  Line,
  LineChart,
  ReferenceLine,
  ResponsiveContainer,
  Tooltip,
  XAxis,
  YAxis,
} from "recharts";
import type { z } from "zod";
import { callApi } from "@/app/_components/api-client";
import { argumentAxis, plotMargin, tooltipStyle, valueAxis } from "@/app/_components/plot/axes";
import type { CurveFigure, Definition, NumberInput } from "@/lib/calculation/definition";
import type { GivenValue } from "@/lib/calculation/evaluation";
import { formatSignificant } from "@/lib/units";
import type { BuiltRequest } from "./build-request";
import { useSettled } from "./use-evaluation";
import { convertText } from "./use-units";

type CurveFigure = z.infer<typeof CurveFigure>;

interface RowsReply {
  units: Record<string, { unit: string }>;
  rows: ({ results: Record<string, number> } | { problem: unknown })[];
}

const points = 61;
/* Line types after the habit of drawings, so that curves are told apart without colour. */
const dashes = ["", "7 4", "2 3", "9 3 2 3"];

function places(figure: CurveFigure): number[] {
  const { from, to, scale } = figure.x;
  return Array.from({ length: points }, (_, index) => {
    const share = index / (points - 1);
    return scale === "log" ? from * (to / from) ** share : from + (to - from) * share;
  });
}

/** Where this run stands on the axis, in the unit of the axis. */
function placeOf(input: NumberInput, given: GivenValue | undefined): number | undefined {
  if (given === undefined) return input.default;
  if (given === null || typeof given !== "object" || !("value" in given)) return undefined;
  const converted = convertText(given.value, given.unit ?? input.unit, input.unit, input.quantity);
  return converted === null ? undefined : Number(converted);
}

/** Results against one input, drawn through evaluate-rows with the form's other inputs. */
export function CurvePlot({
  figure,
  slug,
  revision,
  definition,
  built,
}: {
  figure: CurveFigure;
  slug: string;
  revision: number;
  definition: Definition;
  built: BuiltRequest;
}) {
  const { symbol } = figure.x;
  const input = definition.inputs.find((candidate) => candidate.symbol === symbol);
  const unit = input?.kind === "number" ? input.unit : "1";
  const others = Object.fromEntries(Object.entries(built.inputs).filter(([name]) => name !== symbol));
  const xs = places(figure);
  const drawable = Object.keys(built.faults).every((field) => field === symbol);
  const body = useSettled(
    drawable ? JSON.stringify({ common: others, rows: xs.map((value) => ({ [symbol]: value })) }) : "",
    350,
  );
  const query = useQuery({
    queryKey: ["rows", slug, revision, body],
    queryFn: ({ signal }) =>
      callApi<RowsReply>(`/templates/${slug}/revisions/${revision}/evaluate-rows`, {
        body: JSON.parse(body) as unknown,
        signal,
      }),
    enabled: drawable && body !== "",
    placeholderData: (previous) => previous,
  });

  const rows = (query.data?.rows ?? []).flatMap((row, index) =>
    "results" in row ? [{ x: xs[index] ?? 0, ...row.results }] : [],
  );
  const given = built.inputs[symbol];
  const present = input?.kind === "number" ? placeOf(input, given) : undefined;
  const labels = figure.y.map(
    (name) => definition.results.find((result) => result.symbol === name)?.label ?? name,
  );
  const yUnit = query.data?.units[figure.y[0] ?? ""]?.unit ?? "";
  const all = rows
    .flatMap((row) => figure.y.map((name) => (row as Record<string, number>)[name]))
    .filter((value): value is number => value !== undefined && Number.isFinite(value));
  return (
    <figure className="pb-2">
      <figcaption className="mb-1 text-[13px]">
        <span className="font-[620] [font-stretch:92%]">{figure.title}</span>
        <span className="ml-3 text-muted">
          {query.isError && rows.length === 0 ? "not drawn: these inputs cannot be run" : ""}
        </span>
      </figcaption>
      <div
        className={`h-[264px] ${drawable ? "" : "opacity-60"}`}
        role="img"
        aria-label={`${labels.join(" and ")} against ${input?.label ?? symbol}, from ${figure.x.from} to ${figure.x.to} ${unit}`}
      >
        <ResponsiveContainer width="100%" height="100%">
          <LineChart data={rows} margin={plotMargin} accessibilityLayer={false}>
            <CartesianGrid stroke="var(--soft)" />
            <XAxis
              dataKey="x"
              {...argumentAxis(figure.x.from, figure.x.to, input?.label ?? symbol, unit, figure.x.scale)}
            />
            <YAxis {...valueAxis(all, yUnit)} />
            <Tooltip
              contentStyle={tooltipStyle}
              labelFormatter={(value) =>
                `${input?.label ?? symbol} ${formatSignificant(Number(value), 4)} ${unit === "1" ? "" : unit}`
              }
              formatter={(value, key) => [
                `${formatSignificant(Number(value), 4)} ${yUnit === "1" ? "" : yUnit}`,
                labels[figure.y.indexOf(String(key))] ?? String(key),
              ]}
            />
            {present === undefined ? null : (
              <ReferenceLine
                x={present}
                stroke="var(--ink)"
                strokeDasharray="2 3"
                label={{
                  value: "this run",
                  position: present < (figure.x.from + figure.x.to) / 2 ? "insideTopLeft" : "insideTopRight",
                  fontSize: 11,
                  fill: "var(--muted)",
                }}
              />
            )}
            {figure.y.map((result, index) => (
              <Line
                key={result}
                dataKey={result}
                stroke="var(--ink)"
                strokeWidth={1.8}
                strokeDasharray={dashes[index]}
                dot={false}
                isAnimationActive={false}
              />
            ))}
          </LineChart>
        </ResponsiveContainer>
      </div>
      {figure.y.length > 1 ? (
        <ul className="mt-1 flex flex-wrap gap-x-5 text-[12px] text-muted">
          {labels.map((label, index) => (
            <li key={label} className="flex items-center gap-2">
              <svg width="28" height="6" aria-hidden="true">
                <path d="M0 3H28" stroke="var(--ink)" strokeWidth="1.8" strokeDasharray={dashes[index]} />
              </svg>
              {label}
            </li>
          ))}
        </ul>
      ) : null}
    </figure>
  );
}
