import { isTemperature, fromSi, type Unit } from "@/lib/units";
import type { Evaluation, Notice, ResultValue, RunRequest, Status, Step } from "./evaluation";
import { extrapolationCautions, judgeLimits, judgeService } from "./judge-limits";
import type { MaterialReader } from "./material-reader";
import type { MaterialSnapshots } from "./materials-needed";
import type { Prepared } from "./prepare";
import { InputsReader } from "./prepare-inputs";
import { judgeRequires, refusal, refusalOf, refuseBelowZero, requestedUnits, RunWords } from "./run-state";
import { safetyNotices } from "./safety";

/** The front of a run: prepare a definition once, evaluate it often. */
export { materialsNeeded, materialsNeededForRows } from "./materials-needed";
export type { MaterialSnapshots } from "./materials-needed";
export { prepare } from "./prepare";
export type { Prepared } from "./prepare";
export { evaluateRows } from "./execute-rows";

const base: readonly string[] = ["inputs"];

/** Lowest and highest absolute temperature among the inputs that apply and the results. */
function temperatures(prepared: Prepared, inputs: InputsReader): { lowest: number; highest: number } {
  const { frame } = prepared;
  let lowest = Infinity;
  let highest = -Infinity;
  const see = (kelvin: number) => {
    if (kelvin < lowest) lowest = kelvin;
    if (kelvin > highest) highest = kelvin;
  };
  for (const { value } of prepared.plans) {
    if (inputs.idle.has(value.symbol)) continue;
    if (value.kind === "number" && value.number.quantity.kind === "absolute")
      see(frame.numbers[value.index]!);
    if (value.kind !== "table") continue;
    for (const column of value.columns) {
      if (column.kind === "number" && column.number.quantity.kind === "absolute")
        frame.columns[column.index]?.forEach(see);
    }
  }
  for (const { quantity, index } of prepared.results) {
    if (quantity.kind !== "absolute" || !isTemperature(quantity.dimension)) continue;
    const value = frame.values[index]!;
    if (typeof value === "number") see(value);
    else value.forEach(see);
  }
  return { lowest, highest };
}

function resultsOf(prepared: Prepared, units: ReadonlyMap<string, Unit>): Record<string, ResultValue> {
  const results: Record<string, ResultValue> = {};
  for (const { declaration, quantity, index, display } of prepared.results) {
    const unit = units.get(declaration.symbol) ?? display.unit;
    const value = prepared.frame.values[index]!;
    results[declaration.symbol] = {
      ...(typeof value === "number"
        ? { value: fromSi(value, unit, display.kind) }
        : { values: Array.from(value, (si) => fromSi(si, unit, display.kind)) }),
      unit: unit.symbol,
      ucum: unit.ucum,
      label: declaration.label,
      quantity: quantity.name,
    };
  }
  return results;
}

function stepsOf(prepared: Prepared, words: RunWords): Step[] {
  return prepared.lines.map(({ symbol, index, text, display }) => {
    const { unit, kind } = words.display(symbol, display);
    const value = prepared.frame.values[index]!;
    return {
      symbol,
      expression: text,
      ...(typeof value === "number"
        ? { value: fromSi(value, unit, kind) }
        : { values: Array.from(value, (si) => fromSi(si, unit, kind)) }),
      unit: unit.symbol,
    };
  });
}

function materialsOf(readers: readonly MaterialReader[]): Evaluation["materials"] {
  const found: Evaluation["materials"] = [];
  for (const { material } of readers) {
    if (!material) continue;
    const { slug, revision } = material;
    if (!found.some((known) => known.slug === slug && known.revision === revision))
      found.push({ slug, revision });
  }
  return found;
}

function noticesOf(prepared: Prepared, inputs: InputsReader): Notice[] {
  const { definition, planOf } = prepared;
  const remarks = new Set([...inputs.values.unitRemarks, ...prepared.unitRemarks]);
  const { lowest, highest } = temperatures(prepared, inputs);
  return [
    ...definition.notices.map((message) => ({ code: "template", message })),
    ...inputs.ignored.map((symbol) => ({
      code: "input-ignored",
      message: `${planOf.get(symbol)?.value.label ?? symbol} (${symbol}) does not apply to this choice and was not used.`,
    })),
    ...[...remarks].map((message) => ({ code: "unit-reading", message })),
    ...safetyNotices(definition.category, lowest, highest),
  ];
}

/**
 * Runs a prepared definition. Values of the reply are in the units asked for, else the declared ones. Throws
 * `CodedError` with every problem of the request: faults of inputs and units together, or what stopped the run.
 */
export function evaluate(prepared: Prepared, request: RunRequest, materials: MaterialSnapshots): Evaluation {
  const inputs = new InputsReader(prepared, materials, {
    echo: true,
    allowExtrapolation: request.allowExtrapolation === true,
    refuseDefaults: request.defaults === "refuse",
  });
  inputs.read(request.inputs ?? {}, base);
  const { values } = inputs;
  const units = requestedUnits(prepared, request.units, values.problems, values.unitRemarks);
  judgeRequires(prepared, inputs, base, values.problems);
  if (values.problems.length > 0) throw refusalOf(values.problems);

  const words = new RunWords(prepared, inputs, units);
  let limits: Evaluation["limits"];
  try {
    prepared.compiled.run(prepared.frame);
    refuseBelowZero(prepared, base);
    limits = [...judgeLimits(prepared, words), ...judgeService(inputs.readers)];
  } catch (error) {
    throw refusal(error, base);
  }
  const cautions = [
    ...values.cautions,
    ...extrapolationCautions(inputs.readers),
    ...limits.flatMap(({ broken, level, code, message }) =>
      broken && level === "caution" ? [{ code, message: message ?? "" }] : [],
    ),
  ];
  const stopped = limits.some(({ broken, level }) => broken && level === "stop");
  const status: Status = stopped ? "stop" : cautions.length > 0 ? "caution" : "ok";
  return {
    status,
    inputs: inputs.used,
    defaulted: inputs.defaulted,
    results: resultsOf(prepared, units),
    limits,
    cautions,
    notices: noticesOf(prepared, inputs),
    materials: materialsOf(inputs.readers),
    ...(request.steps === true && { steps: stepsOf(prepared, words) }),
  };
}
