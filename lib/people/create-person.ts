import "server-only";
import type { Tx } from "@/db/client";
import { isUniqueViolation } from "@/db/faults";
import { people } from "@/db/schema/people";
import { write } from "@/db/tx";
import type { Actor } from "@/lib/access/actor";
import { hashPassword, passwordProblem } from "@/lib/access/password";
import { permit } from "@/lib/access/permit";
import { appendAudit } from "@/lib/audit/append";
import { now } from "@/lib/core/clock";
import { CodedError } from "@/lib/core/errors";
import { newId } from "@/lib/core/ids";
import { parseInput } from "@/lib/core/parse";
import { CreatePersonInput } from "./schemas";

export interface PersonReply {
  id: string;
  email: string;
  name: string;
}

/** Adds a person who signs in with a password. */
export async function createPerson(actor: Actor, input: CreatePersonInput): Promise<PersonReply> {
  const permitted = permit(actor, "person.create");
  const { password, ...person } = parseInput(CreatePersonInput, input);
  refuseWeakPassword(password, person);
  const passwordHash = await hashPassword(password);
  return write((tx) => insertPerson(tx, permitted, { ...person, passwordHash }));
}

export function refuseWeakPassword(password: string, about: { email: string; name: string }): void {
  const message = passwordProblem(password, about);
  if (message !== null) throw CodedError.from([{ pointer: "#/password", code: "invalid-input", message }]);
}

/** The row and its audit entry, for verbs that have decided already. Throws `state-conflict` for a known address. */
export async function insertPerson(
  tx: Tx,
  by: Actor | { actor: Actor },
  person: Omit<typeof people.$inferInsert, "id" | "active" | "createdAt">,
): Promise<PersonReply> {
  const id = newId("per");
  try {
    await tx.insert(people).values({ ...person, id, active: true, createdAt: now() });
  } catch (error) {
    if (isUniqueViolation(error)) {
      throw new CodedError("state-conflict", `There is already a person with the address ${person.email}.`);
    }
    throw error;
  }
  await appendAudit(tx, by, {
    action: "person.created",
    object: `person:${id}`,
    details: { role: person.role, isAdmin: person.isAdmin },
  });
  return { id, email: person.email, name: person.name };
}
