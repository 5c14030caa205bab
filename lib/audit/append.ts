import "server-only";
import { desc } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { audit } from "@/db/schema/system";
import type { AuditAction } from "@/db/vocabulary";
import { actorId, type Actor } from "@/lib/access/actor";
import { now } from "@/lib/core/clock";
import { secretVersion } from "@/lib/core/crypto";
import { env } from "@/lib/core/env";
import { chainHash, chainStart } from "./chain";

export interface AuditEntry {
  action: AuditAction;
  /** `template:plane-wall@1`, `record:R-000001`, `person:per_…`. */
  object: string;
  /** What a reader of the trail needs to know; never a secret. */
  details?: Record<string, unknown>;
}

/** Adds a row to the trail, in the transaction of what it tells of, chained to the row before. */
export async function appendAudit(tx: Tx, by: Actor | { actor: Actor }, entry: AuditEntry): Promise<void> {
  const actor = "actor" in by ? by.actor : by;
  const [last] = await tx
    .select({ seq: audit.seq, hash: audit.hash })
    .from(audit)
    .orderBy(desc(audit.seq))
    .limit(1);
  const secret = env().AUDIT_SECRET;
  const details = entry.details ?? {};
  const row = {
    seq: (last?.seq ?? 0) + 1,
    at: now(),
    actorKind: actor.kind,
    actorId: actorId(actor),
    action: entry.action,
    object: entry.object,
    previousHash: last?.hash ?? chainStart,
    secretVersion: secretVersion(secret),
  };
  const hash = chainHash(secret, { ...row, at: row.at.getTime(), details: JSON.stringify(details) });
  await tx.insert(audit).values({ ...row, details, hash });
}
