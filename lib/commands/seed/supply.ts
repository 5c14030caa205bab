import { eq } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { materialRevisions, materials } from "@/db/schema/materials";
import { suppliedSet } from "@/db/schema/revision-columns";
import { templateRevisions, templates } from "@/db/schema/templates";
import { permit } from "@/lib/access/permit";
import { appendAudit } from "@/lib/audit/append";
import { engineVersion } from "@/lib/calculation/engine";
import { after, day, now } from "@/lib/core/clock";
import { newId } from "@/lib/core/ids";
import { seeding } from "./seeding";

/** Something that arrives with Coldface, checked already. */
export interface Supplied {
  slug: string;
  category: string;
  title: string;
  /** Canonical text, and its SHA-256. */
  definition: string;
  definitionHash: string;
}

/** `added`, or for what the database has already: `present`, or `different` when it is not the supplied content. */
export type Outcome = "added" | "present" | "different";

/** Twelve months until an issued revision must have been verified again. */
const verifyWithin = 365 * day;

/** Revision 1 as the supplied set issued it; in the demo works two seniors have signed for it. */
function revisionOne(item: Supplied, adoptedBy: string[] | null) {
  const at = now();
  return {
    id: newId("rev"),
    number: 1,
    state: "issued" as const,
    title: item.title,
    definition: item.definition,
    definitionHash: item.definitionHash,
    engine: engineVersion,
    originatorIds: [suppliedSet],
    reasonForChange: "Supplied with Coldface.",
    createdAt: at,
    createdBy: suppliedSet,
    changedAt: at,
    submittedAt: at,
    submittedBy: suppliedSet,
    checkedBy: suppliedSet,
    issuedAt: at,
    issuedBy: suppliedSet,
    adoptedAt: adoptedBy === null ? null : at,
    adoptedBy,
    verifyBy: after(at, verifyWithin),
    supplied: true,
  };
}

export async function supplyTemplate(tx: Tx, item: Supplied, adoptedBy: string[] | null): Promise<Outcome> {
  const permitted = permit(seeding, "template.supply", { slug: item.slug });
  const known = await tx
    .select({ hash: templateRevisions.definitionHash })
    .from(templates)
    .innerJoin(templateRevisions, eq(templateRevisions.templateId, templates.id))
    .where(eq(templates.slug, item.slug));
  if (known.length > 0) return outcomeOf(known, item);
  const id = newId("tpl");
  await tx
    .insert(templates)
    .values({ id, slug: item.slug, category: item.category, lastNumber: 1, createdAt: now() });
  await tx.insert(templateRevisions).values({ ...revisionOne(item, adoptedBy), templateId: id });
  await appendAudit(tx, permitted, {
    action: "template.supplied",
    object: `template:${item.slug}@1`,
    details: { definitionHash: item.definitionHash },
  });
  return "added";
}

export async function supplyMaterial(tx: Tx, item: Supplied, adoptedBy: string[] | null): Promise<Outcome> {
  const permitted = permit(seeding, "material.supply", { slug: item.slug });
  const known = await tx
    .select({ hash: materialRevisions.definitionHash })
    .from(materials)
    .innerJoin(materialRevisions, eq(materialRevisions.materialId, materials.id))
    .where(eq(materials.slug, item.slug));
  if (known.length > 0) return outcomeOf(known, item);
  const id = newId("mat");
  await tx
    .insert(materials)
    .values({ id, slug: item.slug, category: item.category, lastNumber: 1, createdAt: now() });
  await tx.insert(materialRevisions).values({ ...revisionOne(item, adoptedBy), materialId: id });
  await appendAudit(tx, permitted, {
    action: "material.supplied",
    object: `material:${item.slug}@1`,
    details: { definitionHash: item.definitionHash },
  });
  return "added";
}

/** What the works have issued since is theirs; a supplied revision never changes behind their back. */
function outcomeOf(known: { hash: string }[], item: Supplied): Outcome {
  return known.some(({ hash }) => hash === item.definitionHash) ? "present" : "different";
}
