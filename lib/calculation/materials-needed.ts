import type { Definition, Input } from "./definition";
import type { GivenInputs, RowsRequest } from "./evaluation";
import type { CompiledMaterial } from "./compiled-material";
import type { Material } from "./material";

/** Revision of a material that a run may read. */
export interface MaterialSnapshot {
  readonly slug: string;
  readonly revision: number;
  readonly material: Material;
  /** Set by who keeps compiled materials; compiled for the one run otherwise. */
  readonly compiled?: CompiledMaterial;
}

/** By the name that the request asked for: `slug` or `slug@revision`. */
export type MaterialSnapshots = Readonly<Record<string, MaterialSnapshot>>;

/** Longest name that can be a material's: a slug and a revision. */
const longestName = 80;

function addName(value: unknown, names: Set<string>): void {
  if (typeof value === "string" && value !== "" && value.length <= longestName) names.add(value);
}

function addGiven(input: Input, given: unknown, names: Set<string>): void {
  if (input.kind === "material") {
    addName(given ?? input.default, names);
    // While it does not apply, the working still reads its default.
    if (input.appliesWhen !== undefined || input.fixed) addName(input.default, names);
    return;
  }
  if (input.kind !== "table") return;
  const columns = input.columns.filter((column) => column.kind === "material");
  if (columns.length === 0) return;
  const applies = input.appliesWhen === undefined;
  for (const rows of applies && Array.isArray(given) ? [given] : [input.default, given]) {
    if (!Array.isArray(rows)) continue;
    for (const row of rows as readonly unknown[]) {
      if (typeof row !== "object" || row === null) continue;
      for (const column of columns) {
        addName((row as Record<string, unknown>)[column.symbol] ?? column.default, names);
      }
    }
  }
}

function readsMaterials(input: Input): boolean {
  return (
    input.kind === "material" ||
    (input.kind === "table" && input.columns.some(({ kind }) => kind === "material"))
  );
}

/** Names of materials that a run with these inputs reads, defaults and fixed ones included; they may not exist. */
export function materialsNeeded(definition: Definition, inputs: GivenInputs): string[] {
  const names = new Set<string>();
  for (const input of definition.inputs) {
    if (readsMaterials(input)) addGiven(input, inputs[input.symbol], names);
  }
  return [...names];
}

/** The same for a request with many rows. */
export function materialsNeededForRows(definition: Definition, request: RowsRequest): string[] {
  const names = new Set<string>();
  for (const input of definition.inputs) {
    if (!readsMaterials(input)) continue;
    const common = request.common?.[input.symbol];
    for (const row of request.rows) {
      const given = row[input.symbol];
      addGiven(input, given === undefined ? common : given, names);
    }
  }
  return [...names];
}
