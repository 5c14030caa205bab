import type { z } from "zod";
import type { SectionFigure } from "@/lib/calculation/definition";
import type { MaterialClass } from "@/lib/calculation/material";
import type { UsedCell } from "@/lib/calculation/evaluation";
import { isQuantity, listOf, numberOf, rowsOf, type Run } from "./resolve";

type SectionFigure = z.infer<typeof SectionFigure>;

/** Hatching after the habit of technical drawings: by class of material, else by how it conducts. */
export const hatches = ["metal", "masonry", "refractory", "insulation", "polymer", "fluid"] as const;
export type Hatch = (typeof hatches)[number];

export interface SectionLayer {
  readonly name: string;
  /** Metres. */
  readonly thickness: number;
  readonly hatch: Hatch;
}

/** A section through an assembly with the temperature of each face. SI throughout. */
export interface SectionModel {
  readonly shape: "plane" | "round";
  /** Metres; 0 for a plane section. */
  readonly innerRadius: number;
  readonly layers: readonly SectionLayer[];
  /** Kelvin, layers + 1 values. */
  readonly faces: readonly number[];
  readonly before: { readonly label: string; readonly temperature: number } | null;
  readonly after: { readonly label: string; readonly temperature: number } | null;
  /** Units for showing: of thickness, and of temperature. */
  readonly lengthUnit: string;
  readonly temperatureUnit: string;
}

export const classHatch: Record<MaterialClass, Hatch> = {
  metal: "metal",
  refractory: "refractory",
  masonry: "masonry",
  insulation: "insulation",
  polymer: "polymer",
  liquid: "fluid",
  gas: "fluid",
  other: "masonry",
};

/** Without a named material the conductivity decides, W/(m·K): insulation conducts badly, metals well. */
function hatchByConductivity(conductivity: number | null): Hatch {
  if (conductivity === null) return "masonry";
  if (conductivity >= 8) return "metal";
  if (conductivity >= 0.45) return "masonry";
  return conductivity >= 0.15 ? "polymer" : "insulation";
}

function textOf(cell: UsedCell | undefined): string {
  if (cell === undefined) return "";
  if ("text" in cell) return cell.text;
  return "material" in cell ? cell.material : "";
}

type Known = {
  classes: Readonly<Record<string, MaterialClass>>;
  names: Readonly<Record<string, string>>;
  labels: Readonly<Record<string, string>>;
};

function layersFromTable(
  figure: SectionFigure,
  run: Run,
  known: Known,
): { layers: SectionLayer[]; unit: string } | null {
  if (typeof figure.layers !== "string" || !figure.thickness) return null;
  const rows = rowsOf(run, figure.layers);
  if (!rows || rows.length === 0) return null;
  const layers: SectionLayer[] = [];
  let unit = "mm";
  for (const [index, row] of rows.entries()) {
    const thickness = row[figure.thickness];
    if (!isQuantity(thickness)) return null;
    if (index === 0) unit = thickness.unit;
    const material = Object.values(row).find((cell) => "material" in cell);
    const slug = material && "material" in material ? material.material : null;
    const conductivityCell = figure.conductivity ? row[figure.conductivity] : undefined;
    const conductivity = isQuantity(conductivityCell)
      ? conductivityCell.si
      : conductivityCell && "constant" in conductivityCell
        ? conductivityCell.constant.si
        : null;
    const materialClass = slug ? known.classes[slug] : undefined;
    layers.push({
      name:
        textOf(figure.names ? row[figure.names] : undefined) ||
        (slug ? (known.names[slug] ?? slug) : `Layer ${index + 1}`),
      thickness: thickness.si,
      hatch: materialClass ? classHatch[materialClass] : hatchByConductivity(conductivity),
    });
  }
  return { layers, unit };
}

function layersOneByOne(
  figure: SectionFigure,
  run: Run,
  known: Known,
): { layers: SectionLayer[]; unit: string } | null {
  if (typeof figure.layers === "string") return null;
  const layers: SectionLayer[] = [];
  let unit = "mm";
  for (const [index, layer] of figure.layers.entries()) {
    const thickness = numberOf(run, layer.thickness, "plain");
    if (!thickness) return null;
    if (index === 0) unit = thickness.unit;
    const input = layer.conductivity ? run.inputs[layer.conductivity] : undefined;
    const slug = input && "material" in input ? input.material : null;
    const materialClass = slug ? known.classes[slug] : undefined;
    const conductivity = layer.conductivity ? (numberOf(run, layer.conductivity, "plain")?.si ?? null) : null;
    layers.push({
      name: layer.name ?? (slug ? (known.names[slug] ?? slug) : ""),
      thickness: thickness.si,
      hatch: materialClass ? classHatch[materialClass] : hatchByConductivity(conductivity),
    });
  }
  return { layers, unit };
}

function facesOf(figure: SectionFigure, run: Run): { si: number[]; unit: string } | null {
  if (typeof figure.temperatures === "string") return listOf(run, figure.temperatures, "absolute");
  const faces = figure.temperatures.map((symbol) => numberOf(run, symbol, "absolute"));
  const first = faces[0];
  if (!first || faces.some((face) => face === null)) return null;
  return { si: faces.map((face) => face?.si ?? Number.NaN), unit: first.unit };
}

/**
 * Section model of a run, or null when the run lacks something that the figure reads. Layers of no thickness are
 * left out together with their second face, so that a bare pipe is drawn as one.
 */
export function sectionModel(figure: SectionFigure, run: Run, known: Known): SectionModel | null {
  const found = layersFromTable(figure, run, known) ?? layersOneByOne(figure, run, known);
  const faces = facesOf(figure, run);
  if (!found || !faces || faces.si.length !== found.layers.length + 1 || !faces.si.every(Number.isFinite))
    return null;

  const inner = figure.inner ? numberOf(run, figure.inner, "plain") : null;
  if (figure.shape === "round" && !inner) return null;

  const keptFaces = [faces.si[0] ?? Number.NaN];
  const layers: SectionLayer[] = [];
  found.layers.forEach((layer, index) => {
    if (layer.thickness <= 0) return;
    layers.push(layer);
    keptFaces.push(faces.si[index + 1] ?? Number.NaN);
  });

  const side = (symbol: string | undefined) => {
    if (!symbol) return null;
    const value = numberOf(run, symbol, "absolute");
    // "Fluid temperature" is drawn beside a temperature line: the medium is what there is to say.
    const label = (known.labels[symbol] ?? symbol).replace(/ temperature$/i, "");
    return value ? { label, temperature: value.si } : null;
  };
  return {
    shape: figure.shape,
    innerRadius: inner ? inner.si / 2 : 0,
    layers,
    faces: keptFaces,
    before: side(figure.before),
    after: side(figure.after),
    lengthUnit: found.unit,
    temperatureUnit: faces.unit,
  };
}
