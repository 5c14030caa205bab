"use client";

import { ArrowDown, ArrowUp, X } from "lucide-react";
import { useId, useRef } from "react";
import { flushSync } from "react-dom";
import { TextButton } from "@/app/_components/ui/button";
import type { Column, TableInput as TableDeclaration } from "@/lib/calculation/definition";
import { cellState, type CellState, type RowState, type TableState } from "./form-state";
import { readAmount } from "./build-request";
import { UnitSelect } from "@/app/_components/unit-select";
import { convertText, unitsFor } from "./use-units";
import { rowsFromClipboard } from "./paste-rows";
import { PasteDialog } from "./paste-dialog";
import { TableCell } from "./table-cell";
import type { MaterialChoice } from "./material-choice";

interface Props {
  input: TableDeclaration;
  state: TableState;
  materials: readonly MaterialChoice[];
  onChange: (state: TableState) => void;
  /** Faults by `row.column`, or by `row`. */
  faults: Readonly<Record<string, string>>;
  fault?: string;
}

/** Rows of a table: typed, added, moved, removed, or pasted from a spreadsheet. */
export function TableInput({ input, state, materials, onChange, faults, fault }: Props) {
  const id = useId();
  const body = useRef<HTMLTableSectionElement>(null);
  const change = (rows: RowState[], units = state.units) =>
    onChange({ ...state, rows, units, origin: "typed" });
  // Whoever moves a row by keyboard goes with it, and is not thrown to the top of the page when it is gone.
  const changeAndGoTo = (rows: RowState[], row: number, wanted: readonly string[]) => {
    flushSync(() => change(rows));
    const places = wanted.map((place) =>
      body.current?.children[row]?.querySelector<HTMLElement>(`${place}:not(:disabled)`),
    );
    places.find((place) => place)?.focus();
  };
  const setCell = (index: number, symbol: string, cell: CellState) =>
    change(state.rows.map((row, at) => (at === index ? { cells: { ...row.cells, [symbol]: cell } } : row)));
  const move = (from: number, to: number) => {
    const rows = [...state.rows];
    const [row] = rows.splice(from, 1);
    if (row) rows.splice(to, 0, row);
    changeAndGoTo(
      rows,
      to,
      to < from ? ["[data-move=up]", "[data-move=down]"] : ["[data-move=down]", "[data-move=up]"],
    );
  };
  const remove = (index: number) => {
    const rows = state.rows.filter((_, at) => at !== index);
    changeAndGoTo(rows, Math.min(index, rows.length - 1), ["[data-move=none]", "input", "select"]);
  };
  const add = () => {
    const cells = Object.fromEntries(
      input.columns.map((column) => [
        column.symbol,
        cellState(column, undefined, state.units[column.symbol]),
      ]),
    );
    changeAndGoTo([...state.rows, { cells }], state.rows.length, ["input", "select"]);
  };
  const paste = (text: string, atRow: number, atColumn: number) => {
    const pasted = rowsFromClipboard(text, input, state, atRow, atColumn);
    if (pasted) change(pasted);
    return pasted !== null;
  };
  const pickUnit = (column: Extract<Column, { kind: "number" }>, unit: string) => {
    const rows = state.rows.map((row) => {
      const cell = row.cells[column.symbol];
      if (cell?.kind !== "number") return row;
      const amount = readAmount(column, cell.text, cell.unit);
      const converted = amount.ok ? convertText(amount.value, amount.unit, unit, column.quantity) : null;
      return { cells: { ...row.cells, [column.symbol]: { ...cell, unit, text: converted ?? cell.text } } };
    });
    change(rows, { ...state.units, [column.symbol]: unit });
  };
  const faultId = (place: string) => `${id}-fault-${place}`;

  return (
    <fieldset
      className="min-w-0 border-t border-soft px-6 pb-4 pt-3 max-md:px-4"
      aria-describedby={fault ? faultId("table") : undefined}
    >
      <legend className="sr-only">{input.label}</legend>
      <h2 aria-hidden="true" className="mb-2">
        {input.label}
        {state.origin === "default" ? <small>default, not typed</small> : null}
      </h2>
      <div data-blocks={isWide(input.columns) ? "" : undefined}>
        <table role="table" className="w-full border-collapse blocks:block">
          <thead role="rowgroup" className="blocks:block">
            <tr role="row" className="blocks:flex blocks:flex-wrap blocks:gap-x-4">
              {input.columns.map((column) => (
                <th
                  key={column.symbol}
                  scope="col"
                  role="columnheader"
                  className={`pb-1 pr-2 text-left align-bottom text-[12px] font-normal leading-4 text-muted blocks:flex blocks:items-center blocks:gap-1.5 blocks:p-0 ${hasUnit(column) ? "" : "blocks:sr-only"}`}
                >
                  <span className="block">{column.label}</span>
                  {hasUnit(column) ? (
                    <UnitSelect
                      value={state.units[column.symbol] ?? column.unit}
                      units={unitsFor(column.quantity, column.unit)}
                      label={`Unit of ${column.label}`}
                      onPick={(unit) => pickUnit(column, unit)}
                      className="max-w-full text-[12px]"
                    />
                  ) : null}
                </th>
              ))}
              <th role="columnheader" className="w-[72px] blocks:sr-only">
                <span className="sr-only">Move or remove</span>
              </th>
            </tr>
          </thead>
          <tbody role="rowgroup" ref={body} className="blocks:block">
            {state.rows.map((row, index) => (
              <tr
                key={index}
                role="row"
                className="blocks:flex blocks:flex-wrap blocks:items-end blocks:gap-x-2 blocks:border-t blocks:border-soft blocks:py-2"
              >
                {input.columns.map((column, columnIndex) => {
                  const place = [`${index}.${column.symbol}`, String(index)].find((key) => key in faults);
                  return (
                    <td key={column.symbol} role="cell" className={cellLook(input.columns, columnIndex)}>
                      {columnIndex === 0 ? null : (
                        <span
                          aria-hidden="true"
                          className="hidden pt-1 text-[12px] leading-4 text-muted blocks:block"
                        >
                          {column.label}
                        </span>
                      )}
                      <TableCell
                        column={column}
                        cell={row.cells[column.symbol]}
                        name={`${column.label}, row ${index + 1}`}
                        faultId={place === undefined ? undefined : faultId(place)}
                        materials={materials}
                        onChange={(cell) => setCell(index, column.symbol, cell)}
                        onPaste={(event) => {
                          if (paste(event.clipboardData.getData("text/plain"), index, columnIndex))
                            event.preventDefault();
                        }}
                      />
                    </td>
                  );
                })}
                <td role="cell" className="whitespace-nowrap text-right blocks:order-1 max-md:-mr-3">
                  <RowButton
                    label={`Move row ${index + 1} up`}
                    move="up"
                    disabled={index === 0}
                    onClick={() => move(index, index - 1)}
                  >
                    <ArrowUp size={14} aria-hidden="true" />
                  </RowButton>
                  <RowButton
                    label={`Move row ${index + 1} down`}
                    move="down"
                    disabled={index === state.rows.length - 1}
                    onClick={() => move(index, index + 1)}
                  >
                    <ArrowDown size={14} aria-hidden="true" />
                  </RowButton>
                  <RowButton
                    label={`Remove row ${index + 1}`}
                    move="none"
                    disabled={state.rows.length <= input.minRows}
                    onClick={() => remove(index)}
                  >
                    <X size={14} aria-hidden="true" />
                  </RowButton>
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <div className="text-[12px] leading-4 text-fault">
        {fault ? (
          <p id={faultId("table")} className="mt-1">
            {fault}
          </p>
        ) : null}
        {Object.entries(faults).map(([place, message]) => (
          <p key={place} id={faultId(place)} className="mt-1">
            {rowSentence(input.label, Number(place.split(".")[0]) + 1, message)}
          </p>
        ))}
      </div>
      <div className="mt-2 flex flex-wrap gap-x-4">
        <TextButton onClick={add} disabled={state.rows.length >= input.maxRows}>
          Add a row
        </TextButton>
        <PasteDialog input={input} onPaste={(text) => paste(text, 0, 0)} />
      </div>
    </fieldset>
  );
}

/** A sentence about a row, named once; those of the interface name table and row already. */
function rowSentence(table: string, row: number, message: string): string {
  const named = `${table}, row ${row}: `;
  return `Row ${row}: ${message.startsWith(named) ? message.slice(named.length) : message}`;
}

/** More columns than the pane of the inputs has room for; the names of materials are long. */
function isWide(columns: readonly Column[]): boolean {
  const widths = { number: 80, text: 98, choice: 98, material: 180 };
  return columns.reduce((sum, { kind }) => sum + widths[kind], 0) > 300;
}

function cellLook(columns: readonly Column[], index: number): string {
  const kind = columns[index]?.kind;
  const width = kind === "number" ? "w-[80px]" : "min-w-[98px]";
  const besideMaterial = columns.some((column) => column.kind === "material");
  const basis =
    kind === "material"
      ? "blocks:basis-[60%]"
      : besideMaterial
        ? "blocks:basis-[30%]"
        : "blocks:basis-[calc(50%-8px)]";
  const place = index === 0 ? "blocks:basis-[calc(100%-144px)]" : `blocks:order-2 ${basis}`;
  return `py-0.5 pr-1.5 align-middle blocks:min-w-0 blocks:flex-1 blocks:p-0 ${width} ${place}`;
}

function hasUnit(column: Column): column is Extract<Column, { kind: "number" }> {
  return column.kind === "number" && column.unit !== "1";
}

function RowButton({
  label,
  move,
  ...rest
}: {
  label: string;
  move: "up" | "down" | "none";
  disabled: boolean;
  onClick: () => void;
  children: React.ReactNode;
}) {
  return (
    <button
      type="button"
      aria-label={label}
      data-move={move}
      className="inline-flex size-6 items-center justify-center rounded text-muted hover:text-ink disabled:opacity-30 max-md:size-11"
      {...rest}
    />
  );
}
