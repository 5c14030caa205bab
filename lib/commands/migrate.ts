import { migrateDatabase } from "@/db/migrate";
import { env } from "@/lib/core/env";
import { runCommand, say } from "./terminal";

/** Brings the database of DATABASE_URL up to date with this build. */
await runCommand(async () => {
  const { DATABASE_URL } = env();
  say((await migrateDatabase()) ? `Migrated ${DATABASE_URL}.` : `${DATABASE_URL} is up to date.`);
});
