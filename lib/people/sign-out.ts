import "server-only";
import { write } from "@/db/tx";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { endSession } from "@/lib/access/sessions";
import { appendAudit } from "@/lib/audit/append";

/** Ends the actor's own session; its cookie is worth nothing from the next request on. */
export async function signOut(actor: Actor): Promise<void> {
  const permitted = permit(actor, "session.end");
  if (actor.kind !== "person") return;
  await write(async (tx) => {
    if (!(await endSession(tx, actor.sessionId))) return;
    await appendAudit(tx, permitted, { action: "person.signed-out", object: `person:${actor.personId}` });
  });
}
