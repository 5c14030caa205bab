import { z } from "zod";
import { CodedError } from "./errors";
import { pointerTo } from "./problem";

/** Cursor paging: a list is read in one order, and the cursor holds the sort values of the last row seen. */

export const pageLimits = { default: 50, most: 200 } as const;

/** Query members of every list. */
export const pageQuery = {
  limit: z.coerce
    .number()
    .int()
    .min(1)
    .max(pageLimits.most)
    .default(pageLimits.default)
    .describe("Rows of a page."),
  cursor: z.string().min(1).max(400).optional().describe("`nextCursor` of the page before."),
};

export interface Page<Item> {
  items: Item[];
  nextCursor: string | null;
}

/** Opaque text of the sort values of the last row of a page. */
export function writeCursor(values: readonly (string | number)[]): string {
  return Buffer.from(JSON.stringify(values)).toString("base64url");
}

/** Reads a cursor made by `writeCursor`; anything else is an `invalid-input`. */
export function readCursor<Values extends z.ZodType>(cursor: string, schema: Values): z.output<Values> {
  try {
    return schema.parse(JSON.parse(Buffer.from(cursor, "base64url").toString("utf8")));
  } catch {
    const message = "The cursor is not one of ours. Take nextCursor of the page before, or leave it out.";
    throw CodedError.from([{ pointer: pointerTo("query", "cursor"), code: "invalid-input", message }]);
  }
}

/** From one row more than asked: the page and the cursor of the next one. */
export function pageOf<Row, Item>(
  rows: readonly Row[],
  limit: number,
  sortValues: (row: Row) => readonly (string | number)[],
  item: (row: Row) => Item,
): Page<Item> {
  const shown = rows.slice(0, limit);
  const last = shown.at(-1);
  return {
    items: shown.map(item),
    nextCursor: rows.length > limit && last !== undefined ? writeCursor(sortValues(last)) : null,
  };
}
