import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { Definition } from "@/lib/calculation/definition";
import type { Evaluation, GivenInputs } from "@/lib/calculation/evaluation";
import { evaluate, prepare, type MaterialSnapshots, type Prepared } from "@/lib/calculation/execute";
import { Material } from "@/lib/calculation/material";
import { CodedError } from "@/lib/core/errors";
import { parseUnit, toSi } from "@/lib/units";

/** The supplied shelf as it lies in the seed, and runs through it with everything read back in SI. */

const seed = fileURLToPath(new URL("../../db/seed/", import.meta.url));
const slugs = (folder: string) =>
  readdirSync(`${seed}${folder}`)
    .filter((name) => name.endsWith(".json"))
    .map((name) => name.slice(0, -5))
    .sort();
const read = (folder: string, slug: string): unknown =>
  JSON.parse(readFileSync(`${seed}${folder}/${slug}.json`, "utf8"));

export const templateSlugs = slugs("templates");
export const materialSlugs = slugs("materials");
export const rawTemplate = (slug: string) => read("templates", slug);
export const template = (slug: string): Definition => Definition.parse(rawTemplate(slug));
export const material = (slug: string): Material => Material.parse(read("materials", slug));

export const materials: MaterialSnapshots = Object.fromEntries(
  materialSlugs.map((slug) => [slug, { slug, revision: 1, material: material(slug) }]),
);

const prepared = new Map<string, Prepared>();
export function preparedTemplate(slug: string): Prepared {
  const known = prepared.get(slug);
  if (known) return known;
  const made = prepare(template(slug));
  prepared.set(slug, made);
  return made;
}

const absoluteUnits = new Set(["°C", "°F"]);

/** SI value of a number in `unit`; °C and °F are read as temperatures, K as it stands. */
export function si(value: number, unit: string): number {
  const reading = parseUnit(unit);
  if (!reading.ok) throw new Error(`${unit}: ${reading.fault.message}`);
  return toSi(value, reading.value, absoluteUnits.has(unit) ? "absolute" : "plain");
}

/** A run read back: values of results and lines in SI. */
export class Outcome {
  constructor(readonly evaluation: Evaluation) {}

  private found(symbol: string) {
    const found =
      this.evaluation.results[symbol] ?? this.evaluation.steps?.find((step) => step.symbol === symbol);
    if (!found) throw new Error(`The run has no ${symbol}.`);
    return found;
  }

  number(symbol: string): number {
    const { value, unit } = this.found(symbol);
    if (value === undefined) throw new Error(`${symbol} is a list.`);
    return si(value, unit);
  }

  list(symbol: string): number[] {
    const { values, unit } = this.found(symbol);
    if (values === undefined) throw new Error(`${symbol} is a single number.`);
    return values.map((value) => si(value, unit));
  }
}

/** A number with its unit, as a caller of the interface would send it. */
export const given = (value: number, unit: string) => ({ value, unit });

/** Runs a template of the shelf; `extra` materials stand beside the supplied ones. */
export function run(slug: string, inputs: GivenInputs, extra: MaterialSnapshots = {}): Outcome {
  return new Outcome(evaluate(preparedTemplate(slug), { inputs, steps: true }, { ...materials, ...extra }));
}

/** True when the run is refused with a problem of the domain, false when it answers. */
export function refuses(work: () => unknown): boolean {
  try {
    work();
    return false;
  } catch (error) {
    if (error instanceof CodedError && ["out-of-range", "outside-validity"].includes(error.code)) return true;
    throw error;
  }
}

/** Everything that a template says to people: summary, notices, limits, notes. */
export function texts(slug: string): string {
  const { summary, notices, limits, inputs } = template(slug);
  return [
    summary,
    ...notices,
    ...limits.flatMap(({ label, when, message }) => [label, when, message]),
    ...inputs.flatMap((input) => [input.label, input.note ?? ""]),
  ].join("\n");
}

/** Numbers that a template's texts state at the groups of a pattern; a missing text fails. */
export function stated(slug: string, pattern: RegExp): number[] {
  const match = pattern.exec(texts(slug));
  if (!match) throw new Error(`${slug} does not say ${pattern}.`);
  return match.slice(1).map((text) => Number(text.replaceAll(" ", "")));
}

interface Table {
  readonly symbol: string;
  /** Column → unit and its numbers. */
  readonly columns: Readonly<Record<string, readonly [string, readonly number[]]>>;
}

/**
 * Runs a working of its own that is no template of the shelf, with its data as quoted quantities in the text
 * and, for lists, in one table.
 */
export function ownWorking(working: string, table?: Table): Outcome {
  const columns = Object.entries(table?.columns ?? {});
  const count = columns[0]?.[1][1].length ?? 0;
  const last = working.trim().split("\n").at(-1) ?? "";
  const definition = Definition.parse({
    title: "A working of its own",
    summary: "",
    category: "walls",
    tags: [],
    references: [],
    notices: [],
    inputs: [
      { kind: "number", symbol: "unused_input", label: "Unused", quantity: "ratio", unit: "1", default: 1 },
      ...(table
        ? [
            {
              kind: "table",
              symbol: table.symbol,
              label: "Table",
              columns: columns.map(([symbol, [unit]]) => ({
                kind: "number",
                symbol,
                label: symbol,
                ...declared(unit),
              })),
              minRows: count,
              maxRows: count,
              default: Array.from({ length: count }, (_, row) =>
                Object.fromEntries(columns.map(([symbol, [, values]]) => [symbol, values[row]])),
              ),
            },
          ]
        : []),
    ],
    requires: [],
    working: `${working.trim()}\nanswered = 1`,
    results: [{ symbol: "answered", label: `After ${last.slice(0, 40)}`, quantity: "ratio", unit: "1" }],
    limits: [],
    figures: [],
    cases: [],
  });
  return new Outcome(evaluate(prepare(definition), { steps: true }, materials));
}

const quantityOfUnit: Readonly<Record<string, string>> = {
  "m²·K/W": "thermal insulance",
  "W/(m·K)": "thermal conductivity",
  "W/(m²·K)": "heat transfer coefficient",
  m: "length",
  mm: "length",
  "1": "ratio",
};

function declared(unit: string) {
  const quantity = quantityOfUnit[unit];
  if (quantity === undefined) throw new Error(`No quantity noted for ${unit}.`);
  return { quantity, unit };
}
