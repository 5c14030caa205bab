import type { MaterialClass } from "@/lib/calculation/material";

/** A material as the picker shows it. */
export interface MaterialChoice {
  slug: string;
  name: string;
  class: MaterialClass;
  properties: string[];
  /** Valid range of each property, as text. */
  ranges: Record<string, string>;
  service: string | null;
  source: string;
}
