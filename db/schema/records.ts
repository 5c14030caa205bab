import { sql } from "drizzle-orm";
import { check, index, integer, primaryKey, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { instant, json, wordList } from "../columns";
import { actorKinds, runStatuses, type ActorKind, type RunStatus } from "../vocabulary";
import { people } from "./people";
import { templateRevisions } from "./templates";

/** One kept run: everything needed to reproduce it. Never changed, never deleted; triggers see to it. */
export const records = sqliteTable(
  "records",
  {
    /** Shown as R-000001. */
    number: integer("number").primaryKey({ autoIncrement: true }),
    templateRevisionId: text("template_revision_id")
      .notNull()
      .references(() => templateRevisions.id),
    template: text("template").notNull(),
    revision: integer("revision").notNull(),
    definitionHash: text("definition_hash").notNull(),
    engineVersion: text("engine_version").notNull(),
    nodeVersion: text("node_version").notNull(),
    /** The request as it came: inputs as typed, units, options, and the origin of each input. */
    given: json<Record<string, unknown>>("given").notNull(),
    /** The evaluation as it was answered. */
    evaluation: json<Record<string, unknown>>("evaluation").notNull(),
    status: text("status").$type<RunStatus>().notNull(),
    title: text("title").notNull(),
    note: text("note").notNull(),
    actorKind: text("actor_kind").$type<ActorKind>().notNull(),
    actorId: text("actor_id").notNull(),
    /** The person it belongs to: who made it, or the owner of the key that did. */
    ownerId: text("owner_id").references(() => people.id),
    /** SHA-256 over the canonical content without tags, hex. */
    digest: text("digest").notNull(),
    createdAt: instant("created_at").notNull(),
  },
  (t) => [
    index("records_template").on(t.template, t.revision),
    index("records_owner").on(t.ownerId),
    check("records_status", sql`${t.status} in ${wordList(runStatuses)}`),
    check("records_actor", sql`${t.actorKind} in ${wordList(actorKinds)}`),
    check("records_owner_named", sql`${t.actorKind} = 'system' or ${t.ownerId} is not null`),
    check("records_given_json", sql`json_valid(${t.given})`),
    check("records_evaluation_json", sql`json_valid(${t.evaluation})`),
    check("records_digest_length", sql`length(${t.digest}) = 64 and length(${t.definitionHash}) = 64`),
  ],
);

/** Equipment numbers and projects. */
export const recordTags = sqliteTable(
  "record_tags",
  {
    recordNumber: integer("record_number")
      .notNull()
      .references(() => records.number),
    tag: text("tag").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.recordNumber, t.tag] }),
    index("record_tags_tag").on(t.tag, t.recordNumber),
    check("record_tags_length", sql`length(${t.tag}) between 1 and 64`),
  ],
);

export const recordVoids = sqliteTable(
  "record_voids",
  {
    recordNumber: integer("record_number")
      .primaryKey()
      .references(() => records.number),
    reason: text("reason").notNull(),
    byKind: text("by_kind").$type<ActorKind>().notNull(),
    byId: text("by_id").notNull(),
    at: instant("at").notNull(),
  },
  (t) => [check("record_voids_reason", sql`length(trim(${t.reason})) > 0`)],
);
