import "server-only";
import { and, eq, isNull, lt } from "drizzle-orm";
import { reader, type Tx } from "@/db/client";
import { write } from "@/db/tx";
import { people, sessions } from "@/db/schema/people";
import { after, hour, minute, now } from "@/lib/core/clock";
import { newId } from "@/lib/core/ids";
import { log } from "@/lib/core/log";
import type { PersonActor } from "./actor";

/** A working day; after it one signs in again. */
export const sessionLength = 12 * hour;
const seenEvery = 5 * minute;

export async function startSession(tx: Tx, personId: string): Promise<string> {
  const id = newId("ses");
  const at = now();
  await tx
    .insert(sessions)
    .values({ id, personId, createdAt: at, expiresAt: after(at, sessionLength), lastSeenAt: at });
  return id;
}

/** The person of a session that still stands, read anew each time: ended, expired or deactivated gives null. */
export async function findSession(sessionId: string): Promise<PersonActor | null> {
  const [row] = await reader()
    .select({ session: sessions, person: people })
    .from(sessions)
    .innerJoin(people, eq(people.id, sessions.personId))
    .where(eq(sessions.id, sessionId))
    .limit(1);
  if (!row) return null;
  const { session, person } = row;
  const at = now();
  if (session.endedAt !== null || session.expiresAt <= at || !person.active) return null;
  if (session.lastSeenAt < after(at, -seenEvery)) markSeen(sessionId, at);
  return {
    kind: "person",
    personId: person.id,
    email: person.email,
    name: person.name,
    role: person.role,
    isAdmin: person.isAdmin,
    sessionId,
  };
}

/** Ends the session; answers whether it stood. */
export async function endSession(tx: Tx, sessionId: string): Promise<boolean> {
  const ended = await tx
    .update(sessions)
    .set({ endedAt: now() })
    .where(and(eq(sessions.id, sessionId), isNull(sessions.endedAt)))
    .returning({ id: sessions.id });
  return ended.length === 1;
}

// Nobody waits for this: a request is not refused because its time of day could not be noted.
function markSeen(sessionId: string, at: Date): void {
  write((tx) =>
    tx
      .update(sessions)
      .set({ lastSeenAt: at })
      .where(and(eq(sessions.id, sessionId), lt(sessions.lastSeenAt, at))),
  ).catch((error: unknown) => log.warn("session-not-marked", { error }));
}
