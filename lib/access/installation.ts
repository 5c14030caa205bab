import "server-only";
import { eq } from "drizzle-orm";
import { reader, type Readable } from "@/db/client";
import { settings } from "@/db/schema/system";

/** Which shelf this database was seeded with; null before seeding. */
export async function seededWith(db: Readable = reader()): Promise<"demo" | "starter" | null> {
  const [row] = await db.select().from(settings).where(eq(settings.key, "seed")).limit(1);
  return row?.value === "demo" || row?.value === "starter" ? row.value : null;
}

/** Whether the database holds the demo works with its published passwords. */
export async function isDemoDatabase(): Promise<boolean> {
  return (await seededWith()) === "demo";
}

const loopback = /^(localhost|127(\.\d{1,3}){3}|::1|\[::1\])$/i;

/** Everybody can read the demo's passwords, so that it is not served to other machines unless somebody says so. */
export function refuseExposedDemo(
  settingsOfProcess: { HOST: string; ALLOW_DEMO: boolean },
  database: { demo: boolean },
): void {
  if (!database.demo || settingsOfProcess.ALLOW_DEMO || loopback.test(settingsOfProcess.HOST)) return;
  throw new Error(
    `This database holds the demo works, whose passwords are published, and would be served on ${settingsOfProcess.HOST}. ` +
      "Serve it on 127.0.0.1, begin with SEED=starter and a new DATABASE_URL, or set ALLOW_DEMO=1 if that is meant.",
  );
}

/**
 * The address that the server really binds: the one of its command line, whatever HOST says. Without one `next start`
 * binds every address; the development server hands its command line to a child that does not see it.
 */
export function boundHost(
  commandLine: readonly string[],
  settingsOfProcess: { HOST: string; NODE_ENV: string },
): string {
  for (const [at, word] of commandLine.entries()) {
    if (word === "--hostname" || word === "-H") return commandLine[at + 1] ?? "::";
    const joined = /^--hostname=(.*)$/.exec(word)?.[1];
    if (joined !== undefined) return joined;
  }
  return settingsOfProcess.NODE_ENV === "production" ? "::" : settingsOfProcess.HOST;
}
