import { desc, eq } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { reader as database } from "@/db/client";
import { records } from "@/db/schema/records";
import { audit } from "@/db/schema/system";
import type { PersonActor } from "@/lib/access/actor";
import { createRecord } from "@/lib/records/create-record";
import { recordDigest } from "@/lib/records/digest";
import { getRecord } from "@/lib/records/get-record";
import { listRecords } from "@/lib/records/list-records";
import { recordNumber } from "@/lib/records/record-number";
import { rerunRecord } from "@/lib/records/rerun-record";
import { CreateRecordBody, ListRecordsQuery } from "@/lib/records/schemas";
import { voidRecord } from "@/lib/records/void-record";
import { testDatabase } from "../factories/database";
import {
  draftNext,
  issueMaterial,
  issueNextMaterial,
  issueTemplate,
  layerDefinition,
  lineMaterial,
} from "../factories/definitions";
import { keyActor, makePerson, personActor } from "../factories/people";
import { unique } from "../factories/unique";

testDatabase();

const keep = async (actor: PersonActor, body: object = {}, slug?: string) =>
  (await createRecord(actor, { ...CreateRecordBody.parse(body), slug: slug ?? (await issueTemplate()).slug }))
    .record;
const rowOf = async (name: string) =>
  (
    await database()
      .select()
      .from(records)
      .where(eq(records.number, recordNumber(name)))
  )[0];
const lastAudit = async () => (await database().select().from(audit).orderBy(desc(audit.seq)).limit(1))[0];

describe("keeping a record", () => {
  it("keeps inputs as typed, their origins, and everything that was answered", async () => {
    const engineer = await makePerson();
    const record = await keep(engineer, {
      inputs: { t: { value: 4, unit: "in" }, k: 0.05 },
      origins: { k: "list" },
      units: { R: "ft²·°F·h/BTU" },
      tags: ["B", "A", "B"],
      title: "  Wall  ",
    });
    expect(record).toMatchObject({
      number: expect.stringMatching(/^R-\d{6}$/) as string,
      given: { inputs: { t: { value: 4, unit: "in" }, k: 0.05 }, units: { R: "ft²·°F·h/BTU" } },
      origins: { t: "typed", k: "list" },
      inputs: { t: { value: 4, unit: "in", si: 0.1016 } },
      tags: ["A", "B"],
      title: "Wall",
      createdBy: { kind: "person", id: engineer.personId, name: engineer.name },
      void: null,
    });
    expect(record.steps?.map(({ symbol }) => symbol)).toEqual(["R"]);
    expect(await getRecord(personActor("reader"), { number: record.number })).toEqual(record);
  });

  it("has a digest over its canonical content, which tags do not enter", async () => {
    const record = await keep(await makePerson(), { tags: ["X-1"] });
    const row = await rowOf(record.number);
    if (!row) throw new Error("The record is not there.");
    const { templateRevisionId: _revision, status: _status, digest, ...content } = row;
    expect(digest).toBe(record.digest);
    expect(recordDigest(content)).toBe(digest);
    expect(recordDigest({ ...content, note: "changed" })).not.toBe(digest);
  });

  it("numbers without a gap when many come at once, each with its audit row", async () => {
    const engineer = await makePerson();
    const { slug } = await issueTemplate();
    const made = await Promise.all(Array.from({ length: 20 }, () => keep(engineer, {}, slug)));
    const numbers = made.map(({ number }) => recordNumber(number)).sort((a, b) => a - b);
    expect(numbers).toEqual(Array.from({ length: 20 }, (_, n) => (numbers[0] ?? 0) + n));
    const trail = await database().select().from(audit).where(eq(audit.action, "record.created"));
    for (const { number } of made) expect(trail.map(({ object }) => object)).toContain(`record:${number}`);
  });

  it("is for engineers, and of issued revisions only", async () => {
    const made = await issueTemplate();
    await expect(createRecord(personActor("reader"), { slug: made.slug })).rejects.toMatchObject({
      code: "forbidden",
    });
    await draftNext(made, layerDefinition());
    await expect(
      createRecord(await makePerson({ role: "senior" }), { slug: made.slug, revision: 2 }),
    ).rejects.toMatchObject({
      code: "state-conflict",
    });
  });

  it("takes no default where an input must be typed", async () => {
    const definition = layerDefinition();
    const [t, k] = definition.inputs;
    if (t?.kind !== "number" || !k) throw new Error("The layer has two inputs.");
    const { slug } = await issueTemplate({ ...definition, inputs: [{ ...t, mustType: true }, k] });
    const engineer = await makePerson();
    await expect(keep(engineer, {}, slug)).rejects.toMatchObject({
      problems: [{ pointer: "#/inputs/t", code: "missing-input" }],
    });
    expect((await keep(engineer, { inputs: { t: 100 } }, slug)).status).toBe("ok");
  });

  it("refuses an origin of an input that was not sent, together with other faults", async () => {
    await expect(
      keep(await makePerson(), { inputs: { t: 0 }, origins: { tt: "list" } }),
    ).rejects.toMatchObject({
      problems: [
        { pointer: "#/origins/tt", code: "unknown-member" },
        { pointer: "#/inputs/t", code: "out-of-range" },
      ],
    });
  });
});

describe("voiding a record", () => {
  it("takes a reason, happens once, and leaves the record as it was", async () => {
    const engineer = await makePerson();
    const record = await keep(engineer);
    const voided = await voidRecord(engineer, { number: record.number, reason: "Wrong wall" });
    expect(voided.void).toMatchObject({
      reason: "Wrong wall",
      by: { id: engineer.personId, name: engineer.name },
    });
    expect({ ...voided, void: null }).toEqual(record);
    expect(await lastAudit()).toMatchObject({ action: "record.voided", object: `record:${record.number}` });
    await expect(voidRecord(engineer, { number: record.number, reason: "Again" })).rejects.toMatchObject({
      code: "state-conflict",
    });
  });

  it("is for who made it, through a key of theirs too, and for seniors", async () => {
    const engineer = await makePerson();
    const [one, two] = [await keep(engineer), await keep(engineer)];
    await expect(
      voidRecord(await makePerson(), { number: one.number, reason: "Not mine" }),
    ).rejects.toMatchObject({ code: "forbidden" });
    const key = keyActor("engineer", ["records:write"], {
      owner: { personId: engineer.personId, role: "engineer" },
    });
    expect((await voidRecord(key, { number: one.number, reason: "Twice" })).void?.by.kind).toBe("key");
    expect(
      (await voidRecord(await makePerson({ role: "senior" }), { number: two.number, reason: "Old" })).void,
    ).not.toBeNull();
  });
});

describe("running a record again", () => {
  it("uses the record's own material revision, and the current one when asked", async () => {
    const material = await issueMaterial();
    const definition = layerDefinition({
      inputs: [
        {
          kind: "number",
          symbol: "t",
          label: "Thickness",
          quantity: "length",
          unit: "mm",
          default: 100,
          above: 0,
        },
        { kind: "material", symbol: "wall", label: "Wall", needs: ["k"], default: material.slug },
        {
          kind: "number",
          symbol: "T",
          label: "Temperature",
          quantity: "temperature",
          unit: "K",
          default: 500,
        },
      ],
      working: "R = t/wall.k(T)",
    });
    const { slug } = await issueTemplate(definition);
    const record = await keep(await makePerson(), {}, slug);
    expect(record.materials).toEqual([{ slug: material.slug, revision: 1 }]);
    await issueNextMaterial(
      material,
      lineMaterial([
        [0, 2],
        [1000, 4],
      ]),
    );
    const reader = personActor("reader");
    expect(await rerunRecord(reader, { number: record.number })).toMatchObject({
      same: true,
      deviations: [],
    });
    const current = await rerunRecord(reader, { number: record.number, on: "current" });
    expect(current.after.materials).toEqual([{ slug: material.slug, revision: 2 }]);
    // k(500 K) is 1.5, then 3 W/(m·K): the resistance is halved.
    expect(current).toMatchObject({ same: false, deviations: [{ symbol: "R", relative: 0.5 }] });
  });
});

describe("the list of records", () => {
  const list = async (query: object) =>
    (await listRecords(personActor("reader"), ListRecordsQuery.parse(query))).items.map(
      ({ number }) => number,
    );

  it("is filtered by template, tag, status, owner, void, time and words", async () => {
    const engineer = await makePerson();
    const { slug } = await issueTemplate();
    const tag = unique("TAG");
    const one = await keep(engineer, { tags: [tag], title: "North wall" }, slug);
    const two = await keep(engineer, { title: "South 100% wall" }, slug);
    await voidRecord(engineer, { number: two.number, reason: "Twice" });
    expect(await list({ template: slug })).toEqual([two.number, one.number]);
    expect(await list({ tag })).toEqual([one.number]);
    expect(await list({ template: slug, voided: "false" })).toEqual([one.number]);
    expect(await list({ template: slug, voided: "true" })).toEqual([two.number]);
    expect(await list({ template: slug, status: "stop" })).toEqual([]);
    expect(await list({ owner: engineer.personId })).toEqual([two.number, one.number]);
    expect(await list({ template: slug, search: "north" })).toEqual([one.number]);
    expect(await list({ template: slug, search: "100%" })).toEqual([two.number]);
    expect(await list({ search: one.number.toLowerCase() })).toEqual([one.number]);
    expect(await list({ template: slug, to: "2020-01-01T00:00:00Z" })).toEqual([]);
    expect(await list({ template: slug, from: "2020-01-01T00:00:00+02:00" })).toHaveLength(2);
    const mine = await listRecords(engineer, ListRecordsQuery.parse({ owner: "me" }));
    expect(mine.items.map(({ number }) => number)).toEqual([two.number, one.number]);
  });

  it("is read page by page, latest first", async () => {
    const engineer = await makePerson();
    const { slug } = await issueTemplate();
    const made: string[] = [];
    for (let n = 0; n < 5; n += 1) made.unshift((await keep(engineer, {}, slug)).number);
    const query = { template: slug, limit: 2 };
    const read: string[] = [];
    let cursor: string | null | undefined;
    while (cursor !== null) {
      const page: Awaited<ReturnType<typeof listRecords>> = await listRecords(
        personActor("reader"),
        ListRecordsQuery.parse({ ...query, ...(cursor === undefined ? {} : { cursor }) }),
      );
      read.push(...page.items.map(({ number }) => number));
      cursor = page.nextCursor;
    }
    expect(read).toEqual(made);
  });
});
