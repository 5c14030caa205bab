import { eq } from "drizzle-orm";
import { people } from "@/db/schema/people";
import { write } from "@/db/tx";
import type { Role, Scope } from "@/db/vocabulary";
import type { KeyActor, PersonActor, SystemActor } from "@/lib/access/actor";
import { startSession } from "@/lib/access/sessions";
import { createKey, type NewKeyReply } from "@/lib/people/create-key";
import { createPerson } from "@/lib/people/create-person";
import type { CreateKeyInput } from "@/lib/people/schemas";
import { unique } from "./unique";

export const system: SystemActor = { kind: "system", reason: "test" };
export const goodPassword = "lagging kettle orbit spruce";

/** A person of their own name and address in the database, with a session that stands. */
export async function makePerson(
  wanted: { role?: Role; isAdmin?: boolean; password?: string } = {},
): Promise<PersonActor> {
  const name = unique("Person");
  const email = `${name.toLowerCase()}@works.example`;
  const role = wanted.role ?? "engineer";
  const isAdmin = wanted.isAdmin ?? false;
  const { id } = await createPerson(system, {
    email,
    name,
    role,
    isAdmin,
    password: wanted.password ?? goodPassword,
  });
  const sessionId = await write((tx) => startSession(tx, id));
  return { kind: "person", personId: id, email, name, role, isAdmin, sessionId };
}

export async function deactivate(personId: string): Promise<void> {
  await write((tx) => tx.update(people).set({ active: false }).where(eq(people.id, personId)));
}

/** A key in the database that its owner made. */
export function makeKeyOf(
  owner: PersonActor,
  wanted: Partial<CreateKeyInput> & { scopes?: Scope[] } = {},
): Promise<NewKeyReply> {
  return createKey(owner, {
    ownerId: owner.personId,
    label: unique("key"),
    scopes: ["runs:evaluate"],
    days: 30,
    ...wanted,
  });
}

/** Actors that exist in no database, for decisions that need none. */
export function personActor(role: Role, more: Partial<PersonActor> = {}): PersonActor {
  const name = unique("Actor");
  return {
    kind: "person",
    personId: `per_${name}`,
    email: `${name.toLowerCase()}@works.example`,
    name,
    role,
    isAdmin: false,
    sessionId: `ses_${name}`,
    ...more,
  };
}

export function keyActor(role: Role, scopes: Scope[], more: Partial<KeyActor> = {}): KeyActor {
  const name = unique("key");
  return {
    kind: "key",
    keyId: `key_${name}`,
    label: name,
    owner: { personId: `per_${name}`, role },
    scopes,
    templates: null,
    defaultsPolicy: "allow",
    ratePerMinute: 600,
    ...more,
  };
}
