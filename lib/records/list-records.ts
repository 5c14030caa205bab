import "server-only";
import {
  and,
  asc,
  desc,
  eq,
  exists,
  gte,
  inArray,
  isNull,
  isNotNull,
  like,
  lt,
  lte,
  or,
  type SQL,
} from "drizzle-orm";
import { z } from "zod";
import { reader } from "@/db/client";
import { recordTags, recordVoids, records } from "@/db/schema/records";
import { templateRevisions } from "@/db/schema/templates";
import { responsiblePersonId, type Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { pageOf, readCursor, type Page } from "@/lib/core/paging";
import { recordName, recordNumber } from "./record-number";
import { recordNumberPattern, type ListRecordsQuery, type RecordItem } from "./schemas";
import { doersOf, type Doer } from "./view";

/** Records that the actor may see, latest first. */
export async function listRecords(actor: Actor, query: ListRecordsQuery): Promise<Page<RecordItem>> {
  permit(actor, "record.list");
  const db = reader();
  const rows = await db
    .select({
      number: records.number,
      template: records.template,
      templateTitle: templateRevisions.title,
      revision: records.revision,
      status: records.status,
      title: records.title,
      createdAt: records.createdAt,
      actorKind: records.actorKind,
      actorId: records.actorId,
      voidedAt: recordVoids.at,
    })
    .from(records)
    .innerJoin(templateRevisions, eq(templateRevisions.id, records.templateRevisionId))
    .leftJoin(recordVoids, eq(recordVoids.recordNumber, records.number))
    .where(and(...conditions(actor, query)))
    .orderBy(desc(records.number))
    .limit(query.limit + 1);

  const page = pageOf(
    rows,
    query.limit,
    (row) => [row.number],
    (row) => row,
  );
  const makerOf = (row: (typeof rows)[number]): Doer => ({ kind: row.actorKind, id: row.actorId });
  const [doer, tags] = await Promise.all([
    doersOf(page.items.map(makerOf)),
    tagsByRecord(page.items.map((row) => row.number)),
  ]);
  const items = page.items.map((row) => ({
    number: recordName(row.number),
    template: row.template,
    templateTitle: row.templateTitle,
    revision: row.revision,
    status: row.status,
    title: row.title,
    tags: tags.get(row.number) ?? [],
    createdAt: row.createdAt.toISOString(),
    createdBy: doer(makerOf(row)),
    voided: row.voidedAt !== null,
  }));
  return { items, nextCursor: page.nextCursor };
}

function conditions(actor: Actor, query: ListRecordsQuery): (SQL | undefined)[] {
  const owner = query.owner === "me" ? responsiblePersonId(actor) : query.owner;
  const tagged = (tag: string) =>
    exists(
      reader()
        .select({ tag: recordTags.tag })
        .from(recordTags)
        .where(and(eq(recordTags.recordNumber, records.number), eq(recordTags.tag, tag))),
    );
  return [
    query.cursor === undefined
      ? undefined
      : lt(records.number, readCursor(query.cursor, z.tuple([z.int()]))[0]),
    actor.kind === "key" && actor.templates !== null ? inArray(records.template, actor.templates) : undefined,
    query.template === undefined ? undefined : eq(records.template, query.template),
    query.revision === undefined ? undefined : eq(records.revision, query.revision),
    query.status === undefined ? undefined : eq(records.status, query.status),
    owner === undefined || owner === null ? undefined : eq(records.ownerId, owner),
    query.tag === undefined ? undefined : tagged(query.tag),
    query.voided === undefined
      ? undefined
      : query.voided === "true"
        ? isNotNull(recordVoids.at)
        : isNull(recordVoids.at),
    query.from === undefined ? undefined : gte(records.createdAt, new Date(query.from)),
    query.to === undefined ? undefined : lte(records.createdAt, new Date(query.to)),
    query.search === undefined ? undefined : found(query.search),
  ];
}

function found(search: string): SQL | undefined {
  const part = `%${search.replace(/[%_]/g, "")}%`;
  const name = search.toUpperCase();
  return or(
    like(records.title, part),
    recordNumberPattern.test(name) ? eq(records.number, recordNumber(name)) : undefined,
  );
}

async function tagsByRecord(numbers: readonly number[]): Promise<Map<number, string[]>> {
  if (numbers.length === 0) return new Map();
  const rows = await reader()
    .select()
    .from(recordTags)
    .where(inArray(recordTags.recordNumber, [...numbers]))
    .orderBy(asc(recordTags.tag));
  const tags = new Map<number, string[]>();
  for (const { recordNumber: number, tag } of rows) tags.set(number, [...(tags.get(number) ?? []), tag]);
  return tags;
}
