import { dimensionKey, dimensionless, type Dimension, type Rational } from "@/lib/units";
import type {
  ColumnDeclaration,
  ListLength,
  MaterialSource,
  NumberType,
  Span,
  TemperatureReading,
  Typed,
} from "../types";
import { plain } from "./reading";

/** What the checker knows of an expression beside its tree; null stands for a value whose fault is already told. */
interface ValueBase {
  readonly typed: Typed;
  /** Nodes after functions are expanded. */
  readonly size: number;
  /** Special forms nested in it. */
  readonly forms: number;
}

export interface NumberValue extends ValueBase {
  readonly is: "number";
  readonly type: NumberType;
  /** Exact value where it is built of literals only. */
  readonly literal: Rational | null;
  /** It holds a constant or a power that makes a product with an absolute temperature a law of physics. */
  readonly law: boolean;
  /** Readings of the two sides, where it is a sum. */
  readonly sum?: { readonly operator: "+" | "-"; readonly left: NumberType; readonly right: NumberType };
}

export interface ConditionValue extends ValueBase {
  readonly is: "condition";
  readonly compared: { readonly value: Typed; readonly bound: Typed } | null;
}

type ChoiceDeclaration = Extract<ColumnDeclaration, { kind: "choice" }>;
type MaterialDeclaration = Extract<ColumnDeclaration, { kind: "material" }>;

/** A choice read whole. `table` is set for a choice column. */
export interface ChoiceValue {
  readonly is: "choice";
  readonly index: number;
  readonly declaration: ChoiceDeclaration;
  readonly table: string | null;
}

export interface MaterialValue {
  readonly is: "material";
  readonly source: MaterialSource;
  readonly declaration: MaterialDeclaration;
  readonly length: ListLength | null;
}

export type Value = NumberValue | ConditionValue | ChoiceValue | MaterialValue;

export function numberType(
  dimension: Dimension,
  temperature: TemperatureReading = plain,
  length: ListLength | null = null,
): NumberType {
  return { is: "number", dimension, temperature, length };
}

export const bareNumber: NumberType = numberType(dimensionless);
export const literalZero: NumberType = { ...bareNumber, literalZero: true };
export const condition = { is: "condition" } as const;

/** The same type with another length. */
export function withLength(type: NumberType, length: ListLength | null): NumberType {
  return type.length === length ? type : { ...type, length };
}

export function constantNode(value: number, type: NumberType, span: Span): Typed {
  return { node: "constant", value, type, span };
}

/** A number value around a node, its size and depth taken from its operands. */
export function numberValue(
  typed: Typed,
  type: NumberType,
  operands: readonly (NumberValue | ConditionValue)[],
  more: {
    readonly law?: boolean;
    readonly literal?: Rational | null;
    readonly sum?: NumberValue["sum"];
  } = {},
): NumberValue {
  return {
    is: "number",
    typed,
    type,
    literal: more.literal ?? null,
    law: more.law ?? false,
    size: operands.reduce((sum, operand) => sum + operand.size, 1),
    forms: operands.reduce((most, operand) => Math.max(most, operand.forms), 0),
    ...(more.sum && { sum: more.sum }),
  };
}

export function conditionValue(
  typed: Typed,
  operands: readonly (NumberValue | ConditionValue)[],
  compared: ConditionValue["compared"] = null,
): ConditionValue {
  return {
    is: "condition",
    typed,
    compared,
    size: operands.reduce((sum, operand) => sum + operand.size, 1),
    forms: operands.reduce((most, operand) => Math.max(most, operand.forms), 0),
  };
}

export function sameLength(a: ListLength, b: ListLength): boolean {
  return a.table === b.table && a.plus === b.plus;
}

/** One text per type, for remembering checked functions. */
export function typeKey(type: NumberType): string {
  const { temperature, length } = type;
  const reading = temperature === "none" ? "none" : `${temperature.weight.n}/${temperature.weight.d}`;
  const rows = length ? `${length.table ?? ""}+${length.plus}` : "";
  return `${dimensionKey(type.dimension)} ${reading} ${rows} ${type.literalZero ? "0" : ""}`;
}
