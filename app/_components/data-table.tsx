import Link from "next/link";
import type { ReactNode } from "react";

export interface DataColumn<Row> {
  readonly head: string;
  readonly cell: (row: Row) => ReactNode;
  /** Left out on narrow screens. */
  readonly wide?: boolean;
  readonly right?: boolean;
}

interface DataTableProps<Row> {
  caption: string;
  columns: readonly DataColumn<Row>[];
  rows: readonly Row[];
  keyOf: (row: Row) => string;
  /** Address of the following page, when there is one. */
  next?: string | null;
}

/** Rows of a list page, with the way to the rows that follow. */
export function DataTable<Row>({ caption, columns, rows, keyOf, next }: DataTableProps<Row>) {
  const look = (column: DataColumn<Row>) =>
    `${column.wide ? "max-md:hidden" : ""} ${column.right ? "text-right" : "text-left"}`;
  return (
    <>
      <div className="overflow-x-auto">
        <table className="w-full border-collapse">
          <caption className="sr-only">{caption}</caption>
          <thead>
            <tr className="border-b border-rule">
              {columns.map((column) => (
                <th
                  key={column.head}
                  scope="col"
                  className={`px-3 pb-2 pt-3 text-[12px] font-normal text-muted first:pl-6 last:pr-6 max-md:first:pl-4 max-md:last:pr-4 ${look(column)}`}
                >
                  {column.head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <tr key={keyOf(row)} className="border-b border-soft last:border-b-0 hover:bg-film">
                {columns.map((column) => (
                  <td
                    key={column.head}
                    className={`px-3 py-2.5 align-top first:pl-6 last:pr-6 max-md:first:pl-4 max-md:last:pr-4 max-md:[&>a]:min-h-11 ${look(column)}`}
                  >
                    {column.cell(row)}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {next ? (
        <p className="border-t border-rule px-6 py-3 max-md:px-4">
          <Link href={next} className="underline decoration-rule underline-offset-[3px] hover:decoration-ink">
            The next rows
          </Link>
        </p>
      ) : null}
    </>
  );
}
