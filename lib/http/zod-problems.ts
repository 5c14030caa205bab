import type { z } from "zod";
import type { FieldProblem } from "@/lib/core/errors";
import { nearestName } from "@/lib/core/nearest";
import { pointerTo } from "@/lib/core/problem";

/** Faults of a request's shape as field problems: sentences instead of a validator's vocabulary. */

type Issue = z.core.$ZodIssue;

export interface PlacedProblem extends FieldProblem {
  readonly path: readonly PropertyKey[];
}

function valueAt(value: unknown, path: readonly PropertyKey[]): unknown {
  let here = value;
  for (const part of path) {
    if (typeof here !== "object" || here === null) return undefined;
    here = (here as Record<PropertyKey, unknown>)[part];
  }
  return here;
}

function received(value: unknown): { received?: string | number | boolean | null } {
  if (typeof value === "string") return { received: value.length > 120 ? `${value.slice(0, 119)}…` : value };
  if (typeof value === "number" || typeof value === "boolean" || value === null) return { received: value };
  return {};
}

type AnyDefinition = z.core.$ZodTypeDef & {
  shape?: Record<string, z.core.$ZodType>;
  innerType?: z.core.$ZodType;
  element?: z.core.$ZodType;
  valueType?: z.core.$ZodType;
  options?: readonly z.core.$ZodType[];
  in?: z.core.$ZodType;
};

/** Names of the members that a schema knows at a place. */
function knownNames(schema: z.core.$ZodType, path: readonly PropertyKey[]): string[] {
  const definition = schema._zod.def as AnyDefinition;
  const inner = definition.innerType ?? definition.in;
  if (inner) return knownNames(inner, path);
  if (definition.options) return definition.options.flatMap((option) => knownNames(option, path));
  const [part, ...rest] = path;
  if (part === undefined) return Object.keys(definition.shape ?? {});
  const next = definition.shape?.[String(part)] ?? definition.element ?? definition.valueType;
  return next ? knownNames(next, rest) : [];
}

const kinds: Record<string, string> = {
  string: "a text",
  number: "a number",
  int: "a whole number",
  boolean: "true or false",
  object: "an object",
  record: "an object",
  array: "a list",
  null: "null",
};

function listed(words: readonly string[], joint: "or" | "and"): string {
  if (words.length < 2) return words[0] ?? "";
  return `${words.slice(0, -1).join(", ")} ${joint} ${words.at(-1)}`;
}

function nameOf(path: readonly PropertyKey[]): string {
  const last = path.at(-1);
  if (last === undefined) return "The body";
  if (typeof last !== "number") return `“${String(last)}”`;
  const list = path.at(-2);
  return list === undefined ? `Item ${last + 1}` : `Item ${last + 1} of “${String(list)}”`;
}

/** Of the branches of a union, the faults of the one that was meant: the one whose kind of value matched. */
function meantBranch(branches: readonly (readonly Issue[])[]): readonly Issue[] | null {
  const matching = branches.filter(
    (issues) => !issues.some((issue) => issue.path.length === 0 && issue.code === "invalid_type"),
  );
  return matching.sort((a, b) => a.length - b.length)[0] ?? null;
}

interface Place {
  readonly schema: z.core.$ZodType;
  readonly value: unknown;
  readonly prefix: readonly PropertyKey[];
}

function problemsOf(issue: Issue, base: readonly PropertyKey[], place: Place): PlacedProblem[] {
  const path = [...base, ...issue.path];
  const here = valueAt(place.value, path);
  const name = nameOf(path);
  const problem = (
    code: FieldProblem["code"],
    message: string,
    more: Partial<FieldProblem> = {},
  ): PlacedProblem => ({
    path,
    pointer: pointerTo(...place.prefix, ...path),
    code,
    message,
    ...received(here),
    ...more,
  });

  switch (issue.code) {
    case "unrecognized_keys": {
      const known = knownNames(place.schema, path);
      return issue.keys.map((key) => {
        const near = nearestName(key, known);
        const where = path.length === 0 ? "here" : `in ${name}`;
        const hint = near !== null ? `Did you mean “${near}”?` : `Known are ${listed(known, "and")}.`;
        return {
          path: [...path, key],
          pointer: pointerTo(...place.prefix, ...path, key),
          code: "unknown-member",
          message: `“${key.slice(0, 80)}” is not known ${where}. ${hint}`,
          ...(near !== null ? { expected: near } : {}),
        };
      });
    }
    case "invalid_type": {
      const expected = kinds[issue.expected] ?? issue.expected;
      if (here === undefined)
        return [problem("missing-input", `${name} is missing. Give ${expected}.`, { expected })];
      return [problem("invalid-input", `${name} must be ${expected}.`, { expected })];
    }
    case "invalid_value": {
      const values = issue.values.map(String);
      if (here === undefined) {
        return [problem("missing-input", `${name} is missing. Give ${listed(values, "or")}.`)];
      }
      const near = typeof here === "string" ? nearestName(here, values) : null;
      const hint = near !== null ? ` Did you mean “${near}”?` : "";
      return [
        problem("invalid-input", `${name} must be ${listed(values, "or")}.${hint}`, {
          expected: values.join(", "),
        }),
      ];
    }
    case "too_small":
    case "too_big": {
      const small = issue.code === "too_small";
      const limit = Number(small ? issue.minimum : issue.maximum);
      const bound = `${small ? "at least" : "at most"} ${limit}`;
      const units: Record<string, string> = { string: " characters", array: " items", record: " members" };
      if (issue.origin === "string" && small && limit === 1)
        return [problem("missing-input", `${name} is empty.`)];
      const comparison =
        issue.inclusive === false ? `${small ? "greater than" : "less than"} ${limit}` : bound;
      const unit = units[issue.origin];
      const message = unit
        ? `${name} must have ${bound}${limit === 1 ? unit.replace(/s$/, "") : unit}.`
        : `${name} must be ${comparison}.`;
      return [problem("out-of-range", message, { limit })];
    }
    case "invalid_union": {
      const meant = meantBranch(issue.errors);
      if (meant) return meant.flatMap((inner) => problemsOf(inner, path, place));
      const expected = issue.errors.flatMap((issues) =>
        issues.flatMap((inner) =>
          inner.code === "invalid_type" && inner.path.length === 0
            ? [kinds[inner.expected] ?? inner.expected]
            : [],
        ),
      );
      const words = listed([...new Set(expected)], "or") || issue.message;
      if (here === undefined) return [problem("missing-input", `${name} is missing. Give ${words}.`)];
      return [problem("invalid-input", `${name} must be ${words}.`, { expected: words })];
    }
    case "invalid_format":
    case "custom":
      return [problem("invalid-input", `${name} cannot be read: ${issue.message}`)];
    case "invalid_key":
      return issue.issues.flatMap((inner) => problemsOf(inner, path, place));
    default:
      return [problem("invalid-input", `${name} cannot be read.`)];
  }
}

/** All faults of one part of a request. `prefix` is put before the pointers (`query`). */
export function problemsFromZod(
  error: z.core.$ZodError,
  schema: z.core.$ZodType,
  value: unknown,
  prefix: readonly PropertyKey[] = [],
): PlacedProblem[] {
  return error.issues.flatMap((issue) => problemsOf(issue, [], { schema, value, prefix }));
}
