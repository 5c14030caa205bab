"use client";

import dynamic from "next/dynamic";
import { SectionStrip } from "@/app/_components/section-strip/section-strip";
import type { Definition, Figure } from "@/lib/calculation/definition";
import type { Evaluation } from "@/lib/calculation/evaluation";
import type { MaterialClass } from "@/lib/calculation/material";
import { sectionModel } from "@/lib/sheet/section-model";
import type { BuiltRequest } from "./build-request";
import type { MaterialChoice } from "./run-desk";

const CurvePlot = dynamic(() => import("./curve-plot").then((module) => module.CurvePlot), {
  ssr: false,
  loading: () => <div className="h-[300px]" />,
});

interface Props {
  slug: string;
  revision: number;
  definition: Definition;
  evaluation: Evaluation | null;
  materials: readonly MaterialChoice[];
  built: BuiltRequest;
  stale: boolean;
}

/** The figures of a template that redraw while one types. */
export function FigurePane({ slug, revision, definition, evaluation, materials, built, stale }: Props) {
  const drawn = definition.figures.filter((figure) => figure.kind === "section" || figure.kind === "curve");
  if (drawn.length === 0) return null;
  const known = {
    classes: Object.fromEntries(materials.map((material) => [material.slug, material.class])) as Record<
      string,
      MaterialClass
    >,
    names: Object.fromEntries(materials.map((material) => [material.slug, material.name])),
    labels: Object.fromEntries(definition.inputs.map((input) => [input.symbol, input.label.toLowerCase()])),
  };
  return (
    <div className={`min-w-0 border-b border-rule ${stale ? "opacity-60" : ""}`}>
      {drawn.map((figure, index) => (
        <div key={index} className="border-t border-soft px-6 pb-1.5 pt-3.5 first:border-t-0 max-md:px-2">
          <Drawn
            figure={figure}
            slug={slug}
            revision={revision}
            definition={definition}
            evaluation={evaluation}
            known={known}
            built={built}
          />
        </div>
      ))}
    </div>
  );
}

type Known = Parameters<typeof sectionModel>[2];

function Drawn({
  figure,
  evaluation,
  known,
  ...rest
}: Omit<Props, "materials" | "stale"> & { figure: Figure; known: Known }) {
  if (figure.kind === "curve") return <CurvePlot figure={figure} {...rest} />;
  if (figure.kind !== "section" || !evaluation) return <div className="h-[420px] max-md:h-[330px]" />;
  const model = sectionModel(figure, evaluation, known);
  if (!model)
    return <p className="py-10 text-center text-muted">The section cannot be drawn from these values.</p>;
  const faces = model.faces.length;
  return (
    <SectionStrip
      model={model}
      description={`Section through ${model.layers.length} ${model.layers.length === 1 ? "layer" : "layers"}, to scale, with the temperature of its ${faces} faces above it.`}
    />
  );
}
