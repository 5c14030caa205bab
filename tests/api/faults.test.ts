import { beforeAll, describe, expect, it } from "vitest";
import { scopes } from "@/db/vocabulary";
import { layerDefinition } from "../factories/definitions";
import { makeKeyOf, makePerson } from "../factories/people";
import { apiServer, type Reply } from "./harness";

/** Bad input as it comes: each gets its problem at its place, and the server stays well. */

const api = apiServer();
let key = "";

beforeAll(async () => {
  const owner = await makePerson({ role: "senior" });
  key = (await makeKeyOf(owner, { scopes: [...scopes], ratePerMinute: 10_000 })).key;
});

const run = (slug: string, body: unknown, headers: Record<string, string> = {}) =>
  api.call("POST", `/templates/${slug}/evaluate`, { key, body, headers });
const codeOf = (reply: Reply) => String(reply.json.type).split("/").at(-1);
const places = (reply: Reply) => (reply.json.errors ?? []).map(({ pointer, code }) => `${pointer} ${code}`);

describe("inputs", () => {
  it.each([
    [{ t: { value: 8, unit: "furlongs/K" } }, "#/inputs/t/unit unreadable-unit"],
    [{ t: { value: 8, unit: "kg" } }, "#/inputs/t/unit unit-mismatch"],
    [{ t: { value: 8, unit: "W/mK" } }, "#/inputs/t/unit unreadable-unit"],
    [{ T_hot: { value: 80, unit: "C" } }, "#/inputs/T_hot/unit unreadable-unit"],
    [{ t: "1,250" }, "#/inputs/t invalid-input"],
    [{ t: "" }, "#/inputs/t invalid-input"],
    [{ t: "thick" }, "#/inputs/t invalid-input"],
    [{ t: true }, "#/inputs/t invalid-input"],
    [{ t: [1] }, "#/inputs/t/0 invalid-input"],
    [{ t: { value: "8" } }, "#/inputs/t/value invalid-input"],
    [{ t: 0 }, "#/inputs/t out-of-range"],
    [{ t: -5 }, "#/inputs/t out-of-range"],
    [{ T_hot: -300 }, "#/inputs/T_hot out-of-range"],
    [{ T_hot: { value: -10, unit: "K" } }, "#/inputs/T_hot out-of-range"],
    [{ thickness: 100 }, "#/inputs/thickness unknown-member"],
  ])("%j is refused as %s", async (inputs, place) => {
    const reply = await run("plane-wall", { inputs });
    expect([reply.status, places(reply)]).toEqual([422, [place]]);
  });

  it("are answered with all faults of a request at once: members, inputs and units", async () => {
    const reply = await run("plane-wall", {
      inputs: { t: 0, k: { value: 1, unit: "kg" }, A: true, kk: 1 },
      unts: {},
      units: { Q: "m" },
      steps: "yes",
    });
    expect(places(reply).sort()).toEqual([
      "#/inputs/A invalid-input",
      "#/inputs/k/unit unit-mismatch",
      "#/inputs/kk unknown-member",
      "#/inputs/t out-of-range",
      "#/steps invalid-input",
      "#/units/Q unit-mismatch",
      "#/unts unknown-member",
    ]);
    expect(codeOf(reply)).toBe(reply.json.errors?.[0]?.code);
    for (const { message } of reply.json.errors ?? []) expect(message).toMatch(/^.{10,}[.?]$/u);
  });

  it("name the nearest known symbol", async () => {
    const reply = await run("plane-wall", { inputs: { T_hott: 100 } });
    expect(reply.json.errors?.[0]?.message).toContain("T_hot");
  });

  it("may be left out, null or empty: the defaults run and are named", async () => {
    const nothing = await api.call("POST", "/templates/plane-wall/evaluate", { key });
    const empty = await run("plane-wall", {});
    expect([nothing.status, empty.status]).toEqual([200, 200]);
    expect(nothing.text).toBe(empty.text);
    expect(nothing.json.defaulted).toEqual(["A", "t", "k", "T_hot", "T_cold"]);
    const refused = await run("plane-wall", { inputs: { t: null, k: 1, A: 1 }, defaults: "refuse" });
    expect(places(refused)).toEqual([
      "#/inputs/t missing-input",
      "#/inputs/T_hot missing-input",
      "#/inputs/T_cold missing-input",
    ]);
  });

  it("are left to no default by a key whose policy refuses them, unless the request says so", async () => {
    const strict = await makeKeyOf(await makePerson(), {
      scopes: ["runs:evaluate"],
      defaultsPolicy: "refuse",
    });
    const call = (body: unknown) =>
      api.call("POST", "/templates/plane-wall/evaluate", { key: strict.key, body });
    expect(codeOf(await call({ inputs: { t: 5 } }))).toBe("missing-input");
    expect((await call({ inputs: { t: 5 }, defaults: "allow" })).status).toBe(200);
    const rows = await api.call("POST", "/templates/plane-wall/evaluate-rows", {
      key: strict.key,
      body: { rows: [{ t: 5 }] },
    });
    expect(rows.json.rows).toMatchObject([{ problem: { code: "missing-input" } }]);
  });

  it("refuse a material that is not known, or has no such temperature", async () => {
    const unknown = await run("furnace-lining", {
      inputs: { layers: [{ t: 100, material: "fireclay-brik" }] },
    });
    expect(unknown.status).toBe(422);
    expect(unknown.json.errors?.map(({ code }) => code)).toContain("unknown-material");
  });

  it("of a status that the request does not accept are refused with the evaluation", async () => {
    const plain = await run("plane-wall", {});
    const refused = await run("plane-wall", { accept: plain.json.status === "ok" ? ["stop"] : ["ok"] });
    expect([refused.status, codeOf(refused)]).toEqual([422, "not-accepted"]);
    expect(refused.json.evaluation).toEqual(plain.json);
  });
});

describe("bodies", () => {
  it.each([
    ['{"inputs":{"t":1,"t":2}}', 400, "malformed-json"],
    ['{"inputs":{"t":1e999}}', 400, "malformed-json"],
    ['{"inputs":{"t":Infinity}}', 400, "malformed-json"],
    ['{"inputs":{"\\ud800":1}}', 400, "malformed-json"],
    ['{"inputs":', 400, "malformed-json"],
    ['{"__proto__":{"inputs":{}}}', 422, "unknown-member"],
    ["[]", 422, "invalid-input"],
    ["null", 422, "invalid-input"],
    ['{"inputs":[]}', 422, "invalid-input"],
  ])("%s is answered with %i %s", async (body, status, code) => {
    const reply = await run("plane-wall", body);
    expect([reply.status, codeOf(reply)]).toEqual([status, code]);
  });

  it("nested five thousand deep are refused", async () => {
    const reply = await run("plane-wall", `{"inputs":{"t":${"[".repeat(5000)}${"]".repeat(5000)}}}`);
    expect([reply.status, codeOf(reply)]).toEqual([400, "malformed-json"]);
  });

  it("of 3 MB are refused, and the connection that sent one serves the next", async () => {
    const reply = await run("plane-wall", JSON.stringify({ inputs: { t: "x".repeat(3_000_000) } }));
    expect([reply.status, codeOf(reply)]).toEqual([413, "too-large"]);
    expect((await run("plane-wall", {})).status).toBe(200);
  });

  const unread: Record<string, string>[] = [
    { "content-type": "text/csv" },
    { "content-type": "" },
    { "content-encoding": "gzip" },
  ];
  it.each(unread)("with %j are refused", async (headers) => {
    const reply = await run("plane-wall", "{}", headers);
    expect([reply.status, codeOf(reply)]).toEqual([415, "unsupported-type"]);
  });

  it("never bring out a stack, a path or SQL", async () => {
    for (const body of [
      "{",
      '{"inputs":{"t":{"value":1,"unit":"\' OR 1=1 --"}}}',
      '{"inputs":{"constructor":1}}',
    ]) {
      const reply = await run("plane-wall", body);
      expect(reply.status).toBeLessThan(500);
      expect(reply.text).not.toMatch(/node_modules|\.ts:|at Object|SELECT|sqlite/i);
    }
  });
});

describe("rows", () => {
  it("are answered in order, a bad one spoiling no other", async () => {
    const reply = await api.call("POST", "/templates/plane-wall/evaluate-rows", {
      key,
      body: {
        rows: [{ t: 50 }, { t: 0 }, { t: true }, 5, { t: 200 }],
        common: { k: 0.04 },
        units: { Q: "BTU/h" },
      },
    });
    expect(reply.status).toBe(200);
    const rows = reply.json.rows as { status?: string; problem?: { errors: { pointer: string }[] } }[];
    expect(rows.map((row) => row.status ?? row.problem?.errors[0]?.pointer)).toEqual([
      "ok",
      "#/rows/1/t",
      "#/rows/2/t",
      "#/rows/3",
      "ok",
    ]);
    expect(reply.json.units).toMatchObject({ Q: { unit: "BTU/h" } });
  });

  it("beyond a thousand, or none, are refused", async () => {
    const send = (rows: unknown[]) =>
      api.call("POST", "/templates/plane-wall/evaluate-rows", { key, body: { rows } });
    expect((await send(Array.from({ length: 1000 }, () => ({})))).status).toBe(200);
    expect(places(await send(Array.from({ length: 1001 }, () => ({}))))).toEqual(["#/rows out-of-range"]);
    expect(places(await send([]))).toEqual(["#/rows out-of-range"]);
  });
});

describe("definitions that mean harm", () => {
  const hostile: [string, string][] = [
    ["an endless series", "R = t/k*(1 + 0*series(n, 1, 1e12, 1/n))"],
    ["names of the machine", "R = constructor(t)/k"],
    ["80 kB of dots", `R = ${".".repeat(80_000)}`],
    ["deep nesting", `R = ${"(".repeat(4000)}t/k${")".repeat(4000)}`],
    [
      "functions that double forty times",
      `f0(x) = x + x\n${Array.from({ length: 39 }, (_, i) => `f${i + 1}(x) = f${i}(x) + f${i}(x)`).join("\n")}\nR = f39(t)/k`,
    ],
    ["a pole", "x = balance(z, -1, 1, 1/z)\nR = t/k*(1 + 0*x)"],
    ["a hidden NaN", "x = (0 - t)/t\nR = t/k*sqrt(x)"],
  ];

  it.each(hostile)("%s is answered in words while the server stays awake", async (_name, working) => {
    let watching = true;
    const healths: number[] = [];
    const watch = (async () => {
      while (watching) healths.push((await fetch(`${api.url}/api/health`)).status);
    })();
    const definition = layerDefinition({ working });
    const [checked, evaluated] = await Promise.all([
      api.call("POST", "/definitions/check", { key, body: { definition } }),
      api.call("POST", "/definitions/evaluate", { key, body: { definition } }),
    ]);
    watching = false;
    await watch;
    expect(checked.status).toBe(200);
    expect(evaluated.status).toBe(422);
    expect(String(evaluated.json.detail)).toMatch(/.{15,}/);
    expect(new Set(healths)).toEqual(new Set([200]));
  });
});
