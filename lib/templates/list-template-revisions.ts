import "server-only";
import { and, desc, eq, inArray, lt } from "drizzle-orm";
import { z } from "zod";
import { reader } from "@/db/client";
import { templateRevisions, templates } from "@/db/schema/templates";
import { visibleStates } from "@/lib/access/actions";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { pageOf, readCursor, type Page } from "@/lib/core/paging";
import { peopleOf, revisionMembers } from "@/lib/materials/revision-summary";
import { namesOf } from "@/lib/people/names";
import { nothingHere } from "./find-revision";
import type { RevisionSummary } from "./schemas";

export interface ListRevisionsInput {
  slug: string;
  limit: number;
  cursor?: string | undefined;
}

/** Revisions that the actor may see, latest first. Throws `not-found` when there is none at all. */
export async function listTemplateRevisions(
  actor: Actor,
  { slug, limit, cursor }: ListRevisionsInput,
): Promise<Page<RevisionSummary>> {
  permit(actor, "template.read", { slug });
  const below = cursor === undefined ? Number.MAX_SAFE_INTEGER : readCursor(cursor, z.tuple([z.int()]))[0];
  const rows = await reader()
    .select({ revision: templateRevisions })
    .from(templateRevisions)
    .innerJoin(templates, eq(templates.id, templateRevisions.templateId))
    .where(
      and(
        eq(templates.slug, slug),
        inArray(templateRevisions.state, visibleStates(actor)),
        lt(templateRevisions.number, below),
      ),
    )
    .orderBy(desc(templateRevisions.number))
    .limit(limit + 1);
  if (rows.length === 0 && cursor === undefined) throw nothingHere();
  const nameOf = await namesOf(rows.flatMap(({ revision }) => peopleOf(revision)));
  return pageOf(
    rows,
    limit,
    ({ revision }) => [revision.number],
    ({ revision }) => ({ template: slug, ...revisionMembers(revision, nameOf) }),
  );
}
