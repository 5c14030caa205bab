import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { operations } from "@/openapi/index";

const base = "app/api/v1";
const restRoute = "[[...rest]]/route.ts";

function routeFiles(): string[] {
  return readdirSync(base, { recursive: true, encoding: "utf8" }).filter((file) => file.endsWith("route.ts"));
}

/** `templates/[slug]/evaluate/route.ts` → `/templates/{slug}/evaluate` */
function addressOf(file: string): string {
  return `/${file.replace(/\/route\.ts$/, "").replace(/\[(\w+)\]/g, "{$1}")}`;
}

/** What a route file offers: `METHOD address operation`. */
function offersOf(file: string): string[] {
  const text = readFileSync(join(base, file), "utf8");
  const offers = [...text.matchAll(/(\w+): (?:endpoint|publicEndpoint)\(\s*operations\.(\w+)/g)];
  return offers.map(([, method, id]) => `${method} ${addressOf(file)} ${id}`);
}

describe("routes and operations", () => {
  it("have the same methods, addresses and names", () => {
    const offered = routeFiles().flatMap(offersOf).sort();
    const declared = operations.map(({ method, path, id }) => `${method} ${path} ${id}`).sort();
    expect(offered).toEqual(declared);
  });

  it("export every method from every route, so that Next answers none of them by itself", () => {
    for (const file of routeFiles()) {
      const text = readFileSync(join(base, file), "utf8");
      expect(text, file).toContain("export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } =");
    }
  });

  it("leave every other address to a route that answers with a problem", () => {
    expect(routeFiles()).toContain(restRoute);
  });

  it("name each operation once, by verb and noun", () => {
    const ids = operations.map((operation) => operation.id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const id of ids) expect(id).toMatch(/^(list|get|create|evaluate|check|void|rerun)[A-Z]\w+$/);
  });
});
