import "server-only";
import { and, asc, eq, gt, inArray, sql } from "drizzle-orm";
import { z } from "zod";
import { reader } from "@/db/client";
import { materialRevisions, materials } from "@/db/schema/materials";
import { visibleStates } from "@/lib/access/actions";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import type { Material, Property } from "@/lib/calculation/material";
import { pageOf, readCursor, type Page } from "@/lib/core/paging";
import { matchesWords, searchWords } from "@/lib/core/search-words";
import { fromSi, parseUnit, quantityByName, toSi } from "@/lib/units";
import { materialFrom } from "./material-cache";
import type { ListMaterialsQuery, MaterialItem } from "./schemas";

/** One row per material: the issued revision, else the latest that the actor may see. Ordered by slug. */
export async function listMaterials(actor: Actor, query: ListMaterialsQuery): Promise<Page<MaterialItem>> {
  permit(actor, "material.list");
  const states = visibleStates(actor).filter((state) => query.state === undefined || state === query.state);
  if (states.length === 0) return { items: [], nextCursor: null };
  const from = query.cursor === undefined ? "" : readCursor(query.cursor, z.tuple([z.string()]))[0];
  const wanted = searchWords(query.search ?? "");
  const shown = sql`(select r.id from material_revisions r where r.material_id = ${materials.id} and ${inArray(
    sql`r.state`,
    states,
  )} order by r.state = 'issued' desc, r.number desc limit 1)`;
  const rows = await reader()
    .select({ slug: materials.slug, revision: materialRevisions })
    .from(materials)
    .innerJoin(materialRevisions, eq(materialRevisions.id, shown))
    .where(
      and(
        gt(materials.slug, from),
        query.class === undefined ? undefined : eq(materials.category, query.class),
      ),
    )
    .orderBy(asc(materials.slug))
    // A search looks into the texts, so it cannot stop at a page's end before it has seen them.
    .limit(wanted.length === 0 ? query.limit + 1 : 100_000);

  const known = rows.map(({ slug, revision }) => ({
    slug,
    revision,
    material: materialFrom(revision.definitionHash, revision.definition),
  }));
  const found = wanted.length === 0 ? known : known.filter((row) => matchesWords(wordsOf(row), wanted));
  return pageOf(found, query.limit, (row) => [row.slug], item);
}

const temperature = quantityByName("temperature");
const asTemperature = temperature ? { expect: temperature } : {};

interface Row {
  slug: string;
  revision: typeof materialRevisions.$inferSelect;
  material: Material;
}

function wordsOf({ slug, material }: Row): ReadonlySet<string> {
  return new Set([slug, material.name, material.class, material.condition].flatMap(searchWords));
}

function item({ slug, revision, material }: Row): MaterialItem {
  return {
    slug,
    name: material.name,
    class: material.class,
    condition: material.condition,
    revision: revision.number,
    state: revision.state,
    supplied: revision.supplied,
    adopted: revision.adoptedAt !== null,
    issuedAt: revision.issuedAt?.toISOString() ?? null,
    properties: Object.fromEntries(
      Object.entries(material.properties).map(([name, property]) => [name, rangeOf(property)]),
    ),
  };
}

/** From the least to the greatest end of the pieces, in the unit of the property's argument. */
function rangeOf(property: Property): MaterialItem["properties"][string] {
  const ends = property.pieces.map(({ range }) => ({
    min: convert(range.min, range.unit, property.argumentUnit),
    max: convert(range.max, range.unit, property.argumentUnit),
  }));
  return {
    unit: property.unit,
    min: Math.min(...ends.map(({ min }) => min)),
    max: Math.max(...ends.map(({ max }) => max)),
    argumentUnit: property.argumentUnit,
    basis: property.basis,
  };
}

function convert(value: number, from: string, to: string): number {
  if (from === to) return value;
  const [source, target] = [parseUnit(from, asTemperature), parseUnit(to, asTemperature)];
  if (!source.ok || !target.ok) throw new Error(`A material was stored with the unit ${from} or ${to}.`);
  return fromSi(toSi(value, source.value, "absolute"), target.value, "absolute");
}
