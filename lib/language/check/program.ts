import { Findings, inReadingOrder, workingPath } from "../diagnostics";
import { limits } from "../limits";
import { readExpression, readWorking, type ReadStatement } from "../parse";
import type {
  CheckResult,
  ConditionSource,
  LineReport,
  NumberType,
  ProgramSource,
  TypedCondition,
  TypedLine,
} from "../types";
import { asCondition } from "./compare";
import { LimitMet, type Context, type ProgramState } from "./context";
import { check } from "./expression";
import { Place } from "./place";
import { judgeResults } from "./results";
import { declaredType, Symbols } from "./symbols";
import { judgeNames } from "./uncalled";
import { asNumber, finished } from "./unify";
import { remarkUnused } from "./unused";
import { shownIn } from "./shown";

/**
 * Reads and checks a working with its inputs, conditions and results. All errors are told together; the program is null
 * while one stands. Never throws for a text, and its time is bounded by the limits.
 */
export function checkProgram(source: ProgramSource): CheckResult {
  return new ProgramCheck(source).run();
}

class ProgramCheck {
  private readonly findings = new Findings(workingPath);
  private readonly state: ProgramState;
  private readonly reads: readonly ReadStatement[];
  private readonly lines: TypedLine[] = [];
  private readonly conditions: TypedCondition[] = [];
  private size = 0;
  /** A limit on the whole program was met: what is not yet checked stays unchecked. */
  private ended = false;

  constructor(private readonly source: ProgramSource) {
    const symbols = new Symbols(source.inputs);
    this.state = {
      symbols,
      working: Place.of(this.findings, source.working),
      instances: [],
      remembered: new Map(),
      used: new Set(),
      slots: 0,
      nodes: 0,
      depth: 0,
      iterates: false,
    };
    this.reads = readWorking(source.working, this.findings);
  }

  run(): CheckResult {
    const { source, state, findings } = this;
    state.symbols.addInputs(source.inputs, findings);
    this.judgeQuantities();
    this.declareStatements();
    this.judgeParameters();
    this.reads.forEach((read, i) => this.statement(read, i));
    source.conditions.forEach((condition) => this.condition(condition));
    judgeResults(source, state, findings);
    if (!this.ended) this.judgeUncalled();
    if (!this.ended) remarkUnused(source, this.reads, state, findings);
    return {
      diagnostics: inReadingOrder(findings.diagnostics),
      lines: this.reads.flatMap((read, i) => this.report(read, i)),
      program: findings.errors
        ? null
        : {
            layout: state.symbols.layout,
            functions: state.instances,
            lines: this.lines,
            conditions: this.conditions,
            slots: state.slots,
            iterates: state.iterates,
            size: this.size,
          },
    };
  }

  /** An input whose quantity and unit are both unknown has no type. */
  private judgeQuantities(): void {
    const judge = (
      declaration: { readonly kind: string; readonly quantity?: string; readonly unit?: string },
      path: string,
    ) => {
      const { kind, quantity = "", unit = "" } = declaration;
      if (kind === "number" && !declaredType(quantity, unit))
        this.findings.at(`${path}/quantity`).add({
          code: "unknown-quantity",
          message: `the quantity "${quantity}" is not in the catalogue.`,
          hint: "Choose a quantity of the catalogue.",
        });
    };
    this.source.inputs.forEach((input, i) => {
      if (input.kind === "table")
        input.columns.forEach((column, j) => judge(column, `#/inputs/${i}/columns/${j}`));
      else judge(input, `#/inputs/${i}`);
    });
  }

  private declareStatements(): void {
    const { symbols } = this.state;
    this.reads.forEach((read, statement) => {
      const taken = symbols.taken(read.name);
      if (taken) {
        this.findings.add({
          code: "name-taken",
          message: taken,
          span: read.nameSpan,
          hint: "Each name is defined once. Choose another one.",
        });
        return;
      }
      symbols.own.set(
        read.name,
        read.parameters
          ? { is: "function", statement, read }
          : { is: "line", statement, read, checked: null },
      );
    });
  }

  /** A parameter may not repeat an input, a line (also one below), a function or another parameter. */
  private judgeParameters(): void {
    for (const read of this.reads) {
      const own = new Set<string>();
      for (const { name, span } of read.parameters ?? []) {
        const taken = own.has(name) ? `\`${name}\` is a parameter already.` : this.state.symbols.taken(name);
        if (taken)
          this.findings.add({
            code: "name-taken",
            message: `the parameter of \`${read.name}\`: ${taken}`,
            span,
            hint: "Choose a name that is not in use.",
          });
        own.add(name);
      }
    }
  }

  private statement(read: ReadStatement, statement: number): void {
    const { expression } = read;
    const symbol = this.state.symbols.own.get(read.name);
    if (this.ended || !expression || read.parameters || symbol?.is !== "line") return;
    const context = this.context(this.state.working, statement, false);
    this.within(this.state.working, read, () => {
      const value = asNumber(check(expression, context), expression, context);
      if (!value || !finished({ expression, value }, context)) return;
      this.count(value.size);
      // Only a 0 that is written out fits any dimension; a line that is 0 is a bare number.
      const type = withoutLiteralZero(value.type);
      if (symbol.read === read) {
        const index = this.lines.length;
        symbol.checked = { index, type, law: value.law };
        const { name, note, span } = read;
        this.lines.push({ symbol: name, type, expression: value.typed, span, note });
      }
    });
  }

  private condition(source: ConditionSource): void {
    if (this.ended) return;
    const findings = this.findings.at(source.path);
    const expression = readExpression(source.text, findings);
    if (!expression) return;
    const place = Place.of(findings, source.text);
    const context = this.context(place, source.role === "limit" ? Infinity : -1, true);
    this.within(place, null, () => {
      const value = asCondition(check(expression, context), expression, context);
      if (!value) return;
      this.count(value.size);
      const { role, owner } = source;
      const inputs = [...context.named].filter((name) => this.state.symbols.own.get(name)?.is === "input");
      this.conditions.push({ role, owner, expression: value.typed, inputs, compared: value.compared });
    });
  }

  private context(place: Place, before: number, tolerant: boolean): Context {
    return { state: this.state, place, before, tolerant, locals: new Map(), named: new Set() };
  }

  private count(size: number): void {
    this.size += size;
    if (this.size > limits.nodes) throw new LimitMet();
  }

  /** Runs a part of the check; where the limit on nodes is met, the part is named and nothing follows. */
  private within(place: Place, read: ReadStatement | null, part: () => void): void {
    try {
      part();
    } catch (error) {
      if (!(error instanceof LimitMet)) throw error;
      this.ended = true;
      place.tell({
        code: "too-many-nodes",
        message:
          `with the functions that are called, the calculation up to here has more than ` +
          `${limits.nodes} parts. The limit is ${limits.nodes}.`,
        span: read?.nameSpan ?? { line: 1, column: 1, endLine: 1, endColumn: 2 },
        hint: "Give values that are used often lines of their own.",
      });
    }
  }

  private judgeUncalled(): void {
    this.reads.forEach((read, statement) => {
      const symbol = this.state.symbols.own.get(read.name);
      if (symbol?.is !== "function" || symbol.read !== read || this.state.used.has(read.name)) return;
      const context = this.context(this.state.working, statement, false);
      this.within(this.state.working, read, () => judgeNames(symbol, context));
    });
  }

  private report(read: ReadStatement, statement: number): LineReport[] {
    if (!read.expression) return [];
    const symbol = this.state.symbols.own.get(read.name);
    const line = symbol?.is === "line" && symbol.statement === statement ? symbol : null;
    const { quantity, unit } = shownIn(line?.checked?.type ?? null, this.source.results, read.name);
    return [
      {
        symbol: read.name,
        line: read.span.line,
        endLine: read.span.endLine,
        isFunction: read.parameters !== null,
        text: read.text,
        note: read.note,
        expression: read.expression,
        type: line?.checked?.type ?? null,
        quantity,
        unit,
      },
    ];
  }
}

function withoutLiteralZero(type: NumberType): NumberType {
  if (!type.literalZero) return type;
  const { is, dimension, temperature, length } = type;
  return { is, dimension, temperature, length };
}
