import "server-only";
import path from "node:path";
import { setTimeout as wait } from "node:timers/promises";
import { sql } from "drizzle-orm";
import { migrate } from "drizzle-orm/libsql/migrator";
import { newId } from "@/lib/core/ids";
import { prepareConnections, reader, writeClient, writer } from "./client";
import { retryWhileBusy } from "./retry";
import journal from "./migrations/meta/_journal.json";

const leaseMilliseconds = 60_000;
const patience = 120_000;

/** Moment in the name of the newest migration that this build knows. */
export const newestMigration = Math.max(...journal.entries.map((entry) => entry.when));

/**
 * Brings the database up to date. Drizzle takes no lock of its own, so that a lease of one minute in the database lets
 * one instance at a time through; the others wait and then find nothing to do. Returns whether anything was applied.
 */
export async function migrateDatabase(): Promise<boolean> {
  await prepareConnections();
  const holder = newId("lse");
  await takeLease(holder);
  try {
    const before = await appliedMigration();
    const migrationsFolder = path.join(/* turbopackIgnore: true */ process.cwd(), "db", "migrations");
    await retryWhileBusy(writeClient(), () => migrate(writer(), { migrationsFolder }), patience);
    return (await appliedMigration()) !== before;
  } finally {
    await retryWhileBusy(writeClient(), () =>
      writeClient().execute({ sql: "DELETE FROM migration_lease WHERE holder = ?", args: [holder] }),
    );
  }
}

/** Moment of the newest migration that the database has; 0 for an empty database. */
export async function appliedMigration(): Promise<number> {
  const tables = await reader().all(
    sql`select name from sqlite_master where type = 'table' and name = '__drizzle_migrations'`,
  );
  if (tables.length === 0) return 0;
  const row = await reader().get<{ newest: number | null }>(
    sql`select max(cast(created_at as integer)) as newest from __drizzle_migrations`,
  );
  return Number(row?.newest ?? 0);
}

async function takeLease(holder: string): Promise<void> {
  const deadline = Date.now() + patience;
  while (!(await retryWhileBusy(writeClient(), () => claim(holder), patience))) {
    if (Date.now() > deadline) {
      throw new Error(
        "Another process has been migrating this database for two minutes. Look whether it still runs.",
      );
    }
    await wait(100);
  }
}

async function claim(holder: string): Promise<boolean> {
  const client = writeClient();
  await client.execute(
    "CREATE TABLE IF NOT EXISTS migration_lease (id integer PRIMARY KEY CHECK (id = 1), holder text NOT NULL, expires_at integer NOT NULL)",
  );
  const taken = await client.execute({
    sql: `INSERT INTO migration_lease (id, holder, expires_at) VALUES (1, ?, ?)
          ON CONFLICT (id) DO UPDATE SET holder = excluded.holder, expires_at = excluded.expires_at
          WHERE migration_lease.expires_at < ? RETURNING holder`,
    args: [holder, Date.now() + leaseMilliseconds, Date.now()],
  });
  return taken.rows.length === 1;
}
