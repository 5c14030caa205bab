import "server-only";
import { sql } from "drizzle-orm";
import { write } from "@/db/tx";
import { usageDaily } from "@/db/schema/system";
import { actorId, type Actor } from "@/lib/access/actor";
import { now, second } from "@/lib/core/clock";
import { log } from "@/lib/core/log";

/** Runs are counted in memory and added to the database every 5 s and at stop, so that an evaluation writes nothing. */

type Row = typeof usageDaily.$inferInsert;

const shared = globalThis as typeof globalThis & {
  coldfaceUsage?: Map<string, Row>;
  coldfaceUsageTimer?: NodeJS.Timeout;
};
const counts = () => (shared.coldfaceUsage ??= new Map());

/** Counts `runs` evaluations of a template's revision by the actor. */
export function countUsage(actor: Actor, template: string, revision: number, runs = 1): void {
  const lastAt = now();
  const row: Row = {
    day: lastAt.toISOString().slice(0, 10),
    callerKind: actor.kind,
    callerId: actorId(actor),
    template,
    revision,
    count: runs,
    lastAt,
  };
  add(row);
}

function add(row: Row): void {
  const name = [row.day, row.callerKind, row.callerId, row.template, row.revision].join("\n");
  const known = counts().get(name);
  if (!known) counts().set(name, row);
  else {
    known.count += row.count;
    if (row.lastAt > known.lastAt) known.lastAt = row.lastAt;
  }
}

/** Adds what was counted to the database; counts that could not be written are kept for the next time. */
export async function flushUsage(): Promise<void> {
  const rows = [...counts().values()];
  if (rows.length === 0) return;
  counts().clear();
  try {
    await write(async (tx) => {
      for (let at = 0; at < rows.length; at += 100) {
        await tx
          .insert(usageDaily)
          .values(rows.slice(at, at + 100))
          .onConflictDoUpdate({
            target: [
              usageDaily.day,
              usageDaily.callerKind,
              usageDaily.callerId,
              usageDaily.template,
              usageDaily.revision,
            ],
            set: { count: sql`${usageDaily.count} + excluded.count`, lastAt: sql`excluded.last_at` },
          });
      }
    });
  } catch (error) {
    for (const row of rows) add(row);
    throw error;
  }
}

/** Begins the flush every 5 s; called once at the start of a server. */
export function startUsageFlush(): void {
  if (shared.coldfaceUsageTimer) return;
  shared.coldfaceUsageTimer = setInterval(() => {
    flushUsage().catch((error: unknown) => log.warn("usage-not-flushed", { error }));
  }, 5 * second);
  shared.coldfaceUsageTimer.unref();
}
