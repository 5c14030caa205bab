import type { FrameLayout, PropertyName } from "@/lib/language";
import { type Quantity, quantityByName } from "@/lib/units";
import { type DeclaredNumber, declaredNumber } from "./declared-number";
import type { Column, Definition, Input, TableInput } from "./definition";
import { propertyQuantities } from "./property-quantity";

/** How each input of a definition is read into the frame of a run; made once for a definition. */

interface NumberPlan {
  readonly kind: "number";
  readonly symbol: string;
  readonly label: string;
  /** Place in `Frame.numbers` or `Frame.columns`. */
  readonly index: number;
  readonly number: DeclaredNumber;
}

export interface ChoicePlan {
  readonly kind: "choice";
  readonly symbol: string;
  readonly label: string;
  /** Place in `Frame.choices` or `Frame.choiceColumns`. */
  readonly index: number;
  readonly keys: readonly string[];
  readonly labels: readonly string[];
  readonly places: ReadonlyMap<string, number>;
  readonly default: string | null;
}

export interface MaterialPlan {
  readonly kind: "material";
  readonly symbol: string;
  readonly label: string;
  /** Place in `Frame.materials` or `Frame.columnMaterials`. */
  readonly index: number;
  readonly needs: readonly PropertyName[];
  /** Quantity of the constant that may stand in its place, else null. */
  readonly constant: Quantity | null;
  readonly fixed: boolean;
  readonly default: string | null;
}

interface TextPlan {
  readonly kind: "text";
  readonly symbol: string;
  readonly label: string;
  readonly maxLength: number;
}

export type CellPlan = NumberPlan | ChoicePlan | MaterialPlan | TextPlan;

export interface TablePlan {
  readonly kind: "table";
  readonly symbol: string;
  readonly label: string;
  readonly columns: readonly CellPlan[];
  readonly known: ReadonlySet<string>;
  readonly minRows: number;
  readonly maxRows: number;
  readonly defaultRows: TableInput["default"];
}

export type ValuePlan = NumberPlan | ChoicePlan | MaterialPlan | TablePlan;

export interface InputPlan {
  readonly value: ValuePlan;
  /** Condition under which it applies, as an index into the program's conditions; −1 for always. */
  readonly applies: number;
}

function place(
  column: Exclude<Column, { kind: "text" }> | Exclude<Input, { kind: "table" }>,
  table: string | null,
  layout: FrameLayout,
): number {
  const scalar = { number: layout.numbers, choice: layout.choices, material: layout.materials }[column.kind];
  if (table === null) return scalar.indexOf(column.symbol);
  const columns = {
    number: layout.columns,
    choice: layout.choiceColumns,
    material: layout.columnMaterials,
  }[column.kind];
  return columns.findIndex((entry) => entry.table === table && entry.column === column.symbol);
}

function cellPlan(
  column: Column | Exclude<Input, { kind: "table" }>,
  table: string | null,
  layout: FrameLayout,
): CellPlan {
  const { symbol, label } = column;
  if (column.kind === "text") return { kind: "text", symbol, label, maxLength: column.maxLength };
  const index = place(column, table, layout);
  switch (column.kind) {
    case "number": {
      const number = declaredNumber(column);
      if (!number) throw new TypeError(`${symbol} has no readable unit; the check must have refused it.`);
      return { kind: "number", symbol, label, index, number };
    }
    case "choice": {
      const keys = column.options.map(({ key }) => key);
      return {
        kind: "choice",
        symbol,
        label,
        index,
        keys,
        labels: column.options.map((option) => option.label),
        places: new Map(keys.map((key, i) => [key, i])),
        default: column.default ?? null,
      };
    }
    case "material": {
      const only = column.orConstant ? column.needs[0] : undefined;
      return {
        kind: "material",
        symbol,
        label,
        index,
        needs: column.needs,
        constant: only === undefined ? null : (quantityByName(propertyQuantities[only]) ?? null),
        fixed: "fixed" in column && column.fixed === true,
        default: column.default ?? null,
      };
    }
  }
}

function tablePlan(input: TableInput, layout: FrameLayout): TablePlan {
  return {
    kind: "table",
    symbol: input.symbol,
    label: input.label,
    columns: input.columns.map((column) => cellPlan(column, input.symbol, layout)),
    known: new Set(input.columns.map(({ symbol }) => symbol)),
    minRows: input.minRows,
    maxRows: input.maxRows,
    defaultRows: input.default,
  };
}

/** Plans in the order of the definition. `applies` finds the condition of a symbol, −1 for none. */
export function inputPlans(
  definition: Definition,
  layout: FrameLayout,
  applies: (symbol: string) => number,
): InputPlan[] {
  return definition.inputs.map((input) => ({
    value: input.kind === "table" ? tablePlan(input, layout) : (cellPlan(input, null, layout) as ValuePlan),
    applies: applies(input.symbol),
  }));
}
