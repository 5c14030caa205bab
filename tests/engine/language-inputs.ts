import {
  checkProgram,
  type ColumnDeclaration,
  type Diagnostic,
  type InputDeclaration,
  type ProgramSource,
} from "@/lib/language";
import type { PropertyName } from "@/lib/language";
import { isTemperature } from "@/lib/units";

/** Short ways to declare what a working is checked against. Labels play no part in the checks. */

type NumberDeclaration = Extract<ColumnDeclaration, { kind: "number" }>;
type ChoiceDeclaration = Extract<ColumnDeclaration, { kind: "choice" }>;
type MaterialDeclaration = Extract<ColumnDeclaration, { kind: "material" }>;

export function number(symbol: string, quantity: string, unit: string): NumberDeclaration {
  return { kind: "number", symbol, label: symbol, quantity, unit };
}

export function text(symbol: string): ColumnDeclaration {
  return { kind: "text", symbol, label: symbol };
}

export function material(symbol: string, needs: readonly PropertyName[]): MaterialDeclaration {
  return { kind: "material", symbol, label: symbol, needs };
}

/** Options by key, or with the values of their fields: `{ bare: { eps: [0.9, "1"] } }`. */
export function choice(
  symbol: string,
  options: readonly string[] | Readonly<Record<string, Readonly<Record<string, readonly [number, string]>>>>,
): ChoiceDeclaration {
  const entries: [string, Readonly<Record<string, readonly [number, string]>>][] = Array.isArray(options)
    ? options.map((key: string) => [key, {}])
    : Object.entries(options);
  return {
    kind: "choice",
    symbol,
    label: symbol,
    options: entries.map(([key, fields]) => ({
      key,
      values: Object.fromEntries(
        Object.entries(fields).map(([name, [value, unit]]) => [name, { value, unit }]),
      ),
    })),
  };
}

export function table(symbol: string, columns: readonly ColumnDeclaration[], minRows = 1): InputDeclaration {
  return { kind: "table", symbol, label: symbol, columns, minRows, maxRows: 30 };
}

export interface ShortSource {
  readonly inputs?: readonly InputDeclaration[];
  readonly working: string;
  readonly requires?: readonly string[];
  readonly limits?: readonly string[];
  readonly results?: readonly (readonly [symbol: string, quantity: string, unit: string, list?: "list"])[];
  readonly appliesWhen?: Readonly<Record<string, string>>;
  readonly uses?: readonly string[];
}

export function sourceOf(short: ShortSource): ProgramSource {
  return {
    inputs: short.inputs ?? usualInputs,
    working: short.working,
    conditions: [
      ...(short.requires ?? []).map((that, i) => ({
        role: "requires" as const,
        owner: i,
        path: `#/requires/${i}/that`,
        text: that,
      })),
      ...Object.entries(short.appliesWhen ?? {}).map(([symbol, when]) => ({
        role: "applies-when" as const,
        owner: symbol,
        path: `#/inputs/${symbol}/appliesWhen`,
        text: when,
      })),
      ...(short.limits ?? []).map((when, i) => ({
        role: "limit" as const,
        owner: i,
        path: `#/limits/${i}/when`,
        text: when,
      })),
    ],
    results: (short.results ?? []).map(([symbol, quantity, unit, list], i) => ({
      symbol,
      quantity,
      unit,
      list: list === "list",
      path: `#/results/${i}`,
    })),
    uses: (short.uses ?? []).map((symbol, i) => ({ symbol, path: `#/figures/${i}` })),
  };
}

/** Inputs of every kind, under the names that the tests of the checker use. */
export const usualInputs: readonly InputDeclaration[] = [
  number("T1", "temperature", "°C"),
  number("T2", "temperature", "°C"),
  number("dT", "temperature difference", "K"),
  number("h", "heat transfer coefficient", "W/(m²·K)"),
  number("k", "thermal conductivity", "W/(m·K)"),
  number("q", "heat flux", "W/m²"),
  number("L", "length", "mm"),
  number("A", "area", "m²"),
  number("n", "ratio", "1"),
  number("eps", "emissivity", "1"),
  choice("tip", { bare: { e: [0.9, "1"], d: [2, "mm"] }, clad: { e: [0.1, "1"] } }),
  material("wall", ["k", "c"]),
  table("layers", [
    text("name"),
    number("t", "length", "mm"),
    number("T", "temperature", "°C"),
    material("material", ["k"]),
    choice("finish", { dull: { e: [0.9, "1"] }, bright: { e: [0.1, "1"] } }),
  ]),
  table("pipes", [number("d", "length", "mm")], 0),
];

/** Everything found but remarks on what is not used. */
export function findings(working: string, short: Omit<ShortSource, "working"> = {}): readonly Diagnostic[] {
  return checkProgram(sourceOf({ working, ...short })).diagnostics.filter(
    (diagnostic) => !diagnostic.code.startsWith("unused-"),
  );
}

/** `line:column-endColumn code` of each finding. */
export function places(working: string, short: Omit<ShortSource, "working"> = {}): readonly string[] {
  return findings(working, short).map(
    ({ line, column, endColumn, code }) => `${line ?? 0}:${column ?? 0}-${endColumn ?? 0} ${code}`,
  );
}

/** Type of the line that one expression makes: quantity, reading, list; the codes of what is wrong otherwise. */
export function typeOf(expression: string): string {
  const { lines, diagnostics } = checkProgram(sourceOf({ working: `y = ${expression}` }));
  const errors = diagnostics.filter((diagnostic) => diagnostic.severity === "error");
  const type = lines[0]?.type;
  if (errors.length > 0 || !type) return errors.map((diagnostic) => diagnostic.code).join(", ");
  const unread = type.temperature === "none" && isTemperature(type.dimension);
  const name = unread ? "no reading" : (lines[0]?.quantity?.name ?? lines[0]?.unit ?? "");
  if (!type.length) return name;
  const { table: rows, plus } = type.length;
  return `${name} × ${rows ?? ""}${plus === 0 ? "" : plus > 0 ? `+${plus}` : plus}`;
}
