import "server-only";
import { and, desc, eq, inArray } from "drizzle-orm";
import { reader } from "@/db/client";
import { materialRevisions, materials } from "@/db/schema/materials";
import { visibleStates } from "@/lib/access/actions";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { CodedError } from "@/lib/core/errors";

export function noSuchMaterial(): CodedError {
  return new CodedError("not-found", "There is no such material or revision, or it is not yours to see.");
}

export interface MaterialRow {
  material: typeof materials.$inferSelect;
  revision: typeof materialRevisions.$inferSelect;
}

/** The issued revision, else the latest one that the actor may see; or the numbered one. Throws `not-found`. */
export async function findMaterial(actor: Actor, slug: string, number?: number): Promise<MaterialRow> {
  permit(actor, "material.read", { slug });
  const seen = inArray(materialRevisions.state, visibleStates(actor));
  const which = number === undefined ? seen : and(seen, eq(materialRevisions.number, number));
  const [found] = await reader()
    .select({ material: materials, revision: materialRevisions })
    .from(materialRevisions)
    .innerJoin(materials, eq(materials.id, materialRevisions.materialId))
    .where(and(eq(materials.slug, slug), which))
    .orderBy(desc(eq(materialRevisions.state, "issued")), desc(materialRevisions.number))
    .limit(1);
  if (!found) throw noSuchMaterial();
  permit(actor, "material.read", { slug, state: found.revision.state });
  return found;
}
