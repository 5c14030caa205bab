import "server-only";
import { settings } from "@/db/schema/system";
import { appliedMigration, newestMigration } from "@/db/migrate";
import { write } from "@/db/tx";
import { now, second } from "@/lib/core/clock";
import { log } from "@/lib/core/log";

export interface Readiness {
  ready: boolean;
  database: "writable" | "not writable";
  migrations: "current" | "behind" | "unknown";
}

let last: { at: number; answer: Promise<Readiness> } | undefined;

/** Whether the database can be written and has every migration of this build; asked of the database once a second at most. */
export function readiness(): Promise<Readiness> {
  const at = Date.now();
  if (!last || at - last.at > second) last = { at, answer: look() };
  return last.answer;
}

async function look(): Promise<Readiness> {
  try {
    const migrations = (await appliedMigration()) === newestMigration ? "current" : "behind";
    if (migrations === "behind") return { ready: false, database: "not writable", migrations };
    const value = now().toISOString();
    await write((tx) =>
      tx
        .insert(settings)
        .values({ key: "ready-probe", value })
        .onConflictDoUpdate({ target: settings.key, set: { value } }),
    );
    return { ready: true, database: "writable", migrations };
  } catch (error) {
    log.warn("not-ready", { error });
    return { ready: false, database: "not writable", migrations: "unknown" };
  }
}
