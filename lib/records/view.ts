import "server-only";
import { asc, eq, inArray } from "drizzle-orm";
import { reader, type Readable } from "@/db/client";
import { keys } from "@/db/schema/people";
import type { records } from "@/db/schema/records";
import { recordTags, recordVoids } from "@/db/schema/records";
import type { ActorKind } from "@/db/vocabulary";
import { actorId, type Actor } from "@/lib/access/actor";
import type { Origin, TemplateEvaluation } from "@/lib/calculation/evaluation";
import { namesOf } from "@/lib/people/names";
import { recordName } from "./record-number";
import type { GivenRequest, RecordActor, RecordView } from "./schemas";

/** What a record keeps of its request. */
export interface KeptRequest extends GivenRequest {
  origins: Record<string, Origin>;
}

export type RecordRow = typeof records.$inferSelect;
export type VoidRow = typeof recordVoids.$inferSelect;

export interface Doer {
  kind: ActorKind;
  id: string;
}

/** Names of people, keys (by their label) and Coldface itself. */
export async function doersOf(doers: readonly Doer[]): Promise<(doer: Doer) => RecordActor> {
  const keyIds = [...new Set(doers.filter((doer) => doer.kind === "key").map((doer) => doer.id))];
  const [nameOf, labels] = await Promise.all([
    namesOf(doers.filter((doer) => doer.kind === "person").map((doer) => doer.id)),
    keyIds.length === 0
      ? []
      : reader().select({ id: keys.id, label: keys.label }).from(keys).where(inArray(keys.id, keyIds)),
  ]);
  const labelOf = new Map(labels.map((row) => [row.id, row.label]));
  return ({ kind, id }) => {
    if (kind === "system") return { kind, id, name: "Coldface" };
    return { kind, id, name: kind === "key" ? (labelOf.get(id) ?? id) : nameOf(id).name };
  };
}

/** The record as everybody is answered; the stored evaluation is read, never calculated again. */
export async function recordView(
  row: RecordRow,
  tags: readonly string[],
  voided: VoidRow | null,
): Promise<RecordView> {
  const maker: Doer = { kind: row.actorKind, id: row.actorId };
  const voider: Doer | null = voided && { kind: voided.byKind, id: voided.byId };
  const doer = await doersOf(voider ? [maker, voider] : [maker]);
  return viewOf(row, tags, doer(maker), voided && voider && { row: voided, by: doer(voider) });
}

/** The view of a record that was made just now by this actor, who need not be looked up. */
export function freshRecordView(row: RecordRow, tags: readonly string[], actor: Actor): RecordView {
  const name = actor.kind === "person" ? actor.name : actor.kind === "key" ? actor.label : "Coldface";
  return viewOf(row, tags, { kind: actor.kind, id: actorId(actor), name }, null);
}

function viewOf(
  row: RecordRow,
  tags: readonly string[],
  maker: RecordActor,
  voided: { row: VoidRow; by: RecordActor } | null,
): RecordView {
  const { origins, ...given } = row.given as unknown as KeptRequest;
  return {
    number: recordName(row.number),
    ...(row.evaluation as unknown as TemplateEvaluation),
    given,
    origins,
    title: row.title,
    note: row.note,
    tags: [...tags],
    createdAt: row.createdAt.toISOString(),
    createdBy: maker,
    node: row.nodeVersion,
    digest: row.digest,
    void: voided && { reason: voided.row.reason, at: voided.row.at.toISOString(), by: voided.by },
  };
}

/** Tags of one record, in order of the alphabet. */
export async function tagsOf(db: Readable, number: number): Promise<string[]> {
  const rows = await db
    .select({ tag: recordTags.tag })
    .from(recordTags)
    .where(eq(recordTags.recordNumber, number))
    .orderBy(asc(recordTags.tag));
  return rows.map((row) => row.tag);
}

export async function voidOf(db: Readable, number: number): Promise<VoidRow | null> {
  const [row] = await db.select().from(recordVoids).where(eq(recordVoids.recordNumber, number));
  return row ?? null;
}
