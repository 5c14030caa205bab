import { hmac } from "@/lib/core/crypto";

/** What stands in place of a previous hash before the first row. */
export const chainStart = "0".repeat(64);

export interface ChainedRow {
  seq: number;
  /** Milliseconds since 1970 UTC. */
  at: number;
  actorKind: string;
  actorId: string;
  action: string;
  object: string;
  /** The JSON text as stored. */
  details: string;
  previousHash: string;
  secretVersion: string;
}

/** HMAC-SHA-256 over every column of a row in a fixed order, the hash of the row before among them. */
export function chainHash(secret: string, row: ChainedRow): string {
  return hmac(
    secret,
    JSON.stringify([
      row.seq,
      row.at,
      row.actorKind,
      row.actorId,
      row.action,
      row.object,
      row.details,
      row.previousHash,
      row.secretVersion,
    ]),
  );
}
