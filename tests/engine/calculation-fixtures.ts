import { readdirSync, readFileSync } from "node:fs";
import { expect } from "vitest";
import { Definition, type Input, type WorkedCase } from "@/lib/calculation/definition";
import { type MaterialSnapshots, prepare, type Prepared } from "@/lib/calculation/execute";
import { Material } from "@/lib/calculation/material";
import { CodedError } from "@/lib/core/errors";

/** The supplied shelf, small definitions made for one test, and refusals read back. */

function read(path: string): unknown {
  return JSON.parse(readFileSync(path, "utf8"));
}

export function suppliedTemplate(slug: string): Definition {
  return Definition.parse(read(`db/seed/templates/${slug}.json`));
}

export function suppliedMaterial(slug: string): Material {
  return Material.parse(read(`db/seed/materials/${slug}.json`));
}

export function preparedTemplate(slug: string): Prepared {
  return prepare(suppliedTemplate(slug));
}

export const suppliedSlugs = readdirSync("db/seed/templates").map((name) => name.replace(".json", ""));

export const suppliedMaterials: MaterialSnapshots = Object.fromEntries(
  readdirSync("db/seed/materials").map((name) => {
    const slug = name.replace(".json", "");
    return [slug, { slug, revision: 1, material: suppliedMaterial(slug) }];
  }),
);

type NumberInput = Extract<Input, { kind: "number" }>;

export function numberInput(
  symbol: string,
  quantity: string,
  unit: string,
  more: Partial<NumberInput> = {},
): NumberInput {
  return { kind: "number", symbol, label: symbol, quantity, unit, ...more };
}

/** A definition with the parts that a test is about; the rest is as small as it may be. */
export function definitionOf(
  parts: Partial<Definition> & Pick<Definition, "inputs" | "working" | "results">,
): Definition {
  return {
    title: "Test",
    summary: "",
    category: "shapes",
    tags: [],
    references: [],
    notices: [],
    requires: [],
    limits: [],
    figures: [],
    cases: [],
    ...parts,
  };
}

/** A wall with one layer, enough for most tests. */
export function wall(parts: Partial<Definition> = {}): Definition {
  return definitionOf({
    inputs: [
      numberInput("t", "length", "mm", {
        label: "Thickness",
        default: 100,
        above: 0,
        usualMin: 1,
        usualMax: 2000,
      }),
      numberInput("k", "thermal conductivity", "W/(m·K)", { label: "Conductivity", default: 0.04, above: 0 }),
      numberInput("T_hot", "temperature", "°C", { label: "Hot face", default: 150 }),
      numberInput("T_cold", "temperature", "°C", { label: "Cold face", default: 20 }),
    ],
    working: "q = k*(T_hot - T_cold)/t",
    results: [{ symbol: "q", label: "Heat flux", quantity: "heat flux", unit: "W/m²" }],
    ...parts,
  });
}

export function workedCase(parts: Partial<WorkedCase>): WorkedCase {
  return { title: "Case", inputs: {}, source: "By hand", basis: "computed independently", ...parts };
}

/** The refusal of a call that must be refused. */
export function refusalOf(run: () => unknown): CodedError {
  try {
    run();
  } catch (error) {
    expect(error).toBeInstanceOf(CodedError);
    return error as CodedError;
  }
  throw new Error("The call was not refused.");
}

/** Problems as `pointer code`, in order. */
export function problemsOf(run: () => unknown): string[] {
  return refusalOf(run).problems.map(({ pointer, code }) => `${pointer} ${code}`);
}
