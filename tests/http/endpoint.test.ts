import { describe, expect, it, vi } from "vitest";
import { z } from "zod";
import type { Scope } from "@/db/vocabulary";
import { CodedError } from "@/lib/core/errors";
import { endpoint } from "@/lib/http/endpoint";
import { operation } from "@/lib/http/operation";
import { jsonBodyLimit } from "@/lib/http/read-body";
import { route, unknownAddress } from "@/lib/http/route";
import { testDatabase } from "../factories/database";
import { makeKeyOf, makePerson } from "../factories/people";

testDatabase();
vi.spyOn(process.stdout, "write").mockReturnValue(true);

const example = {
  success: { summary: "s", reply: {} },
  failure: { summary: "f", code: "internal", detail: "f" },
} as const;

const echo = operation({
  id: "createEcho",
  method: "POST",
  path: "/echo/{name}",
  summary: "Echo",
  description: "Echo",
  tag: "Test",
  scope: "records:write",
  request: {
    params: z.object({ name: z.string().max(8) }),
    query: z.strictObject({ limit: z.coerce.number().int().max(10).optional() }),
    body: z.strictObject({ text: z.string().max(20), size: z.number().optional() }),
  },
  reply: { status: 201, description: "Echo", schema: z.object({ name: z.string(), text: z.string() }) },
  refusals: [],
  examples: example,
});

const read = operation({
  id: "getEcho",
  method: "GET",
  path: "/echo/{name}",
  summary: "Echo",
  description: "Echo",
  tag: "Test",
  scope: "records:read",
  request: { params: z.object({ name: z.string() }) },
  reply: {
    status: 200,
    description: "Echo",
    schema: z.object({ items: z.array(z.string()), nextCursor: z.union([z.string(), z.null()]) }),
  },
  refusals: [],
  etag: true,
  examples: example,
});

const address = "http://localhost:3000/api/v1/echo/wall";
const handlers = route({
  POST: endpoint(echo, async (_actor, { name, text }) => ({ name, text })),
  GET: endpoint(read, async (_actor, { name }) => ({ items: [name], nextCursor: "abc" })),
});
const context = (name = "wall") => ({ params: Promise.resolve({ name }) });

async function keyWith(...scopes: Scope[]): Promise<string> {
  return (await makeKeyOf(await makePerson(), { scopes })).key;
}

async function post(
  body: string | ReadableStream | null,
  headers: Record<string, string> = {},
  url = address,
) {
  const request = new Request(url, {
    method: "POST",
    body,
    headers: {
      authorization: `Bearer ${await keyWith("records:write")}`,
      "content-type": "application/json",
      ...headers,
    },
    duplex: "half",
  } as RequestInit);
  return handlers.POST(request, context());
}

async function problemOf(response: Response) {
  expect(response.headers.get("content-type")).toBe("application/problem+json");
  return (await response.json()) as {
    type: string;
    status: number;
    detail: string;
    instance: string;
    errors?: { pointer: string; code: string }[];
  };
}

describe("the hall of the interface", () => {
  it("answers with the content, the request's id, the description and the limit", async () => {
    const response = await post('{"text":"hi"}', { "x-request-id": "abc-1" });
    expect(response.status).toBe(201);
    expect(await response.json()).toEqual({ name: "wall", text: "hi" });
    expect(response.headers.get("x-request-id")).toBe("abc-1");
    expect(response.headers.get("link")).toContain('rel="service-desc"');
    expect(response.headers.get("ratelimit-policy")).toMatch(/^"minute";q=\d+;w=60$/);
    expect(response.headers.get("ratelimit")).toMatch(/^"minute";r=\d+;t=\d+$/);
    expect(response.headers.get("cache-control")).toBe("no-store");
  });

  it("challenges without a key, and says so when one was wrong", async () => {
    const without = await handlers.GET(new Request(address), context());
    expect(without.status).toBe(401);
    expect(without.headers.get("www-authenticate")).toBe('Bearer realm="api"');
    const wrong = await handlers.GET(
      new Request(address, { headers: { authorization: "Bearer cfk_no" } }),
      context(),
    );
    expect(wrong.status).toBe(401);
    expect(wrong.headers.get("www-authenticate")).toBe('Bearer realm="api", error="invalid_token"');
    expect((await problemOf(wrong)).type).toBe("http://localhost:3000/problems/unauthenticated");
  });

  it("names the scope that a key lacks before it reads the body", async () => {
    const response = await post("no json at all", {
      authorization: `Bearer ${await keyWith("records:read")}`,
    });
    expect(response.status).toBe(403);
    expect(response.headers.get("www-authenticate")).toContain(
      'error="insufficient_scope", scope="records:write"',
    );
    expect(await problemOf(response)).toMatchObject({ scope: "records:write" });
  });

  it("tells every fault of query and body at once", async () => {
    const response = await post('{"txt":"hi","size":"big"}', {}, `${address}?limit=11&page=2`);
    expect(response.status).toBe(422);
    const problem = await problemOf(response);
    expect(problem.errors?.map(({ pointer }) => pointer).sort()).toEqual([
      "#/query/limit",
      "#/query/page",
      "#/size",
      "#/text",
      "#/txt",
    ]);
    expect(problem.type).toContain(problem.errors?.[0]?.code);
  });

  it.each([
    ['{"text":"a","text":"b"}', 400, "malformed-json"],
    ['{"text":1e999}', 400, "malformed-json"],
    ["", 400, "malformed-json"],
    ["[]", 422, "invalid-input"],
  ])("answers %j with %i %s", async (body, status, code) => {
    const response = await post(body);
    expect(response.status).toBe(status);
    expect((await problemOf(response)).type).toContain(`/problems/${code}`);
  });

  it.each([
    [{ "content-type": "text/plain" }, 415],
    [{ "content-type": "application/json; charset=latin1" }, 415],
    [{ "content-encoding": "gzip" }, 415],
    [{ "content-type": "application/json; charset=UTF-8" }, 201],
  ])("answers a body sent with %j with %i", async (headers, status) => {
    expect((await post('{"text":"a"}', headers)).status).toBe(status);
  });

  it("counts the bytes of a body that declares no length", async () => {
    const chunk = new Uint8Array(100_000).fill(32);
    let sent = 0;
    const stream = new ReadableStream({
      pull(controller) {
        sent += chunk.byteLength;
        controller.enqueue(chunk);
      },
    });
    const response = await post(stream);
    expect(response.status).toBe(413);
    expect(sent).toBeLessThan(jsonBodyLimit + 5 * chunk.byteLength);
  });

  it("answers an address that cannot exist like one that does not", async () => {
    const key = await keyWith("records:write");
    const request = new Request(address, {
      method: "POST",
      body: "{}",
      headers: { authorization: `Bearer ${key}`, "content-type": "application/json" },
    });
    const response = await handlers.POST(request, context("much-too-long"));
    const other = await unknownAddress.GET(new Request("http://localhost:3000/api/v1/nothing"), {
      params: Promise.resolve({}),
    });
    expect([response.status, other.status]).toEqual([404, 404]);
    const [one, two] = [await problemOf(response), await problemOf(other)];
    expect({ ...one, instance: "" }).toEqual({ ...two, instance: "" });
  });

  it("refuses other methods and names those that are offered", async () => {
    const response = await handlers.DELETE(new Request(address, { method: "DELETE" }), context());
    expect(response.status).toBe(405);
    expect(response.headers.get("allow")).toBe("GET, POST, HEAD, OPTIONS");
    const options = await handlers.OPTIONS(new Request(address, { method: "OPTIONS" }), context());
    expect([options.status, options.headers.get("allow")]).toEqual([204, "GET, POST, HEAD, OPTIONS"]);
  });

  it("mirrors GET for HEAD, tags the content and answers 304 when it has not changed", async () => {
    const authorization = `Bearer ${await keyWith("records:read")}`;
    const get = await handlers.GET(new Request(address, { headers: { authorization } }), context());
    const tag = get.headers.get("etag") ?? "";
    expect(tag).toMatch(/^"[\w-]{20,}"$/);
    const head = await handlers.HEAD(
      new Request(address, { method: "HEAD", headers: { authorization } }),
      context(),
    );
    expect(await head.text()).toBe("");
    expect(head.headers.get("etag")).toBe(tag);
    expect(head.headers.get("content-length")).toBe(String((await get.text()).length));
    const again = await handlers.GET(
      new Request(address, { headers: { authorization, "if-none-match": `"other", ${tag}` } }),
      context(),
    );
    expect([again.status, await again.text(), again.headers.get("etag")]).toEqual([304, "", tag]);
  });

  it("links the next page of a list", async () => {
    const authorization = `Bearer ${await keyWith("records:read")}`;
    const plain = endpoint(
      { ...read, request: { params: read.request.params, query: z.strictObject({ a: z.string() }) } },
      async () => ({
        items: [],
        nextCursor: "abc",
      }),
    );
    const response = await plain(new Request(`${address}?a=1`, { headers: { authorization } }), context());
    expect(response.headers.get("link")).toContain('</api/v1/echo/wall?a=1&cursor=abc>; rel="next"');
  });

  it("continues a trace into the problem", async () => {
    const trace = "4bf92f3577b34da6a3ce929d0e0e4736";
    const response = await post("x", { traceparent: `00-${trace}-00f067aa0ba902b7-01` });
    expect(await problemOf(response)).toMatchObject({ traceId: trace });
  });

  it("hides what nobody expected behind a fixed text and the request's id", async () => {
    const stderr = vi.spyOn(process.stderr, "write").mockReturnValue(true);
    const broken = endpoint(read, async () => {
      throw new Error("SELECT secret FROM people");
    });
    const authorization = `Bearer ${await keyWith("records:read")}`;
    const response = await broken(new Request(address, { headers: { authorization } }), context());
    const text = await response.text();
    expect(response.status).toBe(500);
    expect(text).not.toMatch(/SELECT|secret|\.ts/);
    const { instance } = JSON.parse(text) as { instance: string };
    expect(stderr.mock.calls.map(([line]) => String(line)).join("")).toContain(instance);
    stderr.mockRestore();
  });

  it("fails loudly in tests when an answer holds a member that is not declared", async () => {
    const stderr = vi.spyOn(process.stderr, "write").mockReturnValue(true);
    const leaking = endpoint(read, async () => ({ items: [], nextCursor: null, secret: 1 }));
    const authorization = `Bearer ${await keyWith("records:read")}`;
    const response = await leaking(new Request(address, { headers: { authorization } }), context());
    expect(response.status).toBe(500);
    stderr.mockRestore();
  });

  it("tells when to try again", async () => {
    const busy = endpoint(read, async () => {
      throw new CodedError("busy", "Busy.");
    });
    const authorization = `Bearer ${await keyWith("records:read")}`;
    const response = await busy(new Request(address, { headers: { authorization } }), context());
    expect([response.status, response.headers.get("retry-after")]).toEqual([503, "1"]);
  });

  it("refuses beyond the key's limit with the time until the next minute", async () => {
    const key = (await makeKeyOf(await makePerson(), { scopes: ["records:read"], ratePerMinute: 3 })).key;
    const call = () =>
      handlers.GET(new Request(address, { headers: { authorization: `Bearer ${key}` } }), context());
    const statuses: number[] = [];
    let last: Response | undefined;
    for (let n = 0; n < 8; n++) statuses.push((last = await call()).status);
    // A minute may end among the calls; then at most twice three are answered.
    expect(statuses.filter((status) => status === 200).length).toBeGreaterThanOrEqual(3);
    expect(statuses).toContain(429);
    if (last?.status === 429) expect(Number(last.headers.get("retry-after"))).toBeGreaterThanOrEqual(1);
  });
});
