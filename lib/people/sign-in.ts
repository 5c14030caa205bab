import "server-only";
import { eq } from "drizzle-orm";
import { reader } from "@/db/client";
import { write } from "@/db/tx";
import { people } from "@/db/schema/people";
import type { PersonActor } from "@/lib/access/actor";
import { claimAttempt, forgetAttempts } from "@/lib/access/login-throttle";
import { verifyPassword } from "@/lib/access/password";
import { startSession } from "@/lib/access/sessions";
import { appendAudit } from "@/lib/audit/append";
import { CodedError } from "@/lib/core/errors";
import { parseInput } from "@/lib/core/parse";
import { SignInInput } from "./schemas";

/**
 * Begins a session with address and password. Unknown address, wrong password and deactivated person are answered
 * with the same words after the same work. Throws CodedError `unauthenticated` or `too-many-requests`.
 */
export async function signIn(input: SignInInput): Promise<PersonActor> {
  const { email, password } = parseInput(SignInInput, input);
  await claimAttempt(email);
  const [person] = await reader().select().from(people).where(eq(people.email, email.toLowerCase())).limit(1);
  const matches = await verifyPassword(person?.passwordHash ?? null, password);
  if (!person || !matches || !person.active) {
    throw new CodedError("unauthenticated", "The address and the password do not belong together.");
  }
  await forgetAttempts(email);
  return write(async (tx) => {
    const actor: PersonActor = {
      kind: "person",
      personId: person.id,
      email: person.email,
      name: person.name,
      role: person.role,
      isAdmin: person.isAdmin,
      sessionId: await startSession(tx, person.id),
    };
    await appendAudit(tx, actor, { action: "person.signed-in", object: `person:${person.id}` });
    return actor;
  });
}
