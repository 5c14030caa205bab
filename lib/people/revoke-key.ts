import "server-only";
import { eq } from "drizzle-orm";
import { reader } from "@/db/client";
import { keys } from "@/db/schema/people";
import { write } from "@/db/tx";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { appendAudit } from "@/lib/audit/append";
import { now } from "@/lib/core/clock";
import { CodedError } from "@/lib/core/errors";

/** Ends a key on its next request, on every instance. A revoked key stays revoked, with its first date. */
export async function revokeKey(actor: Actor, input: { id: string }): Promise<void> {
  const [key] = await reader().select().from(keys).where(eq(keys.id, input.id)).limit(1);
  // An unknown key and somebody else's are answered alike: this owner is nobody.
  const permitted = permit(actor, "key.revoke", { ownerId: key?.ownerId ?? "" });
  if (!key) throw new CodedError("not-found", "There is nothing here, or it is not yours to see.");
  await write(async (tx) => {
    const [current] = await tx.select({ revokedAt: keys.revokedAt }).from(keys).where(eq(keys.id, key.id));
    if (current?.revokedAt) return;
    await tx.update(keys).set({ revokedAt: now() }).where(eq(keys.id, key.id));
    await appendAudit(tx, permitted, { action: "key.revoked", object: `key:${key.id}` });
  });
}
