"use client";

import { useId, type ClipboardEvent } from "react";
import type { Column } from "@/lib/calculation/definition";
import { readAmount } from "./build-request";
import type { CellState } from "./form-state";
import { MaterialPicker } from "./material-input";
import type { MaterialChoice } from "./material-choice";
import { convertText } from "./use-units";

const cellInput =
  "num h-[30px] w-full min-w-0 rounded border bg-field px-2 text-right text-[13px] font-medium max-md:h-11";

interface CellProps {
  column: Column;
  cell: CellState | undefined;
  name: string;
  /** The element that says what is wrong with the cell, when something is. */
  faultId?: string;
  materials: readonly MaterialChoice[];
  onChange: (cell: CellState) => void;
  onPaste: (event: ClipboardEvent) => void;
}

/** One cell of a table: a text, a number in the unit of its column, an option or a material. */
export function TableCell({ column, cell, name, faultId, materials, onChange, onPaste }: CellProps) {
  const id = useId();
  const border = faultId ? "border-fault" : "border-(--field-rule)";
  const told = {
    "aria-label": name,
    "aria-invalid": faultId ? true : undefined,
    "aria-describedby": faultId,
  };
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
        {...told}
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
        {...told}
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
        {...told}
        className={`h-[30px] w-full rounded border bg-field pl-1 pr-6 max-md:h-11 ${border}`}
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
        faultId={faultId}
      />
    );
  }
  return null;
}
