import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { Column, Input } from "@/lib/calculation/definition";
import type { GivenValue } from "@/lib/calculation/evaluation";
import { CodedError } from "@/lib/core/errors";
import { getRecord } from "@/lib/records/get-record";
import { recordNumberPattern } from "@/lib/records/schemas";
import type { RevisionView } from "@/lib/templates/schemas";
import {
  cellState,
  initialField,
  type CellState,
  type FieldState,
  type FormValues,
} from "./_components/form-state";

/** The form filled with what a record was given; undefined when there is no such record of this template. */
export async function formFromRecord(
  actor: Actor,
  view: RevisionView,
  number: string,
): Promise<FormValues | undefined> {
  if (!recordNumberPattern.test(number)) return undefined;
  try {
    const record = await getRecord(actor, { number });
    if (record.template !== view.template) return undefined;
    return {
      inputs: Object.fromEntries(
        view.definition.inputs.map((input) => [
          input.symbol,
          fieldFrom(input, record.given.inputs[input.symbol]),
        ]),
      ),
    };
  } catch (error) {
    if (error instanceof CodedError && error.code === "not-found") return undefined;
    throw error;
  }
}

function fieldFrom(input: Input, given: GivenValue | undefined): FieldState {
  const initial = initialField(input);
  if (given === undefined || given === null) return initial;
  if (initial.kind === "table" && input.kind === "table" && Array.isArray(given)) {
    const rows = given.map((row) => ({
      cells: Object.fromEntries(
        input.columns.map((column) => [column.symbol, cellFrom(column, row[column.symbol])]),
      ),
    }));
    return { ...initial, rows, origin: "record" };
  }
  if (initial.kind === "number") {
    if (typeof given === "number") return { ...initial, text: String(given), origin: "record" };
    if (typeof given === "object" && "value" in given)
      return { ...initial, text: String(given.value), unit: given.unit ?? initial.unit, origin: "record" };
  }
  if (initial.kind === "choice" && typeof given === "string")
    return { ...initial, option: given, origin: "record" };
  if (initial.kind === "material") {
    if (typeof given === "string")
      return { ...initial, slug: given.split("@")[0] ?? given, origin: "record" };
    if (typeof given === "object" && "value" in given)
      return {
        ...initial,
        slug: "",
        constant: { text: amountText(given), unit: given.unit ?? "" },
        origin: "record",
      };
  }
  return initial;
}

function amountText(given: { value: number; unit?: string }): string {
  return given.unit === undefined ? String(given.value) : `${given.value} ${given.unit}`;
}

function cellFrom(column: Column, given: unknown): CellState {
  if (
    column.kind === "number" &&
    typeof given === "object" &&
    given !== null &&
    "value" in given &&
    "unit" in given
  ) {
    return { kind: "number", text: `${String(given.value)} ${String(given.unit)}`, unit: column.unit };
  }
  if (column.kind === "material" && typeof given === "string")
    return { kind: "material", slug: given.split("@")[0] ?? given, constant: null };
  return cellState(column, given, undefined);
}
