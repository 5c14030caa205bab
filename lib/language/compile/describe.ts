import { formatSignificant, siUnitSymbol } from "@/lib/units";
import type { Typed, TypedProgram } from "../types";

const longest = 100;
const digits = 6;

const precedence = { "+": 1, "-": 1, "*": 2, "/": 2, "^": 4 } as const;

/** A number of that type with its SI unit, for messages. */
export function describeValue(type: Typed["type"], value: number): string {
  if (Number.isNaN(value)) return "not a number";
  const number = Number.isFinite(value) ? shortNumber(value) : value > 0 ? "∞" : "−∞";
  const unit = type.is === "number" ? siUnitSymbol(type.dimension) : "1";
  return unit === "1" || unit === "" ? number : `${number} ${unit}`;
}

/** Six significant digits without zeros at the end: these are inputs and intermediate values, not results. */
function shortNumber(value: number): string {
  return formatSignificant(value, digits)
    .replace(/(\.\d*?)0+(?=$|·)/, "$1")
    .replace(/\.(?=$|·)/, "");
}

/** Text of an expression as the working would write it, cut when long. */
export function describeExpression(program: TypedProgram, typed: Typed): string {
  const text = write(program, typed, 0);
  return text.length > longest ? `${text.slice(0, longest)}…` : text;
}

function write(program: TypedProgram, typed: Typed, within: number): string {
  const part = (inner: Typed, level = 0): string => write(program, inner, level);
  const { layout } = program;
  switch (typed.node) {
    case "constant":
      return describeValue(typed.type, typed.value);
    case "input":
    case "line":
    case "slot":
      return typed.symbol;
    case "column":
      return `${typed.symbol}.${typed.column}`;
    case "option-field":
      return `a field of ${layout.choices[typed.choice] ?? "the choice"}`;
    case "column-option-field":
      return `a field of ${layout.choiceColumns[typed.choiceColumn]?.column ?? "the choice"}`;
    case "option-test":
      return `${layout.choices[typed.choice] ?? "choice"} ${typed.equal ? "==" : "!="} an option`;
    case "negate":
      return bracketed(`-${part(typed.operand, 3)}`, within > 1);
    case "not":
      return `not (${part(typed.operand)})`;
    case "arithmetic": {
      const level = precedence[typed.operator];
      const tight = typed.operator === "^";
      const left = part(typed.left, tight ? level + 1 : level);
      const right = part(typed.right, tight ? level : level + 1);
      const sign = level === 1 ? ` ${typed.operator} ` : typed.operator;
      return bracketed(`${left}${sign}${right}`, within > level);
    }
    case "comparison":
    case "logic":
      return bracketed(`${part(typed.left, 1)} ${typed.operator} ${part(typed.right, 1)}`, within > 0);
    case "conditional":
      return bracketed(
        `${part(typed.condition)} ? ${part(typed.whenTrue)} : ${part(typed.whenFalse)}`,
        within > 0,
      );
    case "call":
      return `${typed.function}(${typed.arguments.map((each) => part(each)).join(", ")})`;
    case "function-call": {
      const name = program.functions[typed.instance]?.name ?? "function";
      return `${name}(${typed.arguments.map((each) => part(each)).join(", ")})`;
    }
    case "property": {
      const { material } = typed;
      const column = layout.columnMaterials[material.index];
      const owner =
        material.from === "input" ? layout.materials[material.index] : `${column?.table}.${column?.column}`;
      const suffix = typed.operation === "value" ? "" : `_${typed.operation}`;
      return `${owner}.${typed.property}${suffix}(${typed.arguments.map((each) => part(each)).join(", ")})`;
    }
    case "balance":
    case "argmin":
    case "integral":
    case "series":
      return `${typed.node}(…, ${part(typed.lower)}, ${part(typed.upper)}, ${part(typed.body)})`;
    case "fixed-point":
      return `fixed_point(…, ${part(typed.start)}, ${part(typed.body)})`;
  }
}

function bracketed(text: string, brackets: boolean): string {
  return brackets ? `(${text})` : text;
}
