"use client";

import { ArrowDown, ArrowUp, X } from "lucide-react";
import { useId, type ClipboardEvent } from "react";
import { TextButton } from "@/app/_components/ui/button";
import type { Column, TableInput as TableDeclaration } from "@/lib/calculation/definition";
import { cellState, type CellState, type RowState, type TableState } from "./form-state";
import { MaterialPicker } from "./material-input";
import { readAmount } from "./build-request";
import { UnitSelect } from "@/app/_components/unit-select";
import { convertText, unitsFor } from "./use-units";
import { rowsFromClipboard } from "./paste-rows";
import { PasteDialog } from "./paste-dialog";
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

const cellInput =
  "num h-[30px] w-full min-w-0 rounded border bg-field px-2 text-right text-[13px] font-medium max-md:h-11";

/** Rows of a table: typed, added, moved, removed, or pasted from a spreadsheet. */
export function TableInput({ input, state, materials, onChange, faults, fault }: Props) {
  const id = useId();
  const change = (rows: RowState[], units = state.units) =>
    onChange({ ...state, rows, units, origin: "typed" });
  const setCell = (index: number, symbol: string, cell: CellState) =>
    change(state.rows.map((row, at) => (at === index ? { cells: { ...row.cells, [symbol]: cell } } : row)));
  const move = (from: number, to: number) => {
    const rows = [...state.rows];
    const [row] = rows.splice(from, 1);
    if (row) rows.splice(to, 0, row);
    change(rows);
  };
  const add = () =>
    change([
      ...state.rows,
      {
        cells: Object.fromEntries(
          input.columns.map((column) => [
            column.symbol,
            cellState(column, undefined, state.units[column.symbol]),
          ]),
        ),
      },
    ]);
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
  const messages = Object.entries(faults);

  return (
    <fieldset
      className="min-w-0 border-t border-soft px-6 pb-4 pt-3 max-md:px-4"
      aria-describedby={`${id}-faults`}
    >
      <legend className="sr-only">{input.label}</legend>
      <h2 aria-hidden="true" className="mb-2">
        {input.label}
        {state.origin === "default" ? <small>default, not typed</small> : null}
      </h2>
      <div className="overflow-x-auto">
        <table className="w-full border-collapse">
          <thead>
            <tr>
              {input.columns.map((column) => (
                <th
                  key={column.symbol}
                  scope="col"
                  className="pb-1 pr-2 text-left align-bottom text-[12px] font-normal leading-4 text-muted"
                >
                  <span className="block">{column.label}</span>
                  {column.kind === "number" && column.unit !== "1" ? (
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
              <th className="w-[66px]">
                <span className="sr-only">Move or remove</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {state.rows.map((row, index) => (
              <tr key={index}>
                {input.columns.map((column, columnIndex) => (
                  <td
                    key={column.symbol}
                    className={`py-0.5 pr-1.5 align-middle ${column.kind === "number" ? "w-[80px]" : "min-w-[98px]"}`}
                  >
                    <Cell
                      column={column}
                      cell={row.cells[column.symbol]}
                      name={`${column.label}, row ${index + 1}`}
                      fault={faults[`${index}.${column.symbol}`] ?? faults[String(index)]}
                      materials={materials}
                      onChange={(cell) => setCell(index, column.symbol, cell)}
                      onPaste={(event) => {
                        if (paste(event.clipboardData.getData("text/plain"), index, columnIndex))
                          event.preventDefault();
                      }}
                    />
                  </td>
                ))}
                <td className="whitespace-nowrap text-right">
                  <RowButton
                    label={`Move row ${index + 1} up`}
                    disabled={index === 0}
                    onClick={() => move(index, index - 1)}
                  >
                    <ArrowUp size={14} aria-hidden="true" />
                  </RowButton>
                  <RowButton
                    label={`Move row ${index + 1} down`}
                    disabled={index === state.rows.length - 1}
                    onClick={() => move(index, index + 1)}
                  >
                    <ArrowDown size={14} aria-hidden="true" />
                  </RowButton>
                  <RowButton
                    label={`Remove row ${index + 1}`}
                    disabled={state.rows.length <= input.minRows}
                    onClick={() => change(state.rows.filter((_, at) => at !== index))}
                  >
                    <X size={14} aria-hidden="true" />
                  </RowButton>
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <div id={`${id}-faults`} className="text-[12px] leading-4 text-fault">
        {fault ? <p className="mt-1">{fault}</p> : null}
        {messages.map(([place, message]) => (
          <p key={place} className="mt-1">
            Row {Number(place.split(".")[0]) + 1}: {message}
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

function RowButton({
  label,
  ...rest
}: {
  label: string;
  disabled: boolean;
  onClick: () => void;
  children: React.ReactNode;
}) {
  return (
    <button
      type="button"
      aria-label={label}
      className="inline-flex size-[22px] items-center justify-center rounded text-muted hover:text-ink disabled:opacity-30 max-md:h-11 max-md:w-7"
      {...rest}
    />
  );
}

interface CellProps {
  column: Column;
  cell: CellState | undefined;
  name: string;
  fault?: string;
  materials: readonly MaterialChoice[];
  onChange: (cell: CellState) => void;
  onPaste: (event: ClipboardEvent) => void;
}

function Cell({ column, cell, name, fault, materials, onChange, onPaste }: CellProps) {
  const id = useId();
  const border = fault ? "border-fault" : "border-rule";
  if (cell?.kind === "number" && column.kind === "number") {
    const settle = () => {
      const amount = readAmount(column, cell.text, cell.unit);
      if (!amount.ok || amount.unit === cell.unit) return;
      const converted = convertText(amount.value, amount.unit, cell.unit, column.quantity);
      if (converted !== null) onChange({ ...cell, text: converted });
    };
    return (
      <input
        value={cell.text}
        onChange={(event) => onChange({ ...cell, text: event.target.value })}
        onBlur={settle}
        onPaste={onPaste}
        aria-label={name}
        aria-invalid={fault ? true : undefined}
        autoComplete="off"
        maxLength={80}
        className={`${cellInput} ${border}`}
      />
    );
  }
  if (cell?.kind === "text") {
    return (
      <input
        value={cell.text}
        onChange={(event) => onChange({ ...cell, text: event.target.value })}
        onPaste={onPaste}
        aria-label={name}
        maxLength={column.kind === "text" ? column.maxLength : 80}
        className={`h-[30px] w-full min-w-0 rounded border bg-field px-2 max-md:h-11 ${border}`}
      />
    );
  }
  if (cell?.kind === "choice" && column.kind === "choice") {
    return (
      <select
        value={cell.option}
        onChange={(event) => onChange({ ...cell, option: event.target.value })}
        aria-label={name}
        className={`h-[30px] w-full rounded border bg-field px-1 max-md:h-11 ${border}`}
      >
        {cell.option === "" ? <option value="">choose</option> : null}
        {column.options.map((option) => (
          <option key={option.key} value={option.key}>
            {option.label}
          </option>
        ))}
      </select>
    );
  }
  if (cell?.kind === "material" && column.kind === "material") {
    return (
      <MaterialPicker
        id={id}
        label={name}
        needs={column.needs}
        orConstant={column.orConstant}
        slug={cell.slug}
        constant={cell.constant}
        materials={materials}
        onPick={(slug, constant) => onChange({ ...cell, slug, constant })}
        fault={fault}
      />
    );
  }
  return null;
}
