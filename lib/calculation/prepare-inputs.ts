import { type CompiledProgram, type Frame, RunFault } from "@/lib/language";
import type { Caution, GivenInputs, UsedValue } from "./evaluation";
import { ValueReader } from "./input-reader";
import type { CellPlan, InputPlan, MaterialPlan, ValuePlan } from "./input-plan";
import { MaterialInputs } from "./material-input";
import type { MaterialReader } from "./material-reader";
import type { MaterialSnapshots } from "./materials-needed";
import { readerAt, type ReadingOptions, TableReader } from "./table-reader";

/**
 * Reads the inputs of a request into the frame of a run and gathers all problems, cautions and remarks. One reader
 * serves one request; of a request with many rows every row, each begun with `read`.
 */
export class InputsReader {
  readonly values: ValueReader;
  /** Inputs that were left to their default, cells as `layers/1/k`. */
  defaulted: string[] = [];
  used: Record<string, UsedValue> = {};
  /** Inputs given although they do not apply. */
  ignored: string[] = [];
  /** Symbols that could not be read: what depends on them is not judged. */
  readonly faulty = new Set<string>();
  /** Symbols that do not apply in this run. */
  readonly idle = new Set<string>();
  /** Readers of materials that the run uses. */
  readonly readers: MaterialReader[] = [];

  private readonly plans: readonly InputPlan[];
  private readonly known: ReadonlySet<string>;
  private readonly compiled: CompiledProgram;
  private readonly frame: Frame;
  private readonly options: ReadingOptions;
  private readonly conditional: readonly InputPlan[];
  private readonly materials: MaterialInputs;
  private readonly tables: TableReader;

  constructor(
    program: {
      plans: readonly InputPlan[];
      known: ReadonlySet<string>;
      compiled: CompiledProgram;
      frame: Frame;
    },
    materials: MaterialSnapshots,
    options: ReadingOptions,
  ) {
    this.plans = program.plans;
    this.known = program.known;
    this.compiled = program.compiled;
    this.frame = program.frame;
    this.options = options;
    this.values = new ValueReader(options.echo);
    this.materials = new MaterialInputs(this.values, materials, options.allowExtrapolation);
    this.tables = new TableReader(this.values, this.materials, program.frame, options);
    this.conditional = program.plans.filter(({ applies }) => applies >= 0);
  }

  /** Forgets the row before. */
  private begin(): void {
    const { values } = this;
    if (values.problems.length > 0) values.problems = [];
    if (values.cautions.length > 0) values.cautions = [];
    if (this.defaulted.length > 0) this.defaulted = [];
    if (this.ignored.length > 0) this.ignored = [];
    if (this.faulty.size > 0) this.faulty.clear();
    if (this.idle.size > 0) this.idle.clear();
    this.readers.length = 0;
    if (this.options.echo) this.used = {};
  }

  /**
   * Reads one set of inputs. A member that `given` lacks is taken from `common`. `base` is where `given` stands in the
   * request, for pointers.
   */
  read(given: GivenInputs, base: readonly (string | number)[], common: GivenInputs | null = null): void {
    this.begin();
    const { values, plans } = this;
    values.base = base;
    for (const name in given) {
      if (this.known.has(name)) continue;
      values.unknownMembers(given, this.known, "input");
      break;
    }
    for (let i = 0; i < plans.length; i++) {
      const plan = plans[i]!;
      if (plan.applies < 0) this.readInput(plan.value, given, base, common);
    }
    if (this.conditional.length > 0) this.readConditional(given, base, common);
  }

  private readInput(
    plan: ValuePlan,
    given: GivenInputs,
    base: readonly (string | number)[],
    common: GivenInputs | null,
  ): void {
    let value = given[plan.symbol];
    const { values } = this;
    if (common !== null) {
      if (value === undefined) {
        value = common[plan.symbol];
        values.base = value === undefined ? base : ["common"];
      } else values.base = base;
    }
    this.readValue(plan, value);
  }

  private readValue(plan: ValuePlan, value: unknown): void {
    const { values, frame } = this;
    values.input = plan.symbol;
    values.label = plan.label;
    values.row = -1;
    values.used = null;
    const before = values.problems.length;
    switch (plan.kind) {
      case "number": {
        const si =
          value === undefined || value === null
            ? this.defaultNumber(plan, value)
            : values.number(plan.number, value);
        frame.numbers[plan.index] = si;
        break;
      }
      case "choice": {
        const key = this.orDefault(plan.symbol, value, plan.default);
        frame.choices[plan.index] = key === null ? 0 : Math.max(0, values.choice(plan, key));
        break;
      }
      case "material": {
        this.readMaterial(plan, value);
        break;
      }
      case "table":
        this.tables.read(plan, value, this);
    }
    if (values.problems.length > before) this.faulty.add(plan.symbol);
    else if (this.options.echo && values.used !== null) this.used[plan.symbol] = values.used;
  }

  private defaultNumber(plan: Extract<CellPlan, { kind: "number" }>, value: null | undefined): number {
    const { values } = this;
    const { number } = plan;
    const declared = number.declaration.default;
    if (value === null || declared === undefined || this.options.refuseDefaults) {
      values.missing(number.unit.symbol);
      return NaN;
    }
    this.defaulted.push(plan.symbol);
    // Read like a typed one only where it is shown; its bounds were checked with the definition.
    return this.options.echo ? values.number(number, declared) : number.defaultSi;
  }

  /** The given value, or the default and its mention, or null with the problem told. */
  private orDefault(symbol: string, value: unknown, fallback: string | null): unknown {
    if (value !== undefined && value !== null) return value;
    if (value === null || fallback === null || this.options.refuseDefaults) {
      this.values.missing();
      return null;
    }
    this.defaulted.push(symbol);
    return fallback;
  }

  private readMaterial(plan: MaterialPlan, value: unknown): void {
    const { values, frame } = this;
    const reader = readerAt(frame.materials, plan.index);
    if (plan.fixed) {
      if (value !== undefined && value !== null && value !== plan.default) {
        const fixed = String(plan.default);
        values.problem(
          "invalid-input",
          `${values.name()} is fixed to ${fixed} and cannot be changed. Leave it out.`,
          {
            expected: fixed,
          },
        );
        return;
      }
      if (this.materials.read(plan, plan.default, reader)) this.readers.push(reader);
      return;
    }
    const name = this.orDefault(plan.symbol, value, plan.default);
    if (name !== null && this.materials.read(plan, name, reader)) this.readers.push(reader);
  }

  /**
   * Inputs that apply only at times: each is read by itself, then its condition decides, in the order of the
   * definition, whether what was found counts. While it does not apply the working gets its default.
   */
  private readConditional(
    given: GivenInputs,
    base: readonly (string | number)[],
    common: GivenInputs | null,
  ): void {
    const { values } = this;
    const kept = this.conditional.map((plan) => {
      const problems = values.problems;
      const cautions = values.cautions;
      const defaulted = this.defaulted;
      const readers = this.readers.length;
      values.problems = [];
      values.cautions = [];
      this.defaulted = [];
      this.readInput(plan.value, given, base, common);
      const found = {
        problems: values.problems,
        cautions: values.cautions as Caution[],
        defaulted: this.defaulted,
        readers: this.readers.splice(readers),
      };
      values.problems = problems;
      values.cautions = cautions;
      this.defaulted = defaulted;
      return found;
    });
    this.conditional.forEach((plan, i) => {
      const { symbol } = plan.value;
      const found = kept[i]!;
      if (this.applies(plan)) {
        values.problems.push(...found.problems);
        values.cautions.push(...found.cautions);
        this.defaulted.push(...found.defaulted);
        this.readers.push(...found.readers);
        return;
      }
      this.idle.add(symbol);
      this.faulty.delete(symbol);
      const typed = given[symbol] ?? common?.[symbol];
      if (typed !== undefined && typed !== null) this.ignored.push(symbol);
      this.useDefault(plan.value);
      delete this.used[symbol];
    });
  }

  /** An input whose condition cannot be judged counts as applying, so that its own problems are told. */
  private applies(plan: InputPlan): boolean {
    const named = this.compiled.program.conditions[plan.applies]?.inputs ?? [];
    if (named.some((symbol) => this.faulty.has(symbol))) return true;
    try {
      return this.compiled.holds(this.frame, plan.applies);
    } catch (fault) {
      if (fault instanceof RunFault) return true;
      throw fault;
    }
  }

  /** Puts an input's default into the frame without mention. */
  private useDefault(plan: ValuePlan): void {
    const { values } = this;
    const problems = values.problems.length;
    const cautions = values.cautions.length;
    const defaulted = this.defaulted;
    const readers = this.readers.length;
    this.defaulted = [];
    const value =
      plan.kind === "number"
        ? plan.number.declaration.default
        : plan.kind === "table"
          ? plan.defaultRows
          : plan.default;
    this.readValue(plan, value);
    values.cautions.length = cautions;
    this.defaulted = defaulted;
    this.readers.length = readers;
    // A default that cannot be used (its material is gone) stops the run and is told.
    if (values.problems.length === problems) this.faulty.delete(plan.symbol);
  }
}
