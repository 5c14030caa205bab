import { publicRevisionStates, roles, type RevisionState, type Role, type Scope } from "@/db/vocabulary";
import { actorRole, responsiblePersonId, type Actor } from "./actor";

/** What the object of an action must tell for the decision. */
export interface RevisionObject {
  slug: string;
  /** Left out when the template as a whole is meant. */
  state?: RevisionState;
}
export interface RecordObject {
  /** Slug of the record's template. */
  template: string;
  ownerId: string | null;
}
export interface OwnedObject {
  ownerId: string;
}

export type Refusal = "forbidden" | "not-found";

interface ActionRule<O> {
  /** Least role, or the administrator's flag. */
  needs: Role | "admin";
  /** Whether the administrator's flag serves in place of the role. */
  orAdmin?: true;
  /** Scope that a key must have; `session` when no key may. */
  scope: Scope | "session";
  /** Whether Coldface itself may, without a person. */
  system: boolean;
  /** Decides on the object, after role and scope. */
  object?: (actor: Actor, object: O) => Refusal | null;
}

const rule = <O = void>(row: ActionRule<O>): ActionRule<O> => row;

export function roleIsAtLeast(role: Role | null, least: Role): boolean {
  return role !== null && roles.indexOf(role) >= roles.indexOf(least);
}

/** Drafts and revisions in check are for seniors. */
export function seesUnissued(actor: Actor): boolean {
  return actor.kind === "system" || roleIsAtLeast(actorRole(actor), "senior");
}

/** States of revisions that the actor may see, for lists. */
export function visibleStates(actor: Actor): readonly RevisionState[] {
  return seesUnissued(actor) ? ["draft", "in_check", ...publicRevisionStates] : publicRevisionStates;
}

/** A key with a list of templates knows no others. */
export function reachesTemplate(actor: Actor, slug: string): boolean {
  return actor.kind !== "key" || actor.templates === null || actor.templates.includes(slug);
}

const seesState = (actor: Actor, state: RevisionState | undefined) =>
  state === undefined || visibleStates(actor).includes(state);

const templateObject = (actor: Actor, object: RevisionObject): Refusal | null =>
  reachesTemplate(actor, object.slug) && seesState(actor, object.state) ? null : "not-found";

const materialObject = (actor: Actor, object: RevisionObject): Refusal | null =>
  seesState(actor, object.state) ? null : "not-found";

const recordObject = (actor: Actor, object: RecordObject): Refusal | null =>
  reachesTemplate(actor, object.template) ? null : "not-found";

/** One's own, or any as a senior. */
const ownRecordOrSenior = (actor: Actor, object: RecordObject): Refusal | null => {
  if (!reachesTemplate(actor, object.template)) return "not-found";
  const own = object.ownerId !== null && object.ownerId === responsiblePersonId(actor);
  return own || roleIsAtLeast(actorRole(actor), "senior") ? null : "forbidden";
};

/** One's own, or any as an administrator; the keys of others are not there for the rest. */
const ownOrAdmin = (actor: Actor, object: OwnedObject): Refusal | null => {
  if (actor.kind === "system" || object.ownerId === responsiblePersonId(actor)) return null;
  return actor.kind === "person" && actor.isAdmin ? null : "not-found";
};

/** Every action there is: who may do it, with which scope, on which object. The only table of permissions. */
export const actions = {
  "template.list": rule({ needs: "reader", scope: "templates:read", system: true }),
  "template.read": rule<RevisionObject>({
    needs: "reader",
    scope: "templates:read",
    system: true,
    object: templateObject,
  }),
  "template.evaluate": rule<RevisionObject>({
    needs: "reader",
    scope: "runs:evaluate",
    system: true,
    object: templateObject,
  }),
  "template.supply": rule<RevisionObject>({ needs: "admin", scope: "session", system: true }),
  "definition.check": rule({ needs: "senior", scope: "templates:write", system: true }),
  "definition.evaluate": rule({ needs: "senior", scope: "templates:write", system: true }),
  "material.list": rule({ needs: "reader", scope: "materials:read", system: true }),
  "material.read": rule<RevisionObject>({
    needs: "reader",
    scope: "materials:read",
    system: true,
    object: materialObject,
  }),
  "material.supply": rule<RevisionObject>({ needs: "admin", scope: "session", system: true }),
  "unit.read": rule({ needs: "reader", scope: "templates:read", system: true }),
  "record.list": rule({ needs: "reader", scope: "records:read", system: true }),
  "record.read": rule<RecordObject>({
    needs: "reader",
    scope: "records:read",
    system: true,
    object: recordObject,
  }),
  "record.create": rule<RevisionObject>({
    needs: "engineer",
    scope: "records:write",
    system: true,
    object: templateObject,
  }),
  "record.void": rule<RecordObject>({
    needs: "engineer",
    scope: "records:write",
    system: false,
    object: ownRecordOrSenior,
  }),
  "record.rerun": rule<RecordObject>({
    needs: "reader",
    scope: "records:read",
    system: true,
    object: recordObject,
  }),
  "usage.read": rule({ needs: "reader", scope: "usage:read", system: true }),
  "session.end": rule({ needs: "reader", scope: "session", system: false }),
  "key.create": rule<OwnedObject>({
    needs: "engineer",
    orAdmin: true,
    scope: "session",
    system: true,
    object: ownOrAdmin,
  }),
  "key.list": rule({ needs: "engineer", orAdmin: true, scope: "session", system: true }),
  "key.revoke": rule<OwnedObject>({
    needs: "engineer",
    orAdmin: true,
    scope: "session",
    system: true,
    object: ownOrAdmin,
  }),
  "audit.read": rule({ needs: "senior", orAdmin: true, scope: "session", system: true }),
  "outbox.read": rule({ needs: "admin", scope: "session", system: true }),
  "person.create": rule({ needs: "admin", scope: "session", system: true }),
} as const;

export type Action = keyof typeof actions;
/** The object that an action is decided on; `void` when there is none. */
export type ObjectOf<A extends Action> = (typeof actions)[A] extends ActionRule<infer O> ? O : never;
