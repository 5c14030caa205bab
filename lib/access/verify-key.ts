import "server-only";
import { BlockList, isIP } from "node:net";
import { and, eq, isNull, lt, or, sql } from "drizzle-orm";
import { prepared } from "@/db/prepared";
import { write } from "@/db/tx";
import { keys, people } from "@/db/schema/people";
import { after, minute, now } from "@/lib/core/clock";
import { equalInConstantTime } from "@/lib/core/crypto";
import { CodedError } from "@/lib/core/errors";
import { log } from "@/lib/core/log";
import type { KeyActor } from "./actor";
import { isWellFormedKey } from "./api-key";
import { possibleLookups } from "./key-secrets";

const usedEvery = 5 * minute;

/** Challenge of RFC 6750 that goes with the refusal of a key. */
export const invalidTokenChallenge = 'Bearer realm="api", error="invalid_token"';

function refusal(detail: string): CodedError {
  return new CodedError("unauthenticated", detail, [], { challenge: invalidTokenChallenge });
}

const keyByLookup = prepared((db) =>
  db
    .select({
      key: {
        id: keys.id,
        lookup: keys.lookup,
        label: keys.label,
        scopes: keys.scopes,
        templates: keys.templates,
        networks: keys.networks,
        defaultsPolicy: keys.defaultsPolicy,
        ratePerMinute: keys.ratePerMinute,
        expiresAt: keys.expiresAt,
        revokedAt: keys.revokedAt,
        lastUsedAt: keys.lastUsedAt,
      },
      owner: { id: people.id, role: people.role, active: people.active },
    })
    .from(keys)
    .innerJoin(people, eq(people.id, keys.ownerId))
    .where(eq(keys.lookup, sql.placeholder("lookup")))
    .limit(1)
    .prepare(),
);

/** Under the present secret first; under a former one only while such are kept. */
async function findKey(lookups: readonly string[]) {
  for (const lookup of lookups) {
    const [row] = await keyByLookup().all({ lookup });
    if (row && equalInConstantTime(lookup, row.key.lookup)) return row;
  }
  return null;
}

/**
 * The actor behind a presented key. `address` is the caller's, or null when no proxy vouches for it. Garbage is refused
 * before any database read. Throws CodedError `unauthenticated` with the member `challenge`.
 */
export async function verifyKey(text: string, address: string | null): Promise<KeyActor> {
  if (!isWellFormedKey(text)) throw refusal("This is not an API key of Coldface, or it was mistyped.");
  const row = await findKey(possibleLookups(text));
  if (!row) throw refusal("This key is not known here.");
  const { key, owner } = row;
  const at = now();
  if (key.revokedAt !== null) throw refusal("This key was revoked.");
  if (key.expiresAt <= at) throw refusal(`This key expired at ${key.expiresAt.toISOString()}.`);
  if (!owner.active) throw refusal("The owner of this key is no longer active.");
  if (key.networks !== null && !isInside(key.networks, address)) {
    throw refusal("This key may not be used from this network.");
  }
  if (key.lastUsedAt === null || key.lastUsedAt < after(at, -usedEvery)) markUsed(key.id, at);
  return {
    kind: "key",
    keyId: key.id,
    label: key.label,
    owner: { personId: owner.id, role: owner.role },
    scopes: key.scopes,
    templates: key.templates,
    defaultsPolicy: key.defaultsPolicy,
    ratePerMinute: key.ratePerMinute,
  };
}

/** Without a believed address a key that is limited to networks is refused. */
function isInside(networks: readonly string[], address: string | null): boolean {
  if (address === null) return false;
  const family = isIP(address);
  if (family === 0) return false;
  const list = new BlockList();
  for (const network of networks) {
    const [base = "", length] = network.split("/");
    const kind = isIP(base) === 6 ? "ipv6" : "ipv4";
    if (length === undefined) list.addAddress(base, kind);
    else list.addSubnet(base, Number(length), kind);
  }
  return list.check(address, family === 6 ? "ipv6" : "ipv4");
}

function markUsed(keyId: string, at: Date): void {
  const stale = or(isNull(keys.lastUsedAt), lt(keys.lastUsedAt, after(at, -usedEvery)));
  write((tx) =>
    tx
      .update(keys)
      .set({ lastUsedAt: at })
      .where(and(eq(keys.id, keyId), stale)),
  ).catch((error: unknown) => log.warn("key-not-marked", { keyId, error }));
}
