import { eq } from "drizzle-orm";
import { describe, expect, it, vi } from "vitest";
import { z } from "zod";
import { reader, type Tx } from "@/db/client";
import { idempotency, settings } from "@/db/schema/system";
import { write } from "@/db/tx";
import type { Actor } from "@/lib/access/actor";
import type { Call } from "@/lib/core/call";
import { CodedError } from "@/lib/core/errors";
import { endpoint, type Handler } from "@/lib/http/endpoint";
import { operation } from "@/lib/http/operation";
import { testDatabase } from "../factories/database";
import { makeKeyOf, makePerson } from "../factories/people";
import { unique } from "../factories/unique";

testDatabase();
vi.spyOn(process.stdout, "write").mockReturnValue(true);

const Reply = z.object({ name: z.string(), nonce: z.string() });
type Reply = z.infer<typeof Reply>;

const keep = operation({
  id: "createSetting",
  method: "POST",
  path: "/settings",
  summary: "Keep",
  description: "Keep",
  tag: "Test",
  scope: "records:write",
  idempotent: true,
  request: { body: z.strictObject({ name: z.string().max(40), fail: z.boolean().optional() }) },
  reply: { status: 201, description: "Kept", schema: Reply },
  refusals: [],
  examples: {
    success: { summary: "s", reply: {} },
    failure: { summary: "f", code: "internal", detail: "f" },
  },
  present: (body: Reply) => ({ body, headers: { Location: `/settings/${body.name}` } }),
});

/** Writes one row per call, so that every effect can be counted. */
async function keepSetting(
  _actor: Actor,
  { name, fail }: { name: string; fail?: boolean | undefined },
  call: Call<Tx, Reply>,
): Promise<Reply> {
  await new Promise((resolve) => setTimeout(resolve, 20));
  return write(async (tx) => {
    const answer = { name, nonce: unique("nonce") };
    await tx.insert(settings).values({ key: `${name}/${answer.nonce}`, value: name });
    await call.remember(tx, answer);
    if (fail) throw new CodedError("state-conflict", "Refused after the write.");
    return answer;
  });
}

const handler: Handler = endpoint(keep, keepSetting);
const newKey = async () => (await makeKeyOf(await makePerson(), { scopes: ["records:write"] })).key;
const effects = async (name: string) =>
  (await reader().select().from(settings).where(eq(settings.value, name))).length;

function send(key: string, idempotencyKey: string | null, body: unknown): Promise<Response> {
  return handler(
    new Request("http://localhost:3000/api/v1/settings", {
      method: "POST",
      body: typeof body === "string" ? body : JSON.stringify(body),
      headers: {
        authorization: `Bearer ${key}`,
        "content-type": "application/json",
        ...(idempotencyKey === null ? {} : { "idempotency-key": idempotencyKey }),
      },
    }),
    { params: Promise.resolve({}) },
  );
}

describe("requests sent again with the same Idempotency-Key", () => {
  it("are given the first answer, Location included, and have one effect", async () => {
    const key = await newKey();
    const name = unique("setting");
    const first = await send(key, '"abc"', { name });
    const second = await send(key, "abc", `{ "name" : ${JSON.stringify(name)} }`);
    expect([first.status, second.status]).toEqual([201, 201]);
    expect(await second.text()).toBe(await first.text());
    expect(second.headers.get("location")).toBe(first.headers.get("location"));
    expect(await effects(name)).toBe(1);
  });

  it("have a fingerprint that does not depend on the order of members", async () => {
    const key = await newKey();
    const name = unique("setting");
    await send(key, "k1", { name, fail: false });
    expect((await send(key, "k1", { fail: false, name })).status).toBe(201);
    expect(await effects(name)).toBe(1);
  });

  it("are refused when the body is another", async () => {
    const key = await newKey();
    await send(key, "k2", { name: unique("setting") });
    const other = await send(key, "k2", { name: unique("setting") });
    expect(other.status).toBe(422);
    expect(((await other.json()) as { type: string }).type).toContain("idempotency-key-reused");
  });

  it("do not meet those of another caller", async () => {
    const name = unique("setting");
    await send(await newKey(), "k3", { name });
    await send(await newKey(), "k3", { name });
    expect(await effects(name)).toBe(2);
  });

  it("have one winner among 24 at the same time; the others are told to wait or given its answer", async () => {
    const key = await newKey();
    const name = unique("setting");
    const responses = await Promise.all(Array.from({ length: 24 }, () => send(key, "k4", { name })));
    const statuses = responses.map((response) => response.status);
    expect(await effects(name)).toBe(1);
    expect(statuses).toContain(201);
    expect(statuses.every((status) => status === 201 || status === 409)).toBe(true);
    const waiting = responses.find((response) => response.status === 409);
    if (waiting) expect(waiting.headers.get("retry-after")).toBe("1");
  });

  it("may be tried anew after a refusal, which is not kept", async () => {
    const key = await newKey();
    const name = unique("setting");
    expect((await send(key, "k5", { name, fail: true })).status).toBe(409);
    expect(await effects(name)).toBe(0);
    expect((await send(key, "k5", { name })).status).toBe(201);
  });

  it("run again when the claim of a process that died has expired", async () => {
    const key = await newKey();
    const name = unique("setting");
    await send(key, "k6", { name });
    await write((tx) =>
      tx
        .update(idempotency)
        .set({ state: "running", status: null, reply: null, expiresAt: new Date(Date.now() - 1) })
        .where(eq(idempotency.key, "k6")),
    );
    expect((await send(key, "k6", { name })).status).toBe(201);
    expect(await effects(name)).toBe(2);
  });

  it.each(['""', '"unended', "", "two words", '"ü"', "long".repeat(64)])(
    "are refused with the key %j",
    async (bad) => {
      const response = await send(await newKey(), bad, { name: "n" }).catch((error: unknown) => error);
      // A header outside of Latin-1 or with blanks only cannot be sent at all.
      if (response instanceof Response) expect(response.status).toBe(422);
      else expect(response).toBeInstanceOf(TypeError);
    },
  );
});
