import { sql } from "drizzle-orm";
import { index, integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { instant } from "../columns";
import { revisionChecks, revisionColumns } from "./revision-columns";

export const templates = sqliteTable(
  "templates",
  {
    id: text("id").primaryKey(),
    slug: text("slug").notNull(),
    category: text("category").notNull(),
    /** Highest revision number ever given; the number of a deleted draft is not used again. */
    lastNumber: integer("last_number").notNull(),
    createdAt: instant("created_at").notNull(),
  },
  (t) => [uniqueIndex("templates_slug").on(t.slug), index("templates_category").on(t.category, t.slug)],
);

export const templateRevisions = sqliteTable(
  "template_revisions",
  {
    ...revisionColumns(),
    templateId: text("template_id")
      .notNull()
      .references(() => templates.id),
  },
  (t) => [
    uniqueIndex("template_revisions_number").on(t.templateId, t.number),
    uniqueIndex("template_revisions_one_issued")
      .on(t.templateId)
      .where(sql`state = 'issued'`),
    uniqueIndex("template_revisions_one_open")
      .on(t.templateId)
      .where(sql`state in ('draft', 'in_check')`),
    index("template_revisions_hash").on(t.definitionHash),
    ...revisionChecks("template_revisions", t),
  ],
);
