import "server-only";
import { and, eq, inArray, or } from "drizzle-orm";
import { reader } from "@/db/client";
import { materialRevisions, materials } from "@/db/schema/materials";
import type { Material } from "@/lib/calculation/material";
import { materialFrom } from "./material-cache";

/** Materials for one run, under the names that the request asked for: `slug` or `slug@revision`. */
export type Snapshots = Record<string, { slug: string; revision: number; material: Material }>;

interface Asked {
  name: string;
  slug: string;
  revision: number | null;
}

function readName(name: string): Asked {
  const [slug = "", revision] = name.split("@");
  return {
    name,
    slug,
    revision: revision !== undefined && /^[1-9]\d{0,6}$/.test(revision) ? Number(revision) : null,
  };
}

/**
 * The materials that a run names, read in one query. A plain slug is the issued revision, or the one of `pinned`;
 * numbered ones may be superseded. What is not there (or withdrawn, unless pinned) is left out: the run names it.
 */
export async function materialSnapshots(
  names: readonly string[],
  pinned: readonly { slug: string; revision: number }[] = [],
): Promise<Snapshots> {
  if (names.length === 0) return {};
  const pins = new Map(pinned.map((pin) => [pin.slug, pin.revision]));
  const asked = names
    .map(readName)
    .map((name) => ({ ...name, revision: name.revision ?? pins.get(name.slug) ?? null }));
  const rows = await reader()
    .select({
      slug: materials.slug,
      number: materialRevisions.number,
      state: materialRevisions.state,
      hash: materialRevisions.definitionHash,
      text: materialRevisions.definition,
    })
    .from(materialRevisions)
    .innerJoin(materials, eq(materials.id, materialRevisions.materialId))
    .where(
      or(
        ...asked.map(({ slug, revision }) =>
          and(
            eq(materials.slug, slug),
            revision === null
              ? eq(materialRevisions.state, "issued")
              : and(
                  eq(materialRevisions.number, revision),
                  inArray(materialRevisions.state, ["issued", "superseded", "withdrawn"]),
                ),
          ),
        ),
      ),
    );
  const found: Snapshots = {};
  for (const { name, slug, revision } of asked) {
    const row = rows.find(
      (candidate) =>
        candidate.slug === slug &&
        (revision === null ? candidate.state === "issued" : candidate.number === revision),
    );
    if (!row || (row.state === "withdrawn" && pinned.length === 0)) continue;
    found[name] = { slug, revision: row.number, material: materialFrom(row.hash, row.text) };
  }
  return found;
}
