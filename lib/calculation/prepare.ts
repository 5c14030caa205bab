import { CodedError } from "@/lib/core/errors";
import {
  type CheckResult,
  type CompiledProgram,
  type Frame,
  type LineReport,
  type NumberType,
  type Typed,
  type TypedProgram,
} from "@/lib/language";
import { compileProgram } from "@/lib/language/compile";
import {
  type Dimension,
  isTemperature,
  parseUnit,
  type Quantity,
  quantityByName,
  quantityForDimension,
  rationalToNumber,
  type ScaleKind,
  siUnitSymbol,
  type Unit,
  unitNotices,
} from "@/lib/units";
import type { Definition, Limit, Requirement, Result } from "./definition";
import { type InputPlan, inputPlans } from "./input-plan";
import { type MessagePart, messageParts } from "./message-text";
import { checkDefinition } from "./program";
import { type RunCost, runCost } from "./run-cost";

/** How a value of the run is shown. */
export interface Display {
  readonly unit: Unit;
  readonly kind: ScaleKind;
  /** Significant digits for people. */
  readonly digits: number;
}

interface LinePlan {
  readonly symbol: string;
  readonly index: number;
  readonly isList: boolean;
  readonly isAbsoluteTemperature: boolean;
  readonly display: Display;
  /** Source text of the right-hand side. */
  readonly text: string;
  readonly line: number;
}

interface ResultPlan {
  readonly declaration: Result;
  readonly quantity: Quantity;
  /** Place in `Frame.values`. */
  readonly index: number;
  readonly isList: boolean;
  readonly display: Display;
}

interface RequirePlan {
  readonly declaration: Requirement;
  readonly condition: number;
  readonly inputs: readonly string[];
  readonly message: readonly MessagePart[];
}

interface LimitPlan {
  readonly declaration: Limit;
  readonly condition: number;
  readonly label: readonly MessagePart[];
  readonly message: readonly MessagePart[];
  /** How value and bound are shown when the limit is one comparison of numbers: like a symbol, or in a unit. */
  readonly compared: { readonly symbol: string | null; readonly display: Display } | null;
}

/** A definition checked and compiled, with everything that a run needs. Used by one run at a time. */
export interface Prepared {
  readonly definition: Definition;
  readonly check: CheckResult;
  readonly program: TypedProgram;
  readonly compiled: CompiledProgram;
  /** Filled by each run anew. */
  readonly frame: Frame;
  readonly plans: readonly InputPlan[];
  readonly known: ReadonlySet<string>;
  readonly lines: readonly LinePlan[];
  readonly results: readonly ResultPlan[];
  readonly requires: readonly RequirePlan[];
  readonly limits: readonly LimitPlan[];
  readonly planOf: ReadonlyMap<string, InputPlan>;
  readonly lineOf: ReadonlyMap<string, LinePlan>;
  /** What the declared units mean, where they need a remark. */
  readonly unitRemarks: readonly string[];
  readonly cost: RunCost;
}

const usualDigits = 4;

function kindOf(type: NumberType): ScaleKind {
  if (!isTemperature(type.dimension)) return "plain";
  return type.temperature !== "none" && rationalToNumber(type.temperature.weight) === 1
    ? "absolute"
    : "difference";
}

function readable(text: string, quantity?: Quantity): Unit {
  const reading = parseUnit(text, quantity ? { expect: quantity } : {});
  if (!reading.ok) throw new TypeError(`${text}: ${reading.fault.message}`);
  return reading.value;
}

function usualUnit(dimension: Dimension, kind: ScaleKind): Unit {
  return readable(quantityForDimension(dimension, kind)?.unit ?? siUnitSymbol(dimension));
}

function typeOf(typed: Typed): NumberType | null {
  return typed.type.is === "number" ? typed.type : null;
}

function linePlans(
  program: TypedProgram,
  reports: readonly LineReport[],
  results: readonly Result[],
): LinePlan[] {
  const reportOf = new Map(reports.map((report) => [report.symbol, report]));
  return program.lines.map((line, index) => {
    const report = reportOf.get(line.symbol);
    const result = results.find(({ symbol }) => symbol === line.symbol);
    const kind = kindOf(line.type);
    const unit = report?.unit ? readable(report.unit) : usualUnit(line.type.dimension, kind);
    return {
      symbol: line.symbol,
      index,
      isList: line.type.length !== null,
      isAbsoluteTemperature: kind === "absolute",
      display: { unit, kind, digits: result?.digits ?? usualDigits },
      text: report?.text ?? "",
      line: line.span.line,
    };
  });
}

function comparedPlan(
  compared: { readonly value: Typed; readonly bound: Typed } | null,
  lineOf: ReadonlyMap<string, LinePlan>,
  planOf: ReadonlyMap<string, InputPlan>,
): LimitPlan["compared"] {
  const type = compared && typeOf(compared.value);
  const boundType = compared && typeOf(compared.bound);
  if (!type || !boundType || type.length || boundType.length) return null;
  for (const side of [compared.value, compared.bound]) {
    if (side.node === "line") {
      const line = lineOf.get(side.symbol);
      if (line) return { symbol: side.symbol, display: line.display };
    }
    if (side.node === "input") {
      const plan = planOf.get(side.symbol)?.value;
      if (plan?.kind === "number") return { symbol: null, display: inputDisplay(plan.number) };
    }
  }
  const kind = kindOf(type);
  return { symbol: null, display: { unit: usualUnit(type.dimension, kind), kind, digits: usualDigits } };
}

export function inputDisplay(number: { readonly unit: Unit; readonly quantity: Quantity }): Display {
  return { unit: number.unit, kind: number.quantity.kind, digits: usualDigits };
}

function declaredRemarks(plans: readonly InputPlan[], results: readonly ResultPlan[]): string[] {
  const remarks = new Set<string>();
  const add = (unit: Unit) => unitNotices(unit).forEach((remark) => remarks.add(remark));
  for (const { value } of plans) {
    for (const cell of value.kind === "table" ? value.columns : [value]) {
      if (cell.kind === "number") add(cell.number.unit);
    }
  }
  for (const { display } of results) add(display.unit);
  return [...remarks];
}

/**
 * Checks and compiles a definition once. Throws `CodedError` `definition-invalid` with all diagnostics as `extra`.
 */
export function prepare(raw: Definition): Prepared {
  const { definition, check, diagnostics } = checkDefinition(raw);
  const program = check?.program;
  const errors = diagnostics.filter(({ severity }) => severity === "error");
  if (!definition || !check || !program || errors.length > 0) {
    const more = errors.length > 1 ? ` (and ${errors.length - 1} more)` : "";
    throw new CodedError(
      "definition-invalid",
      `The definition has errors. ${errors[0]?.message ?? "The working could not be checked."}${more}`,
      [],
      { diagnostics },
    );
  }
  const compiled = compileProgram(program);
  const conditionOf = (role: string, owner: number | string) =>
    program.conditions.findIndex((condition) => condition.role === role && condition.owner === owner);

  const plans = inputPlans(definition, program.layout, (symbol) => conditionOf("applies-when", symbol));
  const planOf = new Map(plans.map((plan) => [plan.value.symbol, plan]));
  const lines = linePlans(program, check.lines, definition.results);
  const lineOf = new Map(lines.map((line) => [line.symbol, line]));

  const results = definition.results.map((declaration): ResultPlan => {
    const quantity = quantityByName(declaration.quantity);
    const line = lineOf.get(declaration.symbol);
    if (!quantity || !line) throw new TypeError(`The result ${declaration.symbol} has no line.`);
    const display: Display = {
      unit: readable(declaration.unit, quantity),
      kind: quantity.kind,
      digits: declaration.digits ?? usualDigits,
    };
    return { declaration, quantity, index: line.index, isList: line.isList, display };
  });

  return {
    definition,
    check,
    program,
    compiled,
    frame: compiled.newFrame(),
    plans,
    known: new Set(planOf.keys()),
    lines,
    results,
    requires: definition.requires.map((declaration, i) => {
      const condition = conditionOf("requires", i);
      return {
        declaration,
        condition,
        inputs: program.conditions[condition]?.inputs ?? [],
        message: messageParts(declaration.message),
      };
    }),
    limits: definition.limits.map((declaration, i) => {
      const condition = conditionOf("limit", i);
      return {
        declaration,
        condition,
        label: messageParts(declaration.label),
        message: messageParts(declaration.message),
        compared: comparedPlan(program.conditions[condition]?.compared ?? null, lineOf, planOf),
      };
    }),
    planOf,
    lineOf,
    unitRemarks: declaredRemarks(plans, results),
    cost: runCost(program),
  };
}
