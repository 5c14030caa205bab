import "server-only";
import { eq } from "drizzle-orm";
import { reader } from "@/db/client";
import { templateRevisions } from "@/db/schema/templates";
import type { Definition } from "@/lib/calculation/definition";

/**
 * Definitions by their hash. A hash never names another text, so nothing here can become stale; drafts that were
 * overwritten fall out at the end.
 */
const shared = globalThis as typeof globalThis & { coldfaceDefinitions?: Map<string, Definition> };
const known = (shared.coldfaceDefinitions ??= new Map<string, Definition>());
const most = 2000;

/** Keeps a definition that was just read with its row. The text was checked before it was stored. */
export function definitionFrom(hash: string, text: string): Definition {
  const found = known.get(hash);
  if (found) return found;
  const definition = JSON.parse(text) as Definition;
  const oldest = known.size >= most ? known.keys().next().value : undefined;
  if (oldest !== undefined) known.delete(oldest);
  known.set(hash, definition);
  return definition;
}

/** The definition of a revision, from memory or else from its row. */
export async function definitionOf(revision: { id: string; definitionHash: string }): Promise<Definition> {
  const found = known.get(revision.definitionHash);
  if (found) return found;
  const [row] = await reader()
    .select({ text: templateRevisions.definition })
    .from(templateRevisions)
    .where(eq(templateRevisions.id, revision.id));
  if (!row) throw new Error(`Revision ${revision.id} has no row.`);
  return definitionFrom(revision.definitionHash, row.text);
}
