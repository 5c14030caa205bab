import { spawn } from "node:child_process";
import { once } from "node:events";
import { createClient } from "@libsql/client";
import { describe, expect, it } from "vitest";
import { reader, writeClient } from "@/db/client";
import { settings } from "@/db/schema/system";
import { write } from "@/db/tx";
import { readiness } from "@/lib/access/readiness";
import { verifyChain } from "@/lib/audit/verify-chain";
import { testDatabase } from "../factories/database";

const database = testDatabase();

const child = (script: string) =>
  spawn(
    process.execPath,
    ["--conditions=react-server", "--import", "tsx", "--input-type=module", "-e", script],
    { env: { ...process.env, DATABASE_URL: `file:${database.file}` }, stdio: ["ignore", "pipe", "inherit"] },
  );

describe("a process killed while it writes", () => {
  it(
    "loses nothing that it had acknowledged, and leaves nothing half-written",
    { timeout: 120_000 },
    async () => {
      const writing = child(`
      import { settings } from "@/db/schema/system";
      import { write } from "@/db/tx";
      import { appendAudit } from "@/lib/audit/append";
      const one = async (lane, n) => {
        const key = "kill-" + lane + "-" + n;
        await write(async (tx) => {
          await tx.insert(settings).values({ key, value: "1" });
          await appendAudit(tx, { kind: "system", reason: "test" }, { action: "database.seeded", object: key });
        });
        process.stdout.write(key + "\\n");
      };
      await Promise.all([0, 1, 2, 3].map(async (lane) => { for (let n = 0; ; n += 1) await one(lane, n); }));
    `);
      let told = "";
      writing.stdout.on("data", (chunk: Buffer) => {
        told += chunk.toString();
        if (told.length > 4000) writing.kill("SIGKILL");
      });
      await once(writing, "exit");
      const acknowledged = told.split("\n").slice(0, -1);
      expect(acknowledged.length).toBeGreaterThan(100);
      const kept = new Set((await reader().select().from(settings)).map((row) => row.key));
      expect(acknowledged.filter((key) => !kept.has(key))).toEqual([]);

      const verdict = await verifyChain();
      expect(verdict.fault).toBeNull();
      expect(verdict.rows).toBe([...kept].filter((key) => key.startsWith("kill-")).length);
      const check = await writeClient().execute("PRAGMA integrity_check");
      expect(check.rows[0]?.[0]).toBe("ok");
    },
  );
});

/** What another process says of a database, and how its write is refused. */
const ask = async (url: string, pragma = "PRAGMA user_version") => {
  const asking = child(`
    import { readiness } from "@/lib/access/readiness";
    import { write } from "@/db/tx";
    import { settings } from "@/db/schema/system";
    import { writeClient } from "@/db/client";
    process.env.DATABASE_URL = ${JSON.stringify(url)};
    await writeClient().execute(${JSON.stringify(pragma)});
    const answer = await readiness();
    const refusal = await write((tx) => tx.insert(settings).values({ key: "x", value: "1" })).then(() => null, (error) => error.code ?? String(error));
    process.stdout.write("\\n#" + JSON.stringify({ ...answer, refusal }));
  `);
  let told = "";
  asking.stdout.on("data", (chunk: Buffer) => (told += chunk.toString()));
  await once(asking, "exit");
  return JSON.parse(told.split("\n#")[1] ?? "null") as unknown;
};

describe("readiness", () => {
  it("tells a database that can be written", async () => {
    expect(await readiness()).toEqual({ ready: true, database: "writable", migrations: "current" });
  });

  it("tells a database that lacks migrations", { timeout: 120_000 }, async () => {
    expect(await ask(`file:${database.file}.empty`)).toMatchObject({ ready: false, migrations: "behind" });
  });

  it("tells a database that another process has locked", { timeout: 120_000 }, async () => {
    const holder = createClient({ url: `file:${database.file}` });
    const held = await holder.transaction("write");
    expect(await ask(`file:${database.file}`)).toMatchObject({
      ready: false,
      database: "not writable",
      refusal: "busy",
    });
    await held.rollback();
    holder.close();
    await expect(
      write((tx) => tx.insert(settings).values({ key: "after", value: "1" })),
    ).resolves.toBeTruthy();
  });

  // The client refuses `mode=ro`; the pragma makes its writing connection read-only all the same.
  it("tells a database that is read-only", { timeout: 120_000 }, async () => {
    expect(await ask(`file:${database.file}`, "PRAGMA query_only = 1")).toMatchObject({
      ready: false,
      database: "not writable",
      refusal: "busy",
    });
  });
});
