import { sql, type SQL } from "drizzle-orm";
import { integer, text } from "drizzle-orm/sqlite-core";

/** A moment, kept as whole milliseconds since 1970 UTC. */
export const instant = (name: string) => integer(name, { mode: "timestamp_ms" });

/** Yes or no, kept as 1 or 0. */
export const flag = (name: string) => integer(name, { mode: "boolean" });

/** A JSON value, parsed and written by the column. */
export const json = <T>(name: string) => text(name, { mode: "json" }).$type<T>();

/** SQL list of quoted words for a CHECK: `('a', 'b')`. */
export function wordList(words: readonly string[]): SQL {
  return sql.raw(`(${words.map((word) => `'${word.replaceAll("'", "''")}'`).join(", ")})`);
}
