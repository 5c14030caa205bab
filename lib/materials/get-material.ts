import "server-only";
import type { Actor } from "@/lib/access/actor";
import { namesOf } from "@/lib/people/names";
import { findMaterial, type MaterialRow } from "./find-material";
import { materialFrom } from "./material-cache";
import { peopleOf, revisionMembers } from "./revision-summary";
import type { MaterialRevisionView, MaterialView } from "./schemas";

/** A material with the revision that a run by slug uses. Throws `not-found`. */
export async function getMaterial(actor: Actor, { slug }: { slug: string }): Promise<MaterialView> {
  const row = await findMaterial(actor, slug);
  const current = await revisionView(row);
  return {
    slug,
    class: current.definition.class,
    createdAt: row.material.createdAt.toISOString(),
    current,
  };
}

/** One revision with its definition. Throws `not-found`. */
export async function getMaterialRevision(
  actor: Actor,
  { slug, revision }: { slug: string; revision: number },
): Promise<MaterialRevisionView> {
  return revisionView(await findMaterial(actor, slug, revision));
}

async function revisionView({ material, revision }: MaterialRow): Promise<MaterialRevisionView> {
  const nameOf = await namesOf(peopleOf(revision));
  return {
    material: material.slug,
    ...revisionMembers(revision, nameOf),
    definition: materialFrom(revision.definitionHash, revision.definition),
  };
}
