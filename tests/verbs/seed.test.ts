import { count, eq } from "drizzle-orm";
import { describe, expect, it, vi } from "vitest";
import { reader } from "@/db/client";
import { people } from "@/db/schema/people";
import { materialRevisions } from "@/db/schema/materials";
import { settings } from "@/db/schema/system";
import { templateRevisions } from "@/db/schema/templates";
import { write } from "@/db/tx";
import { isDemoDatabase } from "@/lib/access/installation";
import { verifyChain } from "@/lib/audit/verify-chain";
import { runCommandFile } from "../factories/command";
import { testDatabase } from "../factories/database";

testDatabase();
vi.setConfig({ testTimeout: 120_000 });

const countOf = async (table: typeof people | typeof templateRevisions | typeof materialRevisions) =>
  (await reader().select({ n: count() }).from(table))[0]?.n;

describe("the command seed", () => {
  it("with SEED=starter issues the whole shelf, every worked case met, and makes no people", async () => {
    expect(await runCommandFile("seed", [], { SEED: "starter" })).toMatchObject({ code: 0, stderr: "" });
    expect(await countOf(templateRevisions)).toBe(39);
    expect(await countOf(materialRevisions)).toBeGreaterThan(30);
    expect(await countOf(people)).toBe(0);
    const rows = await reader()
      .select({ state: templateRevisions.state, adoptedAt: templateRevisions.adoptedAt })
      .from(templateRevisions);
    expect(rows.every((row) => row.state === "issued" && row.adoptedAt === null)).toBe(true);
    expect((await verifyChain()).fault).toBeNull();
  });

  it("a second time changes nothing, and never turns a real installation into the demo", async () => {
    const before = (await verifyChain()).head;
    const again = await runCommandFile("seed", [], { SEED: "demo" });
    expect(again.code).toBe(0);
    expect(again.stdout).toContain("begun with SEED=starter and stays so");
    expect(await countOf(people)).toBe(0);
    expect(await isDemoDatabase()).toBe(false);
    expect((await verifyChain()).head).toEqual(before);
  });

  it("shows the set-up code while there is nobody", async () => {
    expect((await runCommandFile("accounts")).stdout).toMatch(/Set-up code: ([2-9A-Z]{5}-){3}[2-9A-Z]{5}/);
  });

  it("with SEED=demo makes the demo people and prints their passwords", async () => {
    await write((tx) => tx.delete(settings).where(eq(settings.key, "seed")));
    expect(await runCommandFile("seed", [], { SEED: "demo" })).toMatchObject({ code: 0, stderr: "" });
    expect(await countOf(people)).toBe(5);
    expect(await isDemoDatabase()).toBe(true);
    const { stdout } = await runCommandFile("accounts");
    for (const role of ["admin", "senior", "checker", "engineer", "reader"]) {
      expect(stdout).toMatch(new RegExp(`${role}@tarnbridge\\.example +tarn-bridge-`));
    }
  });
});
