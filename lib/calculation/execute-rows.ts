import { CodedError, type FieldProblem } from "@/lib/core/errors";
import { pointerTo } from "@/lib/core/problem";
import { fromSi, type Unit } from "@/lib/units";
import type { Caution, GivenInputs, RowOutcome, RowsOutcome, RowsRequest, Status } from "./evaluation";
import { brokenLimits, extrapolationCautions, judgeService } from "./judge-limits";
import type { MaterialSnapshots } from "./materials-needed";
import type { Prepared } from "./prepare";
import { InputsReader } from "./prepare-inputs";
import { judgeRequires, refusal, refusalOf, refuseBelowZero, requestedUnits, RunWords } from "./run-state";

function problemOf(error: unknown): RowOutcome {
  if (!(error instanceof CodedError)) throw error;
  return { problem: { code: error.code, detail: error.message, errors: error.problems } };
}

/** A request with many rows under way: rows are evaluated in pieces, so that the caller can stop between them. */
export class RowsRun {
  readonly units: RowsOutcome["units"] = {};
  private readonly inputs: InputsReader;
  private readonly resultUnits: readonly Unit[];
  private readonly words: RunWords;
  private readonly common: GivenInputs | null;

  /** Throws `CodedError` for what is wrong with the request as a whole. */
  constructor(
    private readonly prepared: Prepared,
    private readonly request: RowsRequest,
    materials: MaterialSnapshots,
  ) {
    this.inputs = new InputsReader(prepared, materials, {
      echo: false,
      allowExtrapolation: request.allowExtrapolation === true,
      refuseDefaults: request.defaults === "refuse",
    });
    const problems: FieldProblem[] = [];
    const asked = requestedUnits(prepared, request.units, problems, new Set());
    const { common } = request;
    this.common = common ?? null;
    if (common) {
      this.inputs.values.base = ["common"];
      this.inputs.values.unknownMembers(common, prepared.known, "input");
      problems.push(...this.inputs.values.problems);
    }
    if (problems.length > 0) throw refusalOf(problems);
    this.words = new RunWords(prepared, this.inputs, asked);
    this.resultUnits = prepared.results.map(
      ({ declaration, display }) => asked.get(declaration.symbol) ?? display.unit,
    );
    prepared.results.forEach(({ declaration }, i) => {
      const unit = this.resultUnits[i]!;
      this.units[declaration.symbol] = { unit: unit.symbol, ucum: unit.ucum };
    });
  }

  get count(): number {
    return this.request.rows.length;
  }

  /** One row; what is wrong with it is its outcome. */
  evaluate(index: number): RowOutcome {
    const { prepared, inputs } = this;
    const base = ["rows", index];
    inputs.read(this.request.rows[index]!, base, this.common);
    const { values } = inputs;
    if (prepared.requires.length > 0) judgeRequires(prepared, inputs, base, values.problems);
    if (values.problems.length > 0) return problemOf(refusalOf(values.problems));
    try {
      prepared.compiled.run(prepared.frame);
      refuseBelowZero(prepared, base);
      return this.outcome();
    } catch (error) {
      return problemOf(error instanceof CodedError ? error : refusal(error, base));
    }
  }

  private outcome(): RowOutcome {
    const { prepared } = this;
    const { stop, cautions } = this.judge();
    const status: Status = stop ? "stop" : cautions.length > 0 ? "caution" : "ok";
    const results: Record<string, number | number[]> = {};
    const plans = prepared.results;
    for (let i = 0; i < plans.length; i++) {
      const { declaration, index, display } = plans[i]!;
      const unit = this.resultUnits[i]!;
      const value = prepared.frame.values[index]!;
      results[declaration.symbol] =
        typeof value === "number"
          ? fromSi(value, unit, display.kind)
          : Array.from(value, (si) => fromSi(si, unit, display.kind));
    }
    return cautions.length > 0 ? { status, results, cautions } : { status, results };
  }

  private judge(): { stop: boolean; cautions: Caution[] } {
    const { prepared, inputs } = this;
    let { cautions } = inputs.values;
    let stop = false;
    if (inputs.readers.length > 0) {
      cautions = [...cautions, ...extrapolationCautions(inputs.readers)];
      for (const { broken, code, message } of judgeService(inputs.readers)) {
        if (!broken) continue;
        stop = true;
        cautions.push({ code, message: message ?? "" });
      }
    }
    if (prepared.limits.length > 0) {
      const limits = brokenLimits(prepared, this.words);
      stop ||= limits.stop;
      if (limits.cautions.length > 0) cautions = [...cautions, ...limits.cautions];
    }
    return { stop, cautions };
  }
}

/** The outcome of a row that was not reached in time. */
export function leftOver(index: number, seconds: number): RowOutcome {
  const message = `Row ${index + 1} was not reached: a request may run for ${seconds} s. Send fewer rows at once.`;
  return {
    problem: {
      code: "budget-exceeded",
      detail: message,
      errors: [{ pointer: pointerTo("rows", index), code: "budget-exceeded", message, limit: seconds }],
    },
  };
}

/**
 * Runs every row; a row that cannot be evaluated is answered with its problem and spoils no other. Throws `CodedError`
 * for units or common inputs that no row could use.
 */
export function evaluateRows(
  prepared: Prepared,
  request: RowsRequest,
  materials: MaterialSnapshots,
): RowsOutcome {
  const run = new RowsRun(prepared, request, materials);
  const rows: RowOutcome[] = [];
  for (let i = 0; i < run.count; i++) rows.push(run.evaluate(i));
  return { units: run.units, rows };
}
