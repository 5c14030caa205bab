import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { Definition, independentBases, type Input } from "@/lib/calculation/definition";
import { checkDefinition } from "@/lib/calculation/program";
import { runAllCases } from "@/lib/calculation/worked-case";
import { CodedError } from "@/lib/core/errors";
import { breaking, brokenRelations } from "./breaking-inputs";
import { materials, preparedTemplate, rawTemplate, run, template, templateSlugs } from "./shelf";

interface CatalogueInput {
  readonly symbol: string;
  readonly kind: string;
  readonly meaning: string;
  readonly property?: string;
  readonly needs?: readonly string[];
  readonly options?: readonly { readonly key: string; readonly label: string }[];
  readonly columns?: readonly CatalogueInput[];
  readonly [member: string]: unknown;
}
interface CatalogueTemplate {
  readonly slug: string;
  readonly title: string;
  readonly category: string;
  readonly method: string;
  readonly inputs: readonly CatalogueInput[];
  readonly requires?: readonly { readonly that: string }[];
  readonly results: readonly {
    readonly symbol: string;
    readonly unit: string;
    readonly quantity: string;
    readonly list?: boolean;
  }[];
  readonly limits: string;
}
const catalogue = JSON.parse(
  readFileSync(fileURLToPath(new URL("./data/catalogue.json", import.meta.url)), "utf8"),
) as readonly CatalogueTemplate[];

/** What the catalogue fixes of an input, in the members of the definition. */
function contract({ meaning: _, property, options, columns, needs, ...rest }: CatalogueInput): object {
  return {
    ...rest,
    ...(rest.kind === "material" && { needs: needs ?? [property] }),
    ...(options && { options: options.map(({ key }) => key) }),
    ...(columns && { columns: columns.map(contract) }),
  };
}
const fixed = [
  "symbol kind unit quantity default min max above below appliesWhen mustType",
  "needs orConstant fixed minRows maxRows options columns",
].flatMap((names) => names.split(" "));
function kept(input: Input | Extract<Input, { kind: "table" }>["columns"][number]): object {
  const given = input as unknown as Record<string, unknown>;
  return Object.fromEntries(
    fixed
      .filter((name) => given[name] !== undefined)
      .map((name) => {
        if (input.kind === "choice" && name === "options") return [name, input.options.map(({ key }) => key)];
        if (input.kind === "table" && name === "columns") return [name, input.columns.map(kept)];
        return [name, given[name]];
      }),
  );
}

/** Members of `raw` in the order in which the schema names them, at every depth. */
function sameOrder(raw: unknown, parsed: unknown, path = "#"): string[] {
  if (Array.isArray(raw) && Array.isArray(parsed)) {
    return raw.flatMap((item, i) => sameOrder(item, parsed[i], `${path}/${i}`));
  }
  if (raw === null || typeof raw !== "object" || parsed === null || typeof parsed !== "object") return [];
  const members = Object.keys(raw);
  const wanted = Object.keys(parsed).filter((name) => members.includes(name));
  const inner = members.flatMap((name) =>
    sameOrder(
      (raw as Record<string, unknown>)[name],
      (parsed as Record<string, unknown>)[name],
      `${path}/${name}`,
    ),
  );
  return members.join() === wanted.join() ? inner : [`${path}: ${members.join()}`, ...inner];
}

describe("the shelf", () => {
  it("holds the 39 templates of the catalogue and nothing else", () => {
    expect(templateSlugs).toEqual(catalogue.map(({ slug }) => slug).sort());
    expect(templateSlugs).toHaveLength(39);
  });
});

describe.each(catalogue)("$slug", (entry) => {
  const definition = template(entry.slug);

  it("passes the check without an error or a warning", () => {
    expect(checkDefinition(rawTemplate(entry.slug)).diagnostics).toEqual([]);
  });

  it("names its members in the order of the schema", () => {
    const raw = rawTemplate(entry.slug);
    expect(sameOrder(raw, Definition.parse(raw))).toEqual([]);
  });

  it("keeps the contract of the catalogue", () => {
    expect(definition.title).toBe(entry.title);
    expect(definition.category).toBe(entry.category);
    expect(definition.method).toBe(entry.method);
    expect(definition.inputs.map(kept)).toEqual(entry.inputs.map(contract));
    expect(definition.requires.map(({ that }) => that)).toEqual(
      (entry.requires ?? []).map(({ that }) => that),
    );
    // The order is the template's own: the first two results are shown large.
    const bySymbol = <R extends { symbol: string }>(a: R, b: R) => (a.symbol < b.symbol ? -1 : 1);
    expect(
      definition.results
        .map(({ symbol, unit, quantity, list }) => ({ symbol, unit, quantity, list }))
        .sort(bySymbol),
    ).toEqual(
      entry.results
        .map(({ symbol, unit, quantity, list }) => ({ symbol, unit, quantity, list }))
        .sort(bySymbol),
    );
    expect(definition.limits.length > 0).toBe(!/^(none|notice)/.test(entry.limits));
  });

  it("says what it is for, where it comes from and when not to use it", () => {
    const sentences = definition.summary.split(/[.!?](?:\s|$)/).filter((part) => part.trim() !== "");
    expect(sentences.length).toBeGreaterThanOrEqual(2);
    expect(sentences.length).toBeLessThanOrEqual(9);
    expect(definition.references.length).toBeGreaterThan(0);
    for (const reference of definition.references) expect(reference.edition, reference.text).toBeTruthy();
    expect(definition.tags.length).toBeGreaterThan(0);
    expect(definition.figures.some(({ kind }) => kind === "section" || kind === "curve")).toBe(true);
    expect(JSON.stringify(definition)).not.toMatch(/\bsafe\b/i);
  });

  it("answers finitely on its defaults, with every line", () => {
    const { evaluation } = run(entry.slug, {});
    for (const { symbol, value, values } of evaluation.steps ?? []) {
      for (const number of values ?? [value]) expect(number, symbol).toSatisfy(Number.isFinite);
    }
    expect(Object.keys(evaluation.results)).toEqual(definition.results.map(({ symbol }) => symbol));
  });

  it("meets all its worked cases, at least two of them independent", () => {
    const failed = runAllCases(preparedTemplate(entry.slug), materials).filter(({ passed }) => !passed);
    expect(failed).toEqual([]);
    expect(definition.cases.length).toBeGreaterThanOrEqual(3);
    const independent = definition.cases.filter(
      ({ basis, expected }) => expected && independentBases.includes(basis),
    );
    expect(independent.length).toBeGreaterThanOrEqual(2);
  });

  it("draws its curves between their ends", () => {
    for (const figure of definition.figures) {
      if (figure.kind !== "curve") continue;
      const { symbol, from, to } = figure.x;
      for (const share of [0, 0.25, 0.5, 0.75, 1]) {
        const { evaluation } = run(entry.slug, { [symbol]: from + share * (to - from) });
        for (const name of figure.y)
          expect(evaluation.results[name]?.value, figure.title).toBeTypeOf("number");
      }
    }
  });

  it("breaks each of its limits where it should, and says what to do", () => {
    const cases = breaking[entry.slug] ?? {};
    expect(Object.keys(cases).sort()).toEqual(definition.limits.map(({ code }) => code).sort());
    for (const { code, level } of definition.limits) {
      const { evaluation } = run(entry.slug, cases[code]!.breaks);
      const verdict = evaluation.limits.find((limit) => limit.code === code);
      expect(verdict, code).toMatchObject({ broken: true, level });
      expect(verdict?.message).not.toMatch(/[{}]/);
      const held = run(entry.slug, cases[code]!.holds).evaluation.limits.find((limit) => limit.code === code);
      expect(held, code).toMatchObject({ broken: false });
    }
  });

  it("refuses each relation of inputs when it is broken, in its own words", () => {
    const broken = brokenRelations[entry.slug] ?? [];
    expect(broken).toHaveLength(definition.requires.length);
    definition.requires.forEach(({ message }, i) => {
      const work = () => run(entry.slug, broken[i]!);
      expect(work).toThrow(CodedError);
      expect(work).toThrow(message);
      expect(message).toMatch(/ must .*\.$/);
    });
  });

  it("raises no caution of unusual values on its defaults", () => {
    const { evaluation } = run(entry.slug, {});
    const limits = new Set(definition.limits.map(({ code }) => code));
    expect(evaluation.cautions.filter(({ code }) => !limits.has(code))).toEqual([]);
  });
});
