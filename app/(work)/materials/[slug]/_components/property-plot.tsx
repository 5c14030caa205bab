"use client";

import dynamic from "next/dynamic";

export interface PropertyPlotProps {
  label: string;
  /** Argument and value, in the property's own units. */
  points: { argument: number; value: number }[];
  unit: string;
  argumentUnit: string;
  relativeUncertainty: number | null;
}

/** The plot is loaded when a page needs it; its place is kept, so that nothing moves. */
export const PropertyPlot = dynamic(() => import("./property-chart").then((module) => module.PropertyChart), {
  ssr: false,
  loading: () => <div className="h-[300px]" />,
});
