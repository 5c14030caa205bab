import type { z } from "zod";
import { CodedError, type FieldProblem } from "@/lib/core/errors";
import { pointerTo } from "@/lib/core/problem";
import type { RequestParts } from "./operation";
import { readJsonBody } from "./read-body";
import { problemsFromZod, type PlacedProblem } from "./zod-problems";

export interface ParsedRequest {
  /** Members of path, query and body side by side. */
  readonly input: Record<string, unknown>;
  /** The body as it was read, for the fingerprint of an idempotent request. */
  readonly body: unknown;
  /** Faults of the shape. Empty unless the operation collects. */
  readonly problems: FieldProblem[];
}

function parseParams(
  schema: z.ZodObject | undefined,
  params: Record<string, string>,
): Record<string, unknown> {
  if (!schema) return {};
  const parsed = schema.safeParse(params);
  // An address that cannot exist is answered like one that does not.
  if (!parsed.success) throw new CodedError("not-found", "This address cannot exist.");
  return parsed.data;
}

function parseQuery(
  schema: z.ZodObject | undefined,
  search: URLSearchParams,
  problems: FieldProblem[],
): Record<string, unknown> {
  const given: Record<string, string> = {};
  for (const [name, value] of search) {
    if (Object.hasOwn(given, name)) {
      const message = `“${name}” stands twice in the query.`;
      problems.push({ pointer: pointerTo("query", name), code: "invalid-input", message });
    }
    given[name] = value;
  }
  const names = Object.keys(given);
  if (!schema) {
    for (const name of names) {
      const message = `“${name}” is not known here. This operation reads no query.`;
      problems.push({ pointer: pointerTo("query", name), code: "unknown-member", message });
    }
    return {};
  }
  const parsed = schema.safeParse(given);
  if (parsed.success) return parsed.data;
  problems.push(...bare(problemsFromZod(parsed.error, schema, given, ["query"])));
  return {};
}

function bare(problems: readonly PlacedProblem[]): FieldProblem[] {
  return problems.map(({ path: _path, ...problem }) => problem);
}

/** The body without the members that have a fault: a run's input alone when the fault lies in one of them. */
function withoutFaults(body: unknown, problems: readonly PlacedProblem[]): unknown {
  if (typeof body !== "object" || body === null || Array.isArray(body)) return {};
  const copy = structuredClone(body) as Record<string, unknown>;
  for (const { path } of problems) {
    let holder: unknown = copy;
    const [first, row] = path;
    if (first === "rows" && path.length === 2 && Array.isArray(copy.rows)) {
      copy.rows[Number(row)] = {};
      continue;
    }
    const depth = first === "inputs" || first === "common" ? 1 : first === "rows" ? 2 : 0;
    const reach = path.length > depth ? depth : 0;
    for (const part of path.slice(0, reach))
      holder = (holder as Record<PropertyKey, unknown> | undefined)?.[part];
    const member = path[reach];
    if (member !== undefined && typeof holder === "object" && holder !== null) {
      delete (holder as Record<PropertyKey, unknown>)[member];
    }
  }
  return copy;
}

function parseBody(
  parts: RequestParts,
  body: unknown,
  problems: FieldProblem[],
): Record<string, unknown> | null {
  if (!parts.body) return {};
  const parsed = parts.body.safeParse(body);
  if (parsed.success) return parsed.data;
  const placed = problemsFromZod(parsed.error, parts.body, body);
  problems.push(...bare(placed));
  if (!parts.collects) return null;
  const mended = parts.body.safeParse(withoutFaults(body, placed));
  return mended.success ? mended.data : null;
}

/** Reads and checks path, query and body; throws with every problem unless the operation collects them. */
export async function parseRequest(
  parts: RequestParts,
  request: Request,
  params: Record<string, string>,
  search: URLSearchParams,
): Promise<ParsedRequest> {
  const fromPath = parseParams(parts.params, params);
  const problems: FieldProblem[] = [];
  const fromQuery = parseQuery(parts.query, search, problems);
  const body = parts.body ? await readJsonBody(request, parts.bodyOptional ?? false) : undefined;
  const fromBody = parseBody(parts, body, problems);
  if (problems.length > 0 && (fromBody === null || !parts.collects)) throw CodedError.from(problems);
  return { input: { ...fromQuery, ...fromBody, ...fromPath }, body, problems };
}
