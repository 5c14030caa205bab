import "server-only";
import { and, asc, eq, gt, gte, inArray, sql, sum, type SQL } from "drizzle-orm";
import { z } from "zod";
import { reader } from "@/db/client";
import { usageDaily } from "@/db/schema/system";
import { templateRevisions, templates } from "@/db/schema/templates";
import type { RevisionState } from "@/db/vocabulary";
import { reachesTemplate, visibleStates } from "@/lib/access/actions";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import type { Definition } from "@/lib/calculation/definition";
import { after, day, now } from "@/lib/core/clock";
import { pageOf, readCursor, type Page } from "@/lib/core/paging";
import { matchesWords, searchWords } from "@/lib/core/search-words";
import { namesOf } from "@/lib/people/names";
import { definitionFrom, definitionOf } from "./definition-cache";
import type { ListTemplatesQuery, TemplateItem } from "./schemas";

/**
 * One row per template: the issued revision, else the latest one that the actor may see; with `state`, the latest one
 * of that state. Ordered by slug.
 */
export async function listTemplates(actor: Actor, query: ListTemplatesQuery): Promise<Page<TemplateItem>> {
  permit(actor, "template.list");
  const states = visibleStates(actor).filter((state) => query.state === undefined || state === query.state);
  if (states.length === 0) return { items: [], nextCursor: null };
  const wanted = searchWords(query.search ?? "");
  const from = query.cursor === undefined ? "" : readCursor(query.cursor, z.tuple([z.string()]))[0];

  const rows =
    wanted.length === 0
      ? await readRows(actor, states, query, from, query.limit + 1)
      : await findRows(actor, states, query, from, wanted);
  const page = pageOf(
    rows,
    query.limit,
    (row) => [row.slug],
    (row) => row,
  );
  return { items: await items(page.items), nextCursor: page.nextCursor };
}

const columns = {
  slug: templates.slug,
  category: templates.category,
  id: templateRevisions.id,
  number: templateRevisions.number,
  state: templateRevisions.state,
  title: templateRevisions.title,
  definitionHash: templateRevisions.definitionHash,
  supplied: templateRevisions.supplied,
  adoptedAt: templateRevisions.adoptedAt,
  issuedAt: templateRevisions.issuedAt,
  issuedBy: templateRevisions.issuedBy,
  verifyBy: templateRevisions.verifyBy,
  withdrawalDate: templateRevisions.withdrawalDate,
};
type Row = Awaited<ReturnType<typeof readRows>>[number];

function readRows(
  actor: Actor,
  states: readonly RevisionState[],
  query: ListTemplatesQuery,
  from: string,
  limit: number,
) {
  const shown = sql`(select r.id from template_revisions r where r.template_id = ${templates.id} and ${inArray(
    sql`r.state`,
    states,
  )} order by r.state = 'issued' desc, r.number desc limit 1)`;
  const conditions: (SQL | undefined)[] = [
    gt(templates.slug, from),
    query.category === undefined ? undefined : eq(templates.category, query.category),
    actor.kind === "key" && actor.templates !== null ? inArray(templates.slug, actor.templates) : undefined,
  ];
  return reader()
    .select(columns)
    .from(templates)
    .innerJoin(templateRevisions, eq(templateRevisions.id, shown))
    .where(and(...conditions))
    .orderBy(asc(templates.slug))
    .limit(limit);
}

const everything = 100_000;

/** Searches in memory: the words of a definition are found once and kept by its hash. */
async function findRows(
  actor: Actor,
  states: readonly RevisionState[],
  query: ListTemplatesQuery,
  from: string,
  wanted: readonly string[],
): Promise<Row[]> {
  const found: Row[] = [];
  for (const row of await readRows(actor, states, query, from, everything)) {
    const words = wordsByHash.get(row.definitionHash) ?? (await learnWords(row));
    if (reachesTemplate(actor, row.slug) && matchesWords(words, wanted)) found.push(row);
    if (found.length > query.limit) break;
  }
  return found;
}

const shared = globalThis as typeof globalThis & { coldfaceTemplateWords?: Map<string, ReadonlySet<string>> };
const wordsByHash = (shared.coldfaceTemplateWords ??= new Map<string, ReadonlySet<string>>());

async function learnWords(row: Row): Promise<ReadonlySet<string>> {
  const words = new Set(searchWords(row.slug));
  for (const text of searchedTexts(await definitionOf(row))) {
    for (const word of searchWords(text)) words.add(word);
  }
  if (wordsByHash.size > 10_000) wordsByHash.clear();
  wordsByHash.set(row.definitionHash, words);
  return words;
}

/** Title, tags, and symbols, labels and quantities of inputs and results. */
function searchedTexts(definition: Definition): string[] {
  const texts = [definition.title, definition.category, ...definition.tags];
  for (const input of definition.inputs) {
    texts.push(input.symbol, input.label);
    if (input.kind === "number") texts.push(input.quantity);
    if (input.kind === "table") {
      for (const column of input.columns) {
        texts.push(column.symbol, column.label);
        if (column.kind === "number") texts.push(column.quantity);
      }
    }
  }
  for (const result of definition.results) texts.push(result.symbol, result.label, result.quantity);
  return texts;
}

async function items(rows: readonly Row[]): Promise<TemplateItem[]> {
  if (rows.length === 0) return [];
  const [nameOf, runs, texts] = await Promise.all([
    namesOf(rows.map((row) => row.issuedBy)),
    runsOf(rows.map((row) => row.slug)),
    definitionsOf(rows),
  ]);
  return rows.map((row) => {
    const definition = texts.get(row.id);
    if (!definition) throw new Error(`Revision ${row.id} has no definition.`);
    return {
      slug: row.slug,
      title: row.title,
      summary: definition.summary,
      category: definition.category,
      tags: definition.tags,
      revision: row.number,
      state: row.state,
      supplied: row.supplied,
      adopted: row.adoptedAt !== null,
      issuedAt: row.issuedAt?.toISOString() ?? null,
      issuedBy: row.issuedBy === null ? null : nameOf(row.issuedBy),
      verifyBy: row.verifyBy?.toISOString() ?? null,
      withdrawalDate: row.withdrawalDate?.toISOString() ?? null,
      runsLast30Days: runs.get(row.slug) ?? 0,
    };
  });
}

async function definitionsOf(rows: readonly Row[]): Promise<Map<string, Definition>> {
  const texts = await reader()
    .select({
      id: templateRevisions.id,
      hash: templateRevisions.definitionHash,
      text: templateRevisions.definition,
    })
    .from(templateRevisions)
    .where(
      inArray(
        templateRevisions.id,
        rows.map((row) => row.id),
      ),
    );
  return new Map(texts.map(({ id, hash, text }) => [id, definitionFrom(hash, text)]));
}

/** Runs of the last 30 days by template. */
async function runsOf(slugs: readonly string[]): Promise<Map<string, number>> {
  const since = after(now(), -30 * day)
    .toISOString()
    .slice(0, 10);
  const rows = await reader()
    .select({ template: usageDaily.template, runs: sum(usageDaily.count).mapWith(Number) })
    .from(usageDaily)
    .where(and(inArray(usageDaily.template, [...slugs]), gte(usageDaily.day, since)))
    .groupBy(usageDaily.template);
  return new Map(rows.map((row) => [row.template, row.runs]));
}
