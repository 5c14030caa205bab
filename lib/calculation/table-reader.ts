import type { Frame, PropertyReader } from "@/lib/language";
import type { UsedCell, UsedValue } from "./evaluation";
import type { CellPlan, TablePlan } from "./input-plan";
import type { ValueReader } from "./input-reader";
import type { MaterialInputs } from "./material-input";
import { MaterialReader } from "./material-reader";

export interface ReadingOptions {
  /** Keep what was used in the form of the reply. */
  readonly echo: boolean;
  readonly allowExtrapolation: boolean;
  /** An input left out is missing, even when it has a default. */
  readonly refuseDefaults: boolean;
}

/** What reading a table adds to. */
export interface TableFindings {
  readonly defaulted: string[];
  readonly readers: MaterialReader[];
  readonly used: Record<string, UsedValue>;
}

const noNumbers = new Float64Array(0);
const noPlaces = new Int32Array(0);

/** The reader at a place of a frame; frames are used again, and so are the readers in them. */
export function readerAt(list: PropertyReader[], index: number): MaterialReader {
  const present = list[index];
  if (present instanceof MaterialReader) return present;
  const reader = new MaterialReader();
  list[index] = reader;
  return reader;
}

/** Reads table inputs into the columns of a frame, cell by cell. */
export class TableReader {
  constructor(
    private readonly values: ValueReader,
    private readonly materials: MaterialInputs,
    private readonly frame: Frame,
    private readonly options: ReadingOptions,
  ) {}

  /** Reads a table given or left to its default rows; problems go to the value reader. */
  read(plan: TablePlan, value: unknown, found: TableFindings): void {
    const { values } = this;
    let rows: readonly Record<string, unknown>[];
    if (value === undefined && !this.options.refuseDefaults) {
      found.defaulted.push(plan.symbol);
      rows = plan.defaultRows;
    } else if (value === undefined || value === null) {
      values.missing();
      return;
    } else if (Array.isArray(value)) rows = value as readonly Record<string, unknown>[];
    else {
      values.problem("invalid-input", `${plan.label} must be a list of rows.`, {
        expected: "a list of rows",
      });
      return;
    }
    if (rows.length < plan.minRows || rows.length > plan.maxRows) {
      const few = rows.length < plan.minRows;
      const limit = few ? plan.minRows : plan.maxRows;
      values.problem(
        "out-of-range",
        `${plan.label} has ${rows.length} ${rows.length === 1 ? "row" : "rows"}; ${few ? "at least" : "at most"} ${limit} ${few ? "are needed" : "are read"}.`,
        { received: rows.length, expected: `${few ? "at least" : "at most"} ${limit} rows`, limit },
      );
      return;
    }
    this.readRows(plan, rows, value !== undefined, found);
  }

  private readRows(
    plan: TablePlan,
    rows: readonly Record<string, unknown>[],
    given: boolean,
    found: TableFindings,
  ): void {
    const { values } = this;
    const { echo } = this.options;
    const usedRows: Record<string, UsedCell>[] = [];
    values.tableLabel = plan.label;
    this.makeRoom(plan, rows.length);
    for (let r = 0; r < rows.length; r++) {
      const row = rows[r]!;
      values.row = r;
      values.column = "";
      values.label = plan.label;
      if (typeof row !== "object" || row === null || Array.isArray(row)) {
        values.problem(
          "invalid-input",
          `${plan.label}, row ${r + 1}, must be an object with a member for each column.`,
        );
        continue;
      }
      if (given) values.unknownMembers(row, plan.known, "column");
      const usedRow: Record<string, UsedCell> = {};
      for (const column of plan.columns) {
        values.column = column.symbol;
        values.label = column.label;
        values.used = null;
        this.readCell(plan, column, row[column.symbol], r, given, found);
        if (echo && values.used !== null) usedRow[column.symbol] = values.used;
      }
      if (echo) usedRows.push(usedRow);
    }
    values.row = -1;
    values.column = "";
    values.used = null;
    if (echo) found.used[plan.symbol] = { rows: usedRows };
  }

  /** Lists of the right length for every column of a table. */
  private makeRoom(plan: TablePlan, rows: number): void {
    const { frame } = this;
    for (const column of plan.columns) {
      if (column.kind === "number") {
        if (frame.columns[column.index]?.length !== rows)
          frame.columns[column.index] = new Float64Array(rows);
      } else if (column.kind === "choice") {
        if (frame.choiceColumns[column.index]?.length !== rows)
          frame.choiceColumns[column.index] = new Int32Array(rows);
      } else if (column.kind === "material") {
        frame.columnMaterials[column.index]!.length = rows;
      }
    }
  }

  private readCell(
    table: TablePlan,
    column: CellPlan,
    cell: unknown,
    r: number,
    given: boolean,
    found: TableFindings,
  ): void {
    const { values, frame } = this;
    if (column.kind === "text") return values.text(column.maxLength, cell);
    let value = cell;
    if (value === undefined && (!given || !this.options.refuseDefaults)) {
      value = column.kind === "number" ? column.number.declaration.default : (column.default ?? undefined);
      if (value !== undefined && given) found.defaulted.push(`${table.symbol}/${r}/${column.symbol}`);
    }
    if (value === undefined || value === null) {
      values.missing(column.kind === "number" ? column.number.unit.symbol : undefined);
      return;
    }
    switch (column.kind) {
      case "number":
        (frame.columns[column.index] ?? noNumbers)[r] = values.number(column.number, value);
        break;
      case "choice":
        (frame.choiceColumns[column.index] ?? noPlaces)[r] = Math.max(0, values.choice(column, value));
        break;
      case "material": {
        const reader = readerAt(frame.columnMaterials[column.index]!, r);
        if (this.materials.read(column, value, reader)) found.readers.push(reader);
      }
    }
  }
}
