import "server-only";
import type { Tx } from "@/db/client";
import { outbox } from "@/db/schema/system";
import type { OutboxKind } from "@/db/vocabulary";
import { now } from "@/lib/core/clock";
import { newId } from "@/lib/core/ids";

/** Notes something to be delivered, in the transaction of its cause: it leaves only when that is kept. */
export async function enqueue(
  tx: Tx,
  item: { kind: OutboxKind; payload: Record<string, unknown>; dueAt?: Date },
): Promise<string> {
  const at = now();
  const id = newId("out");
  await tx
    .insert(outbox)
    .values({ id, kind: item.kind, payload: item.payload, createdAt: at, dueAt: item.dueAt ?? at });
  return id;
}
