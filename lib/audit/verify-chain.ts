import "server-only";
import { asc, gt, sql } from "drizzle-orm";
import { reader } from "@/db/client";
import { audit } from "@/db/schema/system";
import { secretVersion } from "@/lib/core/crypto";
import { env } from "@/lib/core/env";
import { chainHash, chainStart } from "./chain";

export interface ChainHead {
  seq: number;
  hash: string;
}

export interface ChainVerdict {
  rows: number;
  head: ChainHead | null;
  /** The first thing that is wrong, as a sentence; null when the chain holds. */
  fault: string | null;
}

const pageSize = 1000;

/**
 * Walks the whole trail. It finds a changed row by its hash, a missing one by the gap, and a cut end by the counter that
 * SQLite keeps or by a head that was noted outside (`known`), which a forger of the whole file cannot reach.
 */
export async function verifyChain(known?: ChainHead): Promise<ChainVerdict> {
  const secrets = new Map(
    [env().AUDIT_SECRET, ...env().AUDIT_SECRET_OLDER].map((secret) => [secretVersion(secret), secret]),
  );
  let head = null as ChainHead | null;
  let knownMet = known === undefined;
  const verdict = (fault: string | null): ChainVerdict => ({ rows: head?.seq ?? 0, head, fault });

  for (;;) {
    const page = await reader()
      .select({
        seq: audit.seq,
        at: sql<number>`${audit.at}`,
        actorKind: audit.actorKind,
        actorId: audit.actorId,
        action: audit.action,
        object: audit.object,
        details: sql<string>`${audit.details}`,
        previousHash: audit.previousHash,
        hash: audit.hash,
        secretVersion: audit.secretVersion,
      })
      .from(audit)
      .where(gt(audit.seq, head?.seq ?? 0))
      .orderBy(asc(audit.seq))
      .limit(pageSize);
    for (const row of page) {
      const expected: number = (head?.seq ?? 0) + 1;
      if (row.seq !== expected) return verdict(`Row ${expected} is missing.`);
      if (row.previousHash !== (head?.hash ?? chainStart)) {
        return verdict(`Row ${row.seq} does not follow the row before it.`);
      }
      const secret = secrets.get(row.secretVersion);
      if (secret === undefined) {
        return verdict(`Row ${row.seq} was made with a secret that this installation does not have.`);
      }
      if (chainHash(secret, row) !== row.hash) return verdict(`Row ${row.seq} was changed.`);
      head = { seq: row.seq, hash: row.hash };
      if (known?.seq === row.seq) {
        if (known.hash !== row.hash) return verdict(`Row ${row.seq} is not the one that was noted as head.`);
        knownMet = true;
      }
    }
    if (page.length < pageSize) break;
  }

  const counter = await reader().get<{ seq: number }>(
    sql`select seq from sqlite_sequence where name = 'audit'`,
  );
  const last = Math.max(counter?.seq ?? 0, knownMet ? 0 : (known?.seq ?? 0));
  if (last > (head?.seq ?? 0))
    return verdict(`The trail ends at row ${head?.seq ?? 0}; it once had ${last}.`);
  return verdict(null);
}
