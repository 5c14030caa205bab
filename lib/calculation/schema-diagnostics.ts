import type { z } from "zod";
import { nearestName } from "@/lib/core/nearest";
import { pointerTo } from "@/lib/core/problem";
import type { Diagnostic } from "@/lib/language";

/** Faults of a definition's or a material's shape as diagnostics with a path and a sentence. */

type Issue = z.core.$ZodIssue;

const kinds: Readonly<Record<string, string>> = {
  string: "a text",
  number: "a number",
  int: "a whole number",
  boolean: "true or false",
  object: "an object",
  record: "an object",
  array: "a list",
};

const countedThings: Readonly<Record<string, string>> = {
  string: "character",
  array: "item",
  record: "member",
};

function named(path: readonly PropertyKey[]): string {
  const last = path.at(-1);
  if (last === undefined) return "The definition";
  if (typeof last !== "number") return `\`${String(last)}\``;
  const list = path.at(-2);
  return list === undefined ? `Item ${last + 1}` : `Item ${last + 1} of \`${String(list)}\``;
}

function member(value: unknown, path: readonly PropertyKey[]): unknown {
  let here = value;
  for (const part of path) {
    if (typeof here !== "object" || here === null) return undefined;
    here = (here as Record<PropertyKey, unknown>)[part];
  }
  return here;
}

/** The branch of a union that was meant: the one whose own kind of value fits, with the fewest faults. */
function meantBranch(branches: readonly (readonly Issue[])[]): readonly Issue[] | null {
  const fitting = branches.filter(
    (issues) => !issues.some((issue) => issue.path.length === 0 && issue.code === "invalid_type"),
  );
  return [...fitting].sort((a, b) => a.length - b.length)[0] ?? null;
}

function bound(issue: Extract<Issue, { code: "too_small" | "too_big" }>, name: string): string {
  const small = issue.code === "too_small";
  const limit = Number(small ? issue.minimum : issue.maximum);
  const words = `${small ? "at least" : "at most"} ${limit}`;
  const things = countedThings[issue.origin];
  if (issue.origin === "string" && small && limit === 1) return `${name} is empty.`;
  if (things) return `${name} must have ${words} ${things}${limit === 1 ? "" : "s"}.`;
  return issue.inclusive === false
    ? `${name} must be ${small ? "greater" : "less"} than ${limit}.`
    : `${name} must be ${words}.`;
}

function diagnosticsOf(
  issue: Issue,
  base: readonly PropertyKey[],
  whole: unknown,
  known: readonly string[],
): Diagnostic[] {
  const path = [...base, ...issue.path];
  const name = named(path);
  const missing = member(whole, path) === undefined;
  const one = (code: string, message: string, hint?: string): Diagnostic[] => [
    { path: pointerTo(...path), severity: "error", code, message, ...(hint !== undefined && { hint }) },
  ];
  switch (issue.code) {
    case "unrecognized_keys":
      return issue.keys.map((key) => {
        const near = nearestName(key, known);
        return {
          path: pointerTo(...path, key),
          severity: "error",
          code: "unknown-member",
          message: `\`${key.slice(0, 80)}\` is not known ${path.length === 0 ? "here" : `in ${name}`}.`,
          ...(near !== null && { hint: `Did you mean \`${near}\`?` }),
        };
      });
    case "invalid_type": {
      const wanted = kinds[issue.expected] ?? issue.expected;
      return missing
        ? one("missing-member", `${name} is missing.`, `Give ${wanted}.`)
        : one("invalid-member", `${name} must be ${wanted}.`);
    }
    case "invalid_value":
      return one("invalid-member", `${name} must be one of ${issue.values.map(String).join(", ")}.`);
    case "too_small":
    case "too_big":
      return one(
        issue.origin === "string" || issue.origin === "array" ? "size" : "out-of-range",
        bound(issue, name),
      );
    case "invalid_union": {
      const meant = meantBranch(issue.errors);
      if (meant && meant.length > 0)
        return meant.flatMap((inner) => diagnosticsOf(inner, path, whole, known));
      if (issue.discriminator !== undefined) {
        const tag = named([...path, issue.discriminator]);
        return one("invalid-member", `${name}: ${tag} is missing or has a value that is not known.`);
      }
      return one("invalid-member", `${name} has a form that is not read here.`);
    }
    case "invalid_key":
      return issue.issues.flatMap((inner) => diagnosticsOf(inner, path, whole, known));
    case "invalid_format":
    case "custom":
      return one("invalid-member", `${name} cannot be read: ${issue.message}`);
    default:
      return one("invalid-member", `${name} cannot be read.`);
  }
}

/** Every fault that the schema found in `value`; `known` are member names to suggest. */
export function schemaDiagnostics(
  error: z.core.$ZodError,
  value: unknown,
  known: readonly string[],
): Diagnostic[] {
  return error.issues.flatMap((issue) => diagnosticsOf(issue, [], value, known));
}
