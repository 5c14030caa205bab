import { createHash } from "node:crypto";
import { canonicalText } from "./canonical";
import type { Definition } from "./definition";
import type { Material } from "./material";

/** SHA-256 of a text that is already canonical (as stored), hexadecimal. */
export function textHash(text: string): string {
  return createHash("sha256").update(text, "utf8").digest("hex");
}

/** SHA-256 over the canonical text of a definition, hexadecimal. For stored ones use `textHash` of the stored text. */
export function definitionHash(definition: Definition): string {
  return textHash(canonicalText(definition));
}

/** SHA-256 over the canonical text of a material, hexadecimal. */
export function materialHash(material: Material): string {
  return textHash(canonicalText(material));
}
