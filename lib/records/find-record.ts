import "server-only";
import { eq } from "drizzle-orm";
import type { Readable } from "@/db/client";
import { records } from "@/db/schema/records";
import { CodedError } from "@/lib/core/errors";
import { recordNumber } from "./record-number";
import type { RecordRow } from "./view";

/** The row behind a record's name. Throws `not-found`. */
export async function findRecord(db: Readable, name: string): Promise<RecordRow> {
  const [row] = await db
    .select()
    .from(records)
    .where(eq(records.number, recordNumber(name)));
  if (!row) throw new CodedError("not-found", "There is no such record, or it is not yours to see.");
  return row;
}
