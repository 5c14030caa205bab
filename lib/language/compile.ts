import { assertGenerated } from "./compile/identifiers";
import { findNotFinite, formText, linePlace } from "./compile/diagnose";
import type { TolerantName } from "./compile/emit-number";
import { writeProgram } from "./compile/write-program";
import { tolerantComparisons } from "./runtime/comparison";
import { fixedPointList, fixedPointNumber } from "./runtime/fixed-point";
import { budgetExceeded, startFuel } from "./runtime/fuel";
import {
  elementAt,
  interpolateLinear,
  requireElements,
  requireLength,
  room,
  sameLength,
} from "./runtime/lists";
import { mathNames, power, scalarFunctions } from "./runtime/scalar";
import { solveArgmin, solveBalance, solveIntegral, wholeBound, type FormText } from "./runtime/solvers";
import { propertyNames, RunFault, type CompiledProgram, type Frame, type TypedProgram } from "./types";

/*
 * A typed program becomes a module of straight-line JavaScript in three steps, each in a file of compile/:
 *   graph          typed tree → values, equal ones once, functions of the working expanded in place
 *   write-program  values → code, line by line (emit-number, emit-list, emit-form), region by region
 *   identifiers    every word of the code is on a list, before `new Function` sees it
 * A fault is noticed cheaply (sums of judged values) and explained slowly (diagnose, a walk of the typed tree).
 *
 * Forward-mode derivatives fit beside this: `Graph` gives for each value its operands, so a second pass over the same
 * values appends for each one its tangent as one more value (product rule over `operands`, slope functions for calls,
 * implicit differentiation for a form from the tangents of its body), and the writer emits value and tangents in one
 * function whose common parts are shared like any equal subexpressions.
 */

const functions = {
  ...Object.fromEntries(Object.entries(scalarFunctions).filter(([name]) => !Object.hasOwn(mathNames, name))),
  power,
  elementAt,
  interpolateLinear,
  requireElements,
  requireLength,
  sameLength,
  wholeBound,
  budgetExceeded,
  room,
  ...({
    equalTo: tolerantComparisons["=="],
    unequalTo: tolerantComparisons["!="],
    below: tolerantComparisons["<"],
    atMost: tolerantComparisons["<="],
    above: tolerantComparisons[">"],
    atLeast: tolerantComparisons[">="],
  } satisfies Record<TolerantName, unknown>),
};

interface Runtime {
  balance(site: number, f: (x: number) => number, lower: number, upper: number): number;
  argmin(site: number, f: (x: number) => number, lower: number, upper: number): number;
  integral(site: number, f: (x: number) => number, lower: number, upper: number): number;
  readonly fixedPointNumber: typeof fixedPointNumber;
  readonly fixedPointList: typeof fixedPointList;
  notFinite(frame: Frame, from: number, to: number): void;
}

const methods = [
  ...([
    "balance",
    "argmin",
    "integral",
    "fixedPointNumber",
    "fixedPointList",
    "notFinite",
  ] satisfies (keyof Runtime)[]),
  ...Object.values(mathNames),
  "pow",
];

interface Generated {
  readonly run: (frame: Frame) => void;
  readonly holds: readonly ((frame: Frame) => boolean)[];
  /** Value and bound; 0 for a condition that is not one comparison. */
  readonly compared: readonly (readonly [(frame: Frame) => number, (frame: Frame) => number] | 0)[];
  readonly begin: (fuel: number) => void;
  readonly fuel: () => number;
  readonly at: () => number;
}

export interface CompileOptions {
  /** Fuel of one run; for tests of the limit. */
  readonly fuel?: number;
}

/**
 * Compiles a checked program. The result is used by one run at a time (it keeps scratch lists), with any number of
 * frames. Lists in `frame.values` belong to the frame and are written again by its next run: copy what must last.
 * `run`, `holds` and `compared` throw `RunFault` with line and symbol.
 */
export function compileProgram(program: TypedProgram, options: CompileOptions = {}): CompiledProgram {
  const { code, sites } = writeProgram(program);
  const names = Object.keys(functions);
  assertGenerated(code, { functions: names, methods, texts: propertyNames });
  const texts = sites.map(({ form }) => formText(form));
  const text = (site: number): FormText => texts[site]!;
  const runtime: Runtime = {
    balance: (site, f, lower, upper) => solveBalance(text(site), f, lower, upper),
    argmin: (site, f, lower, upper) => solveArgmin(text(site), f, lower, upper),
    integral: (site, f, lower, upper) => solveIntegral(text(site), f, lower, upper),
    fixedPointNumber,
    fixedPointList,
    notFinite: (frame, from, to) => findNotFinite(program, frame, from, to),
  };
  const make = new Function("X", ...names, code) as (...given: unknown[]) => Generated;
  const generated = make(runtime, ...Object.values(functions));
  const fuel = options.fuel ?? startFuel;

  function judgedCondition<T>(frame: Frame, index: number, evaluate: () => T): T {
    generated.begin(fuel);
    try {
      return evaluate();
    } catch (error) {
      throw explained(program, frame, error, -1 - index, null);
    }
  }

  return {
    program,
    newFrame: () => newFrame(program),
    holds: (frame, index) => judgedCondition(frame, index, () => generated.holds[index]!(frame)),
    compared(frame, index) {
      const sides = generated.compared[index];
      if (!sides) return null;
      return judgedCondition(frame, index, () => ({ value: sides[0](frame), bound: sides[1](frame) }));
    },
    run(frame) {
      generated.begin(fuel);
      try {
        generated.run(frame);
      } catch (error) {
        const line = generated.at();
        throw explained(program, frame, error, line, line);
      } finally {
        frame.fuel = generated.fuel();
      }
    },
  };
}

/**
 * Adds line and symbol to a fault. Where a value that is not finite was met, the slow walk names its operation.
 * @param line index of the line; null in a condition, −1 before the first line
 */
function explained(
  program: TypedProgram,
  frame: Frame,
  error: unknown,
  place: number,
  line: number | null,
): unknown {
  if (!(error instanceof RunFault) || error.symbol !== null) return error;
  // Lines are judged together, so an earlier one may be the true beginning of this fault.
  const earlier = line === null ? -1 : unfinishedBefore(frame, line);
  const suspect = earlier >= 0 ? earlier : error.code === "not-finite" && line !== -1 ? place : null;
  if (suspect !== null) {
    try {
      findNotFinite(program, frame, suspect, suspect);
    } catch (better) {
      if (better instanceof RunFault && better.code === "not-finite") return better;
    }
  }
  const named = line === null ? null : linePlace(program, line);
  if (!named) return error;
  return new RunFault(error.code, `${named.text}: ${error.message}`, named, error.details);
}

/** The first line before `line` whose value in the frame is not finite; −1 when there is none. */
function unfinishedBefore(frame: Frame, line: number): number {
  return frame.values
    .slice(0, Math.max(0, line))
    .findIndex((value) =>
      typeof value === "number" ? !Number.isFinite(value) : !value.every(Number.isFinite),
    );
}

/** A frame of the right shape. Columns are empty until the caller puts lists of equal length into each table. */
function newFrame(program: TypedProgram): Frame {
  const { layout } = program;
  const values: (number | Float64Array)[] = [];
  // Pushed one by one, a program without lists has its values in one packed array of doubles.
  for (const line of program.lines) values.push(line.type.length ? new Float64Array(0) : NaN);
  return {
    numbers: new Float64Array(layout.numbers.length),
    columns: layout.columns.map(() => new Float64Array(0)),
    choices: new Int32Array(layout.choices.length),
    choiceColumns: layout.choiceColumns.map(() => new Int32Array(0)),
    materials: [],
    columnMaterials: layout.columnMaterials.map(() => []),
    values,
    fuel: startFuel,
  };
}
