import "server-only";
import { reader, type Database } from "./client";

/**
 * A query of every request, built once per connection: putting its SQL together costs more than running it.
 * Values come in through `sql.placeholder`.
 */
export function prepared<Query>(build: (db: Database) => Query): () => Query {
  const built = new WeakMap<Database, Query>();
  return () => {
    const db = reader();
    let query = built.get(db);
    if (query === undefined) built.set(db, (query = build(db)));
    return query;
  };
}
