import type { ListLength, TypedProgram } from "../types";
import { FunctionWriter } from "./function-writer";
import { Graph, type Site } from "./graph";
import { ModuleWriter, numberLiteral } from "./module-writer";
import type { Value } from "./value";

/** Above this many nodes every line becomes a function of its own: V8 leaves very long functions unoptimised. */
const splitAbove = 3000;

export interface WrittenProgram {
  readonly code: string;
  readonly sites: readonly Site[];
}

/** Generates the module of a program: `run`, the conditions, and the state that a run reports. */
export function writeProgram(program: TypedProgram): WrittenProgram {
  const shared = new ModuleWriter(program);
  const functions: string[] = [];
  const run =
    program.size > splitAbove
      ? writeLinesApart(shared, functions)
      : writeFunction(shared, (writer) => {
          const graph = new Graph(program, shared.sites, (_, index) => values[index]!);
          const values: Value[] = [];
          for (const index of program.lines.keys()) values.push(writeLine(writer, graph, index));
          writer.flush(writer.top);
          return null;
        });
  const pairs: string[] = [];
  const conditions = program.conditions.map((condition, index) => {
    const place = -1 - index;
    const sides = condition.compared;
    pairs.push(
      sides === null
        ? "0"
        : `[${[sides.value, sides.bound]
            .map((side) =>
              writeFunction(
                shared,
                (writer) => {
                  const value = alone(shared).build(side);
                  return writer.number(value, writer.top);
                },
                place,
              ),
            )
            .join(", ")}]`,
    );
    return writeFunction(
      shared,
      (writer) => writer.condition(alone(shared).build(condition.expression), writer.top),
      place,
    );
  });
  const code = [
    '"use strict";',
    "let J = true;",
    "let Z = false;",
    "let U = 0;",
    "let A = 0;",
    "function N(F, r0, r1) { if (J) X.notFinite(F, r0, r1); Z = true; return false; }",
    ...shared.declarations,
    ...functions,
    `const run = ${run};`,
    `const holds = [${conditions.join(",\n")}];`,
    `const compared = [${pairs.join(",\n")}];`,
    "return {",
    "run, holds, compared,",
    "begin: (r0) => { J = true; Z = false; U = r0; A = -1; },",
    "fuel: () => U,",
    "at: () => A,",
    "};",
  ].join("\n");
  return { code, sites: shared.sites };
}

/** Graph whose lines are finished ones, read from the frame. */
function alone(shared: ModuleWriter): Graph {
  const { program, sites } = shared;
  return new Graph(program, sites, (graph, index) =>
    graph.value({ is: "line", index }, [], program.lines[index]?.type.length ?? null),
  );
}

/** Text of a function of the frame; `write` answers what it returns. */
function writeFunction(
  shared: ModuleWriter,
  write: (writer: FunctionWriter) => string | null,
  place = 0,
): string {
  const writer = new FunctionWriter(shared, place);
  const result = write(writer);
  const name = result === null ? null : writer.module.name("r");
  if (name !== null) writer.top.code.push(`const ${name} = ${result};`);
  writer.flush(writer.top);
  return `(F) => {\nconst V = F.values;\n${writer.text()}${name === null ? "" : `\nreturn ${name};`}\n}`;
}

function writeLinesApart(shared: ModuleWriter, functions: string[]): string {
  const names = [...shared.program.lines.keys()].map((index) => {
    const name = shared.name("l");
    const text = writeFunction(shared, (writer) => {
      writeLine(writer, alone(shared), index);
      return null;
    });
    functions.push(`const ${name} = ${text};`);
    return name;
  });
  return `(F) => {\n${names.map((name) => `${name}(F);`).join("\n")}\n}`;
}

/** Writes a line's value into the frame. Lines with special forms are judged apart, so that no solver works on a fault. */
function writeLine(writer: FunctionWriter, graph: Graph, index: number): Value {
  const { top } = writer;
  const line = writer.module.program.lines[index]!;
  const pending = [...top.judged];
  const pendingRange = { ...writer.range };
  if (pending.length === 0) writer.range.from = index;
  writer.range.to = index;
  const start = top.code.length;
  const [forms, faults] = [writer.forms, writer.faults];
  const value = graph.judge(graph.build(line.expression));
  if (line.type.length) writeList(writer, value, index, line.type.length);
  else top.code.push(`V[${index}] = ${writer.number(value, top)};`);
  const before: string[] = [];
  if (writer.forms > forms) {
    const own = top.judged.filter((register) => !pending.includes(register));
    if (pending.length > 0) {
      const { from, to } = pendingRange;
      before.push(`if ((${pending.join(" + ")}) * 0 !== 0) X.notFinite(F, ${numberLiteral(from)}, ${to});`);
    }
    top.judged = own;
    writer.range.from = index;
    writer.flush(top);
  }
  if (writer.faults > faults) before.push(`A = ${index};`);
  top.code.splice(start, 0, ...before);
  return value;
}

function writeList(writer: FunctionWriter, value: Value, index: number, length: ListLength): void {
  const { top } = writer;
  if (length.plus < 0) writer.faults++;
  const n = writer.length(length);
  const fits = `V[${index}].length === ${n}`;
  const room = writer.assign(top, "b", `${fits} ? V[${index}] : room(V, ${index}, ${n})`);
  writer.fill(value, room, length);
  if (value.length) top.registers.set(value.id, room);
}
