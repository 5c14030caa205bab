import type { z } from "zod";
import { CodedError } from "@/lib/core/errors";

type SearchParams = Record<string, string | string[] | undefined>;

/**
 * Query of a list page. What the address holds and the list does not understand is dropped member by member, so that a
 * mistyped filter shows the list without it and never a broken page.
 */
export function listQuery<Schema extends z.ZodObject>(schema: Schema, given: SearchParams): z.output<Schema> {
  const members: Record<string, string> = {};
  for (const name of Object.keys(schema.shape)) {
    const value = given[name];
    if (typeof value === "string" && value !== "") members[name] = value;
  }
  const first = schema.safeParse(members);
  if (first.success) return first.data;
  for (const issue of first.error.issues) delete members[String(issue.path[0])];
  return schema.parse(members);
}

/** A page of a list. A cursor that is none of ours begins with the first row instead of a broken page. */
export async function pageFrom<Query extends { cursor?: string | undefined }, Page>(
  query: Query,
  list: (query: Query) => Promise<Page>,
): Promise<Page> {
  try {
    return await list(query);
  } catch (error) {
    const cursor = error instanceof CodedError && error.code === "invalid-input" ? query.cursor : undefined;
    if (cursor === undefined) throw error;
    return list({ ...query, cursor: undefined });
  }
}

/** Address of the rows that follow. */
export function nextAddress(path: string, given: SearchParams, cursor: string | null): string | null {
  if (cursor === null) return null;
  const wanted = new URLSearchParams();
  for (const [name, value] of Object.entries(given))
    if (typeof value === "string" && name !== "cursor") wanted.set(name, value);
  wanted.set("cursor", cursor);
  return `${path}?${wanted.toString()}`;
}
