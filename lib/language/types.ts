/**
 * The stages of a working and what passes between them:
 *   text → tokens → syntax tree (`Expression`) → checked program (`TypedProgram`) → compiled code.
 * The checked program is the only thing that the compiler, the typesetter of values and (later) the
 * generator of derivatives read; it knows no text.
 */
import type { Dimension, Quantity, Rational } from "@/lib/units";

/** Place in a working, lines and columns from 1, end exclusive. */
export interface Span {
  readonly line: number;
  readonly column: number;
  readonly endLine: number;
  readonly endColumn: number;
}

// ───────────────────────────── diagnostics

export type Severity = "error" | "warning" | "remark";

/** A mend that an editor can apply: replace the span by the text. */
export interface Mend {
  readonly title: string;
  readonly span: Span;
  readonly text: string;
}

export interface Diagnostic {
  /** Where in the definition, as a JSON pointer fragment: `#/working`, `#/limits/0/when`, `#/results/2/unit`. */
  readonly path: string;
  readonly line?: number;
  readonly column?: number;
  readonly endLine?: number;
  readonly endColumn?: number;
  readonly severity: Severity;
  /** Stable, kebab-case: `unit-mismatch`, `unknown-name`, `absolute-sum`, … */
  readonly code: string;
  /** A sentence in the trade's words. */
  readonly message: string;
  /** The likely mend in words. */
  readonly hint?: string;
  readonly mend?: Mend;
}

// ───────────────────────────── syntax tree

export type UnaryOperator = "-" | "+" | "not";
export type BinaryOperator =
  "+" | "-" | "*" | "/" | "^" | "==" | "!=" | "<" | "<=" | ">" | ">=" | "and" | "or";

export type Expression =
  | { readonly node: "number"; readonly value: number; readonly span: Span }
  | { readonly node: "text"; readonly text: string; readonly span: Span }
  | { readonly node: "name"; readonly name: string; readonly span: Span }
  /** `layers.t`, `finish.eps`; the object is a name or one more member. */
  | {
      readonly node: "member";
      readonly object: Expression;
      readonly member: string;
      readonly span: Span;
      readonly memberSpan: Span;
    }
  /** `f(x)`, `wall.k(T)`, `layers.material.k_mean(a, b)`: the callee is a name or a member. */
  | {
      readonly node: "call";
      readonly callee: Expression;
      readonly arguments: readonly Expression[];
      readonly span: Span;
    }
  | {
      readonly node: "unary";
      readonly operator: UnaryOperator;
      readonly operand: Expression;
      readonly span: Span;
    }
  | {
      readonly node: "binary";
      readonly operator: BinaryOperator;
      readonly left: Expression;
      readonly right: Expression;
      readonly span: Span;
    }
  | {
      readonly node: "conditional";
      readonly condition: Expression;
      readonly whenTrue: Expression;
      readonly whenFalse: Expression;
      readonly span: Span;
    };

/** One statement of a working. */
export type Statement =
  | {
      readonly statement: "line";
      readonly name: string;
      readonly nameSpan: Span;
      readonly expression: Expression;
      readonly span: Span;
      readonly note: string | null;
    }
  | {
      readonly statement: "function";
      readonly name: string;
      readonly nameSpan: Span;
      readonly parameters: readonly { readonly name: string; readonly span: Span }[];
      readonly expression: Expression;
      readonly span: Span;
      readonly note: string | null;
    };

// ───────────────────────────── types of values

/**
 * Temperature reading of a value whose dimension is temperature (language rules of weights):
 * weight 1 is an absolute temperature, 0 a difference, other weights are unfinished sums;
 * `none` marks a product or power that came from an absolute one and has no reading until `as_temperature`.
 * Values of every other dimension carry weight 0; a power of temperature (T⁴) may carry `none`, so that its root does.
 */
export type TemperatureReading = { readonly weight: Rational } | "none";

/** Length of a list: rows of that table plus a whole number; without a table, a known number. */
export interface ListLength {
  readonly table: string | null;
  readonly plus: number;
}

export interface NumberType {
  readonly is: "number";
  readonly dimension: Dimension;
  readonly temperature: TemperatureReading;
  /** null for a single number. */
  readonly length: ListLength | null;
  /** The literal 0, which fits any dimension except an absolute temperature. */
  readonly literalZero?: true;
}

// ───────────────────────────── checked program

export const propertyNames = ["k", "k_along", "k_across", "rho", "c", "eps", "rho_e", "mu"] as const;
export type PropertyName = (typeof propertyNames)[number];
export type PropertyOperation = "value" | "mean" | "integral";

/** Where a material is read from: index into `Frame.materials`, or into `Frame.columnMaterials`. */
export type MaterialSource =
  { readonly from: "input"; readonly index: number } | { readonly from: "column"; readonly index: number };

interface TypedBase {
  readonly type: NumberType | { readonly is: "condition" };
  readonly span: Span;
}

/**
 * Every number in it is SI (kelvin for temperatures). Lists spread numbers; the type of a node says whether it is a
 * list, so a compiler needs no other rule: a list node with number operands computes element by element.
 */
export type Typed = TypedBase &
  (
    | { readonly node: "constant"; readonly value: number }
    /** Scalar number input: index into `Frame.numbers`. */
    | { readonly node: "input"; readonly index: number; readonly symbol: string }
    /** Number column of a table: index into `Frame.columns`. */
    | { readonly node: "column"; readonly index: number; readonly symbol: string; readonly column: string }
    /** Value of an earlier line: index into `TypedProgram.lines`. */
    | { readonly node: "line"; readonly index: number; readonly symbol: string }
    /** Parameter of the function instance being compiled, or a bound variable: unique slot in the program. */
    | { readonly node: "slot"; readonly slot: number; readonly symbol: string }
    /** A field of a chosen option: `values[i]` is the value (SI) for option i; NaN where the option lacks the field. */
    | { readonly node: "option-field"; readonly choice: number; readonly values: readonly number[] }
    /** The same for a choice column: element by element. */
    | {
        readonly node: "column-option-field";
        readonly choiceColumn: number;
        readonly values: readonly number[];
      }
    /** `case == "convection"`: is option `option` of choice `choice` taken? */
    | {
        readonly node: "option-test";
        readonly choice: number;
        readonly option: number;
        readonly equal: boolean;
      }
    | { readonly node: "negate"; readonly operand: Typed }
    | { readonly node: "not"; readonly operand: Typed }
    | {
        readonly node: "arithmetic";
        readonly operator: "+" | "-" | "*" | "/" | "^";
        readonly left: Typed;
        readonly right: Typed;
      }
    /** `tolerant`: in requires, limits and applies-when, equal within 1e-9 of the larger. */
    | {
        readonly node: "comparison";
        readonly operator: "==" | "!=" | "<" | "<=" | ">" | ">=";
        readonly left: Typed;
        readonly right: Typed;
        readonly tolerant: boolean;
      }
    | { readonly node: "logic"; readonly operator: "and" | "or"; readonly left: Typed; readonly right: Typed }
    | {
        readonly node: "conditional";
        readonly condition: Typed;
        readonly whenTrue: Typed;
        readonly whenFalse: Typed;
      }
    /** A function of the language by its row name (`functions.ts`). Whole-constant orders stay constant nodes. */
    | { readonly node: "call"; readonly function: string; readonly arguments: readonly Typed[] }
    /** A function of the working: index into `TypedProgram.functions`; arguments are evaluated once. */
    | { readonly node: "function-call"; readonly instance: number; readonly arguments: readonly Typed[] }
    | {
        readonly node: "property";
        readonly material: MaterialSource;
        readonly property: PropertyName;
        readonly operation: PropertyOperation;
        readonly arguments: readonly Typed[];
      }
    | {
        readonly node: "balance" | "argmin" | "integral";
        readonly slot: number;
        readonly lower: Typed;
        readonly upper: Typed;
        readonly body: Typed;
      }
    | {
        readonly node: "series";
        readonly slot: number;
        readonly lower: Typed;
        readonly upper: Typed;
        readonly body: Typed;
      }
    | { readonly node: "fixed-point"; readonly slot: number; readonly start: Typed; readonly body: Typed }
  );

/** One function of the working checked for one combination of argument types. */
export interface FunctionInstance {
  readonly name: string;
  readonly parameters: readonly {
    readonly slot: number;
    readonly symbol: string;
    readonly type: NumberType;
  }[];
  readonly body: Typed;
}

export interface TypedLine {
  readonly symbol: string;
  readonly type: NumberType;
  readonly expression: Typed;
  readonly span: Span;
  readonly note: string | null;
}

/** A condition of the definition. `owner` is the index in `requires` or `limits`, or the symbol it applies to. */
export interface TypedCondition {
  readonly role: "requires" | "limit" | "applies-when";
  readonly owner: number | string;
  readonly expression: Typed;
  /** Symbols of inputs named in it, for pointers. */
  readonly inputs: readonly string[];
  /** When the condition is one comparison: its sides, so that value and bound can be shown. */
  readonly compared: { readonly value: Typed; readonly bound: Typed } | null;
}

/** Order of everything that a run supplies. An index in the tree is a place in one of these. */
export interface FrameLayout {
  readonly numbers: readonly string[];
  readonly columns: readonly { readonly table: string; readonly column: string }[];
  readonly choices: readonly string[];
  readonly choiceColumns: readonly { readonly table: string; readonly column: string }[];
  readonly materials: readonly string[];
  readonly columnMaterials: readonly { readonly table: string; readonly column: string }[];
}

export interface TypedProgram {
  readonly layout: FrameLayout;
  readonly functions: readonly FunctionInstance[];
  readonly lines: readonly TypedLine[];
  readonly conditions: readonly TypedCondition[];
  readonly slots: number;
  /** A special form occurs: run it where it can be ended from outside. */
  readonly iterates: boolean;
  /** Nodes after functions are expanded. */
  readonly size: number;
}

// ───────────────────────────── what the checker is given

export interface OptionField {
  readonly value: number;
  readonly unit: string;
}

export type ColumnDeclaration =
  | {
      readonly kind: "number";
      readonly symbol: string;
      readonly label: string;
      readonly quantity: string;
      readonly unit: string;
    }
  | {
      readonly kind: "choice";
      readonly symbol: string;
      readonly label: string;
      readonly options: readonly {
        readonly key: string;
        readonly values: Readonly<Record<string, OptionField>>;
      }[];
    }
  | {
      readonly kind: "material";
      readonly symbol: string;
      readonly label: string;
      readonly needs: readonly PropertyName[];
    }
  | { readonly kind: "text"; readonly symbol: string; readonly label: string };

export type InputDeclaration =
  | Exclude<ColumnDeclaration, { kind: "text" }>
  | {
      readonly kind: "table";
      readonly symbol: string;
      readonly label: string;
      readonly columns: readonly ColumnDeclaration[];
      readonly minRows: number;
      readonly maxRows: number;
    };

export interface ConditionSource {
  readonly role: TypedCondition["role"];
  readonly owner: number | string;
  readonly path: string;
  readonly text: string;
}

export interface ResultSource {
  readonly symbol: string;
  readonly quantity: string;
  readonly unit: string;
  readonly list: boolean;
  /** Path of the result in the definition, `#/results/0`. */
  readonly path: string;
}

/** What a working is checked against. `requires` and `applies-when` see inputs only; limits see every line. */
export interface ProgramSource {
  readonly inputs: readonly InputDeclaration[];
  readonly working: string;
  readonly conditions: readonly ConditionSource[];
  readonly results: readonly ResultSource[];
  /** Symbols that figures and messages read: they must exist and count as used. */
  readonly uses: readonly { readonly symbol: string; readonly path: string }[];
}

/** What was found about each statement, for margins and the typeset working. */
export interface LineReport {
  readonly symbol: string;
  readonly line: number;
  readonly endLine: number;
  readonly isFunction: boolean;
  /** Source text of the right-hand side. */
  readonly text: string;
  readonly note: string | null;
  readonly expression: Expression;
  /** null when the line has an error, or is a function. */
  readonly type: NumberType | null;
  readonly quantity: Quantity | null;
  /** Unit it is shown in: the declared one of a result, else the catalogue's preferred one. */
  readonly unit: string | null;
}

export interface CheckResult {
  readonly diagnostics: readonly Diagnostic[];
  readonly lines: readonly LineReport[];
  /** null while an error stands. */
  readonly program: TypedProgram | null;
}

// ───────────────────────────── running

/** How generated code reads a material. Temperatures in kelvin, values SI; lists of materials are arrays of readers. */
export interface PropertyReader {
  /**
   * `judged` is false while a solver iterates: outside the valid range the value at its end is answered then.
   * When judged, an argument outside the range throws `RunFault` `outside-validity`, unless the run allows extrapolation.
   */
  value(property: PropertyName, temperature: number, judged: boolean): number;
  mean(property: PropertyName, from: number, to: number, judged: boolean): number;
  integral(property: PropertyName, from: number, to: number, judged: boolean): number;
}

/** Everything that one run reads and writes; made by `newFrame(program)`, filled by the caller, reusable. All SI. */
export interface Frame {
  readonly numbers: Float64Array;
  readonly columns: Float64Array[];
  readonly choices: Int32Array;
  readonly choiceColumns: Int32Array[];
  readonly materials: PropertyReader[];
  readonly columnMaterials: PropertyReader[][];
  /** Values of the lines after `run`: a number, or a list for list lines. */
  readonly values: (number | Float64Array)[];
  /** Fuel left; a run begins with `startFuel`. */
  fuel: number;
}

export type RunFaultCode =
  | "not-finite"
  | "not-converged"
  | "no-solution"
  | "crossed-bounds"
  | "budget-exceeded"
  | "outside-validity"
  | "out-of-range";

/** What stopped a run: the sentence names line, operation and operands with units where it can. */
export class RunFault extends Error {
  readonly code: RunFaultCode;
  /** Symbol of the line being evaluated, when known. */
  readonly symbol: string | null;
  readonly line: number | null;
  readonly details: Readonly<Record<string, string | number>>;

  constructor(
    code: RunFaultCode,
    message: string,
    place: { symbol?: string | null; line?: number | null } = {},
    details: Readonly<Record<string, string | number>> = {},
  ) {
    super(message);
    this.name = "RunFault";
    this.code = code;
    this.symbol = place.symbol ?? null;
    this.line = place.line ?? null;
    this.details = details;
  }
}

export interface CompiledProgram {
  readonly program: TypedProgram;
  newFrame(): Frame;
  /** Evaluates the conditions of one role that need inputs only. Answers in the order of `program.conditions`. */
  holds(frame: Frame, condition: number): boolean;
  /** Sides of a condition that is one comparison (SI), after `run` for limits. */
  compared(frame: Frame, condition: number): { readonly value: number; readonly bound: number } | null;
  /** Runs all lines in order into `frame.values`. Throws `RunFault`. */
  run(frame: Frame): void;
}
