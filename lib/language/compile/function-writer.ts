import type { FrameLayout, ListLength, MaterialSource } from "../types";
import type { ModuleWriter } from "./module-writer";
import { numberLiteral } from "./module-writer";
import { Region } from "./region";
import type { Value } from "./value";
import { emitCondition, emitNumber } from "./emit-number";
import { emitList, fillList } from "./emit-list";

/**
 * Writes one generated function of the frame `F`: what it reads of the frame comes first, then the code of the region
 * `top`. The parts that turn values into code are in emit-number, emit-list and emit-form.
 */
export class FunctionWriter {
  readonly top = Region.top();
  private readonly prologue: string[] = [];
  private readonly loaded = new Map<string, string>();
  /** Lines that a fault found here is looked for in; a condition is counted below zero. */
  range: { from: number; to: number };
  /** Depth of solvers whose trial evaluations are not judged around the code being written. */
  unjudged = 0;
  /** Special forms written so far. */
  forms = 0;
  /** Places written so far that can stop the run. */
  faults = 0;
  /** Places written so far that note a value which is not finite. */
  judgements = 0;

  constructor(
    readonly module: ModuleWriter,
    place: number,
  ) {
    this.range = { from: place, to: place };
  }

  get layout(): FrameLayout {
    return this.module.program.layout;
  }

  /** Code of the whole function body, without its `return`. */
  text(): string {
    return [...this.prologue, ...this.top.code].join("\n");
  }

  number(value: Value, region: Region): string {
    return emitNumber(this, value, region);
  }

  condition(value: Value, region: Region): string {
    return emitCondition(this, value, region);
  }

  /** Register of a buffer that holds the list (it may be longer than the list). */
  list(value: Value, region: Region): string {
    return emitList(this, value, region);
  }

  /** Writes the elements of a list (or one number for all of them) into a buffer. */
  fill(value: Value, into: string, length: ListLength): void {
    fillList(this, value, into, this.top, length);
  }

  assign(region: Region, prefix: string, expression: string): string {
    const name = this.module.name(prefix);
    region.code.push(`const ${name} = ${expression};`);
    return name;
  }

  /** Has the registers judged at the end of the region, or of the outermost one in which they are surely computed. */
  judge(register: string, region: Region): void {
    if (!region.judged.includes(register)) region.judged.push(register);
  }

  /** Writes the judgement of all registers noted in the region. The sum is finite when all are, unless it overflows. */
  flush(region: Region): void {
    if (region.judged.length === 0) return;
    const sum = region.judged.join(" + ");
    region.code.push(`if ((${sum}) * 0 !== 0) ${this.notFinite()};`);
    region.judged = [];
  }

  /** Statement for a value found not finite: the run stops if it is still so in the slow walk. */
  notFinite(): string {
    this.judgements++;
    const stop = `X.notFinite(F, ${numberLiteral(this.range.from)}, ${numberLiteral(this.range.to)})`;
    return this.unjudged > 0 ? `{ if (J) ${stop}; else Z = true; }` : stop;
  }

  /** "true", or the flag that says whether this evaluation is judged. */
  get judgedFlag(): string {
    return this.unjudged > 0 ? "J" : "true";
  }

  input(index: number): string {
    return this.load("r", `F.numbers[${index}]`);
  }

  choice(index: number): string {
    return this.load("q", `F.choices[${index}]`);
  }

  lineNumber(index: number): string {
    return this.load("r", `V[${index}]`);
  }

  lineList(index: number): string {
    return this.load("b", `V[${index}]`);
  }

  column(index: number): string {
    this.requireTable(this.layout.columns[index]?.table);
    return this.load("b", `F.columns[${index}]`);
  }

  choiceColumn(index: number): string {
    this.requireTable(this.layout.choiceColumns[index]?.table);
    return this.load("q", `F.choiceColumns[${index}]`);
  }

  material(source: MaterialSource): string {
    if (source.from === "input") return this.load("m", `F.materials[${source.index}]`);
    this.requireTable(this.layout.columnMaterials[source.index]?.table);
    return this.load("m", `F.columnMaterials[${source.index}]`);
  }

  /** Expression for the length of a list in this run. */
  length(length: ListLength): string {
    if (length.table === null) return String(length.plus);
    const rows = this.rows(length.table);
    if (length.plus === 0) return rows;
    const key = `length ${length.table} ${length.plus}`;
    const known = this.loaded.get(key);
    if (known) return known;
    return this.load("n", `${rows} + ${length.plus}`.replace("+ -", "- "), key);
  }

  /** Register of scratch room for a list of that length. */
  room(length: ListLength): string {
    const n = this.length(length);
    const buffer = this.module.buffer();
    const local = this.module.name("b");
    this.prologue.push(
      `if (${buffer}.length < ${n}) ${buffer} = new Float64Array(${n});`,
      `const ${local} = ${buffer};`,
    );
    return local;
  }

  /** Rows of a table; all columns of it that the program knows must agree. */
  private rows(table: string): string {
    const key = `rows ${table}`;
    const known = this.loaded.get(key);
    if (known) return known;
    const { columns, choiceColumns, columnMaterials } = this.layout;
    const lengths = [
      ...columns.flatMap((column, i) => (column.table === table ? [`F.columns[${i}].length`] : [])),
      ...choiceColumns.flatMap((column, i) =>
        column.table === table ? [`F.choiceColumns[${i}].length`] : [],
      ),
      ...columnMaterials.flatMap((column, i) =>
        column.table === table ? [`F.columnMaterials[${i}].length`] : [],
      ),
    ];
    const [first, ...others] = lengths;
    if (first === undefined) throw new Error(`Table ${table} has no column in the layout.`);
    const name = this.load("n", first, key);
    for (const other of others)
      this.prologue.push(`if (${other} !== ${name}) sameLength(${name}, ${other});`);
    return name;
  }

  private requireTable(table: string | undefined): void {
    if (table === undefined) throw new Error("A column is not in the layout.");
    this.rows(table);
  }

  private load(prefix: string, expression: string, key = expression): string {
    const known = this.loaded.get(key);
    if (known) return known;
    const name = this.module.name(prefix);
    this.prologue.push(`const ${name} = ${expression};`);
    this.loaded.set(key, name);
    return name;
  }
}
