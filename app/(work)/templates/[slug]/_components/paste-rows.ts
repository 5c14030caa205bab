import type { TableInput } from "@/lib/calculation/definition";
import { cellState, type CellState, type RowState, type TableState } from "./form-state";

/**
 * Rows with a pasted block laid over them from a given cell, tab-separated lines as spreadsheets copy them. Rows are
 * added as far as the table allows. Null for a single value, which the browser pastes by itself.
 */
export function rowsFromClipboard(
  text: string,
  input: TableInput,
  state: TableState,
  atRow: number,
  atColumn: number,
): RowState[] | null {
  const lines = text.replace(/\r\n?/g, "\n").replace(/\n+$/, "").split("\n");
  if (lines.length === 1 && !text.includes("\t")) return null;
  const block = lines.map((line) => line.split("\t").map((cell) => cell.trim()));
  const count = Math.min(input.maxRows, Math.max(state.rows.length, atRow + block.length));
  return Array.from({ length: count }, (_, index) => {
    const present =
      state.rows[index]?.cells ??
      Object.fromEntries(
        input.columns.map((column) => [
          column.symbol,
          cellState(column, undefined, state.units[column.symbol]),
        ]),
      );
    const pasted = block[index - atRow];
    if (!pasted) return { cells: present };
    const cells: Record<string, CellState> = { ...present };
    pasted.forEach((value, offset) => {
      const column = input.columns[atColumn + offset];
      const cell = column ? cells[column.symbol] : undefined;
      if (!column || !cell) return;
      if (cell.kind === "number" || cell.kind === "text") cells[column.symbol] = { ...cell, text: value };
      else if (cell.kind === "choice" && column.kind === "choice") {
        const option = column.options.find(
          (candidate) => candidate.key === value || candidate.label.toLowerCase() === value.toLowerCase(),
        );
        cells[column.symbol] = { ...cell, option: option?.key ?? cell.option };
      } else if (cell.kind === "material") {
        cells[column.symbol] = /^[-+.\d]/.test(value)
          ? { ...cell, slug: "", constant: { text: value, unit: "W/(m·K)" } }
          : { ...cell, slug: value.toLowerCase(), constant: null };
      }
    });
    return { cells };
  });
}
