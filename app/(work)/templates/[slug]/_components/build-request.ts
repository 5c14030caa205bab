import type { Column, Definition, Input } from "@/lib/calculation/definition";
import type { GivenInputs, GivenValue } from "@/lib/calculation/evaluation";
import { parseAmount, quantityByName } from "@/lib/units";
import type { CellState, FieldState, FormValues } from "./form-state";

/** What a form's present texts mean: the inputs of a call, and a sentence for each text that cannot be read. */
export interface BuiltRequest {
  readonly inputs: GivenInputs;
  /** By field: `t`, or `layers.1.k` for a cell (rows from 0). */
  readonly faults: Readonly<Record<string, string>>;
  /** What was understood that might surprise, by field. */
  readonly notices: Readonly<Record<string, string>>;
}

type NumberLike = Extract<Input | Column, { kind: "number" }>;

/** A typed text as number and unit: the unit in the text wins over the field's. */
export function readAmount(declared: NumberLike, text: string, unit: string) {
  const label = declared.label;
  if (text.trim() === "") {
    return {
      ok: false as const,
      message: `${label} is empty. Type a number, with a unit if it is not in ${unit === "1" ? "plain numbers" : unit}.`,
    };
  }
  const expect = quantityByName(declared.quantity);
  const reading = parseAmount(text, { expect, shorthand: true });
  if (!reading.ok) return { ok: false as const, message: reading.fault.message };
  return {
    ok: true as const,
    value: reading.value.value,
    unit: reading.value.unit?.symbol ?? unit,
    notices: reading.notices,
  };
}

function cellValue(
  column: Column,
  cell: CellState,
  key: string,
  faults: Record<string, string>,
  notices: Record<string, string>,
) {
  if (cell.kind === "number" && column.kind === "number") {
    const amount = readAmount(column, cell.text, cell.unit);
    if (!amount.ok) faults[key] = amount.message;
    else {
      if (amount.notices[0]) notices[key] = amount.notices[0];
      return { value: amount.value, unit: amount.unit };
    }
  } else if (cell.kind === "choice") {
    if (cell.option === "") faults[key] = `${column.label} is not chosen.`;
    return cell.option;
  } else if (cell.kind === "material") {
    return materialValue(column.label, cell, key, faults);
  } else if (cell.kind === "text") {
    return cell.text;
  }
  return null;
}

function materialValue(
  label: string,
  state: { slug: string; constant: { text: string; unit: string } | null },
  key: string,
  faults: Record<string, string>,
) {
  if (!state.constant) {
    if (state.slug === "") faults[key] = `${label} is not chosen. Pick a material from the library.`;
    return state.slug;
  }
  const reading = parseAmount(state.constant.text);
  if (state.constant.text.trim() === "")
    faults[key] = `${label} is empty. Type a conductivity, or pick a material.`;
  else if (!reading.ok) faults[key] = reading.fault.message;
  else return { value: reading.value.value, unit: reading.value.unit?.symbol ?? state.constant.unit };
  return null;
}

function fieldValue(
  input: Input,
  state: FieldState,
  faults: Record<string, string>,
  notices: Record<string, string>,
): GivenValue {
  if (input.kind === "number" && state.kind === "number") {
    const amount = readAmount(input, state.text, state.unit);
    if (!amount.ok) {
      faults[input.symbol] = amount.message;
      return null;
    }
    if (amount.notices[0]) notices[input.symbol] = amount.notices[0];
    return { value: amount.value, unit: amount.unit };
  }
  if (input.kind === "choice" && state.kind === "choice") {
    if (state.option === "") faults[input.symbol] = `${input.label} is not chosen.`;
    return state.option;
  }
  if (input.kind === "material" && state.kind === "material")
    return materialValue(input.label, state, input.symbol, faults);
  if (input.kind === "table" && state.kind === "table") {
    return state.rows.map((row, index) =>
      Object.fromEntries(
        input.columns.flatMap((column) => {
          const cell = row.cells[column.symbol];
          return cell
            ? [
                [
                  column.symbol,
                  cellValue(column, cell, `${input.symbol}.${index}.${column.symbol}`, faults, notices),
                ],
              ]
            : [];
        }),
      ),
    );
  }
  return null;
}

/** Inputs of a call from the form. Untouched defaults are left out, so that the answer names them as defaulted. */
export function buildRequest(
  definition: Definition,
  values: FormValues,
  applies: (input: Input) => boolean,
): BuiltRequest {
  const inputs: GivenInputs = {};
  const faults: Record<string, string> = {};
  const notices: Record<string, string> = {};
  for (const input of definition.inputs) {
    const state = values.inputs[input.symbol];
    if (!state || state.origin === "default" || !applies(input)) continue;
    if (input.kind === "material" && input.fixed) continue;
    inputs[input.symbol] = fieldValue(input, state, faults, notices);
  }
  return { inputs, faults, notices };
}

/** Where a problem of the API belongs in the form: `#/inputs/layers/1/k` is `layers.1.k`. */
export function fieldOfPointer(definition: Definition, pointer: string): string | null {
  const [symbol = "", row, column] = pointer
    .replace(/^#\/inputs\//, "")
    .split("/")
    .map((part) => part.replace(/~1/g, "/").replace(/~0/g, "~"));
  const input = pointer.startsWith("#/inputs/")
    ? definition.inputs.find((candidate) => candidate.symbol === symbol)
    : undefined;
  if (!input) return null;
  if (input.kind !== "table" || row === undefined) return symbol;
  return column === undefined ? `${symbol}.${row}` : `${symbol}.${row}.${column}`;
}
