import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { keys } from "@/db/schema/people";
import { write } from "@/db/tx";
import { scopes, type Scope } from "@/db/vocabulary";
import type { PersonActor } from "@/lib/access/actor";
import { revokeKey } from "@/lib/people/revoke-key";
import type { Operation } from "@/lib/http/operation";
import { operations } from "@/openapi/index";
import { deactivate, makeKeyOf, makePerson } from "../factories/people";
import { addressOf } from "./examples";
import { apiServer, sessionCookie, type CallOptions, type JsonObject, type Reply } from "./harness";

/** Who is refused, and how: the same rows for every operation that is not open to everybody. */

const api = apiServer();
const guarded = operations.filter(({ scope }) => scope !== "public");
const rows = guarded.map((operation) => [operation.id, operation] as const);

const all: Scope[] = [...scopes];
const refused = { noKey: "", garbage: "cfk_garbage", revoked: "", expired: "", deactivated: "" };
let owner: PersonActor;
let good = "";
let elsewhere = "";

beforeAll(async () => {
  owner = await makePerson({ role: "senior" });
  const made = (more: object = {}) => makeKeyOf(owner, { scopes: all, ratePerMinute: 10_000, ...more });
  good = (await made()).key;
  elsewhere = (await made({ templates: ["insulated-pipe"] })).key;
  const revoked = await made();
  await revokeKey(owner, { id: revoked.id });
  refused.revoked = revoked.key;
  const expired = await made();
  await write((tx) =>
    tx
      .update(keys)
      .set({ createdAt: new Date(Date.now() - 2000), expiresAt: new Date(Date.now() - 1000) })
      .where(eq(keys.id, expired.id)),
  );
  refused.expired = expired.key;
  const leaver = await makePerson({ role: "senior" });
  refused.deactivated = (await makeKeyOf(leaver, { scopes: all })).key;
  await deactivate(leaver.personId);
  await api.call("POST", "/templates/plane-wall/records", { key: good, body: { title: "Somebody's" } });
});

function send(operation: Operation, options: CallOptions): Promise<Reply> {
  const { success } = operation.examples;
  return api.call(operation.method, addressOf(operation, success), { body: success.body, ...options });
}

const codeOf = (reply: Reply) => String(reply.json.type).split("/").at(-1);
const withoutInstance = ({ instance: _instance, ...rest }: JsonObject) => rest;

describe.each(rows)("%s", (_id, operation) => {
  it("refuses a call without a key or session", async () => {
    const reply = await send(operation, {});
    expect([reply.status, reply.headers.get("www-authenticate")]).toEqual([401, 'Bearer realm="api"']);
  });

  it.each(["garbage", "revoked", "expired", "deactivated"] as const)("refuses a key: %s", async (which) => {
    const reply = await send(operation, { key: refused[which] });
    expect([reply.status, codeOf(reply)]).toEqual([401, "unauthenticated"]);
    expect(reply.headers.get("www-authenticate")).toBe('Bearer realm="api", error="invalid_token"');
  });

  it("refuses a session that ended and a cookie that somebody made up", async () => {
    const gone = await makePerson({ role: "senior" });
    const cookie = await sessionCookie(gone.sessionId);
    await deactivate(gone.personId);
    const headers = { "sec-fetch-site": "same-origin" };
    expect((await send(operation, { cookie, headers })).status).toBe(401);
    expect((await send(operation, { cookie: "coldface.session=forged", headers })).status).toBe(401);
  });

  it("refuses a key with every other scope, and names the one that it lacks", async () => {
    const others = all.filter((scope) => scope !== operation.scope);
    const { key } = await makeKeyOf(owner, { scopes: others });
    const reply = await send(operation, { key });
    expect([reply.status, codeOf(reply), reply.json.scope]).toEqual([
      403,
      "insufficient-scope",
      operation.scope,
    ]);
    expect(reply.headers.get("www-authenticate")).toContain(`scope="${operation.scope}"`);
  });

  it("never gives a key more than its owner may", async () => {
    const reader = await makePerson({ role: "engineer" });
    const { key } = await makeKeyOf(reader, { scopes: all });
    await write(async (tx) => {
      const { people } = await import("@/db/schema/people");
      await tx.update(people).set({ role: "reader" }).where(eq(people.id, reader.personId));
    });
    const reply = await send(operation, { key });
    const beyondReader = [
      "createRecord",
      "createRevisionRecord",
      "voidRecord",
      "checkDefinition",
      "evaluateDefinition",
    ];
    if (beyondReader.includes(operation.id))
      expect([reply.status, codeOf(reply)]).toEqual([403, "forbidden"]);
    else expect(reply.status).toBe(operation.reply.status);
  });
});

const ofTemplate = rows.filter(
  ([, { path }]) => path.startsWith("/templates/{") || path.startsWith("/records/{"),
);

describe.each(ofTemplate)("%s", (_id, operation) => {
  it("answers a foreign object exactly like one that does not exist", async () => {
    const foreign = await send(operation, { key: elsewhere });
    const unknown = await api.call(
      operation.method,
      addressOf(operation, { params: { slug: "no-such-thing", revision: "1", number: "R-999999" } }),
      { key: elsewhere, body: operation.examples.success.body },
    );
    expect([foreign.status, unknown.status]).toEqual([404, 404]);
    expect(withoutInstance(foreign.json)).toEqual(withoutInstance(unknown.json));
  });
});

describe("lists", () => {
  it("show a limited key its own templates only, and their records only", async () => {
    const templates = await api.call("GET", "/templates?limit=200", { key: elsewhere });
    expect((templates.json.items as { slug: string }[]).map(({ slug }) => slug)).toEqual(["insulated-pipe"]);
    const records = await api.call("GET", "/records", { key: elsewhere });
    expect(records.json.items).toEqual([]);
    expect(
      ((await api.call("GET", "/records", { key: good })).json.items as unknown[]).length,
    ).toBeGreaterThan(0);
  });
});

describe("changes by cookie", () => {
  const send = (headers: Record<string, string>, body: unknown = { title: "By cookie" }) =>
    sessionCookie(owner.sessionId).then((cookie) =>
      api.call("POST", "/templates/plane-wall/records", { cookie, headers, body }),
    );

  it.each([
    [{ "sec-fetch-site": "same-origin" }, 201],
    [{ "sec-fetch-site": "cross-site" }, 403],
    [{ "sec-fetch-site": "same-site" }, 403],
    [{ origin: "https://elsewhere.example" }, 403],
    [{}, 403],
  ])("sent with %j are answered with %i", async (headers, status) => {
    expect((await send(headers)).status).toBe(status);
  });

  it.each(["text/plain", "application/x-www-form-urlencoded", "multipart/form-data"])(
    "as %s, which any site can send, are refused",
    async (type) => {
      const headers = { "sec-fetch-site": "same-origin", "content-type": type };
      expect((await send(headers)).status).toBe(415);
    },
  );
});

describe("people by role", () => {
  it("lets nobody void another's record but a senior", async () => {
    const record = await api.call("POST", "/templates/plane-wall/records", { key: good });
    const address = `/records/${String(record.json.number)}/void`;
    const other = (await makeKeyOf(await makePerson({ role: "engineer" }), { scopes: all })).key;
    expect((await api.call("POST", address, { key: other, body: { reason: "Not mine" } })).status).toBe(403);
    const second = (await makeKeyOf(await makePerson({ role: "senior" }), { scopes: all })).key;
    expect((await api.call("POST", address, { key: second, body: { reason: "Wrong wall" } })).status).toBe(
      200,
    );
  });

  it("keeps an administrator without an engineering role from keeping records", async () => {
    const admin = await makePerson({ role: "reader", isAdmin: true });
    const reply = await api.call("POST", "/templates/plane-wall/records", {
      cookie: await sessionCookie(admin.sessionId),
      headers: { "sec-fetch-site": "same-origin" },
      body: {},
    });
    expect([reply.status, codeOf(reply)]).toEqual([403, "forbidden"]);
  });
});
