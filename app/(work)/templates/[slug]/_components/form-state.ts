import type { Column, Definition, Input } from "@/lib/calculation/definition";
import type { Origin } from "@/lib/calculation/evaluation";

/** What is typed in the form, as text, so that nothing is lost while it cannot be read. */
export interface NumberState {
  kind: "number";
  text: string;
  unit: string;
  origin: Origin;
}
export interface ChoiceState {
  kind: "choice";
  option: string;
  origin: Origin;
}
/** A material by slug, or a constant value with unit in its place. */
export interface MaterialState {
  kind: "material";
  slug: string;
  constant: { text: string; unit: string } | null;
  origin: Origin;
}
export interface TextState {
  kind: "text";
  text: string;
}
export type CellState =
  Omit<NumberState, "origin"> | Omit<ChoiceState, "origin"> | Omit<MaterialState, "origin"> | TextState;
export interface RowState {
  cells: Record<string, CellState>;
}
export interface TableState {
  kind: "table";
  rows: RowState[];
  /** Unit of each number column. */
  units: Record<string, string>;
  origin: Origin;
}
export type FieldState = NumberState | ChoiceState | MaterialState | TableState;

export interface FormValues {
  inputs: Record<string, FieldState>;
}

function numberText(value: number | undefined): string {
  return value === undefined ? "" : String(value);
}

/** A cell as a new row begins, or as a default row gives it. */
export function cellState(column: Column, given: unknown, unit: string | undefined): CellState {
  switch (column.kind) {
    case "number":
      return {
        kind: "number",
        text: numberText(typeof given === "number" ? given : column.default),
        unit: unit ?? column.unit,
      };
    case "choice":
      return { kind: "choice", option: typeof given === "string" ? given : (column.default ?? "") };
    case "material": {
      if (typeof given === "object" && given !== null && "value" in given && "unit" in given) {
        return {
          kind: "material",
          slug: "",
          constant: { text: String(given.value), unit: String(given.unit) },
        };
      }
      return {
        kind: "material",
        slug: typeof given === "string" ? given : (column.default ?? ""),
        constant: null,
      };
    }
    case "text":
      return { kind: "text", text: typeof given === "string" ? given : "" };
  }
}

function columnUnits(columns: readonly Column[]): Record<string, string> {
  return Object.fromEntries(
    columns.flatMap((column) => (column.kind === "number" ? [[column.symbol, column.unit]] : [])),
  );
}

/** The state an input has before anybody typed. */
export function initialField(input: Input): FieldState {
  switch (input.kind) {
    case "number":
      return {
        kind: "number",
        text: numberText(input.default),
        unit: input.unit,
        origin: input.default === undefined ? "typed" : "default",
      };
    case "choice":
      return {
        kind: "choice",
        option: input.default ?? "",
        origin: input.default === undefined ? "typed" : "default",
      };
    case "material":
      return {
        kind: "material",
        slug: input.default ?? "",
        constant: null,
        origin: input.default === undefined ? "typed" : "default",
      };
    case "table": {
      const units = columnUnits(input.columns);
      const rows = input.default.map((row) => ({
        cells: Object.fromEntries(
          input.columns.map((column) => [
            column.symbol,
            cellState(column, row[column.symbol], units[column.symbol]),
          ]),
        ),
      }));
      return { kind: "table", rows, units, origin: "default" };
    }
  }
}

export function initialValues(definition: Definition): FormValues {
  return {
    inputs: Object.fromEntries(definition.inputs.map((input) => [input.symbol, initialField(input)])),
  };
}
