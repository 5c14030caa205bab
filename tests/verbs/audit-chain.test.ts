import { beforeEach, describe, expect, it } from "vitest";
import { writeClient } from "@/db/client";
import { write } from "@/db/tx";
import { appendAudit } from "@/lib/audit/append";
import { verifyChain } from "@/lib/audit/verify-chain";
import { testDatabase } from "../factories/database";
import { system } from "../factories/people";
import { unique } from "../factories/unique";

testDatabase();

const append = (object: string) =>
  write((tx) =>
    appendAudit(tx, system, { action: "database.seeded", object, details: { n: 0.1, "2": "é", a: null } }),
  );

/** Somebody who owns the file takes the guards away first. */
async function forge(sql: string): Promise<void> {
  await writeClient().executeMultiple(
    `DROP TRIGGER IF EXISTS audit_never_change; DROP TRIGGER IF EXISTS audit_are_kept; ${sql}`,
  );
}

describe("the chain of the trail", () => {
  beforeEach(async () => {
    await forge("DELETE FROM audit; DELETE FROM sqlite_sequence WHERE name = 'audit';");
    await Promise.all(Array.from({ length: 5 }, () => append(unique("thing"))));
  });

  it("holds for what was written at once and one after another", async () => {
    await append(unique("thing"));
    const verdict = await verifyChain();
    expect(verdict).toMatchObject({ rows: 6, fault: null });
    await append(unique("thing"));
    expect(await verifyChain(verdict.head ?? undefined)).toMatchObject({ rows: 7, fault: null });
  });

  it("holds over more rows than one page", async () => {
    await Promise.all(Array.from({ length: 1100 }, () => append("page")));
    expect(await verifyChain()).toMatchObject({ rows: 1105, fault: null });
  });

  it.each([
    ["what", "object = 'forged'"],
    ["who", "actor_id = 'per_other'"],
    ["when", "at = at + 1"],
    ["the details", "details = '{}'"],
    ["the action", "action = 'key.created'"],
  ])("betrays a changed row: %s", async (_what, set) => {
    await forge(`UPDATE audit SET ${set} WHERE seq = 3;`);
    expect(await verifyChain()).toMatchObject({ fault: "Row 3 was changed." });
  });

  it("betrays a row whose own hash was made again without the secret", async () => {
    await forge(`UPDATE audit SET object = 'forged', hash = '${"c".repeat(64)}' WHERE seq = 3;`);
    expect(await verifyChain()).toMatchObject({ fault: "Row 3 was changed." });
  });

  it("betrays a missing row, first, middle or renumbered", async () => {
    await forge("DELETE FROM audit WHERE seq = 3;");
    expect(await verifyChain()).toMatchObject({ fault: "Row 3 is missing." });
    await forge("UPDATE audit SET seq = seq - 1 WHERE seq > 3;");
    expect(await verifyChain()).toMatchObject({ fault: "Row 3 does not follow the row before it." });
    await forge("DELETE FROM audit WHERE seq = 1;");
    expect(await verifyChain()).toMatchObject({ fault: "Row 1 is missing." });
  });

  it("betrays a cut end by SQLite's counter, and by a noted head when that was set back, too", async () => {
    const { head } = await verifyChain();
    await forge("DELETE FROM audit WHERE seq > 3;");
    expect(await verifyChain()).toMatchObject({ fault: "The trail ends at row 3; it once had 5." });
    await forge("UPDATE sqlite_sequence SET seq = 3 WHERE name = 'audit';");
    expect(await verifyChain()).toMatchObject({ fault: null });
    expect(await verifyChain(head ?? undefined)).toMatchObject({
      fault: "The trail ends at row 3; it once had 5.",
    });
    await append("other");
    await append("history");
    expect(await verifyChain(head ?? undefined)).toMatchObject({
      fault: "Row 5 is not the one that was noted as head.",
    });
  });

  it("betrays an unknown secret", async () => {
    await forge("UPDATE audit SET secret_version = 'unknown' WHERE seq = 2;");
    expect((await verifyChain()).fault).toContain("a secret that this installation does not have");
  });

  it("keeps nothing of a row whose transaction fails", async () => {
    await expect(
      write(async (tx) => {
        await appendAudit(tx, system, { action: "database.seeded", object: "lost" });
        throw new Error("no");
      }),
    ).rejects.toThrow("no");
    expect(await verifyChain()).toMatchObject({ rows: 5, fault: null });
  });
});
