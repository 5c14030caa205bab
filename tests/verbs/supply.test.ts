import { eq } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { reader, writeClient } from "@/db/client";
import { audit } from "@/db/schema/system";
import { templateRevisions, templates } from "@/db/schema/templates";
import { write } from "@/db/tx";
import { signIn } from "@/lib/people/sign-in";
import {
  demoPasswordHashes,
  demoPeople,
  demoSeniors,
  insertDemoPeople,
} from "@/lib/commands/seed/demo-people";
import { compiledShelf, readMaterials, readTemplates } from "@/lib/commands/seed/read-shelf";
import { supplyMaterial, supplyTemplate, type Supplied } from "@/lib/commands/seed/supply";
import { sha256 } from "@/lib/core/crypto";
import { testDatabase } from "../factories/database";
import { unique } from "../factories/unique";

testDatabase();

function item(): Supplied {
  const definition = JSON.stringify({ title: unique("Wall") });
  return {
    slug: unique("supplied"),
    category: "walls",
    title: "Wall",
    definition,
    definitionHash: sha256(definition),
  };
}

describe("supplying the shelf", () => {
  it("issues revision 1 once, by the supplied set and not yet adopted, with its row in the trail", async () => {
    const wall = item();
    expect(await write((tx) => supplyTemplate(tx, wall, null))).toBe("added");
    expect(await write((tx) => supplyTemplate(tx, wall, null))).toBe("present");
    const rows = await reader()
      .select({ revision: templateRevisions })
      .from(templateRevisions)
      .innerJoin(templates, eq(templates.id, templateRevisions.templateId))
      .where(eq(templates.slug, wall.slug));
    expect(rows.map((row) => row.revision)).toEqual([
      expect.objectContaining({
        number: 1,
        state: "issued",
        supplied: true,
        checkedBy: "system",
        originatorIds: ["system"],
        adoptedAt: null,
        adoptedBy: null,
      }),
    ]);
    const trail = await reader()
      .select()
      .from(audit)
      .where(eq(audit.object, `template:${wall.slug}@1`));
    expect(trail.map((row) => row.action)).toEqual(["template.supplied"]);
  });

  it("keeps what is issued when the supplied content has changed", async () => {
    const wall = item();
    await write((tx) => supplyMaterial(tx, wall, null));
    const newer = { ...wall, definition: "{}", definitionHash: sha256("{}") };
    expect(await write((tx) => supplyMaterial(tx, newer, null))).toBe("different");
    const kept = await writeClient().execute({
      sql: "SELECT definition FROM material_revisions r JOIN materials m ON m.id = r.material_id WHERE slug = ?",
      args: [wall.slug],
    });
    expect(kept.rows.map((row) => row.definition)).toEqual([wall.definition]);
  });

  it("has every material of db/seed in a form that compiles, under its own slug", () => {
    const materials = readMaterials();
    expect(materials.length).toBeGreaterThan(30);
    expect(Object.keys(compiledShelf(materials))).toEqual(materials.map((material) => material.slug));
  });

  it("has the 39 templates of db/seed, each stored as the text that its hash is of", () => {
    const shelf = readTemplates();
    expect(shelf).toHaveLength(39);
    for (const template of shelf) expect(sha256(template.definition)).toBe(template.definitionHash);
  });
});

describe("the demo works", () => {
  it("has five people who can sign in, two of them seniors who sign for the shelf", async () => {
    const hashes = await demoPasswordHashes();
    await write((tx) => insertDemoPeople(tx, hashes));
    for (const person of demoPeople) {
      expect(await signIn({ email: person.email, password: person.password })).toMatchObject({
        role: person.role,
        isAdmin: person.isAdmin,
      });
    }
    const seniors = await write((tx) => demoSeniors(tx));
    expect(seniors).toHaveLength(2);
    const wall = item();
    await write((tx) => supplyTemplate(tx, wall, seniors));
    const [row] = await reader()
      .select({ adoptedBy: templateRevisions.adoptedBy, adoptedAt: templateRevisions.adoptedAt })
      .from(templateRevisions)
      .where(eq(templateRevisions.definitionHash, wall.definitionHash));
    expect(row).toEqual({ adoptedBy: seniors, adoptedAt: expect.any(Date) });
  });
});
