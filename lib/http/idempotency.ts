import { createHash } from "node:crypto";
import { and, eq, lt } from "drizzle-orm";
import { reader, type Tx } from "@/db/client";
import { isUniqueViolation } from "@/db/faults";
import { idempotency } from "@/db/schema/system";
import { write } from "@/db/tx";
import { actorId, type Actor } from "@/lib/access/actor";
import { after, day, minute, now } from "@/lib/core/clock";
import { CodedError } from "@/lib/core/errors";

/**
 * Requests that create something and may be sent again. A claim is written first; the answer is written in the
 * transaction of the effect, so that either both are there or neither.
 */

/** How long an answer is given again, and how long a claim without an answer holds. */
const kept = day;
const claimed = minute;

export interface StoredReply {
  readonly status: number;
  readonly location: string | null;
  readonly text: string;
}

export interface Claim {
  /** Writes the answer; called inside the transaction of the effect. */
  store(tx: Tx, reply: StoredReply): Promise<void>;
  /** Gives the key free again after a refusal, because only answers of success are kept. */
  release(): Promise<void>;
}

const structuredString = /^"((?:[\x20-\x21\x23-\x5b\x5d-\x7e]|\\["\\])*)"$/;
const bareToken = /^[\x21\x23-\x7e]+$/;

/** Reads the header: a structured string (RFC 9651) or a bare token. Null when it was not sent. */
export function readIdempotencyKey(header: string | null): string | null {
  if (header === null) return null;
  const text = header.trim();
  const key =
    structuredString.exec(text)?.[1]?.replace(/\\(["\\])/g, "$1") ?? (bareToken.test(text) ? text : "");
  if (key.length === 0 || key.length > 255) {
    throw new CodedError(
      "invalid-input",
      "Idempotency-Key cannot be read. Send 1 to 255 printable ASCII characters, in quotes or bare.",
    );
  }
  return key;
}

/** JSON with members in order, so that the same request written in another order has the same fingerprint. */
function canonical(value: unknown): string {
  if (typeof value !== "object" || value === null) return JSON.stringify(value) ?? "null";
  if (Array.isArray(value)) return `[${value.map(canonical).join(",")}]`;
  const members = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1));
  return `{${members.map(([name, member]) => `${JSON.stringify(name)}:${canonical(member)}`).join(",")}}`;
}

/** Fingerprint of method, path and body. */
export function requestFingerprint(method: string, path: string, body: unknown): string {
  return createHash("sha256")
    .update(`${method} ${path}\n${canonical(body)}`)
    .digest("hex");
}

type Row = typeof idempotency.$inferSelect;

function answerTo(row: Row, requestHash: string): StoredReply | null {
  if (row.requestHash !== requestHash) {
    throw new CodedError(
      "idempotency-key-reused",
      "This Idempotency-Key came with another request before. Use a new key for a new request.",
    );
  }
  if (row.state === "running") {
    throw new CodedError("still-running", "The first request with this Idempotency-Key has not ended yet.");
  }
  if (row.status === null || row.reply === null) return null;
  return { status: row.status, location: row.location, text: row.reply };
}

async function find(scope: string, key: string): Promise<Row | undefined> {
  const rows = await reader()
    .select()
    .from(idempotency)
    .where(and(eq(idempotency.scope, scope), eq(idempotency.key, key)));
  return rows[0];
}

/**
 * Claims a key for this caller: an earlier answer, or a claim to store one. Throws `still-running` while the first
 * request runs and `idempotency-key-reused` for another request.
 */
export async function claimKey(
  actor: Actor,
  key: string,
  requestHash: string,
): Promise<{ earlier: StoredReply } | { claim: Claim }> {
  const scope = `${actor.kind}:${actorId(actor)}`;
  const mine = and(eq(idempotency.scope, scope), eq(idempotency.key, key));
  const at = now();

  const before = await find(scope, key);
  if (before && before.expiresAt > at) {
    const earlier = answerTo(before, requestHash);
    if (earlier) return { earlier };
  }
  try {
    await write(async (tx) => {
      await tx.delete(idempotency).where(and(mine, lt(idempotency.expiresAt, at)));
      await tx
        .insert(idempotency)
        .values({ scope, key, requestHash, state: "running", createdAt: at, expiresAt: after(at, claimed) });
    });
  } catch (error) {
    if (!isUniqueViolation(error)) throw error;
    const winner = await find(scope, key);
    const earlier = winner ? answerTo(winner, requestHash) : null;
    if (earlier) return { earlier };
    throw new CodedError("still-running", "The first request with this Idempotency-Key has not ended yet.");
  }
  return {
    claim: {
      async store(tx, reply) {
        const { status, location, text } = reply;
        const done = await tx
          .update(idempotency)
          .set({ state: "done", status, location, reply: text, expiresAt: after(at, kept) })
          .where(and(mine, eq(idempotency.state, "running"), eq(idempotency.createdAt, at)))
          .returning({ key: idempotency.key });
        // The claim ran out and another request took it: undo this effect rather than have two.
        if (done.length === 0) {
          throw new CodedError("still-running", "Another request with this Idempotency-Key took over.");
        }
      },
      async release() {
        await write(async (tx) => {
          await tx
            .delete(idempotency)
            .where(and(mine, eq(idempotency.state, "running"), eq(idempotency.createdAt, at)));
        });
      },
    },
  };
}
