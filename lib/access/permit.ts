import type { Role } from "@/db/vocabulary";
import { CodedError } from "@/lib/core/errors";
import { actions, roleIsAtLeast, type Action, type ObjectOf, type Refusal } from "./actions";
import { actorRole, type Actor, type KeyActor, type PersonActor } from "./actor";

declare const permitted: unique symbol;

/** Proof that the actor may do `action`. Only `permit` makes one, so a verb that forgets to ask does not compile. */
export interface Permitted<A extends Action = Action> {
  readonly actor: Actor;
  readonly action: A;
  readonly [permitted]: A;
}

type Rest<A extends Action> = ObjectOf<A> extends void ? [] : [object: ObjectOf<A>];

/**
 * Decides whether `actor` may do `action` (on `object`). Throws CodedError: `unauthenticated` without an actor,
 * `insufficient-scope` for a key without the scope (member `scope` names it), `forbidden` for the role, and `not-found`
 * for what the actor may not even see.
 */
export function permit<A extends Action>(actor: Actor | null, action: A, ...rest: Rest<A>): Permitted<A> {
  if (actor === null) throw new CodedError("unauthenticated", "Sign in, or send a valid key.");
  const row = actions[action];
  if (actor.kind === "system") {
    if (!row.system) throw new CodedError("forbidden", "This takes a person.");
  } else {
    if (actor.kind === "key") checkScope(actor.scopes, row.scope);
    checkRole(actor, row.needs, "orAdmin" in row && row.orAdmin === true);
  }
  if ("object" in row && row.object) {
    // The table pairs each action with its own object type; TypeScript cannot follow a union of rows.
    const decide = row.object as (actor: Actor, object: unknown) => Refusal | null;
    const refusal = decide(actor, rest[0]);
    if (refusal === "not-found")
      throw new CodedError("not-found", "There is nothing here, or it is not yours to see.");
    if (refusal === "forbidden")
      throw new CodedError("forbidden", "You may see this, but not do that to it.");
  }
  return { actor, action } as Permitted<A>;
}

/** Whether `permit` would agree; for what a page offers, never in place of `permit` in a verb. */
export function may<A extends Action>(actor: Actor | null, action: A, ...rest: Rest<A>): boolean {
  try {
    permit(actor, action, ...rest);
    return true;
  } catch (error) {
    if (error instanceof CodedError) return false;
    throw error;
  }
}

function checkScope(scopes: readonly string[], scope: string): void {
  if (scope === "session") throw new CodedError("forbidden", "No key may do this. Sign in to do it.");
  if (!scopes.includes(scope)) {
    throw new CodedError("insufficient-scope", `The key needs the scope ${scope}.`, [], { scope });
  }
}

function checkRole(actor: PersonActor | KeyActor, needs: Role | "admin", orAdmin: boolean): void {
  // A key never carries the administrator's flag of its owner.
  const isAdmin = actor.kind === "person" && actor.isAdmin;
  if (isAdmin && (orAdmin || needs === "admin")) return;
  if (needs === "admin") throw new CodedError("forbidden", "This takes an administrator.");
  const role = actorRole(actor);
  if (!roleIsAtLeast(role, needs)) {
    throw new CodedError(
      "forbidden",
      `This takes the role ${needs}${orAdmin ? " or an administrator" : ""}; yours is ${role ?? "none"}.`,
    );
  }
}
