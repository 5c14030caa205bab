import type { GivenInputs } from "@/lib/calculation/evaluation";
import { paths } from "@/lib/core/paths";

export interface CallSketch {
  /** Where this installation is reached, without a slash at the end. */
  origin: string;
  slug: string;
  /** A pinned revision, or null for the current one. */
  revision: number | null;
  inputs: GivenInputs;
  units: Readonly<Record<string, string>>;
}

function shellQuoted(text: string): string {
  return `'${text.replaceAll("'", `'\\''`)}'`;
}

export function callAddress(sketch: CallSketch): string {
  const path =
    sketch.revision === null
      ? `/templates/${encodeURIComponent(sketch.slug)}`
      : `/templates/${encodeURIComponent(sketch.slug)}/revisions/${sketch.revision}`;
  return `${sketch.origin}${paths.api(path)}/evaluate`;
}

export function callBody(sketch: CallSketch): string {
  const body = {
    inputs: sketch.inputs,
    ...(Object.keys(sketch.units).length > 0 ? { units: sketch.units } : {}),
  };
  return JSON.stringify(body, null, 2);
}

/** A call that a shell runs as it stands, once COLDFACE_KEY holds a key. */
export function curlSnippet(sketch: CallSketch): string {
  return [
    `curl -sS ${shellQuoted(callAddress(sketch))} \\`,
    `  -H "Authorization: Bearer $COLDFACE_KEY" \\`,
    `  -H 'Content-Type: application/json' \\`,
    `  --data ${shellQuoted(callBody(sketch))}`,
  ].join("\n");
}
