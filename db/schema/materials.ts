import { sql } from "drizzle-orm";
import { index, integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { instant } from "../columns";
import { revisionChecks, revisionColumns } from "./revision-columns";

export const materials = sqliteTable(
  "materials",
  {
    id: text("id").primaryKey(),
    slug: text("slug").notNull(),
    /** Class of the material: metal, insulation, gas … */
    category: text("category").notNull(),
    lastNumber: integer("last_number").notNull(),
    createdAt: instant("created_at").notNull(),
  },
  (t) => [uniqueIndex("materials_slug").on(t.slug), index("materials_category").on(t.category, t.slug)],
);

export const materialRevisions = sqliteTable(
  "material_revisions",
  {
    ...revisionColumns(),
    materialId: text("material_id")
      .notNull()
      .references(() => materials.id),
  },
  (t) => [
    uniqueIndex("material_revisions_number").on(t.materialId, t.number),
    uniqueIndex("material_revisions_one_issued")
      .on(t.materialId)
      .where(sql`state = 'issued'`),
    uniqueIndex("material_revisions_one_open")
      .on(t.materialId)
      .where(sql`state in ('draft', 'in_check')`),
    ...revisionChecks("material_revisions", t),
  ],
);
