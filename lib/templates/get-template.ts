import "server-only";
import { eq } from "drizzle-orm";
import { reader } from "@/db/client";
import { templateRevisions, templates } from "@/db/schema/templates";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { peopleOf, revisionMembers } from "@/lib/materials/revision-summary";
import { namesOf } from "@/lib/people/names";
import { definitionFrom } from "./definition-cache";
import { findRevision, findShownRevision, nothingHere } from "./find-revision";
import type { RevisionView, TemplateView } from "./schemas";

/** A template with the revision that a run by slug uses. Throws `not-found`. */
export async function getTemplate(actor: Actor, { slug }: { slug: string }): Promise<TemplateView> {
  permit(actor, "template.read", { slug });
  const shown = await findShownRevision(actor, slug);
  if (shown === null) throw nothingHere();
  const [template] = await reader()
    .select({ createdAt: templates.createdAt })
    .from(templates)
    .where(eq(templates.slug, slug));
  if (!template) throw nothingHere();
  const current = await revisionView(slug, shown.id);
  return {
    slug,
    category: current.definition.category,
    createdAt: template.createdAt.toISOString(),
    current,
  };
}

/** One revision with its definition; withdrawn ones stay readable. Throws `not-found`. */
export async function getTemplateRevision(
  actor: Actor,
  { slug, revision }: { slug: string; revision: number },
): Promise<RevisionView> {
  permit(actor, "template.read", { slug });
  const found = await findRevision(slug, revision);
  if (found === null) throw nothingHere();
  permit(actor, "template.read", { slug, state: found.state });
  return revisionView(slug, found.id);
}

async function revisionView(slug: string, id: string): Promise<RevisionView> {
  const [row] = await reader().select().from(templateRevisions).where(eq(templateRevisions.id, id));
  if (!row) throw nothingHere();
  const nameOf = await namesOf(peopleOf(row));
  return {
    template: slug,
    ...revisionMembers(row, nameOf),
    definition: definitionFrom(row.definitionHash, row.definition),
  };
}
