import {
  dimension,
  dimensionless,
  isTemperature,
  parseUnit,
  quantityByName,
  toSi,
  type Dimension,
  type ScaleKind,
} from "@/lib/units";
import type { Findings } from "../diagnostics";
import {
  languageConstants,
  languageFunctions,
  reservedWords,
  specialForms,
  type ConstantRow,
  type FunctionRow,
  type SpecialFormRow,
} from "../functions";
import type { ReadStatement } from "../parse";
import type {
  ColumnDeclaration,
  FrameLayout,
  InputDeclaration,
  NumberType,
  OptionField,
  PropertyName,
  TemperatureReading,
} from "../types";
import { absolute, plain } from "./reading";
import { numberType } from "./value";

/** Members that every JavaScript object has: as symbols they would be mistaken for data somewhere. */
const unusableNames: ReadonlySet<string> = new Set([
  ...reservedWords,
  "constructor",
  "prototype",
  "hasOwnProperty",
  "isPrototypeOf",
  "propertyIsEnumerable",
  "toLocaleString",
  "toString",
  "valueOf",
]);

export interface LineSymbol {
  readonly is: "line";
  readonly statement: number;
  readonly read: ReadStatement;
  /** Set when the line was checked without error: its place among the lines of the program, and what it is. */
  checked: { readonly index: number; readonly type: NumberType; readonly law: boolean } | null;
}

export interface FunctionSymbol {
  readonly is: "function";
  readonly statement: number;
  readonly read: ReadStatement;
}

interface InputSymbol {
  readonly is: "input";
  readonly declaration: InputDeclaration;
}

export type ProgramSymbol = LineSymbol | FunctionSymbol | InputSymbol;

/** Everything that a name can mean in one definition. */
export class Symbols {
  readonly own = new Map<string, ProgramSymbol>();
  readonly functions: ReadonlyMap<string, FunctionRow>;
  readonly forms: ReadonlyMap<string, SpecialFormRow>;
  readonly constants: ReadonlyMap<string, ConstantRow>;
  readonly layout: FrameLayout;

  constructor(inputs: readonly InputDeclaration[]) {
    this.functions = new Map(languageFunctions.map((row) => [row.name, row]));
    this.forms = new Map(specialForms.map((row) => [row.name, row]));
    this.constants = new Map(languageConstants.map((row) => [row.name, row]));
    this.layout = layoutOf(inputs);
  }

  /** What stands against using this name for something new, or null. */
  taken(name: string): string | null {
    if (unusableNames.has(name)) return `\`${name}\` cannot be used as a name.`;
    if (this.functions.has(name) || this.forms.has(name)) return `\`${name}\` is a function of the language.`;
    if (this.constants.has(name)) return `\`${name}\` is a constant of the language.`;
    const own = this.own.get(name);
    if (!own) return null;
    if (own.is === "input") return `\`${name}\` is an input already.`;
    return `\`${name}\` is defined on line ${own.read.nameSpan.line} already.`;
  }

  /** Enters the inputs; clashes are told at their place in the definition. */
  addInputs(inputs: readonly InputDeclaration[], findings: Findings): void {
    inputs.forEach((declaration, i) => {
      const taken = this.taken(declaration.symbol);
      if (taken)
        findings.at(`#/inputs/${i}/symbol`).add({
          code: "name-taken",
          message: taken,
          hint: "Choose another symbol.",
        });
      if (!this.own.has(declaration.symbol)) this.own.set(declaration.symbol, { is: "input", declaration });
      if (declaration.kind !== "table") return;
      const columns = new Set<string>();
      declaration.columns.forEach((column, j) => {
        const message = unusableNames.has(column.symbol)
          ? `\`${column.symbol}\` cannot be used as a name.`
          : columns.has(column.symbol)
            ? `the table \`${declaration.symbol}\` has two columns \`${column.symbol}\`.`
            : null;
        if (message)
          findings
            .at(`#/inputs/${i}/columns/${j}/symbol`)
            .add({ code: "name-taken", message, hint: "Choose another symbol." });
        columns.add(column.symbol);
      });
    });
  }

  /** Every name that can be read at the end of the working, for suggestions. */
  names(): string[] {
    return [...this.own.keys(), ...this.functions.keys(), ...this.forms.keys(), ...this.constants.keys()];
  }
}

function layoutOf(inputs: readonly InputDeclaration[]): FrameLayout {
  const symbols = (kind: InputDeclaration["kind"]) =>
    inputs.filter((input) => input.kind === kind).map((input) => input.symbol);
  const columns = (kind: ColumnDeclaration["kind"]) =>
    inputs.flatMap((input) =>
      input.kind === "table"
        ? input.columns
            .filter((column) => column.kind === kind)
            .map((column) => ({ table: input.symbol, column: column.symbol }))
        : [],
    );
  return {
    numbers: symbols("number"),
    columns: columns("number"),
    choices: symbols("choice"),
    choiceColumns: columns("choice"),
    materials: symbols("material"),
    columnMaterials: columns("material"),
  };
}

/** Type of a declared quantity and unit; null where neither can be read. */
export function declaredType(quantityName: string, unit: string): NumberType | null {
  const quantity = quantityByName(quantityName);
  if (quantity) return numberType(quantity.dimension, readingOf(quantity.kind));
  const reading = parseUnit(unit);
  return reading.ok ? numberType(reading.value.dimension, readingOf(scaleOf(reading.value))) : null;
}

export function readingOf(kind: ScaleKind): TemperatureReading {
  return kind === "absolute" ? absolute : plain;
}

/** A temperature in °C, °F, K or °R is absolute unless its unit says that it is a difference. */
export function scaleOf(unit: { readonly dimension: Dimension; readonly differenceOnly?: true }): ScaleKind {
  if (!isTemperature(unit.dimension)) return "plain";
  return unit.differenceOnly ? "difference" : "absolute";
}

/** A field of an option in SI with its type, or null where the unit cannot be read. */
export function optionField(
  field: OptionField,
): { readonly value: number; readonly type: NumberType } | null {
  const reading = parseUnit(field.unit);
  if (!reading.ok) return null;
  const kind = scaleOf(reading.value);
  return {
    value: toSi(field.value, reading.value, kind),
    type: numberType(reading.value.dimension, readingOf(kind)),
  };
}

const conductivity = dimension({ mass: 1, length: 1, time: -3, temperature: -1 });

/** Dimension of each property of a material. */
export const propertyDimensions: Readonly<Record<PropertyName, Dimension>> = {
  k: conductivity,
  k_along: conductivity,
  k_across: conductivity,
  rho: dimension({ mass: 1, length: -3 }),
  c: dimension({ length: 2, time: -2, temperature: -1 }),
  eps: dimensionless,
  rho_e: dimension({ mass: 1, length: 3, time: -3, "electric current": -2 }),
  mu: dimension({ mass: 1, length: -1, time: -1 }),
};
