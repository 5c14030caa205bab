import "server-only";
import { desc, eq } from "drizzle-orm";
import { reader } from "@/db/client";
import { keys, people } from "@/db/schema/people";
import type { Actor } from "@/lib/access/actor";
import { responsiblePersonId } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";

export interface KeyRow {
  id: string;
  label: string;
  ending: string;
  owner: { id: string; name: string };
  scopes: string[];
  templates: string[] | null;
  ratePerMinute: number;
  createdAt: Date;
  expiresAt: Date;
  revokedAt: Date | null;
  lastUsedAt: Date | null;
}

/** One's own keys, newest first; an administrator sees all. */
export async function listKeys(actor: Actor): Promise<KeyRow[]> {
  permit(actor, "key.list");
  const all = actor.kind === "system" || (actor.kind === "person" && actor.isAdmin);
  const rows = await reader()
    .select({ key: keys, owner: { id: people.id, name: people.name } })
    .from(keys)
    .innerJoin(people, eq(people.id, keys.ownerId))
    .where(all ? undefined : eq(keys.ownerId, responsiblePersonId(actor) ?? ""))
    .orderBy(desc(keys.createdAt))
    .limit(500);
  return rows.map(({ key, owner }) => ({
    id: key.id,
    label: key.label,
    ending: key.ending,
    owner,
    scopes: key.scopes,
    templates: key.templates,
    ratePerMinute: key.ratePerMinute,
    createdAt: key.createdAt,
    expiresAt: key.expiresAt,
    revokedAt: key.revokedAt,
    lastUsedAt: key.lastUsedAt,
  }));
}
