import { templateRevisions, templates } from "@/db/schema/templates";
import { write } from "@/db/tx";
import type { RevisionState } from "@/db/vocabulary";
import { sha256 } from "@/lib/core/crypto";
import { unique } from "./unique";

type Revision = typeof templateRevisions.$inferInsert;

/** Rows of a template with one revision in the wanted state, as far as the database's own rules ask. */
export async function makeRevision(
  state: RevisionState,
  more: Partial<Revision> = {},
): Promise<{ templateId: string; revisionId: string; slug: string }> {
  const slug = unique("wall");
  const templateId = `tpl_${slug}`;
  const revisionId = `rev_${slug}`;
  await write(async (tx) => {
    await tx
      .insert(templates)
      .values({ id: templateId, slug, category: "walls", lastNumber: 1, createdAt: new Date() });
    await tx.insert(templateRevisions).values({ ...revisionRow(state), id: revisionId, templateId, ...more });
  });
  return { templateId, revisionId, slug };
}

/** Every column that the checks of a state want filled. */
export function revisionRow(state: RevisionState): Omit<Revision, "id" | "templateId"> {
  const at = new Date("2026-01-05T08:00:00Z");
  const definition = JSON.stringify({ title: unique("Definition") });
  const submitted = state === "draft" ? {} : { submittedAt: at, submittedBy: "per_author" };
  const issued =
    state === "draft" || state === "in_check"
      ? {}
      : { issuedAt: at, issuedBy: "per_checker", checkedBy: "per_checker" };
  return {
    number: 1,
    state,
    title: "Wall",
    definition,
    definitionHash: sha256(definition),
    engine: "1.0.0",
    originatorIds: ["per_author"],
    createdAt: at,
    createdBy: "per_author",
    changedAt: at,
    supplied: false,
    ...submitted,
    ...issued,
    ...(state === "superseded" ? { supersededAt: at } : {}),
    ...(state === "withdrawn"
      ? { withdrawnAt: at, withdrawnBy: "per_checker", withdrawnReason: "Test" }
      : {}),
  };
}
