import { beforeAll, describe, expect, it, vi } from "vitest";
import { migrateDatabase } from "@/db/migrate";
import { verifyKey } from "@/lib/access/verify-key";
import { setUpCode } from "@/lib/people/set-up-first-person";
import { runCommandFile } from "../factories/command";
import { testDatabase } from "../factories/database";
import { makePerson } from "../factories/people";

testDatabase();
// Each command is a process of its own, and a busy machine starts it slowly.
vi.setConfig({ testTimeout: 120_000 });

describe("the command key", () => {
  let email = "";
  beforeAll(async () => {
    email = (await makePerson({ role: "engineer" })).email;
  });

  it("prints a working key, and only it, on the last line", async () => {
    const { code, stdout } = await runCommandFile("key", [
      "--owner",
      email,
      "--scopes",
      "all",
      "--days",
      "7",
    ]);
    expect(code).toBe(0);
    const last = stdout.trimEnd().split("\n").at(-1) ?? "";
    expect(last).toMatch(/^cfk_[0-9A-Za-z]{49}$/);
    expect(await verifyKey(last, null)).toMatchObject({
      kind: "key",
      owner: { role: "engineer" },
      ratePerMinute: 600,
    });
  });

  it("takes a list of scopes and of templates", async () => {
    const { stdout } = await runCommandFile("key", [
      "--owner",
      email.toUpperCase(),
      "--scopes",
      "runs:evaluate, records:write",
      "--days=1",
      "--templates=plane-wall,insulated-pipe",
    ]);
    expect(await verifyKey(stdout.trimEnd().split("\n").at(-1) ?? "", null)).toMatchObject({
      scopes: ["runs:evaluate", "records:write"],
      templates: ["plane-wall", "insulated-pipe"],
    });
  });

  it.each([
    [
      ["--owner", "nobody@works.example", "--scopes", "all", "--days", "7"],
      "There is no person with the address",
    ],
    [["--scopes", "all"], "npm run key -- --owner MAIL"],
    [["--owner", "EMAIL", "--scopes", "everything", "--days", "7"], "Unknown scope: everything"],
    [["--owner", "EMAIL", "--scopes", "all", "--days", "soon"], "days"],
  ])("says what is wrong with %j", async (args, words) => {
    const { code, stderr, stdout } = await runCommandFile(
      "key",
      args.map((word) => (word === "EMAIL" ? email : word)),
    );
    expect(code).toBe(1);
    expect(stderr).toContain(words);
    expect(stderr).not.toMatch(/\n +at /);
    expect(stdout).not.toContain("cfk_");
  });
});

describe("the commands of the start", () => {
  it("migrate says that there is nothing to do", async () => {
    expect(await migrateDatabase()).toBe(false);
    expect(await runCommandFile("migrate")).toMatchObject({
      code: 0,
      stdout: expect.stringContaining("is up to date"),
    });
  });

  it("stop with a sentence when a secret is missing", async () => {
    const { code, stderr } = await runCommandFile("migrate", [], { AUDIT_SECRET: "" });
    expect(code).toBe(1);
    expect(stderr).toContain("AUDIT_SECRET is missing");
    expect(stderr).not.toMatch(/\n +at /);
  });

  it("accounts never tells the set-up code once there are people", async () => {
    expect((await runCommandFile("accounts")).stdout).not.toContain(setUpCode());
  });
});
