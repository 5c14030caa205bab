import type { Evaluation, UsedCell, UsedValue } from "@/lib/calculation/evaluation";
import { fromSi, parseUnit, toSi, type ScaleKind } from "@/lib/units";

/** What a figure reads: a run as answered, with the steps when a line that is no result is drawn. */
export type Run = Pick<Evaluation, "inputs" | "results" | "steps">;

/** A number of a run in SI with the unit it is shown in. */
export interface Shown {
  readonly si: number;
  readonly unit: string;
}

function unitOf(text: string) {
  const reading = parseUnit(text);
  return reading.ok ? reading.value : null;
}

/** SI value of a number in a unit that a run has answered; temperatures as absolute. */
export function siOf(value: number, unit: string, kind: ScaleKind): number {
  const parsed = unitOf(unit);
  return parsed ? toSi(value, parsed, kind) : Number.NaN;
}

/** SI value in a unit for showing; temperatures as absolute. */
export function shownIn(si: number, unit: string, kind: ScaleKind): number {
  const parsed = unitOf(unit);
  return parsed ? fromSi(si, parsed, kind) : Number.NaN;
}

function isQuantity(
  cell: UsedValue | UsedCell | undefined,
): cell is { value: number; unit: string; ucum: string | null; si: number } {
  return cell !== undefined && "si" in cell;
}

/** A single number of the run by symbol: an input, a result, or a line. Null when the run has none. */
export function numberOf(run: Run, symbol: string, kind: ScaleKind): Shown | null {
  const input = run.inputs[symbol];
  if (isQuantity(input)) return { si: input.si, unit: input.unit };
  const source = run.results[symbol] ?? run.steps?.find((step) => step.symbol === symbol);
  if (source?.value === undefined) return null;
  return { si: siOf(source.value, source.unit, kind), unit: source.unit };
}

/** A list of the run by symbol, in SI. */
export function listOf(
  run: Run,
  symbol: string,
  kind: ScaleKind,
): { readonly si: number[]; readonly unit: string } | null {
  const source = run.results[symbol] ?? run.steps?.find((step) => step.symbol === symbol);
  if (!source?.values) return null;
  return { si: source.values.map((value) => siOf(value, source.unit, kind)), unit: source.unit };
}

/** Rows of a table input, or null. */
export function rowsOf(run: Run, symbol: string): Record<string, UsedCell>[] | null {
  const input = run.inputs[symbol];
  return input !== undefined && "rows" in input ? input.rows : null;
}

export { isQuantity };
