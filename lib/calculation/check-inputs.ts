import { nearestName } from "@/lib/core/nearest";
import type { Diagnostic } from "@/lib/language";
import { compatibleUnits, parseUnit, type Quantity, quantities, quantityByName, toSi } from "@/lib/units";
import { amountText } from "./amount-text";
import {
  absoluteZeroTolerance,
  boundsText,
  brokenBound,
  type DeclaredNumber,
  declaredNumber,
  type NumberDeclaration,
} from "./declared-number";
import type { ChoiceInput, Column, Definition, Input, MaterialInput, TableInput } from "./definition";
import { propertyQuantities } from "./property-quantity";

/** Faults of inputs that neither the schema nor the check of the working sees. */

type Add = (path: string, code: string, message: string, hint?: string) => void;
type ChoiceDeclaration = Pick<ChoiceInput, "symbol" | "options" | "default">;
type MaterialDeclaration = Pick<MaterialInput, "symbol" | "needs" | "orConstant" | "default">;

/** Quantity by name, or a diagnostic that names the nearest one. */
export function checkQuantity(name: string, path: string, add: Add): Quantity | null {
  const quantity = quantityByName(name);
  if (quantity) return quantity;
  const near = nearestName(
    name,
    quantities.map((row) => row.name),
  );
  add(
    path,
    "unknown-quantity",
    `There is no quantity “${name}”.`,
    near === null ? "Choose one of the list of quantities." : `Did you mean “${near}”?`,
  );
  return null;
}

/** A unit that must measure a quantity; a diagnostic at `path` when it does not. */
export function checkUnit(text: string, quantity: Quantity, path: string, add: Add): boolean {
  const reading = parseUnit(text, { expect: quantity });
  if (reading.ok) return true;
  const offered = compatibleUnits(quantity).slice(0, 5).join(", ");
  add(path, reading.fault.code, reading.fault.message, `Units of ${quantity.name}: ${offered}.`);
  return false;
}

function checkNumber(declaration: NumberDeclaration, path: string, add: Add): void {
  const quantity = checkQuantity(declaration.quantity, `${path}/quantity`, add);
  if (!quantity || !checkUnit(declaration.unit, quantity, `${path}/unit`, add)) return;
  const number = declaredNumber(declaration);
  if (!number) return;
  const { min, max, above, below, usualMin, usualMax } = declaration;
  const low = Math.max(min ?? -Infinity, above ?? -Infinity);
  const high = Math.min(max ?? Infinity, below ?? Infinity);
  const open = low === above || high === below;
  if (low > high || (low === high && open)) {
    add(path, "crossed-bounds", `The bounds of ${declaration.label} leave no value: ${boundsText(number)}.`);
    return;
  }
  if (usualMin !== undefined && usualMax !== undefined && usualMin > usualMax) {
    add(
      `${path}/usualMin`,
      "crossed-bounds",
      `The usual range of ${declaration.label} ends below its beginning.`,
    );
  }
  if (declaration.default !== undefined) checkValue(number, declaration.default, `${path}/default`, add);
  const uncertaintyUnit = declaration.uncertainty?.unit;
  if (uncertaintyUnit !== undefined) {
    const difference =
      quantity.kind === "absolute" ? (quantityByName("temperature difference") ?? quantity) : quantity;
    checkUnit(uncertaintyUnit, difference, `${path}/uncertainty/unit`, add);
  }
}

/** A declared value (in the declared unit) within its bounds and above absolute zero. */
function checkValue(number: DeclaredNumber, value: number, path: string, add: Add): void {
  const si = toSi(value, number.unit, number.quantity.kind);
  const text = amountText(value, number.unit.symbol);
  if (number.quantity.kind === "absolute" && si < absoluteZeroTolerance) {
    add(path, "out-of-range", `${number.label}: the default ${text} lies below absolute zero.`);
    return;
  }
  const broken = brokenBound(number, si);
  if (broken)
    add(path, "out-of-range", `${number.label}: the default is ${text}. It must be ${broken.expected}.`);
}

function checkChoice(choice: ChoiceDeclaration, path: string, add: Add): void {
  const keys = choice.options.map(({ key }) => key);
  keys.forEach((key, i) => {
    if (keys.indexOf(key) !== i)
      add(`${path}/options/${i}/key`, "duplicate-option", `The option \`${key}\` occurs twice.`);
  });
  choice.options.forEach(({ values }, i) => {
    for (const [field, { unit }] of Object.entries(values ?? {})) {
      const reading = parseUnit(unit);
      if (!reading.ok)
        add(`${path}/options/${i}/values/${field}/unit`, reading.fault.code, reading.fault.message);
    }
  });
  if (choice.default !== undefined && !keys.includes(choice.default))
    unknownOption(choice, choice.default, `${path}/default`, add);
}

function unknownOption(choice: ChoiceDeclaration, key: string, path: string, add: Add): void {
  const keys = choice.options.map((option) => option.key);
  const near = nearestName(key, keys);
  add(
    path,
    "unknown-option",
    `\`${key}\` is no option of \`${choice.symbol}\`.`,
    near === null ? `Options: ${keys.join(", ")}.` : `Did you mean \`${near}\`?`,
  );
}

function checkMaterialDeclaration(material: MaterialDeclaration, path: string, add: Add): void {
  if (material.orConstant && material.needs.length !== 1) {
    add(
      `${path}/orConstant`,
      "constant-for-several",
      `\`${material.symbol}\` needs ${material.needs.join(", ")}; a constant can stand for one property only.`,
      "Ask for one property, or drop orConstant.",
    );
  }
}

function checkColumn(column: Column, path: string, add: Add): void {
  if (column.kind === "number") checkNumber(column, path, add);
  if (column.kind === "choice") checkChoice(column, path, add);
  if (column.kind === "material") checkMaterialDeclaration(column, path, add);
}

type Row = TableInput["default"][number];

function checkCell(column: Column, cell: Row[string] | undefined, path: string, add: Add): void {
  if (cell === undefined) {
    const optional = column.kind === "text" || column.default !== undefined;
    if (!optional) add(path, "missing-cell", `The default row has no \`${column.symbol}\`.`);
    return;
  }
  const wrong = (wanted: string) => add(path, "cell-kind", `\`${column.symbol}\` must be ${wanted} here.`);
  switch (column.kind) {
    case "text":
      if (typeof cell !== "string") wrong("a text");
      else if (cell.length > column.maxLength) wrong(`at most ${column.maxLength} characters`);
      return;
    case "choice":
      if (typeof cell !== "string") wrong("the key of an option");
      else if (!column.options.some(({ key }) => key === cell)) unknownOption(column, cell, path, add);
      return;
    case "material": {
      if (typeof cell === "string") return;
      const need = column.needs[0];
      const quantity = need === undefined ? undefined : quantityByName(propertyQuantities[need]);
      if (typeof cell === "number" || !column.orConstant || !quantity) {
        return wrong(column.orConstant ? "a material or a constant with unit" : "a material");
      }
      checkUnit(cell.unit, quantity, `${path}/unit`, add);
      return;
    }
    case "number": {
      if (typeof cell !== "number") return wrong("a number in the unit of its column");
      const number = declaredNumber(column);
      if (number) checkValue(number, cell, path, add);
    }
  }
}

function checkTable(table: TableInput, path: string, add: Add): void {
  table.columns.forEach((column, i) => checkColumn(column, `${path}/columns/${i}`, add));
  if (table.minRows > table.maxRows) {
    add(
      `${path}/minRows`,
      "crossed-bounds",
      `${table.label} asks for at least ${table.minRows} and at most ${table.maxRows} rows.`,
    );
  } else if (table.default.length < table.minRows || table.default.length > table.maxRows) {
    add(
      `${path}/default`,
      "default-rows",
      `${table.label} has ${table.default.length} default rows; it takes ${table.minRows} to ${table.maxRows}.`,
    );
  }
  const known = table.columns.map(({ symbol }) => symbol);
  table.default.forEach((row, i) => {
    for (const symbol of Object.keys(row)) {
      if (known.includes(symbol)) continue;
      const near = nearestName(symbol, known);
      add(
        `${path}/default/${i}/${symbol}`,
        "unknown-column",
        `\`${table.symbol}\` has no column \`${symbol}\`.`,
        near === null ? `Columns: ${known.join(", ")}.` : `Did you mean \`${near}\`?`,
      );
    }
    for (const column of table.columns) {
      checkCell(column, row[column.symbol], `${path}/default/${i}/${column.symbol}`, add);
    }
  });
}

function checkInput(input: Input, path: string, add: Add): void {
  switch (input.kind) {
    case "number":
      checkNumber(input, path, add);
      break;
    case "choice":
      checkChoice(input, path, add);
      break;
    case "table":
      checkTable(input, path, add);
      return;
    case "material":
      checkMaterialDeclaration(input, path, add);
      if (input.fixed && input.default === undefined) {
        add(
          `${path}/default`,
          "fixed-without-material",
          `\`${input.symbol}\` is fixed but names no material.`,
          "Give it as default.",
        );
      }
  }
  if (input.appliesWhen !== undefined && input.default === undefined) {
    add(
      path,
      "default-needed",
      `\`${input.symbol}\` applies only at times and has no default; the working needs a value while it does not apply.`,
      "Give a default.",
    );
  }
}

/** Diagnostics of every input: quantities, units, bounds, defaults, options, rows. */
export function checkInputs(definition: Definition): Diagnostic[] {
  const found: Diagnostic[] = [];
  const add: Add = (path, code, message, hint) =>
    found.push({ path, severity: "error", code, message, ...(hint !== undefined && { hint }) });
  definition.inputs.forEach((input, i) => checkInput(input, `#/inputs/${i}`, add));
  return found;
}
