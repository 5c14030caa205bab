import "server-only";
import { eq } from "drizzle-orm";
import { write } from "@/db/tx";
import { rateWindows } from "@/db/schema/people";
import { minute } from "@/lib/core/clock";
import { actorId, type Actor } from "./actor";

/**
 * A number of requests per minute and caller, kept exactly over all instances: an instance leases tokens of the present
 * minute from the database in blocks of a tenth, so that most requests need no write. Leased tokens that nobody used
 * are lost with their minute, so that the limit is never exceeded.
 */

export interface RateVerdict {
  allowed: boolean;
  limit: number;
  /** Tokens that this instance knows to be left in this minute. */
  remaining: number;
  /** Seconds until the next minute begins. */
  resetSeconds: number;
}

interface Bucket {
  window: number;
  tokens: number;
  /** Tokens not yet leased by anybody, as of the last lease. */
  unleased: number;
  lease: Promise<void> | null;
}

const shared = globalThis as typeof globalThis & { coldfaceBuckets?: Map<string, Bucket> };
const buckets = (shared.coldfaceBuckets ??= new Map<string, Bucket>());
const mostBuckets = 10_000;

/** People who work with the forms; a form evaluates while one types. */
const personRatePerMinute = 1200;

/** Takes `cost` tokens from the actor's minute. The system is not limited. */
export async function takeToken(actor: Actor, cost = 1): Promise<RateVerdict> {
  if (actor.kind === "system")
    return { allowed: true, limit: Infinity, remaining: Infinity, resetSeconds: 0 };
  const limit = actor.kind === "key" ? actor.ratePerMinute : personRatePerMinute;
  return takeTokens(`${actor.kind}:${actorId(actor)}`, limit, cost);
}

export async function takeTokens(caller: string, limit: number, cost: number): Promise<RateVerdict> {
  for (;;) {
    const present = Math.floor(Date.now() / minute);
    const bucket = bucketOf(caller, present, limit);
    if (bucket.tokens >= cost) {
      bucket.tokens -= cost;
      return verdict(true, limit, bucket);
    }
    if (bucket.tokens + bucket.unleased < cost) return verdict(false, limit, bucket);
    bucket.lease ??= lease(caller, limit, Math.max(cost - bucket.tokens, Math.ceil(limit / 10)), bucket);
    await bucket.lease;
  }
}

function bucketOf(caller: string, present: number, limit: number): Bucket {
  const known = buckets.get(caller);
  if (known && known.window >= present) return known;
  if (buckets.size >= mostBuckets) {
    for (const [name, bucket] of buckets) if (bucket.window < present) buckets.delete(name);
  }
  const fresh: Bucket = { window: present, tokens: 0, unleased: limit, lease: null };
  buckets.set(caller, fresh);
  return fresh;
}

async function lease(caller: string, limit: number, wanted: number, bucket: Bucket): Promise<void> {
  try {
    await write(async (tx) => {
      const [row] = await tx.select().from(rateWindows).where(eq(rateWindows.caller, caller)).limit(1);
      // Another instance's clock may be ahead: its minute is the one that counts.
      const window = Math.max(bucket.window, row?.window ?? 0);
      const leased = row?.window === window ? row.leased : 0;
      const granted = Math.max(0, Math.min(wanted, limit - leased));
      const values = { caller, window, leased: leased + granted };
      await tx
        .insert(rateWindows)
        .values(values)
        .onConflictDoUpdate({ target: rateWindows.caller, set: { window, leased: values.leased } });
      return { window, granted, unleased: limit - values.leased };
    }).then(({ window, granted, unleased }) => {
      // Tokens of an older minute are lost with it.
      bucket.tokens = (window === bucket.window ? bucket.tokens : 0) + granted;
      bucket.window = window;
      bucket.unleased = Math.max(0, unleased);
    });
  } finally {
    bucket.lease = null;
  }
}

function verdict(allowed: boolean, limit: number, bucket: Bucket): RateVerdict {
  const resetSeconds = Math.max(1, Math.ceil(((bucket.window + 1) * minute - Date.now()) / 1000));
  return { allowed, limit, remaining: Math.max(0, bucket.tokens + bucket.unleased), resetSeconds };
}
