import { Parser } from "expr-eval";
import { all, create, type FactoryFunctionMap, type MathNode, type Unit } from "mathjs";
import { checkProgram, type ProgramSource } from "@/lib/language";
import { compileProgram } from "@/lib/language/compile";

export const math = create(all as FactoryFunctionMap);

/** What is measured: `run(i)` does one run on inputs that vary with i and answers a result, so that nothing is optimised away. */
export interface Contestant {
  readonly name: string;
  readonly run: (i: number) => number;
}

export function compiledRun(
  source: ProgramSource,
  given: Record<string, number | number[]>,
  vary: string,
  result: string,
): Contestant {
  const { program, diagnostics } = checkProgram(source);
  if (!program) throw new Error(diagnostics.map((each) => each.message).join("\n"));
  const compiled = compileProgram(program);
  const frame = compiled.newFrame();
  program.layout.numbers.forEach((symbol, i) => (frame.numbers[i] = given[symbol] as number));
  program.layout.choices.forEach((symbol, i) => (frame.choices[i] = given[symbol] as number));
  program.layout.columns.forEach(
    (at, i) => (frame.columns[i] = Float64Array.from(given[`${at.table}.${at.column}`] as number[])),
  );
  const place = program.layout.numbers.indexOf(vary);
  const line = program.lines.findIndex(({ symbol }) => symbol === result);
  const base = given[vary] as number;
  return {
    name: "compiled",
    run(i) {
      frame.numbers[place] = base * (1 + (i & 63) * 1e-3);
      compiled.run(frame);
      return frame.values[line] as number;
    },
  };
}

/** Last result by hand: kept, so that all of it has to be computed, as a compiled run computes all its lines. */
let kept: Record<string, number | number[]> = {};

export function byHand<T extends object>(
  f: (inputs: T) => Record<string, number | number[]>,
  given: T,
  vary: keyof T,
  result: string,
): Contestant {
  const inputs = { ...given };
  const base = given[vary] as number;
  return {
    name: "by hand",
    run(i) {
      (inputs as Record<keyof T, unknown>)[vary] = base * (1 + (i & 63) * 1e-3);
      kept = f(inputs);
      return kept[result] as number;
    },
  };
}

/** Lines `name = expression`, with functions of ours in the scope where the interpreter has none. */
export type Lines = readonly (readonly [string, string])[];

export function mathjsRun(
  lines: Lines,
  scope: Record<string, unknown>,
  vary: string,
  base: number,
  result: string,
): Contestant {
  const compiled = lines.map(([name, text]) => [name, (math.parse(text) as MathNode).compile()] as const);
  return {
    name: "mathjs numbers",
    run(i) {
      scope[vary] = base * (1 + (i & 63) * 1e-3);
      for (const [name, code] of compiled) scope[name] = code.evaluate(scope);
      return scope[result] as number;
    },
  };
}

export function unitsRun(
  lines: Lines,
  scope: Record<string, unknown>,
  vary: string,
  base: number,
  unit: string,
  result: string,
): Contestant {
  const compiled = lines.map(([name, text]) => [name, (math.parse(text) as MathNode).compile()] as const);
  return {
    name: "mathjs Units",
    run(i) {
      scope[vary] = math.unit(base * (1 + (i & 63) * 1e-3), unit);
      for (const [name, code] of compiled) scope[name] = code.evaluate(scope);
      const value = scope[result] as Unit | number;
      return typeof value === "number" ? value : value.toSI().toJSON().value;
    },
  };
}

export function exprEvalRun(
  lines: Lines,
  scope: Record<string, unknown>,
  vary: string,
  base: number,
  result: string,
): Contestant {
  const parser = new Parser();
  const functions = Object.entries(scope).filter(([, value]) => typeof value === "function");
  for (const [name, value] of functions) parser.functions[name] = value as (...values: number[]) => number;
  const values = Object.fromEntries(Object.entries(scope).filter(([, value]) => typeof value !== "function"));
  const parsed = lines.map(([name, text]) => [name, parser.parse(text)] as const);
  return {
    name: "expr-eval",
    run(i) {
      values[vary] = base * (1 + (i & 63) * 1e-3);
      for (const [name, expression] of parsed)
        values[name] = expression.evaluate(values as Record<string, number>);
      return values[result] as number;
    },
  };
}
