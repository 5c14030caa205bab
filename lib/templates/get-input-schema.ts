import "server-only";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { env } from "@/lib/core/env";
import { paths } from "@/lib/core/paths";
import { definitionOf } from "./definition-cache";
import { findRevision, nothingHere } from "./find-revision";
import { inputSchema } from "./input-schema";
import type { InputSchemaView } from "./schemas";

/** JSON Schema of one revision's inputs. Throws `not-found`. */
export async function getInputSchema(
  actor: Actor,
  { slug, revision }: { slug: string; revision: number },
): Promise<InputSchemaView> {
  permit(actor, "template.read", { slug });
  const found = await findRevision(slug, revision);
  if (found === null) throw nothingHere();
  permit(actor, "template.read", { slug, state: found.state });
  const id = `${env().PUBLIC_URL}${paths.apiTemplateRevision(slug, revision)}/schema`;
  return inputSchema(await definitionOf(found), id);
}
