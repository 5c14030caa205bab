"use client";

import dynamic from "next/dynamic";

/** The plot is loaded when a page needs it; its place is kept, so that nothing moves. */
export const PropertyPlot = dynamic(() => import("./property-chart").then((module) => module.PropertyChart), {
  ssr: false,
  loading: () => <div className="h-[300px]" />,
});
