import { execFile } from "node:child_process";
import { promisify } from "node:util";
import { eq } from "drizzle-orm";
import { afterEach, describe, expect, it, vi } from "vitest";
import { reader } from "@/db/client";
import { outbox, usageDaily } from "@/db/schema/system";
import { write } from "@/db/tx";
import { takeToken, takeTokens } from "@/lib/access/rate-limit";
import { enqueue } from "@/lib/outbox/enqueue";
import { countUsage, flushUsage } from "@/lib/usage/count";
import { testDatabase } from "../factories/database";
import { keyActor, personActor, system } from "../factories/people";
import { unique } from "../factories/unique";

const database = testDatabase();

afterEach(() => {
  vi.useRealTimers();
});

/** Keeps a test inside one minute, whenever it runs. */
const freezeMinute = () => vi.useFakeTimers({ toFake: ["Date"], now: new Date("2026-05-04T10:00:10Z") });

describe("the limit of a minute", () => {
  it("lets exactly the limit through, however many ask at once", async () => {
    freezeMinute();
    const key = keyActor("engineer", ["runs:evaluate"], { ratePerMinute: 25 });
    const verdicts = await Promise.all(Array.from({ length: 60 }, () => takeToken(key)));
    expect(verdicts.filter((verdict) => verdict.allowed)).toHaveLength(25);
    expect(verdicts.at(-1)).toEqual({ allowed: false, limit: 25, remaining: 0, resetSeconds: 50 });
  });

  it("begins anew with the next minute", async () => {
    freezeMinute();
    const key = keyActor("engineer", ["runs:evaluate"], { ratePerMinute: 1 });
    expect([(await takeToken(key)).allowed, (await takeToken(key)).allowed]).toEqual([true, false]);
    vi.setSystemTime(new Date("2026-05-04T10:01:00Z"));
    expect((await takeToken(key)).allowed).toBe(true);
  });

  it("counts a dearer request as more, and refuses one that is dearer than the limit", async () => {
    freezeMinute();
    const caller = unique("caller");
    expect(await takeTokens(caller, 10, 8)).toMatchObject({ allowed: true, remaining: 2 });
    expect(await takeTokens(caller, 10, 3)).toMatchObject({ allowed: false });
    expect(await takeTokens(caller, 10, 2)).toMatchObject({ allowed: true, remaining: 0 });
  });

  it("does not hold up people or the system itself", async () => {
    expect(await takeToken(personActor("reader"))).toMatchObject({ allowed: true });
    expect(await takeToken(system)).toMatchObject({ allowed: true, limit: Infinity });
  });

  it("is never exceeded by three instances together", async () => {
    const script = `
      import { takeTokens } from "@/lib/access/rate-limit";
      Date.now = () => Date.parse("2026-05-04T11:00:10Z");
      let allowed = 0;
      for (let n = 0; n < 80; n += 1) if ((await takeTokens("shared", 100, 1)).allowed) allowed += 1;
      process.stdout.write(String(allowed));
    `;
    const run = async () => {
      const { stdout } = await promisify(execFile)(
        process.execPath,
        ["--conditions=react-server", "--import", "tsx", "--input-type=module", "-e", script],
        { env: { ...process.env, DATABASE_URL: `file:${database.file}` } },
      );
      return Number(stdout);
    };
    const allowed = (await Promise.all([run(), run(), run()])).reduce((sum, each) => sum + each, 0);
    expect(allowed).toBeLessThanOrEqual(100);
    // Each instance may hold up to nine leased tokens that nobody asked it for.
    expect(allowed).toBeGreaterThanOrEqual(100 - 3 * 9);
  });
});

describe("usage", () => {
  it("is summed per day, caller and revision, and added up over flushes", async () => {
    const actor = personActor("engineer");
    const template = unique("template");
    countUsage(actor, template, 1);
    countUsage(actor, template, 1, 9);
    countUsage(actor, template, 2);
    await flushUsage();
    countUsage(actor, template, 1, 5);
    await flushUsage();
    await flushUsage();
    const rows = await reader().select().from(usageDaily).where(eq(usageDaily.template, template));
    expect(rows.map(({ callerId, revision, count }) => ({ callerId, revision, count }))).toEqual([
      { callerId: actor.personId, revision: 1, count: 15 },
      { callerId: actor.personId, revision: 2, count: 1 },
    ]);
  });
});

describe("the outbox", () => {
  it("keeps an item only with its cause", async () => {
    const id = await write((tx) => enqueue(tx, { kind: "mail", payload: { to: "a@works.example" } }));
    await write(async (tx) => {
      await enqueue(tx, { kind: "mail", payload: { to: "b@works.example" } });
      throw new Error("no");
    }).catch(() => undefined);
    const rows = await reader().select().from(outbox);
    expect(rows.map((row) => row.id)).toEqual([id]);
    expect(rows[0]).toMatchObject({ attempts: 0, sentAt: null, payload: { to: "a@works.example" } });
  });
});
