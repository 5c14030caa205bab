"use client";

import dynamic from "next/dynamic";
import { SectionStrip } from "@/app/_components/section-strip/section-strip";
import type { Definition } from "@/lib/calculation/definition";
import type { Evaluation } from "@/lib/calculation/evaluation";
import type { MaterialClass } from "@/lib/calculation/material";
import { sectionModel } from "@/lib/sheet/section-model";
import type { BuiltRequest } from "./build-request";
import type { MaterialChoice } from "./material-choice";

const CurvePlot = dynamic(() => import("./curve-plot").then((module) => module.CurvePlot), {
  ssr: false,
  loading: () => <div className="h-[300px]" />,
});

interface SectionPaneProps {
  definition: Definition;
  evaluation: Evaluation | null;
  materials: readonly MaterialChoice[];
  stale: boolean;
}

/** The section through the assembly, which redraws while one types. */
export function SectionPane({ definition, evaluation, materials, stale }: SectionPaneProps) {
  const figures = definition.figures.filter((figure) => figure.kind === "section");
  if (figures.length === 0) return null;
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
      {figures.map((figure, index) => {
        const model = evaluation ? sectionModel(figure, evaluation, known) : null;
        const layers = model?.layers.length ?? 0;
        return (
          <div key={index} className="border-t border-soft px-6 pb-1.5 pt-3.5 first:border-t-0 max-md:px-2">
            {model ? (
              <SectionStrip
                model={model}
                description={`Section through ${layers} ${layers === 1 ? "layer" : "layers"}, to scale, with the temperature of each of its ${layers + 1} faces above it.`}
              />
            ) : evaluation ? (
              <p className="py-10 text-center text-muted">The section cannot be drawn from these values.</p>
            ) : (
              <div className="h-[432px] max-md:h-[348px]" />
            )}
          </div>
        );
      })}
    </div>
  );
}

interface CurvesPaneProps {
  slug: string;
  revision: number;
  definition: Definition;
  built: BuiltRequest;
}

/** Results against one input each. */
export function CurvesPane({ slug, revision, definition, built }: CurvesPaneProps) {
  const figures = definition.figures.filter((figure) => figure.kind === "curve");
  if (figures.length === 0) return null;
  return (
    <div
      className={`order-3 grid min-w-0 border-t border-rule md:order-none ${figures.length > 1 ? "xl:grid-cols-2" : ""}`}
    >
      {figures.map((figure, index) => (
        <div
          key={index}
          className="min-w-0 border-soft px-6 pb-1.5 pt-3.5 max-xl:border-t max-xl:first:border-t-0 max-md:px-2 xl:border-l xl:first:border-l-0"
        >
          <CurvePlot figure={figure} slug={slug} revision={revision} definition={definition} built={built} />
        </div>
      ))}
    </div>
  );
}
