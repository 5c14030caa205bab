import { checkProgram, type ProgramSource, type PropertyReader } from "@/lib/language";
import { compileProgram, type CompileOptions } from "@/lib/language/compile";
import { RunFault, type CompiledProgram, type Frame, type TypedProgram } from "@/lib/language/types";

/** Values of a run by symbol: SI numbers, option indices, readers, and columns of tables as `table.column`. */
export type Given = Readonly<
  Record<string, number | readonly number[] | PropertyReader | readonly PropertyReader[]>
>;

/** A checked and compiled program with one frame. */
export class TestProgram {
  readonly typed: TypedProgram;
  readonly compiled: CompiledProgram;
  readonly frame: Frame;

  constructor(source: ProgramSource, options: CompileOptions = {}) {
    const check = checkProgram(source);
    if (!check.program) {
      throw new Error(
        check.diagnostics.map((each) => `${each.path} ${each.line}: ${each.message}`).join("\n"),
      );
    }
    this.typed = check.program;
    this.compiled = compileProgram(check.program, options);
    this.frame = this.compiled.newFrame();
  }

  /** Fills a frame without running. */
  fill(given: Given, frame = this.frame): this {
    const { layout } = this.typed;
    const value = <T>(key: string): T => {
      if (!(key in given)) throw new Error(`The test gives no ${key}.`);
      return given[key] as T;
    };
    const cell = <T>(at: { table: string; column: string }): T => value<T>(`${at.table}.${at.column}`);
    layout.numbers.forEach((symbol, i) => (frame.numbers[i] = value(symbol)));
    layout.choices.forEach((symbol, i) => (frame.choices[i] = value(symbol)));
    layout.materials.forEach((symbol, i) => (frame.materials[i] = value(symbol)));
    layout.columns.forEach((at, i) => (frame.columns[i] = Float64Array.from(cell<number[]>(at))));
    layout.choiceColumns.forEach((at, i) => (frame.choiceColumns[i] = Int32Array.from(cell<number[]>(at))));
    layout.columnMaterials.forEach((at, i) => (frame.columnMaterials[i] = [...cell<PropertyReader[]>(at)]));
    return this;
  }

  /** Runs and answers the values of all lines by symbol. */
  run(given: Given): Record<string, number | number[]> {
    this.fill(given).compiled.run(this.frame);
    return this.values();
  }

  values(frame = this.frame): Record<string, number | number[]> {
    return Object.fromEntries(
      this.typed.lines.map(({ symbol }, i) => {
        const value = frame.values[i]!;
        return [symbol, typeof value === "number" ? value : [...value]];
      }),
    );
  }

  /** The fault that stops the run. */
  fault(given: Given): RunFault {
    try {
      this.run(given);
    } catch (error) {
      if (error instanceof RunFault) return error;
      throw error;
    }
    throw new Error(`The run was not stopped: ${JSON.stringify(this.values())}`);
  }
}

/** A property that is a function of temperature, with its integral; every call is noted with its `judged` flag. */
export function reader(
  f: (temperature: number) => number,
  integral: (from: number, to: number) => number,
  calls: boolean[] = [],
): PropertyReader {
  return {
    value(_, temperature, judged) {
      calls.push(judged);
      return f(temperature);
    },
    integral(_, from, to, judged) {
      calls.push(judged);
      return integral(from, to);
    },
    mean(_, from, to, judged) {
      calls.push(judged);
      return from === to ? f(from) : integral(from, to) / (to - from);
    },
  };
}

/** Property that does not vary. */
export const constantReader = (value: number, calls: boolean[] = []): PropertyReader =>
  reader(
    () => value,
    (from, to) => value * (to - from),
    calls,
  );

/** Property linear in temperature. */
export const linearReader = (at0: number, slope: number): PropertyReader =>
  reader(
    (t) => at0 + slope * t,
    (from, to) => (to - from) * (at0 + (slope * (from + to)) / 2),
  );
