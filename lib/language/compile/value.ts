import type { ListLength, MaterialSource, PropertyName, PropertyOperation, Typed } from "../types";

type ComparisonOperator = Extract<Typed, { node: "comparison" }>["operator"];
type ArithmeticOperator = Extract<Typed, { node: "arithmetic" }>["operator"];
export type FormName = "balance" | "argmin" | "integral" | "series" | "fixed-point";

/** What a value is, apart from its operands. */
export type Operation =
  | { readonly is: "constant"; readonly value: number }
  | { readonly is: "input"; readonly index: number }
  | { readonly is: "column"; readonly index: number }
  /** A line that was finished elsewhere: read from the frame. */
  | { readonly is: "line"; readonly index: number }
  /** Variable of the special form at this depth (0 outermost). */
  | { readonly is: "bound"; readonly depth: number }
  | { readonly is: "option-field"; readonly choice: number; readonly values: readonly number[] }
  | {
      readonly is: "column-option-field";
      readonly choiceColumn: number;
      readonly values: readonly number[];
    }
  | {
      readonly is: "option-test";
      readonly choice: number;
      readonly option: number;
      readonly equal: boolean;
    }
  | { readonly is: "negate" }
  | { readonly is: "arithmetic"; readonly operator: ArithmeticOperator }
  | { readonly is: "comparison"; readonly operator: ComparisonOperator; readonly tolerant: boolean }
  | { readonly is: "not" }
  | { readonly is: "logic"; readonly operator: "and" | "or" }
  /** Operands: condition, when true, when false. */
  | { readonly is: "select" }
  | { readonly is: "call"; readonly name: string }
  /** The operand, judged finite where it is computed. */
  | { readonly is: "judged" }
  /** The first operand, computed after the others. */
  | { readonly is: "after" }
  | {
      readonly is: "property";
      readonly material: MaterialSource;
      readonly property: PropertyName;
      readonly operation: PropertyOperation;
    }
  /** Operands: lower, upper, body; of a fixed point: start, body. */
  | { readonly is: "form"; readonly form: FormName; readonly bound: Value; readonly site: number };

/**
 * One value of the program: equal values are one object, so an equal subexpression is computed once wherever the
 * place of its first computation is passed on the way to the second.
 */
export interface Value {
  readonly id: number;
  readonly operation: Operation;
  readonly operands: readonly Value[];
  /** null for a number or a condition. */
  readonly length: ListLength | null;
  /** Bit set of the depths of special forms whose variable it reads. */
  readonly free: number;
  /** Can be computed early without a fault: it neither stops the run nor is judged. */
  readonly still: boolean;
  /** Sums and products of inputs and variables: cheaper to compute in front of a conditional than twice. */
  readonly light: boolean;
  /** Reads a property, so that it must be evaluated once more, judged, when a solver has finished. */
  readonly reads: boolean;
  /** Places that use it. */
  uses: number;
}

/** Text that is equal for equal lengths. */
export function lengthKey(length: ListLength): string {
  return `${length.table ?? ""}|${length.plus}`;
}
