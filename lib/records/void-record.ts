import "server-only";
import type { Tx } from "@/db/client";
import { recordVoids } from "@/db/schema/records";
import { write } from "@/db/tx";
import { actorId, type Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { appendAudit } from "@/lib/audit/append";
import { plainCall, type Call } from "@/lib/core/call";
import { now } from "@/lib/core/clock";
import { CodedError } from "@/lib/core/errors";
import { findRecord } from "./find-record";
import type { RecordView } from "./schemas";
import { recordView, tagsOf, voidOf } from "./view";

/** Declares a record not to be used, with a reason; it stays readable. Throws `state-conflict` when it is void. */
export async function voidRecord(
  actor: Actor,
  { number, reason }: { number: string; reason: string },
  call: Call<Tx, RecordView> = plainCall,
): Promise<RecordView> {
  return write(async (tx) => {
    const row = await findRecord(tx, number);
    const permitted = permit(actor, "record.void", row);
    if ((await voidOf(tx, row.number)) !== null) {
      throw new CodedError("state-conflict", `Record ${number} is void already.`);
    }
    const voided = {
      recordNumber: row.number,
      reason,
      byKind: actor.kind,
      byId: actorId(actor),
      at: now(),
    };
    await tx.insert(recordVoids).values(voided);
    const answer = await recordView(row, await tagsOf(tx, row.number), voided);
    await appendAudit(tx, permitted, {
      action: "record.voided",
      object: `record:${number}`,
      details: { reason },
    });
    await call.remember(tx, answer);
    return answer;
  });
}
