import { formatSignificant } from "@/lib/units";
import { shownIn } from "@/lib/sheet/resolve";
import type { Hatch, SectionModel } from "@/lib/sheet/section-model";
import { niceTicks } from "../plot/ticks";
import { captionBox, placeLabels, type PlacedLabel } from "./place-labels";

/**
 * Projected view in pixels: the section to scale below, the temperature along it above on a scale of its own.
 * Pure, so that the page and the printed sheet can draw the same picture.
 */
export interface StripLayout {
  readonly width: number;
  readonly height: number;
  readonly chart: {
    readonly left: number;
    readonly right: number;
    readonly top: number;
    readonly bottom: number;
  };
  readonly section: { readonly top: number; readonly bottom: number; readonly axis: number };
  readonly ticks: readonly { readonly y: number; readonly text: string }[];
  readonly temperatureUnit: string;
  readonly lengthUnit: string;
  /** Centre line of a round wall, when it lies inside the picture. */
  readonly centreX: number | null;
  readonly pixelsPerMetre: number;
  readonly innerRadius: number;
  readonly curve: string;
  readonly faces: readonly { readonly x: number; readonly y: number }[];
  readonly labels: readonly PlacedLabel[];
  readonly layers: readonly {
    readonly from: number;
    readonly to: number;
    readonly name: string;
    readonly hatch: Hatch;
    readonly showName: boolean;
  }[];
  readonly dimensions: readonly {
    readonly from: number;
    readonly to: number;
    readonly text: string;
    readonly x: number;
    readonly row: number;
  }[];
  readonly before: PlacedLabel | null;
  readonly after: PlacedLabel | null;
  /** Left end of the drawn bore or air, and right end of the air outside. */
  readonly leftEdge: number;
  readonly rightEdge: number;
}

const character = 7.3;

/** Pixels for a width; below 600 the slim proportions of a phone. */
export function stripLayout(model: SectionModel, width: number): StripLayout {
  const slim = width < 600;
  const chartTop = 30;
  const chartHeight = slim ? 128 : 168;
  const chartBottom = chartTop + chartHeight;
  const sectionTop = chartBottom + (slim ? 32 : 40);
  const sectionHeight = slim ? 96 : 132;
  const sectionBottom = sectionTop + sectionHeight;
  const axis = (sectionTop + sectionBottom) / 2;

  const left = slim ? 46 : 84;
  const scaleRight = slim ? 44 : 108;
  const airWidth = slim ? 34 : 64;
  const right = width - scaleRight;

  const total = model.layers.reduce((sum, layer) => sum + layer.thickness, 0);
  const outer = model.innerRadius + total;
  const round = model.shape === "round";
  // A bore much wider than its wall is cut, so that the wall keeps the width it needs.
  const shownFrom = round ? (total / outer < 0.3 ? model.innerRadius - total * 0.7 : 0) : 0;
  const from = round ? left : left + (model.before ? airWidth : 12);
  const to = round ? right : right - (model.after ? airWidth * 0.3 : 0);
  const pixelsPerMetre = (to - from) / ((round ? outer : total) - shownFrom);
  const x = (place: number) => from + (place - shownFrom) * pixelsPerMetre;

  const places = [round ? model.innerRadius : 0];
  for (const layer of model.layers) places.push((places.at(-1) ?? 0) + layer.thickness);

  const shown = (kelvin: number) => shownIn(kelvin, model.temperatureUnit, "absolute");
  const values = [
    ...model.faces,
    ...(model.before ? [model.before.temperature] : []),
    ...(model.after ? [model.after.temperature] : []),
  ].map(shown);
  const ticks = niceTicks(Math.min(...values), Math.max(...values), slim ? 4 : 6);
  const low = ticks[0] ?? 0;
  const high = ticks.at(-1) ?? 1;
  const y = (kelvin: number) => chartBottom - ((shown(kelvin) - low) / (high - low || 1)) * chartHeight;

  const faces = model.faces.map((temperature, index) => ({ x: x(places[index] ?? 0), y: y(temperature) }));
  const leftEdge = round ? Math.max(left, x(shownFrom)) : left;
  const rightEdge = Math.min(width - 8, (faces.at(-1)?.x ?? right) + (model.after ? airWidth : 10));
  const curve = curvePath(model, faces, places, x, y, leftEdge, rightEdge);

  // Where fluid and air are named: above the line on the left, below it on the right unless the chart ends there.
  const fluidY = model.before ? y(model.before.temperature) : 0;
  const airY = model.after ? y(model.after.temperature) : 0;
  const before = model.before
    ? { text: model.before.label, x: leftEdge + 8, y: fluidY - 7, anchor: "start" as const }
    : null;
  const after = model.after
    ? {
        text: model.after.label,
        x: rightEdge,
        y: airY > chartTop + 40 ? airY + 15 : airY - 7,
        anchor: "end" as const,
      }
    : null;
  const wholeLine = [
    ...(model.before ? [{ x: leftEdge, y: fluidY }] : []),
    ...faces,
    ...(model.after ? [{ x: rightEdge, y: airY }] : []),
  ];

  const names = model.layers.map((layer, index) => {
    const start = x(places[index] ?? 0);
    const end = x(places[index + 1] ?? 0);
    return {
      from: start,
      to: end,
      name: layer.name,
      hatch: layer.hatch,
      showName: layer.name !== "" && end - start > layer.name.length * 6.4 + 20,
    };
  });

  return {
    width,
    height: sectionBottom + 62,
    chart: { left, right, top: chartTop, bottom: chartBottom },
    section: { top: sectionTop, bottom: sectionBottom, axis },
    ticks: ticks.map((value) => ({
      y: chartBottom - ((value - low) / (high - low || 1)) * chartHeight,
      text: formatTick(value),
    })),
    temperatureUnit: model.temperatureUnit,
    lengthUnit: model.lengthUnit,
    centreX: round && shownFrom === 0 ? x(0) : null,
    pixelsPerMetre,
    innerRadius: model.innerRadius,
    curve,
    faces,
    labels: placeLabels(
      model.faces.map((temperature, index) => ({
        text: `${formatSignificant(shown(temperature), 4)} ${model.temperatureUnit}`,
        x: faces[index]?.x ?? 0,
        y: faces[index]?.y ?? 0,
      })),
      { left: 4, right: width - 4, top: 2, bottom: chartBottom + 30 },
      {
        points: faces,
        line: wholeLine,
        taken: [before, after].flatMap((caption) => (caption ? [captionBox(caption)] : [])),
      },
    ),
    layers: names,
    dimensions: dimensionRow(model, names, width),
    before,
    after,
    leftEdge,
    rightEdge,
  };
}

function formatTick(value: number): string {
  return String(Math.round(value * 1e6) / 1e6).replace("-", "\u2212");
}

/** Temperature along the section: straight in a plane layer, logarithmic in a round one, a short bend in each film. */
function curvePath(
  model: SectionModel,
  faces: StripLayout["faces"],
  places: readonly number[],
  x: (place: number) => number,
  y: (kelvin: number) => number,
  leftEdge: number,
  rightEdge: number,
): string {
  const points: string[] = [];
  const add = (px: number, py: number) =>
    points.push(`${points.length === 0 ? "M" : "L"}${px.toFixed(1)} ${py.toFixed(1)}`);
  const first = faces[0];
  const last = faces.at(-1);
  if (!first || !last) return "";

  if (model.before) {
    const film = Math.min(18, Math.max(0, first.x - leftEdge));
    const fluid = y(model.before.temperature);
    add(leftEdge, fluid);
    for (let i = 0; i <= 8; i += 1)
      add(first.x - film + (film * i) / 8, fluid + (first.y - fluid) * (i / 8) ** 3);
  } else {
    add(first.x, first.y);
  }
  for (let index = 0; index < model.layers.length; index += 1) {
    const r1 = places[index] ?? 0;
    const r2 = places[index + 1] ?? 0;
    const t1 = model.faces[index] ?? 0;
    const t2 = model.faces[index + 1] ?? 0;
    const steps = model.shape === "round" ? 20 : 1;
    for (let i = 1; i <= steps; i += 1) {
      const place = r1 + ((r2 - r1) * i) / steps;
      const share = model.shape === "round" ? Math.log(place / r1) / Math.log(r2 / r1) : i / steps;
      add(x(place), y(t1 + (t2 - t1) * share));
    }
  }
  if (model.after) {
    const air = y(model.after.temperature);
    const film = Math.min(18, rightEdge - last.x);
    for (let i = 1; i <= 8; i += 1) add(last.x + (film * i) / 8, air + (last.y - air) * (1 - i / 8) ** 3);
    add(rightEdge, air);
  }
  return points.join("");
}

/** Dimension texts: centred where they fit, else moved outward or to a second row, never over one another. */
function dimensionRow(
  model: SectionModel,
  layers: readonly { from: number; to: number }[],
  width: number,
): StripLayout["dimensions"] {
  const taken: { from: number; to: number; row: number }[] = [];
  return layers.map(({ from, to }, index) => {
    const text = formatSignificant(
      shownIn(model.layers[index]?.thickness ?? 0, model.lengthUnit, "plain"),
      4,
    ).replace(/\.0+$|(\.\d*?)0+$/, "$1");
    const half = (text.length * character) / 2;
    const middle = (from + to) / 2;
    const narrow = to - from < half * 2 + 8;
    const aside = index === 0 ? from - half - 6 : index === layers.length - 1 ? to + half + 6 : middle;
    for (const [x, row] of [
      [narrow ? aside : middle, 0],
      [middle, 1],
      [aside, 1],
    ] as const) {
      const clamped = Math.min(Math.max(x, half + 2), width - half - 2);
      const free = taken.every(
        (other) => other.row !== row || clamped - half > other.to + 4 || clamped + half < other.from - 4,
      );
      if (!free) continue;
      taken.push({ from: clamped - half, to: clamped + half, row });
      return { from, to, text, x: clamped, row };
    }
    return { from, to, text: "", x: middle, row: 0 };
  });
}
