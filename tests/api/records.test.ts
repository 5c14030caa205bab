import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { templateRevisions } from "@/db/schema/templates";
import { write } from "@/db/tx";
import { scopes } from "@/db/vocabulary";
import { issueNext, issueTemplate, layerDefinition, withdraw } from "../factories/definitions";
import { makeKeyOf, makePerson } from "../factories/people";
import { apiServer, sessionCookie, type JsonObject } from "./harness";

const api = apiServer();
let key = "";

beforeAll(async () => {
  const owner = await makePerson({ role: "engineer" });
  key = (await makeKeyOf(owner, { scopes: [...scopes], ratePerMinute: 10_000 })).key;
});

const keep = (slug: string, body: unknown, headers: Record<string, string> = {}) =>
  api.call("POST", `/templates/${slug}/records`, { key, body, headers });
const read = (number: unknown) => api.call("GET", `/records/${String(number)}`, { key });

describe("a record", () => {
  it("is there after a kill -9 right behind its 201", async () => {
    const made = await keep("plane-wall", { inputs: { t: { value: 4, unit: "in" } }, tags: ["K-9"] });
    await api.stop("SIGKILL");
    await api.start();
    expect(made.status).toBe(201);
    const kept = await read(made.json.number);
    expect(kept.json).toEqual(made.json);
  });

  it("survives the kill when many are being written", async () => {
    const acknowledged: string[] = [];
    const writing = Array.from({ length: 40 }, (_, n) =>
      keep("plane-wall", { title: `Wall ${n}` }).then(
        ({ json }) => acknowledged.push(String(json.number)),
        () => undefined,
      ),
    );
    await Promise.race(writing);
    await api.stop("SIGKILL");
    await Promise.all(writing);
    await api.start();
    expect(acknowledged.length).toBeGreaterThan(0);
    for (const number of acknowledged) expect((await read(number)).status).toBe(200);
    const listed = (await api.call("GET", "/records?limit=200", { key })).json.items as { number: string }[];
    expect(new Set(listed.map(({ number }) => number)).size).toBe(listed.length);
  });

  it("has the digits of the same evaluation, by key and by session, and of a run again", async () => {
    const owner = await makePerson({ role: "engineer" });
    const cookie = await sessionCookie(owner.sessionId);
    const headers = { "sec-fetch-site": "same-origin" };
    for (const [slug, body] of [
      ["plane-wall", { inputs: { t: { value: 4, unit: "in" } }, units: { Q: "BTU/h" } }],
      ["insulated-pipe", {}],
      ["touch-limit-thickness", {}],
      ["furnace-lining", {}],
    ] as const) {
      const evaluated = await api.call("POST", `/templates/${slug}/evaluate`, { key, body });
      const bySession = await api.call("POST", `/templates/${slug}/evaluate`, { cookie, headers, body });
      const kept = await keep(slug, body);
      const again = await api.call("POST", `/records/${String(kept.json.number)}/rerun`, { key });
      expect([slug, evaluated.status, kept.status, again.json.same]).toEqual([slug, 200, 201, true]);
      expect(bySession.json.results).toEqual(evaluated.json.results);
      expect(kept.json.results).toEqual(evaluated.json.results);
      expect((again.json.after as JsonObject).results).toEqual(evaluated.json.results);
    }
  });

  it("is answered with its address, and again for the same Idempotency-Key", async () => {
    const headers = { "idempotency-key": '"one-wall"' };
    const first = await keep("plane-wall", { title: "Once" }, headers);
    const second = await keep("plane-wall", { title: "Once" }, headers);
    expect([first.status, second.status, second.text]).toEqual([201, 201, first.text]);
    expect(second.headers.get("location")).toBe(`/api/v1/records/${String(first.json.number)}`);
    expect((await keep("plane-wall", { title: "Twice" }, headers)).status).toBe(422);
  });

  it("counts one winner among 24 requests with the same Idempotency-Key", async () => {
    const headers = { "idempotency-key": "race" };
    const replies = await Promise.all(
      Array.from({ length: 24 }, () => keep("plane-wall", { title: "Race" }, headers)),
    );
    const numbers = new Set(replies.filter(({ status }) => status === 201).map(({ json }) => json.number));
    expect(numbers.size).toBe(1);
    expect(replies.every(({ status }) => status === 201 || status === 409)).toBe(true);
  });

  it("is kept of nothing when an input is wrong", async () => {
    const before = (await api.call("GET", "/records?limit=1", { key })).json.items;
    expect((await keep("plane-wall", { inputs: { t: 0 }, tags: ["x"] })).status).toBe(422);
    expect((await keep("plane-wall", { titel: "x" })).status).toBe(422);
    expect((await api.call("GET", "/records?limit=1", { key })).json.items).toEqual(before);
  });
});

describe("revisions on their way out", () => {
  it("run with Deprecation and the successor, with Sunset only when a date is set", async () => {
    const first = await issueTemplate();
    const second = await issueNext(first, layerDefinition({ working: "R = 2*t/k" }));
    const pinned = () => api.call("POST", `/templates/${first.slug}/revisions/1/evaluate`, { key, body: {} });
    const old = await pinned();
    expect([old.status, old.json.revision]).toEqual([200, 1]);
    expect(old.headers.get("deprecation")).toMatch(/^@\d{10}$/);
    expect(old.headers.get("sunset")).toBeNull();
    expect(old.headers.get("link")).toContain(
      `</api/v1/templates/${first.slug}/revisions/2>; rel="successor-version"`,
    );
    const date = new Date("2031-05-01T00:00:00Z");
    await write((tx) =>
      tx
        .update(templateRevisions)
        .set({ withdrawalDate: date })
        .where(eq(templateRevisions.id, first.revisionId)),
    );
    expect((await pinned()).headers.get("sunset")).toBe("Thu, 01 May 2031 00:00:00 GMT");
    const current = await api.call("POST", `/templates/${first.slug}/evaluate`, { key, body: {} });
    expect([current.json.revision, current.headers.get("deprecation")]).toEqual([second.number, null]);
  });

  it("answer 410 once withdrawn, but stay readable, and their records run again", async () => {
    const made = await issueTemplate();
    const kept = await keep(made.slug, { inputs: { t: 50 } });
    await withdraw(made.revisionId, "The factor was wrong.");
    for (const address of ["evaluate", "records", "revisions/1/evaluate", "revisions/1/records"]) {
      const reply = await api.call("POST", `/templates/${made.slug}/${address}`, { key, body: {} });
      expect([address, reply.status]).toEqual([address, 410]);
      expect(reply.json.detail).toContain("The factor was wrong.");
    }
    expect((await api.call("GET", `/templates/${made.slug}/revisions/1`, { key })).json.state).toBe(
      "withdrawn",
    );
    const again = await api.call("POST", `/records/${String(kept.json.number)}/rerun`, { key, body: {} });
    expect([again.status, again.json.same]).toEqual([200, true]);
    const current = await api.call("POST", `/records/${String(kept.json.number)}/rerun`, {
      key,
      body: { on: "current" },
    });
    expect(current.status).toBe(404);
  });

  it("show what changed when a record runs on the current one", async () => {
    const first = await issueTemplate();
    const kept = await keep(first.slug, { inputs: { t: 50 } });
    await issueNext(first, layerDefinition({ working: "R = 2*t/k" }));
    const again = await api.call("POST", `/records/${String(kept.json.number)}/rerun`, {
      key,
      body: { on: "current" },
    });
    // 0.05 m / 0.04 W/(m·K) = 1.25 m²·K/W, doubled by revision 2.
    expect(again.json).toMatchObject({
      on: "current",
      same: false,
      deviations: [
        { symbol: "R", before: { value: 1.25 }, after: { value: 2.5 }, absolute: 1.25, relative: 1 },
      ],
    });
  });
});
