import "server-only";
import { and, desc, eq, inArray, sql } from "drizzle-orm";
import { reader } from "@/db/client";
import { prepared } from "@/db/prepared";
import { templateRevisions, templates } from "@/db/schema/templates";
import type { RevisionState } from "@/db/vocabulary";
import { visibleStates } from "@/lib/access/actions";
import type { Actor } from "@/lib/access/actor";
import { permit, type Permitted } from "@/lib/access/permit";
import { CodedError } from "@/lib/core/errors";
import type { Lifecycle } from "./schemas";

/** What a run has to know of a revision; the definition itself comes from the cache. */
export interface RunnableRevision {
  id: string;
  slug: string;
  number: number;
  state: RevisionState;
  definitionHash: string;
  title: string;
  supersededAt: Date | null;
  withdrawalDate: Date | null;
  withdrawnAt: Date | null;
  withdrawnReason: string | null;
}

const columns = {
  id: templateRevisions.id,
  slug: templates.slug,
  number: templateRevisions.number,
  state: templateRevisions.state,
  definitionHash: templateRevisions.definitionHash,
  title: templateRevisions.title,
  supersededAt: templateRevisions.supersededAt,
  withdrawalDate: templateRevisions.withdrawalDate,
  withdrawnAt: templateRevisions.withdrawnAt,
  withdrawnReason: templateRevisions.withdrawnReason,
};

const issuedBySlug = prepared((db) =>
  db
    .select(columns)
    .from(templateRevisions)
    .innerJoin(templates, eq(templates.id, templateRevisions.templateId))
    .where(and(eq(templates.slug, sql.placeholder("slug")), eq(templateRevisions.state, "issued")))
    .prepare(),
);

const numberedBySlug = prepared((db) =>
  db
    .select(columns)
    .from(templateRevisions)
    .innerJoin(templates, eq(templates.id, templateRevisions.templateId))
    .where(
      and(
        eq(templates.slug, sql.placeholder("slug")),
        eq(templateRevisions.number, sql.placeholder("number")),
      ),
    )
    .prepare(),
);

/** The issued revision of a template, or the numbered one whatever its state; null when there is none. */
export async function findRevision(
  slug: string,
  number: number | undefined,
): Promise<RunnableRevision | null> {
  const [row] =
    number === undefined ? await issuedBySlug().all({ slug }) : await numberedBySlug().all({ slug, number });
  return row ?? null;
}

/** The issued revision, else the latest one that the actor may see; null when there is none. */
export async function findShownRevision(actor: Actor, slug: string): Promise<RunnableRevision | null> {
  const issued = await findRevision(slug, undefined);
  if (issued) return issued;
  const [row] = await reader()
    .select(columns)
    .from(templateRevisions)
    .innerJoin(templates, eq(templates.id, templateRevisions.templateId))
    .where(and(eq(templates.slug, slug), inArray(templateRevisions.state, visibleStates(actor))))
    .orderBy(desc(templateRevisions.number))
    .limit(1);
  return row ?? null;
}

export function nothingHere(): CodedError {
  return new CodedError("not-found", "There is no such template or revision, or it is not yours to see.");
}

function withdrawn(revision: RunnableRevision): CodedError {
  const at = revision.withdrawnAt?.toISOString() ?? null;
  const reason = revision.withdrawnReason ?? "";
  return new CodedError(
    "withdrawn",
    `Revision ${revision.number} of ${revision.slug} was withdrawn and no longer runs. Reason: ${reason}`,
    [],
    { withdrawal: { at, reason } },
  );
}

export async function lifecycleOf(revision: RunnableRevision): Promise<Lifecycle> {
  const { slug, supersededAt, withdrawalDate, state } = revision;
  const successor = state === "superseded" ? ((await findRevision(slug, undefined))?.number ?? null) : null;
  return { slug, supersededAt: state === "superseded" ? supersededAt : null, withdrawalDate, successor };
}

/**
 * The revision that a run uses, with the permission to run it (or to keep its record). Throws `not-found`, and
 * `withdrawn` for a revision out of use.
 */
export async function revisionToRun<Action extends "template.evaluate" | "record.create">(
  actor: Actor,
  action: Action,
  slug: string,
  number: number | undefined,
): Promise<{ revision: RunnableRevision; permitted: Permitted<Action> }> {
  const permitted = permitRun(actor, action, slug);
  const revision =
    number === undefined ? await findShownRevision(actor, slug) : await findRevision(slug, number);
  if (revision === null) throw nothingHere();
  permitRun(actor, action, slug, revision.state);
  if (revision.state === "withdrawn") throw withdrawn(revision);
  // By slug alone, what runs is what is issued; a draft is asked for by its number.
  if (number === undefined && revision.state !== "issued") throw nothingHere();
  return { revision, permitted };
}

function permitRun<Action extends "template.evaluate" | "record.create">(
  actor: Actor,
  action: Action,
  slug: string,
  state?: RevisionState,
): Permitted<Action> {
  const ask = permit as (
    actor: Actor,
    action: Action,
    object: { slug: string; state?: RevisionState },
  ) => Permitted<Action>;
  return ask(actor, action, state === undefined ? { slug } : { slug, state });
}
