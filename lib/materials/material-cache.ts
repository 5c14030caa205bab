import "server-only";
import type { Material } from "@/lib/calculation/material";

/** Materials by the hash of their text, which never names another text. */
const shared = globalThis as typeof globalThis & { coldfaceMaterials?: Map<string, Material> };
const known = (shared.coldfaceMaterials ??= new Map<string, Material>());
const most = 2000;

/** The material of a row that was just read. The text was checked before it was stored. */
export function materialFrom(hash: string, text: string): Material {
  const found = known.get(hash);
  if (found) return found;
  const material = JSON.parse(text) as Material;
  const oldest = known.size >= most ? known.keys().next().value : undefined;
  if (oldest !== undefined) known.delete(oldest);
  known.set(hash, material);
  return material;
}
