import { describe, expect, it } from "vitest";
import { write } from "@/db/tx";
import { usageDaily } from "@/db/schema/system";
import { ListTemplatesQuery } from "@/lib/templates/schemas";
import { evaluateTemplate } from "@/lib/templates/evaluate-template";
import { getInputSchema } from "@/lib/templates/get-input-schema";
import { getTemplate, getTemplateRevision } from "@/lib/templates/get-template";
import { listTemplateRevisions } from "@/lib/templates/list-template-revisions";
import { listTemplates } from "@/lib/templates/list-templates";
import Ajv2020 from "ajv/dist/2020";
import { testDatabase } from "../factories/database";
import { draftNext, issueNext, issueTemplate, layerDefinition, withdraw } from "../factories/definitions";
import { keyActor, personActor } from "../factories/people";
import { unique } from "../factories/unique";

testDatabase();

const reader = personActor("reader");
const senior = personActor("senior");
const list = (query: object, actor = reader) => listTemplates(actor, ListTemplatesQuery.parse(query));
const slugs = async (query: object, actor = reader) =>
  (await list(query, actor)).items.map(({ slug }) => slug);

describe("the list of templates", () => {
  it("is read page by page without a gap or a repeat", async () => {
    for (let n = 0; n < 7; n += 1) await issueTemplate();
    const whole = await slugs({ limit: 200 });
    const read: string[] = [];
    let cursor: string | null = null;
    do {
      const page: Awaited<ReturnType<typeof list>> = await list({
        limit: 3,
        ...(cursor === null ? {} : { cursor }),
      });
      read.push(...page.items.map(({ slug }) => slug));
      cursor = page.nextCursor;
    } while (cursor !== null);
    expect(read).toEqual(whole);
    expect([...read].sort()).toEqual(read);
  });

  it("finds words that begin a title, tag, symbol, label or quantity, whatever their accents", async () => {
    const tag = unique("tag");
    const { slug } = await issueTemplate(
      layerDefinition({ title: `Geschweißter Kühler ${tag}`, tags: [`zebra${tag}`] }),
    );
    for (const search of [
      `kuhl ${tag}`,
      `KÜHLER ${tag}`,
      `zebra${tag}`,
      `${tag} conductiv`,
      `${tag} k insul`,
    ]) {
      expect([search, await slugs({ search })]).toEqual([search, [slug]]);
    }
    expect(await slugs({ search: `${tag} nothing` })).toEqual([]);
  });

  it("pages a search like the rest", async () => {
    const tag = unique("paged");
    const made: string[] = [];
    for (let n = 0; n < 5; n += 1) made.push((await issueTemplate(layerDefinition({ tags: [tag] }))).slug);
    const first = await list({ search: tag, limit: 3 });
    const second = await list({ search: tag, limit: 3, cursor: first.nextCursor ?? "" });
    expect([...first.items, ...second.items].map(({ slug }) => slug)).toEqual(made.sort());
    expect(second.nextCursor).toBeNull();
  });

  it("shows drafts to seniors only, and withdrawn ones to everybody", async () => {
    const made = await issueTemplate();
    await draftNext(made, layerDefinition());
    const gone = await issueTemplate();
    await withdraw(gone.revisionId);
    expect(await slugs({ state: "draft" })).toEqual([]);
    expect(await slugs({ state: "draft" }, senior)).toEqual([made.slug]);
    expect(await slugs({ state: "withdrawn" })).toContain(gone.slug);
    const row = (await list({ limit: 200 }, senior)).items.find(({ slug }) => slug === made.slug);
    expect(row).toMatchObject({ revision: 1, state: "issued" });
  });

  it("counts the runs of the last 30 days", async () => {
    const { slug } = await issueTemplate(layerDefinition({ tags: [unique("counted")] }));
    const row = {
      callerKind: "key",
      callerId: "key_1",
      template: slug,
      revision: 1,
      lastAt: new Date(),
    } as const;
    const dayOf = (ago: number) => new Date(Date.now() - ago * 86_400_000).toISOString().slice(0, 10);
    await write((tx) =>
      tx.insert(usageDaily).values([
        { ...row, day: dayOf(0), count: 5 },
        { ...row, day: dayOf(20), count: 7 },
        { ...row, day: dayOf(40), count: 100 },
      ]),
    );
    expect((await list({ search: slug })).items[0]?.runsLast30Days).toBe(12);
  });

  it("refuses a cursor that is not its own", async () => {
    await expect(list({ cursor: "WzFd" })).rejects.toMatchObject({
      problems: [{ pointer: "#/query/cursor", code: "invalid-input" }],
    });
  });
});

describe("revisions", () => {
  it("are listed latest first, drafts for seniors only", async () => {
    const first = await issueTemplate();
    const second = await issueNext(first, layerDefinition());
    await draftNext(second, layerDefinition());
    const numbers = async (actor = reader) =>
      (await listTemplateRevisions(actor, { slug: first.slug, limit: 50 })).items.map(
        ({ revision }) => revision,
      );
    expect(await numbers()).toEqual([2, 1]);
    expect(await numbers(senior)).toEqual([3, 2, 1]);
    await expect(getTemplateRevision(reader, { slug: first.slug, revision: 3 })).rejects.toMatchObject({
      code: "not-found",
    });
    expect(await getTemplateRevision(senior, { slug: first.slug, revision: 3 })).toMatchObject({
      state: "draft",
    });
    expect((await getTemplate(reader, { slug: first.slug })).current.revision).toBe(2);
  });

  it("that are drafts run for seniors by number, and for nobody by slug", async () => {
    const first = await issueTemplate();
    await draftNext(first, layerDefinition({ working: "R = 3*t/k" }));
    const run = (actor: typeof reader, revision?: number) =>
      evaluateTemplate(actor, { slug: first.slug, ...(revision === undefined ? {} : { revision }) });
    // 0.1 m / 0.04 W/(m·K) = 2.5 m²·K/W.
    expect((await run(senior, 2)).evaluation.results.R?.value).toBeCloseTo(7.5, 12);
    expect((await run(senior)).evaluation.results.R?.value).toBeCloseTo(2.5, 12);
    await expect(run(reader, 2)).rejects.toMatchObject({ code: "not-found" });
  });

  it("that are hidden from a limited key do not exist for it", async () => {
    const [mine, other] = [await issueTemplate(), await issueTemplate()];
    const key = keyActor("engineer", ["templates:read", "runs:evaluate"], { templates: [mine.slug] });
    expect((await getTemplate(key, { slug: mine.slug })).slug).toBe(mine.slug);
    await expect(getTemplate(key, { slug: other.slug })).rejects.toMatchObject({ code: "not-found" });
    await expect(evaluateTemplate(key, { slug: other.slug })).rejects.toMatchObject({ code: "not-found" });
  });
});

describe("the input schema of a revision", () => {
  it("accepts what a run accepts and refuses what it refuses, as far as a schema can", async () => {
    const { slug } = await issueTemplate();
    const schema = await getInputSchema(reader, { slug, revision: 1 });
    const accepts = new Ajv2020({ strict: false }).compile(schema);
    for (const inputs of [{}, { t: 5 }, { t: { value: 3, unit: "in" }, k: 1 }])
      expect(accepts(inputs)).toBe(true);
    for (const inputs of [{ t: 0 }, { t: -1 }, { x: 1 }, { t: "5" }, { t: { unit: "in" } }]) {
      expect(accepts(inputs)).toBe(false);
      await expect(evaluateTemplate(reader, { slug, inputs: inputs as never })).rejects.toMatchObject({
        problems: [expect.anything()],
      });
    }
  });

  it("names inputs without a default as required", async () => {
    const definition = layerDefinition();
    const [t, k] = definition.inputs;
    if (t?.kind !== "number" || !k) throw new Error("The layer has two inputs.");
    const { default: _default, ...bare } = t;
    const { slug } = await issueTemplate({ ...definition, inputs: [bare, k] });
    expect((await getInputSchema(reader, { slug, revision: 1 })).required).toEqual(["t"]);
  });
});

describe("inputs that must be typed", () => {
  it("take no default from other software, but do in a form", async () => {
    const definition = layerDefinition();
    const [t, k] = definition.inputs;
    if (t?.kind !== "number" || !k) throw new Error("The layer has two inputs.");
    const { slug } = await issueTemplate({ ...definition, inputs: [{ ...t, mustType: true }, k] });
    const key = keyActor("engineer", ["runs:evaluate"]);
    await expect(evaluateTemplate(key, { slug, inputs: { k: -1 } })).rejects.toMatchObject({
      problems: [
        { pointer: "#/inputs/t", code: "missing-input" },
        { pointer: "#/inputs/k", code: "out-of-range" },
      ],
    });
    expect((await evaluateTemplate(key, { slug, inputs: { t: 10 } })).evaluation.status).toBe("ok");
    expect((await evaluateTemplate(reader, { slug })).evaluation.defaulted).toContain("t");
  });
});
