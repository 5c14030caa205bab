import { eq } from "drizzle-orm";
import { materialRevisions, materials } from "@/db/schema/materials";
import { templateRevisions, templates } from "@/db/schema/templates";
import { write } from "@/db/tx";
import { canonicalText } from "@/lib/calculation/canonical";
import type { Definition } from "@/lib/calculation/definition";
import { textHash } from "@/lib/calculation/hash";
import type { Material } from "@/lib/calculation/material";
import { newId } from "@/lib/core/ids";
import { revisionRow } from "./revisions";
import { unique } from "./unique";

/** One flat layer: R = t/k. Small enough to calculate by hand. */
export function layerDefinition(more: Partial<Definition> = {}): Definition {
  return {
    title: unique("Layer"),
    summary: "Resistance of one flat layer.",
    category: "walls",
    tags: [],
    references: [],
    notices: [],
    inputs: [
      {
        kind: "number",
        symbol: "t",
        label: "Thickness",
        quantity: "length",
        unit: "mm",
        default: 100,
        above: 0,
      },
      {
        kind: "number",
        symbol: "k",
        label: "Conductivity",
        quantity: "thermal conductivity",
        unit: "W/(m·K)",
        default: 0.04,
        above: 0,
      },
    ],
    requires: [],
    working: "R = t/k",
    results: [{ symbol: "R", label: "Resistance", quantity: "thermal insulance", unit: "m²·K/W" }],
    limits: [],
    figures: [],
    cases: [],
    ...more,
  };
}

export interface MadeTemplate {
  slug: string;
  templateId: string;
  revisionId: string;
  number: number;
}

function stored(content: unknown) {
  const definition = canonicalText(content);
  return { definition, definitionHash: textHash(definition) };
}

/** A template whose revision 1 is issued. */
export async function issueTemplate(definition: Definition = layerDefinition()): Promise<MadeTemplate> {
  const slug = unique("layer").toLowerCase();
  const templateId = newId("tpl");
  const revisionId = newId("rev");
  await write(async (tx) => {
    await tx
      .insert(templates)
      .values({ id: templateId, slug, category: definition.category, lastNumber: 1, createdAt: new Date() });
    await tx.insert(templateRevisions).values({
      ...revisionRow("issued"),
      ...stored(definition),
      title: definition.title,
      id: revisionId,
      templateId,
    });
  });
  return { slug, templateId, revisionId, number: 1 };
}

/** A draft of the next revision. */
export async function draftNext(before: MadeTemplate, definition: Definition): Promise<MadeTemplate> {
  const revisionId = newId("rev");
  const number = before.number + 1;
  await write((tx) =>
    tx.insert(templateRevisions).values({
      ...revisionRow("draft"),
      ...stored(definition),
      title: definition.title,
      id: revisionId,
      templateId: before.templateId,
      number,
    }),
  );
  return { ...before, revisionId, number };
}

/** The next revision issued, which supersedes the one before. */
export async function issueNext(before: MadeTemplate, definition: Definition): Promise<MadeTemplate> {
  const revisionId = newId("rev");
  const number = before.number + 1;
  await write(async (tx) => {
    await tx
      .update(templateRevisions)
      .set({ state: "superseded", supersededAt: new Date() })
      .where(eq(templateRevisions.id, before.revisionId));
    await tx.insert(templateRevisions).values({
      ...revisionRow("issued"),
      ...stored(definition),
      title: definition.title,
      id: revisionId,
      templateId: before.templateId,
      number,
    });
  });
  return { ...before, revisionId, number };
}

export async function withdraw(revisionId: string, reason = "A wrong factor."): Promise<void> {
  await write((tx) =>
    tx
      .update(templateRevisions)
      .set({
        state: "withdrawn",
        withdrawnAt: new Date(),
        withdrawnBy: "per_senior",
        withdrawnReason: reason,
      })
      .where(eq(templateRevisions.id, revisionId)),
  );
}

/** k = 1 + T/1000 W/(m·K) from 0 to 1000 K, or what is given. */
export function lineMaterial(
  points: [number, number][] = [
    [0, 1],
    [1000, 2],
  ],
): Material {
  return {
    name: unique("Brick"),
    class: "refractory",
    condition: "dry",
    properties: {
      k: {
        pieces: [{ form: "table", interpolation: "linear", points, range: { min: 0, max: 1000, unit: "K" } }],
        argumentUnit: "K",
        unit: "W/(m·K)",
        source: "invented for tests",
        basis: "from memory",
        status: "typical",
      },
    },
  };
}

export async function issueMaterial(
  material: Material = lineMaterial(),
): Promise<{ slug: string; materialId: string; revisionId: string }> {
  const slug = unique("brick").toLowerCase();
  const materialId = newId("mat");
  const revisionId = newId("rev");
  await write(async (tx) => {
    await tx
      .insert(materials)
      .values({ id: materialId, slug, category: material.class, lastNumber: 1, createdAt: new Date() });
    await tx.insert(materialRevisions).values({
      ...revisionRow("issued"),
      ...stored(material),
      title: material.name,
      id: revisionId,
      materialId,
    });
  });
  return { slug, materialId, revisionId };
}

/** Revision 2 of a material, issued in place of revision 1. */
export async function issueNextMaterial(
  before: { slug: string; materialId: string; revisionId: string },
  material: Material,
): Promise<void> {
  await write(async (tx) => {
    await tx
      .update(materialRevisions)
      .set({ state: "superseded", supersededAt: new Date() })
      .where(eq(materialRevisions.id, before.revisionId));
    await tx.insert(materialRevisions).values({
      ...revisionRow("issued"),
      ...stored(material),
      title: material.name,
      id: newId("rev"),
      materialId: before.materialId,
      number: 2,
    });
  });
}
