import type { DefaultsPolicy, Role, Scope } from "@/db/vocabulary";

/** Who acts: somebody signed in, other software with a key, or Coldface itself (seeding, commands, timers). */
export interface PersonActor {
  kind: "person";
  personId: string;
  email: string;
  name: string;
  role: Role;
  isAdmin: boolean;
  sessionId: string;
}

export interface KeyActor {
  kind: "key";
  keyId: string;
  label: string;
  /** A key acts with at most its owner's rights. */
  owner: { personId: string; role: Role };
  scopes: Scope[];
  /** Slugs that the key is limited to; null for all. */
  templates: string[] | null;
  defaultsPolicy: DefaultsPolicy;
  ratePerMinute: number;
}

export interface SystemActor {
  kind: "system";
  reason: string;
}

export type Actor = PersonActor | KeyActor | SystemActor;

/** Id for the columns that name who did something; `system` for Coldface itself. */
export function actorId(actor: Actor): string {
  if (actor.kind === "person") return actor.personId;
  return actor.kind === "key" ? actor.keyId : "system";
}

/** The person who answers for what the actor does: oneself, or the owner of the key; null for the system. */
export function responsiblePersonId(actor: Actor): string | null {
  if (actor.kind === "person") return actor.personId;
  return actor.kind === "key" ? actor.owner.personId : null;
}

/** Role that the actor acts with; the system has none, its permissions are listed one by one. */
export function actorRole(actor: Actor): Role | null {
  if (actor.kind === "person") return actor.role;
  return actor.kind === "key" ? actor.owner.role : null;
}
