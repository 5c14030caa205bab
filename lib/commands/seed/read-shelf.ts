import { canonicalText } from "@/lib/calculation/canonical";
import { compileMaterial } from "@/lib/calculation/compiled-material";
import { Definition } from "@/lib/calculation/definition";
import { textHash } from "@/lib/calculation/hash";
import { Material } from "@/lib/calculation/material";
import type { MaterialSnapshot } from "@/lib/calculation/materials-needed";
import { readFolder } from "./read-folder";
import type { Supplied } from "./supply";

/** What arrives with Coldface, read from db/seed, in the form that is stored. */

export interface SuppliedMaterial extends Supplied {
  material: Material;
}
export interface SuppliedTemplate extends Supplied {
  content: Definition;
}

export function readMaterials(): SuppliedMaterial[] {
  return readFolder("materials").map(({ slug, content }) => {
    const parsed = Material.safeParse(content);
    if (!parsed.success) throw shapeFault(`materials/${slug}.json`, parsed.error.issues);
    const material = parsed.data;
    return { slug, category: material.class, title: material.name, ...stored(material), material };
  });
}

export function readTemplates(): SuppliedTemplate[] {
  return readFolder("templates").map(({ slug, content: raw }) => {
    const parsed = Definition.safeParse(raw);
    if (!parsed.success) throw shapeFault(`templates/${slug}.json`, parsed.error.issues);
    const content = parsed.data;
    return { slug, category: content.category, title: content.title, ...stored(content), content };
  });
}

/** The supplied materials compiled, by slug, for running the worked cases. */
export function compiledShelf(materials: readonly SuppliedMaterial[]): Record<string, MaterialSnapshot> {
  return Object.fromEntries(
    materials.map(({ slug, material }) => [
      slug,
      { slug, revision: 1, material, compiled: compileMaterial(material, slug, 1) },
    ]),
  );
}

function stored(content: unknown): Pick<Supplied, "definition" | "definitionHash"> {
  const definition = canonicalText(content);
  return { definition, definitionHash: textHash(definition) };
}

function shapeFault(file: string, issues: readonly { path: PropertyKey[]; message: string }[]): Error {
  const lines = issues.map((issue) => `  ${issue.path.map(String).join("/")}: ${issue.message}`);
  return new Error(`db/seed/${file} has not the shape that is stored.\n${lines.join("\n")}`);
}
