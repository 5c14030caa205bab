import { prepareConnections } from "./db/client";
import { appliedMigration, newestMigration } from "./db/migrate";
import { boundHost, isDemoDatabase, refuseExposedDemo } from "./lib/access/installation";
import { compute } from "./lib/compute/compute";
import { env } from "./lib/core/env";
import { log } from "./lib/core/log";
import { needsFirstPerson, setUpCode } from "./lib/people/set-up-first-person";
import { flushUsage, startUsageFlush } from "./lib/usage/count";

/** Checks that the server may start, and starts what runs beside it. A refusal ends the process with its reason. */
export async function start(): Promise<void> {
  try {
    const settings = env();
    process.env.NEXTAUTH_URL ??= settings.PUBLIC_URL;
    process.env.NEXTAUTH_SECRET ??= settings.AUTH_SECRET;
    await prepareConnections();
    if ((await appliedMigration()) !== newestMigration) {
      throw new Error("The database is not up to date with this build. `npm run up` brings it there.");
    }
    refuseExposedDemo(
      { ...settings, HOST: boundHost(process.argv, settings) },
      { demo: await isDemoDatabase() },
    );
    if (await needsFirstPerson()) {
      log.info("first-person-wanted", {
        message: `Open ${settings.PUBLIC_URL}/set-up, set-up code ${setUpCode()}`,
      });
    }
    await compute.warm();
    startUsageFlush();
    for (const signal of ["SIGTERM", "SIGINT"] as const) process.once(signal, () => void lastFlush());
    log.info("started", { publicUrl: settings.PUBLIC_URL });
  } catch (error) {
    log.error("not-started", { error });
    process.stderr.write(`\n${error instanceof Error ? error.message : String(error)}\n`);
    process.exit(1);
  }
}

async function lastFlush(): Promise<void> {
  try {
    await flushUsage();
  } catch (error) {
    log.error("usage-lost", { error });
  }
}
