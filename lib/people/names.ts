import "server-only";
import { inArray } from "drizzle-orm";
import { reader } from "@/db/client";
import { people } from "@/db/schema/people";
import { suppliedSet } from "@/db/schema/revision-columns";

/** Somebody as named beside what they did; the supplied set has no id. */
export interface NamedPerson {
  id: string | null;
  name: string;
}

const supplied: NamedPerson = { id: null, name: "supplied set" };

/** Names by id, for the columns that say who did something. */
export async function namesOf(ids: Iterable<string | null>): Promise<(id: string) => NamedPerson> {
  const wanted = [...new Set(ids)].filter((id): id is string => id !== null && id !== suppliedSet);
  const rows =
    wanted.length === 0
      ? []
      : await reader()
          .select({ id: people.id, name: people.name })
          .from(people)
          .where(inArray(people.id, wanted));
  const names = new Map(rows.map((row) => [row.id, row]));
  return (id) => (id === suppliedSet ? supplied : (names.get(id) ?? { id, name: id }));
}
