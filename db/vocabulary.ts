/** Words that the database, the API and the browser share. No imports: it runs anywhere. */

/** From least to most: a role may do what those before it may. */
export const roles = ["reader", "engineer", "senior"] as const;
export type Role = (typeof roles)[number];

export const revisionStates = ["draft", "in_check", "issued", "superseded", "withdrawn"] as const;
export type RevisionState = (typeof revisionStates)[number];

/** States that everybody who is signed in may see. */
export const publicRevisionStates = ["issued", "superseded", "withdrawn"] as const;

/** What a key may be allowed. No scope submits, issues, withdraws, signs, or manages people and keys. */
export const scopes = [
  "templates:read",
  "templates:write",
  "runs:evaluate",
  "records:read",
  "records:write",
  "batches:read",
  "batches:write",
  "materials:read",
  "materials:write",
  "usage:read",
] as const;
export type Scope = (typeof scopes)[number];

export const actorKinds = ["person", "key", "system"] as const;
export type ActorKind = (typeof actorKinds)[number];

export const runStatuses = ["ok", "caution", "stop"] as const;
export type RunStatus = (typeof runStatuses)[number];

/** Whether a key's calls may leave inputs to their defaults when the request does not say. */
export const defaultsPolicies = ["allow", "refuse"] as const;
export type DefaultsPolicy = (typeof defaultsPolicies)[number];

/** What the audit trail tells of; the noun first. */
export const auditActions = [
  "person.created",
  "person.signed-in",
  "person.signed-out",
  "key.created",
  "key.revoked",
  "template.supplied",
  "material.supplied",
  "record.created",
  "record.voided",
  "database.seeded",
] as const;
export type AuditAction = (typeof auditActions)[number];

/** Kinds of row that leave through the outbox. */
export const outboxKinds = ["mail", "webhook"] as const;
export type OutboxKind = (typeof outboxKinds)[number];
