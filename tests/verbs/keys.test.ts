import { eq } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { reader } from "@/db/client";
import { keys } from "@/db/schema/people";
import { audit } from "@/db/schema/system";
import { write } from "@/db/tx";
import { crc32, isWellFormedKey, makeKey } from "@/lib/access/api-key";
import { actorFromRequest } from "@/lib/access/current-actor";
import { verifyKey } from "@/lib/access/verify-key";
import { hmac } from "@/lib/core/crypto";
import { createKey } from "@/lib/people/create-key";
import { listKeys } from "@/lib/people/list-keys";
import { revokeKey } from "@/lib/people/revoke-key";
import { testDatabase } from "../factories/database";
import { deactivate, makeKeyOf, makePerson } from "../factories/people";

testDatabase({ TRUSTED_PROXIES: "1", KEY_SECRET_OLDER: "former-key-secret-of-the-tests-0123456789" });

const row = async (id: string) => (await reader().select().from(keys).where(eq(keys.id, id)))[0];
const change = (id: string, values: Partial<typeof keys.$inferInsert>) =>
  write((tx) => tx.update(keys).set(values).where(eq(keys.id, id)));

describe("the form of a key", () => {
  it("is cfk_, 43 characters of randomness and 6 of their CRC-32", () => {
    const key = makeKey();
    expect(key).toMatch(/^cfk_[0-9A-Za-z]{49}$/);
    expect(isWellFormedKey(key)).toBe(true);
    // Check value of CRC-32/ISO-HDLC, Ross Williams' catalogue of parametrised CRC algorithms.
    expect(crc32("123456789")).toBe(0xcbf43926);
  });

  it("differs from key to key", () => {
    expect(new Set(Array.from({ length: 200 }, makeKey)).size).toBe(200);
  });

  it("betrays any single changed character", () => {
    const key = makeKey();
    for (let at = 4; at < key.length; at += 1) {
      const changed = key.slice(0, at) + (key[at] === "a" ? "b" : "a") + key.slice(at + 1);
      expect(isWellFormedKey(changed)).toBe(false);
    }
  });
});

describe("a key of a person", () => {
  it("is stored as an HMAC only and acts with its owner's role", async () => {
    const owner = await makePerson({ role: "senior" });
    const { id, key } = await makeKeyOf(owner, {
      scopes: ["runs:evaluate", "records:write"],
      templates: ["plane-wall"],
    });
    expect(JSON.stringify(await row(id))).not.toContain(key.slice(4, 30));
    expect(await verifyKey(key, null)).toMatchObject({
      kind: "key",
      keyId: id,
      owner: { personId: owner.personId, role: "senior" },
      scopes: ["runs:evaluate", "records:write"],
      templates: ["plane-wall"],
    });
  });

  it("serves as Bearer token, and a bad one never falls back to a cookie", async () => {
    const { key } = await makeKeyOf(await makePerson());
    const ask = (authorization: string) =>
      actorFromRequest(new Request("http://localhost:3000/api/v1/templates", { headers: { authorization } }));
    expect(await ask(`Bearer ${key}`)).toMatchObject({ kind: "key" });
    expect(await ask(`bearer ${key}`)).toMatchObject({ kind: "key" });
    for (const bad of ["Bearer", "Basic dXNlcjpwYXNz", `Bearer ${key} x`, "Bearer garbage"]) {
      await expect(ask(bad)).rejects.toMatchObject({ code: "unauthenticated" });
    }
  });

  const faults: [string, (id: string, owner: string) => Promise<unknown>, RegExp][] = [
    ["revoked", (id) => change(id, { revokedAt: new Date() }), /revoked/],
    ["expired", (id) => change(id, { createdAt: new Date(1), expiresAt: new Date(2) }), /expired/],
    ["of a deactivated owner", (_id, owner) => deactivate(owner), /no longer active/],
    ["deleted", (id) => write((tx) => tx.delete(keys).where(eq(keys.id, id))), /not known/],
    ["made with a forgotten secret", (id) => change(id, { lookup: hmac("forgotten", id) }), /not known/],
  ];
  it.each(faults)("is refused when %s, on the next request", async (_what, spoil, words) => {
    const owner = await makePerson();
    const { id, key } = await makeKeyOf(owner);
    await verifyKey(key, null);
    await spoil(id, owner.personId);
    await expect(verifyKey(key, null)).rejects.toMatchObject({
      code: "unauthenticated",
      message: expect.stringMatching(words),
      extra: { challenge: 'Bearer realm="api", error="invalid_token"' },
    });
  });

  it.each([
    "",
    "cfk_",
    "cfk_" + "a".repeat(49),
    "CFK_" + "a".repeat(49),
    "é".repeat(53),
    "a".repeat(100_000),
  ])("is refused as garbage: %.20s", async (text) => {
    await expect(verifyKey(text, null)).rejects.toThrow("not an API key");
  });

  it("made under a former secret still works while that secret is kept", async () => {
    const { id, key } = await makeKeyOf(await makePerson());
    await change(id, { lookup: hmac("former-key-secret-of-the-tests-0123456789", key) });
    expect(await verifyKey(key, null)).toMatchObject({ keyId: id });
  });

  it("limited to networks answers only from inside, and not without a believed address", async () => {
    const { key } = await makeKeyOf(await makePerson(), { networks: ["10.2.0.0/16", "2001:db8::/32"] });
    expect(await verifyKey(key, "10.2.3.4")).toBeTruthy();
    expect(await verifyKey(key, "2001:db8::7")).toBeTruthy();
    for (const address of ["10.3.0.1", "2001:db9::7", "not an address", null]) {
      await expect(verifyKey(key, address)).rejects.toThrow("from this network");
    }
  });

  it("notes its last use at most every five minutes", async () => {
    const { id, key } = await makeKeyOf(await makePerson());
    await verifyKey(key, null);
    await write(async () => undefined);
    const first = (await row(id))?.lastUsedAt;
    expect(first).toBeInstanceOf(Date);
    await verifyKey(key, null);
    await write(async () => undefined);
    expect((await row(id))?.lastUsedAt).toEqual(first);
    const early = new Date(Date.now() - 6 * 60_000);
    await change(id, { lastUsedAt: early });
    await verifyKey(key, null);
    await write(async () => undefined);
    expect((await row(id))?.lastUsedAt?.getTime()).toBeGreaterThan(early.getTime());
  });
});

describe("making and revoking keys", () => {
  it("is noted in the trail, without the key", async () => {
    const owner = await makePerson();
    const { id, key } = await makeKeyOf(owner);
    await revokeKey(owner, { id });
    await revokeKey(owner, { id });
    const rows = await reader()
      .select()
      .from(audit)
      .where(eq(audit.object, `key:${id}`));
    expect(rows.map((entry) => entry.action)).toEqual(["key.created", "key.revoked"]);
    expect(JSON.stringify(rows)).not.toContain(key);
  });

  it("is for engineers and their own keys; administrators manage those of others", async () => {
    const [reading, owner, other] = [
      await makePerson({ role: "reader" }),
      await makePerson(),
      await makePerson(),
    ];
    const admin = await makePerson({ role: "reader", isAdmin: true });
    await expect(makeKeyOf(reading)).rejects.toMatchObject({ code: "forbidden" });
    await expect(makeKeyOf(other, { ownerId: owner.personId })).rejects.toMatchObject({ code: "not-found" });
    const { id } = await makeKeyOf(admin, { ownerId: owner.personId });
    await expect(revokeKey(other, { id })).rejects.toMatchObject({ code: "not-found" });
    await expect(revokeKey(other, { id: "key_unknown" })).rejects.toMatchObject({ code: "not-found" });
    expect((await listKeys(owner)).map((entry) => entry.id)).toEqual([id]);
    expect(await listKeys(other)).toEqual([]);
    await revokeKey(admin, { id });
    expect((await row(id))?.revokedAt).toBeInstanceOf(Date);
  });

  it("refuses an owner who is not there, no scopes, no days and unreadable networks", async () => {
    const owner = await makePerson();
    const admin = await makePerson({ isAdmin: true });
    await expect(makeKeyOf(admin, { ownerId: "per_unknown" })).rejects.toMatchObject({ code: "not-found" });
    await expect(
      createKey(owner, { ownerId: owner.personId, label: "", scopes: [], days: 0, networks: ["10.2.0.0"] }),
    ).rejects.toMatchObject({
      problems: [
        { pointer: "#/label" },
        { pointer: "#/scopes" },
        { pointer: "#/networks/0" },
        { pointer: "#/days" },
      ],
    });
  });
});
