import { spawn } from "node:child_process";
import { once } from "node:events";
import { createClient } from "@libsql/client";
import { eq, sql } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { reader, writeClient } from "@/db/client";
import { isUniqueViolation } from "@/db/faults";
import { migrateDatabase } from "@/db/migrate";
import { settings } from "@/db/schema/system";
import { write } from "@/db/tx";
import { testDatabase } from "../factories/database";
import { unique } from "../factories/unique";

const database = testDatabase();

const keep = (key: string, value = "1") => write((tx) => tx.insert(settings).values({ key, value }));
const kept = async (key: string) =>
  (await reader().select().from(settings).where(eq(settings.key, key))).map((row) => row.value);

/** Another process that takes the write lock, says so, and gives it back after `milliseconds`. */
async function holdLock(milliseconds: number): Promise<() => Promise<unknown>> {
  const script = `
    const { createClient } = require("@libsql/client");
    const client = createClient({ url: ${JSON.stringify(`file:${database.file}`)} });
    client.transaction("write").then(async (tx) => {
      await tx.execute("INSERT INTO settings (key, value) VALUES ('lock-holder', '1') ON CONFLICT DO NOTHING");
      process.stdout.write("held");
      setTimeout(() => tx.commit().then(() => process.exit(0)), ${milliseconds});
    });`;
  const child = spawn(process.execPath, ["-e", script], {
    cwd: process.cwd(),
    stdio: ["ignore", "pipe", "inherit"],
  });
  const ended = once(child, "exit");
  await once(child.stdout, "data");
  return () => ended;
}

describe("the write queue", () => {
  it("keeps every one of many writes that were asked for at once", async () => {
    const names = Array.from({ length: 100 }, () => unique("many"));
    await Promise.all(names.map((name) => keep(name)));
    const rows = await reader()
      .select()
      .from(settings)
      .where(sql`${settings.key} like 'many-%'`);
    expect(rows).toHaveLength(100);
  });

  it("undoes a failed write without touching its neighbours in the same commit", async () => {
    const [before, failing, behind] = [unique("before"), unique("failing"), unique("behind")];
    const outcomes = await Promise.allSettled([
      keep(before),
      write(async (tx) => {
        await tx.insert(settings).values({ key: failing, value: "1" });
        throw new Error("no");
      }),
      keep(behind),
    ]);
    expect(outcomes.map((outcome) => outcome.status)).toEqual(["fulfilled", "rejected", "fulfilled"]);
    expect([await kept(before), await kept(failing), await kept(behind)]).toEqual([["1"], [], ["1"]]);
  });

  it("tells a unique violation from other faults", async () => {
    const key = unique("twice");
    await keep(key);
    const error: unknown = await keep(key).catch((reason: unknown) => reason);
    expect(isUniqueViolation(error)).toBe(true);
    expect(isUniqueViolation(new Error("UNIQUE constraint failed"))).toBe(false);
  });

  it("waits for another process without stopping the event loop", async () => {
    const ended = await holdLock(600);
    let turns = 0;
    const timer = setInterval(() => (turns += 1), 10);
    const key = unique("waited");
    await keep(key);
    clearInterval(timer);
    expect(await kept(key)).toEqual(["1"]);
    // A loop that stood still for the whole wait would have had no turn at all.
    expect(turns).toBeGreaterThan(3);
    await ended();
  });

  it("answers busy, and keeps nothing, when the lock is not given back", async () => {
    const ended = await holdLock(7000);
    const key = unique("refused");
    await expect(keep(key)).rejects.toMatchObject({ code: "busy" });
    await ended();
    expect(await kept(key)).toEqual([]);
    await keep(key);
    expect(await kept(key)).toEqual(["1"]);
  });

  it("answers busy when the disk is full, keeps nothing, and recovers", async () => {
    const pages = Number((await writeClient().execute("PRAGMA page_count")).rows[0]?.[0]);
    await writeClient().execute(`PRAGMA max_page_count = ${pages}`);
    const [small, large] = [unique("small"), unique("large")];
    const outcomes = await Promise.allSettled([keep(small), keep(large, "x".repeat(400_000))]);
    expect(outcomes.map((outcome) => outcome.status)).toEqual(["rejected", "rejected"]);
    expect(outcomes[1]).toMatchObject({ reason: { code: "busy" } });
    expect(await kept(small)).toEqual([]);
    await writeClient().execute("PRAGMA max_page_count = 1073741823");
    await keep(large, "x".repeat(400_000));
    expect(await kept(large)).toHaveLength(1);
  });
});

describe("the library's traps", () => {
  it("binds a JavaScript number as REAL, so that SQL divides in fractions", async () => {
    const result = await writeClient().execute({ sql: "SELECT 7 / ? AS bound, 7 / 2 AS written", args: [2] });
    expect([result.rows[0]?.bound, result.rows[0]?.written]).toEqual([3.5, 3]);
  });

  it("keeps whole numbers whole in INTEGER columns all the same", async () => {
    const result = await writeClient().execute(
      "SELECT DISTINCT typeof(created_at) AS kind FROM __drizzle_migrations",
    );
    expect(result.rows.map((row) => row.kind)).toEqual(["integer"]);
  });

  it("answers no rowsAffected for statements that return rows", async () => {
    const result = await writeClient().execute({
      sql: "INSERT INTO settings (key, value) VALUES (?, '1') RETURNING key",
      args: [unique("returning")],
    });
    expect([result.rowsAffected, result.rows.length]).toEqual([0, 1]);
  });

  it("leaves a connection that met a lock unable to commit until it is renewed", async () => {
    const url = `file:${database.file}`;
    const holder = createClient({ url });
    const client = createClient({ url, timeout: 50, concurrency: 1 });
    const held = await holder.transaction("write");
    await expect(client.transaction("write")).rejects.toThrow("database is locked");
    await held.rollback();
    const next = async () => {
      const tx = await client.transaction("write");
      await tx.execute("UPDATE settings SET value = value");
      return tx.commit().finally(() => tx.close());
    };
    await expect(next()).rejects.toThrow("SQL statements in progress");
    client.reconnect();
    await expect(next()).resolves.toBeUndefined();
    holder.close();
    client.close();
  });

  it("loses an in-memory database on another client, so that tests use files", async () => {
    const client = createClient({ url: "file::memory:" });
    await client.execute("CREATE TABLE t (a)");
    const other = createClient({ url: "file::memory:" });
    await expect(other.execute("SELECT * FROM t")).rejects.toThrow("no such table");
  });

  it("lets one of many migrate at a time and finds nothing to do afterwards", async () => {
    expect(await Promise.all([migrateDatabase(), migrateDatabase(), migrateDatabase()])).toEqual([
      false,
      false,
      false,
    ]);
  });
});
