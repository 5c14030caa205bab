import "server-only";
import { reader } from "@/db/client";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { findRecord } from "./find-record";
import type { RecordView } from "./schemas";
import { recordView, tagsOf, voidOf } from "./view";

/** One record as it was kept. Throws `not-found`. */
export async function getRecord(actor: Actor, { number }: { number: string }): Promise<RecordView> {
  const db = reader();
  const row = await findRecord(db, number);
  permit(actor, "record.read", row);
  const [tags, voided] = await Promise.all([tagsOf(db, row.number), voidOf(db, row.number)]);
  return recordView(row, tags, voided);
}
