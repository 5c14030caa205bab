import { beforeAll, describe, expect, it } from "vitest";
import { scopes } from "@/db/vocabulary";
import { errorCodes } from "@/lib/core/errors";
import { operations } from "@/openapi/index";
import { makeKeyOf, makePerson } from "../factories/people";
import { addressOf } from "./examples";
import { apiServer } from "./harness";

const api = apiServer();
let senior = "";

beforeAll(async () => {
  const owner = await makePerson({ role: "senior" });
  senior = (await makeKeyOf(owner, { scopes: [...scopes], ratePerMinute: 10_000 })).key;
  const first = await api.call("POST", "/templates/plane-wall/records", {
    key: senior,
    body: { title: "First" },
  });
  expect(first.json.number).toBe("R-000001");
});

describe("every operation over HTTP", () => {
  // Voiding comes last, so that the other examples meet a record that stands.
  const ordered = [...operations].sort(
    (a, b) => Number(a.id === "voidRecord") - Number(b.id === "voidRecord"),
  );

  it.each(ordered.map((operation) => [operation.id, operation] as const))(
    "%s answers its example of success",
    async (_id, operation) => {
      const { success } = operation.examples;
      const reply = await api.call(operation.method, addressOf(operation, success), {
        key: senior,
        body: success.body,
      });
      expect([reply.status, reply.status < 300 ? "" : reply.text]).toEqual([operation.reply.status, ""]);
      expect(reply.headers.get("x-request-id")).toBeTruthy();
      expect(reply.headers.get("link")).toContain('rel="service-desc"');
      for (const [name, member] of Object.entries(success.reply as Record<string, unknown>)) {
        // What the example shows is there; digits and moments are this run's own.
        expect(reply.json, name).toHaveProperty(name);
        expect(Array.isArray(reply.json[name])).toBe(Array.isArray(member));
      }
    },
  );

  it.each(ordered.map((operation) => [operation.id, operation] as const))(
    "%s answers its example of failure",
    async (_id, operation) => {
      const { failure } = operation.examples;
      const reply = await api.call(operation.method, addressOf(operation, failure), {
        key: senior,
        body: failure.body,
      });
      expect(reply.json.type).toBe(`${process.env.PUBLIC_URL}/problems/${failure.code}`);
      expect(reply.status).toBe(errorCodes[failure.code].status);
      expect(reply.json.detail).toBe(failure.detail);
      expect(reply.json.errors?.map(({ pointer, code }) => ({ pointer, code })) ?? []).toEqual(
        (failure.errors ?? []).map(({ pointer, code }) => ({ pointer, code })),
      );
    },
  );

  it.each(
    operations
      .filter(({ method }) => method === "GET")
      .map((operation) => [operation.id, operation] as const),
  )("%s mirrors GET for HEAD", async (_id, operation) => {
    const address = addressOf(operation, operation.examples.success);
    const get = await api.call("GET", address, { key: senior });
    const head = await api.call("HEAD", address, { key: senior });
    expect([head.status, head.text]).toEqual([get.status, ""]);
    expect(head.headers.get("content-type")).toBe(get.headers.get("content-type"));
    expect(head.headers.get("etag")).toBe(get.headers.get("etag"));
  });

  it.each(
    operations.filter(({ etag }) => etag === true).map((operation) => [operation.id, operation] as const),
  )("%s answers 304 to its own tag", async (_id, operation) => {
    const address = addressOf(operation, operation.examples.success);
    const tag = (await api.call("GET", address, { key: senior })).headers.get("etag") ?? "";
    expect(tag).toMatch(/^"[\w-]+"$/);
    const again = await api.call("GET", address, { key: senior, headers: { "if-none-match": tag } });
    expect([again.status, again.text]).toEqual([304, ""]);
  });

  it("answers every other method of an address with 405 and Allow", async () => {
    for (const address of new Set(
      operations.map((operation) => addressOf(operation, operation.examples.success)),
    )) {
      const path = address.split("?")[0] ?? "";
      const reply = await api.call("PATCH", path, { key: senior, body: {} });
      expect([path, reply.status]).toEqual([path, 405]);
      expect(reply.headers.get("allow")).toMatch(/(GET|POST).*OPTIONS/);
      expect(reply.headers.get("content-type")).toBe("application/problem+json");
      const options = await api.call("OPTIONS", path);
      expect([options.status, options.headers.get("allow")]).toEqual([204, reply.headers.get("allow")]);
    }
  });

  it("answers an address that no operation has with a problem", async () => {
    for (const address of ["", "/nothing", "/templates/plane-wall/nothing", "/records/R-000001/void/x"]) {
      const reply = await api.call("GET", address, { key: senior });
      expect([address, reply.status]).toEqual([address, 404]);
      expect(reply.headers.get("content-type")).toBe("application/problem+json");
    }
  });

  it("serves the document for its own address", async () => {
    const reply = await api.call("GET", "/openapi.json");
    expect(reply.json.openapi).toBe("3.1.1");
    expect(reply.json.servers).toEqual([{ url: `${process.env.PUBLIC_URL}/api/v1` }]);
  });
});
