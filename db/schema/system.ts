import { sql } from "drizzle-orm";
import { check, index, integer, primaryKey, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { instant, json, wordList } from "../columns";
import { actorKinds, outboxKinds, type ActorKind, type AuditAction, type OutboxKind } from "../vocabulary";

export const settings = sqliteTable("settings", {
  key: text("key").primaryKey(),
  value: text("value").notNull(),
});

/**
 * Answers already given, for requests sent again with the same Idempotency-Key. `scope` names the caller; a row that is
 * still `running` is a claim that ends at `expiresAt`.
 */
export const idempotency = sqliteTable(
  "idempotency",
  {
    scope: text("scope").notNull(),
    key: text("key").notNull(),
    /** SHA-256 of method, path and canonical body, hex. */
    requestHash: text("request_hash").notNull(),
    state: text("state").$type<"running" | "done">().notNull(),
    status: integer("status"),
    location: text("location"),
    /** The body of the answer as it was sent. */
    reply: text("reply"),
    createdAt: instant("created_at").notNull(),
    expiresAt: instant("expires_at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.scope, t.key] }),
    index("idempotency_expires").on(t.expiresAt),
    check("idempotency_state", sql`${t.state} in ('running', 'done')`),
    check("idempotency_done", sql`${t.state} = 'running' or ${t.status} between 200 and 299`),
  ],
);

/** Runs per day, caller and revision. `day` is the UTC date, 2026-12-01. */
export const usageDaily = sqliteTable(
  "usage_daily",
  {
    day: text("day").notNull(),
    callerKind: text("caller_kind").$type<ActorKind>().notNull(),
    callerId: text("caller_id").notNull(),
    template: text("template").notNull(),
    revision: integer("revision").notNull(),
    count: integer("count").notNull(),
    lastAt: instant("last_at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.day, t.callerKind, t.callerId, t.template, t.revision] }),
    index("usage_daily_template").on(t.template, t.day),
    index("usage_daily_caller").on(t.callerKind, t.callerId, t.lastAt),
    check("usage_daily_kind", sql`${t.callerKind} in ${wordList(actorKinds)}`),
    check("usage_daily_count", sql`${t.count} > 0`),
  ],
);

/** The trail: each row's hash covers the one before it. Rows never change; triggers see to it. */
export const audit = sqliteTable(
  "audit",
  {
    seq: integer("seq").primaryKey({ autoIncrement: true }),
    at: instant("at").notNull(),
    actorKind: text("actor_kind").$type<ActorKind>().notNull(),
    actorId: text("actor_id").notNull(),
    action: text("action").$type<AuditAction>().notNull(),
    /** What it was done to: `template:plane-wall@1`, `record:R-000001`, `key:key_…`. */
    object: text("object").notNull(),
    details: json<Record<string, unknown>>("details").notNull(),
    previousHash: text("previous_hash").notNull(),
    /** HMAC-SHA-256, hex. */
    hash: text("hash").notNull(),
    secretVersion: text("secret_version").notNull(),
  },
  (t) => [
    index("audit_object").on(t.object),
    check("audit_kind", sql`${t.actorKind} in ${wordList(actorKinds)}`),
    check("audit_hash_length", sql`length(${t.hash}) = 64 and length(${t.previousHash}) = 64`),
  ],
);

/** What has to leave the house: written in the transaction of its cause, delivered later. */
export const outbox = sqliteTable(
  "outbox",
  {
    id: text("id").primaryKey(),
    kind: text("kind").$type<OutboxKind>().notNull(),
    payload: json<Record<string, unknown>>("payload").notNull(),
    createdAt: instant("created_at").notNull(),
    dueAt: instant("due_at").notNull(),
    attempts: integer("attempts").notNull().default(0),
    lastError: text("last_error"),
    sentAt: instant("sent_at"),
    /** Given up after a day of attempts; waits for a person. */
    parkedAt: instant("parked_at"),
  },
  (t) => [
    index("outbox_due")
      .on(t.dueAt)
      .where(sql`sent_at is null and parked_at is null`),
    check("outbox_kind", sql`${t.kind} in ${wordList(outboxKinds)}`),
    check("outbox_payload_json", sql`json_valid(${t.payload})`),
  ],
);
