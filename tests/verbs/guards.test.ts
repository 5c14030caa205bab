import { beforeAll, describe, expect, it } from "vitest";
import { writeClient } from "@/db/client";
import { records, recordVoids } from "@/db/schema/records";
import { templateRevisions } from "@/db/schema/templates";
import { write } from "@/db/tx";
import type { RevisionState } from "@/db/vocabulary";
import { appendAudit } from "@/lib/audit/append";
import { testDatabase } from "../factories/database";
import { system } from "../factories/people";
import { makeRevision, revisionRow } from "../factories/revisions";

testDatabase();

/** What somebody with a database tool would do, past every verb. */
const raw = (sql: string, args: (string | number)[] = []) => writeClient().execute({ sql, args });

describe("revisions", () => {
  it.each<RevisionState>(["in_check", "issued", "superseded", "withdrawn"])(
    "refuses a new definition for a revision that is %s",
    async (state) => {
      const { revisionId } = await makeRevision(state);
      await expect(
        raw("UPDATE template_revisions SET definition = '{}' WHERE id = ?", [revisionId]),
      ).rejects.toThrow("only a draft changes its content");
      await expect(
        raw("UPDATE template_revisions SET definition_hash = ? WHERE id = ?", ["0".repeat(64), revisionId]),
      ).rejects.toThrow("only a draft changes its content");
    },
  );

  it("lets a draft change and be deleted", async () => {
    const { revisionId } = await makeRevision("draft");
    await raw("UPDATE template_revisions SET definition = '{\"a\":1}' WHERE id = ?", [revisionId]);
    await raw("DELETE FROM template_revisions WHERE id = ?", [revisionId]);
    const left = await raw("SELECT 1 FROM template_revisions WHERE id = ?", [revisionId]);
    expect(left.rows).toHaveLength(0);
  });

  it("refuses to delete an issued revision", async () => {
    const { revisionId } = await makeRevision("issued");
    await expect(raw("DELETE FROM template_revisions WHERE id = ?", [revisionId])).rejects.toThrow(
      "only a draft is deleted",
    );
  });

  it.each([
    ["issued", "draft"],
    ["withdrawn", "issued"],
    ["superseded", "issued"],
    ["draft", "issued"],
  ] as const)("refuses to move a revision from %s to %s", async (from, to) => {
    const { revisionId } = await makeRevision(from);
    await expect(
      raw(
        "UPDATE template_revisions SET state = ?, submitted_at = 1, submitted_by = 'x', issued_at = 1, issued_by = 'x', checked_by = 'x' WHERE id = ?",
        [to, revisionId],
      ),
    ).rejects.toThrow(/not allowed|never changes/);
  });

  it("refuses a second issued and a second open revision of one template", async () => {
    const { templateId } = await makeRevision("issued");
    const second = (state: RevisionState, id: string, number: number) =>
      write((tx) => tx.insert(templateRevisions).values({ ...revisionRow(state), id, templateId, number }));
    await expect(second("issued", "rev_second", 2)).rejects.toThrow();
    await second("draft", "rev_open", 3);
    await expect(second("in_check", "rev_open2", 4)).rejects.toThrow();
  });

  it("refuses to replace an issued revision, by number and by state", async () => {
    const { templateId, revisionId } = await makeRevision("issued");
    for (const number of [1, 2]) {
      await expect(
        raw(
          `INSERT OR REPLACE INTO template_revisions (id, template_id, number, state, title, definition, definition_hash, engine,
             originator_ids, created_at, created_by, changed_at, submitted_at, submitted_by, checked_by, issued_at, issued_by, supplied)
           VALUES ('rev_forged', ?, ?, 'issued', 'T', '{}', ?, '1', '["a"]', 1, 'a', 1, 1, 'a', 'b', 1, 'b', 0)`,
          [templateId, number, "0".repeat(64)],
        ),
      ).rejects.toThrow("is not replaced");
    }
    const left = await raw("SELECT id FROM template_revisions WHERE template_id = ?", [templateId]);
    expect(left.rows.map((row) => row.id)).toEqual([revisionId]);
  });

  it("refuses the originator as checker", async () => {
    await expect(makeRevision("issued", { checkedBy: "per_author" })).rejects.toThrow();
  });

  it("refuses an issued revision without an issuer", async () => {
    await expect(makeRevision("issued", { issuedBy: null })).rejects.toThrow();
  });

  it("refuses another slug for a template", async () => {
    const { templateId } = await makeRevision("draft");
    await expect(raw("UPDATE templates SET slug = 'other' WHERE id = ?", [templateId])).rejects.toThrow(
      "the slug is fixed",
    );
  });
});

describe("records and the trail", () => {
  let number = 0;

  beforeAll(async () => {
    const { revisionId, slug } = await makeRevision("issued");
    const [row] = await write((tx) =>
      tx
        .insert(records)
        .values({
          templateRevisionId: revisionId,
          template: slug,
          revision: 1,
          definitionHash: "a".repeat(64),
          engineVersion: "1.0.0",
          nodeVersion: "20",
          given: {},
          evaluation: { q: 0.1 + 0.2 },
          status: "ok",
          title: "",
          note: "",
          actorKind: "system",
          actorId: "system",
          digest: "b".repeat(64),
          createdAt: new Date(),
        })
        .returning({ number: records.number }),
    );
    number = row?.number ?? 0;
    await write(async (tx) => {
      await tx.insert(recordVoids).values({
        recordNumber: number,
        reason: "Wrong pipe",
        byKind: "system",
        byId: "system",
        at: new Date(),
      });
      await appendAudit(tx, system, { action: "record.voided", object: `record:${number}` });
    });
  });

  it.each([
    ["records", "UPDATE records SET title = 'forged'"],
    ["records", "DELETE FROM records"],
    ["record_voids", "UPDATE record_voids SET reason = 'forged'"],
    ["record_voids", "DELETE FROM record_voids"],
    ["audit", "UPDATE audit SET object = 'forged'"],
    ["audit", "DELETE FROM audit"],
  ])("refuses any change of %s: %s", async (_table, sql) => {
    await expect(raw(sql)).rejects.toThrow(/rows never change|rows are kept/);
  });

  it("refuses to replace a record", async () => {
    await expect(
      raw("INSERT OR REPLACE INTO records SELECT * FROM records WHERE number = ?", [number]),
    ).rejects.toThrow("a row is not replaced");
  });

  it("refuses to void a record twice", async () => {
    await expect(
      raw("INSERT INTO record_voids VALUES (?, 'again', 'system', 'system', 1)", [number]),
    ).rejects.toThrow();
  });
});
