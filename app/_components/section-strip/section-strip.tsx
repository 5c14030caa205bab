"use client";

import { useId } from "react";
import type { SectionModel } from "@/lib/sheet/section-model";
import { useWidth } from "../use-width";
import { HatchDefinitions } from "./hatches";
import { stripLayout, type StripLayout } from "./layout";

const mono = "var(--font-mono), var(--font-greek), monospace";

/** The projected view: section to scale below, temperature along it above, projected from each interface. */
export function SectionStrip({ model, description }: { model: SectionModel; description: string }) {
  const [ref, width] = useWidth(904);
  const id = useId();
  const layout = stripLayout(model, Math.max(300, width));
  return (
    <div ref={ref} className="w-full overflow-hidden">
      <svg
        role="img"
        aria-label={description}
        width={layout.width}
        height={layout.height}
        viewBox={`0 0 ${layout.width} ${layout.height}`}
        className="block"
      >
        <defs>
          <HatchDefinitions id={id} />
          <linearGradient
            id={`${id}-scale`}
            x1="0"
            x2="0"
            y1={layout.chart.top}
            y2={layout.chart.bottom}
            gradientUnits="userSpaceOnUse"
          >
            <stop offset="0" stopColor="var(--hot)" />
            <stop offset=".36" stopColor="var(--warm)" />
            <stop offset=".72" stopColor="var(--cool)" />
            <stop offset="1" stopColor="var(--cold)" />
          </linearGradient>
          <clipPath id={`${id}-band`}>
            <rect
              x={layout.leftEdge}
              y={layout.section.top}
              width={layout.width - layout.leftEdge}
              height={layout.section.bottom - layout.section.top}
            />
          </clipPath>
        </defs>
        <Scale layout={layout} id={id} />
        <Projections layout={layout} />
        <Section layout={layout} id={id} />
        <Dimensions layout={layout} />
        <path
          d={layout.curve}
          fill="none"
          stroke={`url(#${id}-scale)`}
          strokeWidth="2.4"
          strokeLinejoin="round"
        />
        {layout.faces.map((face, index) => (
          <circle
            key={index}
            cx={face.x}
            cy={face.y}
            r="3.6"
            fill="var(--sheet)"
            stroke="var(--ink)"
            strokeWidth="1.3"
          />
        ))}
        {layout.labels.map((label, index) => (
          <text
            key={index}
            x={label.x}
            y={label.y}
            textAnchor={label.anchor}
            fontFamily={mono}
            fontSize="13"
            fontWeight="550"
            fill="var(--ink)"
          >
            {label.text}
          </text>
        ))}
        <Surroundings layout={layout} />
      </svg>
    </div>
  );
}

function Scale({ layout, id }: { layout: StripLayout; id: string }) {
  const { left, top, bottom } = layout.chart;
  const barX = left - 6;
  return (
    <g>
      {layout.ticks.map((tick) => (
        <g key={tick.text}>
          <path d={`M${left} ${tick.y}H${layout.rightEdge}`} stroke="var(--soft)" />
          <text
            x={barX - 7}
            y={tick.y + 4}
            textAnchor="end"
            fontFamily={mono}
            fontSize="12"
            fill="var(--ink)"
          >
            {tick.text}
          </text>
        </g>
      ))}
      <rect x={barX - 2} y={top} width="5" height={bottom - top} fill={`url(#${id}-scale)`} />
      <text x={barX - 7} y={top - 12} textAnchor="end" fontSize="12" fill="var(--muted)">
        {layout.temperatureUnit}
      </text>
    </g>
  );
}

function Projections({ layout }: { layout: StripLayout }) {
  return (
    <g stroke="var(--hatch)" strokeWidth=".9" strokeDasharray="2 2.5">
      {layout.faces.map((face, index) => (
        <path key={index} d={`M${face.x} ${face.y + 4}V${layout.section.top}`} />
      ))}
    </g>
  );
}

/** A free-hand break line between two points at one height. */
function breakLine(from: number, to: number, y: number): string {
  const waves = Math.max(4, Math.round((to - from) / 9));
  const step = (to - from) / waves;
  let path = `M${from} ${y}`;
  for (let i = 0; i < waves; i += 1) path += `q${step / 2} ${i % 2 === 0 ? -2.6 : 2.6} ${step} 0`;
  return path;
}

function Section({ layout, id }: { layout: StripLayout; id: string }) {
  const { top, bottom, axis } = layout.section;
  const first = layout.layers[0];
  const last = layout.layers.at(-1);
  if (!first || !last) return null;
  const round = layout.innerRadius > 0;
  const centre = first.from - layout.innerRadius * layout.pixelsPerMetre;
  const height = bottom - top;

  // Round walls are painted as whole discs from the outside in, cut to the band: true arcs for every radius.
  const fill = (from: number, to: number, paint: string, key: string) =>
    round ? (
      <circle key={key} cx={centre} cy={axis} r={Math.max(0, to - centre)} fill={paint} />
    ) : (
      <rect key={key} x={from} y={top} width={Math.max(0, to - from)} height={height} fill={paint} />
    );
  const paintOf = (layer: StripLayout["layers"][number]) =>
    layer.to - layer.from < 4 ? "var(--ink)" : `url(#${id}-${layer.hatch})`;
  const edges = [first.from, ...layout.layers.map((layer) => layer.to)];

  return (
    <g>
      <g clipPath={`url(#${id}-band)`}>
        {[...layout.layers].reverse().map((layer, index) => (
          <g key={index}>
            {fill(layer.from, layer.to, "var(--sheet)", "ground")}
            {fill(layer.from, layer.to, paintOf(layer), "hatch")}
          </g>
        ))}
        {round ? (
          <circle cx={centre} cy={axis} r={layout.innerRadius * layout.pixelsPerMetre} fill="var(--sheet)" />
        ) : null}
        {edges.map((edge, index) =>
          round ? (
            <circle
              key={index}
              cx={centre}
              cy={axis}
              r={edge - centre}
              fill="none"
              stroke="var(--ink)"
              strokeWidth="1.3"
            />
          ) : (
            <path key={index} d={`M${edge} ${top}V${bottom}`} stroke="var(--ink)" strokeWidth="1.3" />
          ),
        )}
      </g>
      <path
        d={breakLine(first.from - 14, last.to + 14, top)}
        fill="none"
        stroke="var(--hatch)"
        strokeWidth="1.1"
      />
      <path
        d={breakLine(first.from - 14, last.to + 14, bottom)}
        fill="none"
        stroke="var(--hatch)"
        strokeWidth="1.1"
      />
      {round ? (
        <path
          d={`M${layout.leftEdge - 6} ${axis}H${last.to + 16}`}
          stroke="var(--hatch)"
          strokeWidth=".8"
          strokeDasharray="14 4 2 4"
        />
      ) : null}
      {layout.centreX === null ? null : (
        <path
          d={`M${layout.centreX} ${top - 10}V${bottom + 10}`}
          stroke="var(--ink)"
          strokeWidth=".9"
          strokeDasharray="14 4 2 4"
        />
      )}
      {round && layout.before && first.from - layout.leftEdge > 60 ? (
        <LayerName x={(layout.leftEdge + first.from) / 2} y={axis} text="bore" />
      ) : null}
      {layout.layers.map((layer, index) =>
        layer.showName ? (
          <LayerName key={index} x={(layer.from + layer.to) / 2} y={axis} text={layer.name} />
        ) : null,
      )}
    </g>
  );
}

function LayerName({ x, y, text }: { x: number; y: number; text: string }) {
  const half = text.length * 3.15 + 6;
  return (
    <g>
      <rect x={x - half} y={y - 9} width={half * 2} height="18" fill="var(--sheet)" />
      <text x={x} y={y + 4} textAnchor="middle" fontSize="12" fill="var(--muted)">
        {text}
      </text>
    </g>
  );
}

function Dimensions({ layout }: { layout: StripLayout }) {
  const y = layout.section.bottom + 22;
  const first = layout.dimensions[0];
  const last = layout.dimensions.at(-1);
  if (!first || !last) return null;
  const ends = [first.from, ...layout.dimensions.map((dimension) => dimension.to)];
  return (
    <g>
      <path d={`M${first.from - 6} ${y}H${last.to + 6}`} stroke="var(--muted)" strokeWidth=".9" />
      {ends.map((x, index) => (
        <g key={index}>
          <path d={`M${x} ${layout.section.bottom + 4}V${y + 5}`} stroke="var(--rule)" strokeWidth=".9" />
          <path d={`M${x - 4} ${y + 4}L${x + 4} ${y - 4}`} stroke="var(--ink)" strokeWidth="1.4" />
        </g>
      ))}
      {layout.dimensions.map((dimension, index) =>
        dimension.text === "" ? null : (
          <text
            key={index}
            x={dimension.x}
            y={y + 17 + dimension.row * 14}
            textAnchor="middle"
            fontFamily={mono}
            fontSize="12"
            fill="var(--ink)"
          >
            {dimension.text}
          </text>
        ),
      )}
      <text
        x={Math.max(2, layout.leftEdge - (layout.innerRadius > 0 ? 4 : 40))}
        y={y + 17}
        fontSize="11"
        fill="var(--muted)"
      >
        {first.from - layout.leftEdge > 60 || layout.innerRadius === 0
          ? `${layout.lengthUnit}, to scale`
          : layout.lengthUnit}
      </text>
    </g>
  );
}

function Surroundings({ layout }: { layout: StripLayout }) {
  return (
    <g fontSize="12" fill="var(--muted)">
      {[layout.before, layout.after].map((caption) =>
        caption ? (
          <text key={caption.anchor} x={caption.x} y={caption.y} textAnchor={caption.anchor}>
            {caption.text}
          </text>
        ) : null,
      )}
    </g>
  );
}
