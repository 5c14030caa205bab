import { checkProgram, parseWorking } from "@/lib/language";
import { compileProgram } from "@/lib/language/compile";
import { RunFault, type Frame, type Statement, type TypedProgram } from "@/lib/language/types";
import { Interpreter, type Inputs, type Material, type Option, type Value } from "./interpreter";
import { optionIndex, randomInputs, randomProgram, readerOf } from "./random-program";
import { Random } from "./random";
import { OracleFault } from "./vocabulary";

type Outcome = { readonly values: ReadonlyMap<string, Value> } | { readonly fault: string };

const relativeTolerance = 1e-10;
/** Disturbance of each operation, and how much of the spread it causes is tolerated beside. */
const noise = 1e-13;
const spreadFactor = 30;

/** Checks, compiles and runs the random program of a seed, and compares with the oracle; answers what disagrees. */
export function disagreements(seed: number): string[] {
  const { working, runs } = randomProgram(seed);
  const check = checkProgram({ inputs: randomInputs, working, conditions: [], results: [], uses: [] });
  if (!check.program) {
    const errors = check.diagnostics.filter((each) => each.severity === "error");
    return [
      `refused: ${errors.map((each) => `${each.line}:${each.column} ${each.message}`).join(" | ")}\n${working}`,
    ];
  }
  const { program } = check;
  const { statements } = parseWorking(working);
  const compiled = compileProgram(program);
  const frame = compiled.newFrame();
  return runs.flatMap((inputs, run) => {
    fill(frame, program, inputs);
    const got = compiledOutcome(program, () => compiled.run(frame), frame);
    const wanted = oracleOutcome(statements, inputs);
    const difference = compare(got, wanted, () => disturbedOutcomes(statements, inputs, seed));
    return difference ? [`run ${run}: ${difference}\n${working}\n${JSON.stringify(inputs)}`] : [];
  });
}

function fill(frame: Frame, program: TypedProgram, inputs: Inputs): void {
  const { layout } = program;
  const cell = (each: { table: string; column: string }): Value =>
    (inputs[each.table] as Record<string, Value>)[each.column]!;
  layout.numbers.forEach((symbol, i) => (frame.numbers[i] = inputs[symbol] as number));
  layout.choices.forEach((symbol, i) => (frame.choices[i] = optionIndex(inputs[symbol] as Option)));
  layout.materials.forEach((symbol, i) => (frame.materials[i] = readerOf(inputs[symbol] as Material)));
  layout.columns.forEach((each, i) => (frame.columns[i] = Float64Array.from(cell(each) as number[])));
  layout.choiceColumns.forEach(
    (each, i) => (frame.choiceColumns[i] = Int32Array.from((cell(each) as Option[]).map(optionIndex))),
  );
  layout.columnMaterials.forEach(
    (each, i) => (frame.columnMaterials[i] = (cell(each) as Material[]).map(readerOf)),
  );
}

function compiledOutcome(program: TypedProgram, run: () => void, frame: Frame): Outcome {
  try {
    run();
  } catch (error) {
    if (error instanceof RunFault) return { fault: `${error.code} in ${error.symbol}` };
    throw error;
  }
  return {
    values: new Map(
      program.lines.map((line, i) => {
        const value = frame.values[i]!;
        return [line.symbol, typeof value === "number" ? value : [...value]];
      }),
    ),
  };
}

function oracleOutcome(statements: readonly Statement[], inputs: Inputs, disturb?: () => number): Outcome {
  try {
    return { values: new Interpreter(inputs, disturb ? { noise: disturb } : {}).run(statements) };
  } catch (error) {
    if (error instanceof OracleFault) return { fault: `${error.code} in ${error.symbol}` };
    throw error;
  }
}

function disturbedOutcomes(statements: readonly Statement[], inputs: Inputs, seed: number): Outcome[] {
  return [1, 2, 3].map((which) => {
    const random = new Random(seed * 7 + which);
    return oracleOutcome(statements, inputs, () => (2 * random.next() - 1) * noise);
  });
}

/** null when both agree within rounding, which the disturbed runs of the oracle tell. */
function compare(got: Outcome, wanted: Outcome, disturbed: () => Outcome[]): string | null {
  const difference = compareWithin(got, wanted, []);
  return difference === null ? null : compareWithin(got, wanted, disturbed());
}

function compareWithin(got: Outcome, wanted: Outcome, disturbed: readonly Outcome[]): string | null {
  if ("fault" in got || "fault" in wanted) {
    const [mine, theirs] = [got, wanted].map((each) => ("fault" in each ? each.fault : "values"));
    const known = [theirs, ...disturbed.map((each) => ("fault" in each ? each.fault : "values"))];
    return known.includes(mine) ? null : `${mine}, where the oracle has ${theirs}`;
  }
  for (const [symbol, value] of wanted.values) {
    const mine = numbersOf(got.values.get(symbol)!);
    const theirs = numbersOf(value);
    if (mine.length !== theirs.length)
      return `${symbol} has ${mine.length} values, the oracle ${theirs.length}`;
    for (const [i, x] of theirs.entries()) {
      const spread = disturbed.map((each) =>
        "fault" in each ? Infinity : Math.abs(numbersOf(each.values.get(symbol)!)[i]! - x),
      );
      const allowed = relativeTolerance * Math.abs(x) + spreadFactor * Math.max(0, ...spread);
      if (!(Math.abs(mine[i]! - x) <= allowed)) return `${symbol}[${i}] = ${mine[i]}, the oracle has ${x}`;
    }
  }
  return null;
}

function numbersOf(value: Value): number[] {
  return Array.isArray(value) ? (value as number[]) : [value as number];
}
