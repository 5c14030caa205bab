import { readFileSync } from "node:fs";
import { afterAll, describe, expect, it } from "vitest";
import type { Definition } from "@/lib/calculation/definition";
import { evaluate, type MaterialSnapshots, prepare } from "@/lib/calculation/execute";
import { definitionHash } from "@/lib/calculation/hash";
import type { Material } from "@/lib/calculation/material";
import { Compute } from "@/lib/compute/compute";
import { Lru } from "@/lib/compute/lru";
import { CodedError } from "@/lib/core/errors";

const compute = new Compute();
afterAll(() => compute.close());

function supplied<T>(folder: "templates" | "materials", slug: string): T {
  return JSON.parse(readFileSync(`db/seed/${folder}/${slug}.json`, "utf8")) as T;
}

function snapshots(...slugs: string[]): MaterialSnapshots {
  return Object.fromEntries(
    slugs.map((slug) => [slug, { slug, revision: 1, material: supplied<Material>("materials", slug) }]),
  );
}

const liningMaterials = snapshots("fireclay-brick", "insulating-brick-23", "stone-wool-mat");

function oneLine(working: string, more: Partial<Definition> = {}): Definition {
  return {
    title: "Test",
    summary: "",
    category: "walls",
    tags: [],
    references: [],
    notices: [],
    inputs: [{ kind: "number", symbol: "x", label: "Number", quantity: "ratio", unit: "1", default: 1 }],
    requires: [],
    working,
    results: [{ symbol: "y", label: "Answer", quantity: "ratio", unit: "1" }],
    limits: [],
    figures: [],
    cases: [],
    ...more,
  };
}

async function refusedWith(run: Promise<unknown>): Promise<CodedError> {
  const error = await run.then(
    () => null,
    (reason: unknown) => reason,
  );
  expect(error).toBeInstanceOf(CodedError);
  return error as CodedError;
}

describe("runs through the pool", () => {
  it("gives the same digits in a worker as in process", async () => {
    const definition = supplied<Definition>("templates", "furnace-lining");
    const request = { inputs: { T_hot: { value: 1000, unit: "°C" } }, steps: true };
    const there = await compute.evaluate(definitionHash(definition), definition, request, liningMaterials);
    const here = evaluate(prepare(definition), request, liningMaterials);
    expect(there).toEqual(here);
  });

  it("runs a closed form without starting a worker", async () => {
    const own = new Compute();
    const definition = supplied<Definition>("templates", "plane-wall");
    const run = await own.evaluate(definitionHash(definition), definition, {}, {});
    expect(run.results.q?.value).toBeCloseTo(52, 9);
    await own.close();
  });

  it("carries every problem of a refused run back with its pointers", async () => {
    const definition = supplied<Definition>("templates", "furnace-lining");
    const request = { inputs: { h_c: -1, eps: 2, layers: [{ t: 0, material: "ytong" }] } };
    const error = await refusedWith(
      compute.evaluate(definitionHash(definition), definition, request, liningMaterials),
    );
    expect(error.problems.map(({ pointer, code }) => `${pointer} ${code}`)).toEqual([
      "#/inputs/h_c out-of-range",
      "#/inputs/eps out-of-range",
      "#/inputs/layers/0/t out-of-range",
      "#/inputs/layers/0/material unknown-material",
    ]);
  });

  it("answers many rows of an iterating template, a bad one in its place", async () => {
    const definition = supplied<Definition>("templates", "furnace-lining");
    const rows = [{ T_hot: 900 }, { T_hot: -400 }, { T_hot: 1000 }];
    const { rows: outcomes, units } = await compute.evaluateRows(
      definitionHash(definition),
      definition,
      { rows },
      liningMaterials,
    );
    expect(units.T_shell).toEqual({ unit: "°C", ucum: "Cel" });
    expect(outcomes.map((row) => ("problem" in row ? row.problem.errors?.[0]?.pointer : row.status))).toEqual(
      ["caution", "#/rows/1/T_hot", "caution"],
    );
  });
});

describe("hostile definitions", () => {
  it("ends an endless series by its fuel and names line and limit", async () => {
    const definition = oneLine("y = series(n, 1, 1e9, x/n)");
    const error = await refusedWith(compute.evaluate(definitionHash(definition), definition, {}, {}));
    expect(error.code).toBe("budget-exceeded");
    expect(error.message).toMatch(/^Line 1 .*20,000,000/);
  });

  it("keeps the event loop free while a run is busy", async () => {
    const definition = oneLine("y = series(n, 1, 1e9, bessel_j(0, x*n))");
    let beats = 0;
    const heart = setInterval(() => beats++, 5);
    await refusedWith(compute.evaluate(definitionHash(definition), definition, {}, {}));
    clearInterval(heart);
    expect(beats).toBeGreaterThan(5);
  });

  it("ends a run that overruns its time from outside, and goes on serving", async () => {
    // Each reading of the material stays below its own fuel; only the clock sees that there are hundreds of them.
    const working = 'k = "1 W/(m·K)"*series(n, 1, 1e6, exp(-n/number_in(T, "K")))';
    const range = { min: 1, max: 2000, unit: "K" };
    const slowMaterial: Material = {
      name: "Slow",
      class: "other",
      condition: "",
      properties: {
        k: {
          pieces: [{ form: "working", working, range }],
          argumentUnit: "K",
          unit: "W/(m·K)",
          source: "Made for a test.",
          basis: "from memory",
          status: "typical",
        },
      },
    };
    const definition = oneLine('y = x*number_in(m.k_mean("100 K", "1000 K"), "W/(m·K)")', {
      inputs: [
        { kind: "number", symbol: "x", label: "Number", quantity: "ratio", unit: "1", default: 1 },
        { kind: "material", symbol: "m", label: "Material", needs: ["k"], default: "slow" },
      ],
    });
    const materials = { slow: { slug: "slow", revision: 1, material: slowMaterial } };
    const impatient = new Compute({ run: 0.1, rows: 10 });
    const error = await refusedWith(
      impatient.evaluate(definitionHash(definition), definition, {}, materials),
    );
    expect(error.problems).toEqual([expect.objectContaining({ code: "budget-exceeded", limit: "0.1 s" })]);
    // The next run gets a fresh thread.
    const quick = oneLine("y = series(n, 1, 3, x*n)");
    const { rows } = await impatient.evaluateRows(definitionHash(quick), quick, { rows: [{ x: 2 }] }, {});
    expect(rows).toEqual([{ status: "ok", results: { y: 12 } }]);
    await impatient.close();
  });

  it("answers the rows that were not reached in time as budget-exceeded and keeps the finished ones", async () => {
    const impatient = new Compute({ run: 1.5, rows: 0.5 });
    const definition = oneLine("y = series(n, 1, 100000*x, exp(-n/1000))");
    const rows = [{ x: 1 }, { x: 1 }, ...Array.from({ length: 200 }, () => ({ x: 5 })), { x: 1e5 }];
    const { rows: outcomes } = await impatient.evaluateRows(
      definitionHash(definition),
      definition,
      { rows },
      {},
    );
    expect(outcomes).toHaveLength(rows.length);
    expect(outcomes[0]).toMatchObject({ status: "ok" });
    expect(outcomes.at(-1)).toMatchObject({ problem: { code: "budget-exceeded" } });
    await impatient.close();
  });

  it("refuses a definition with errors with its diagnostics, also when a worker found them", async () => {
    const padding = "# ".padEnd(1500, "x");
    const definition = oneLine(`${Array.from({ length: 6 }, () => padding).join("\n")}\ny = x + missing`);
    const error = await refusedWith(compute.evaluate(definitionHash(definition), definition, {}, {}));
    expect(error.code).toBe("definition-invalid");
    expect(error.extra.diagnostics).toEqual(
      expect.arrayContaining([expect.objectContaining({ code: "unknown-name", line: 7 })]),
    );
  });
});

describe("Lru", () => {
  it("drops the entry that was used longest ago", () => {
    const cache = new Lru<number>(2);
    cache.set("a", 1);
    cache.set("b", 2);
    expect(cache.get("a")).toBe(1);
    cache.set("c", 3);
    expect([cache.get("a"), cache.get("b"), cache.get("c")]).toEqual([1, undefined, 3]);
    expect(cache.size).toBe(2);
  });
});
