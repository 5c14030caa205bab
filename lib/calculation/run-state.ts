import { CodedError, type FieldProblem } from "@/lib/core/errors";
import { nearestName } from "@/lib/core/nearest";
import { pointerTo } from "@/lib/core/problem";
import { RunFault } from "@/lib/language";
import { compatibleUnits, fromSi, parseUnit, type Unit } from "@/lib/units";
import { amountText, resultListText, resultText } from "./amount-text";
import { absoluteZeroTolerance } from "./declared-number";
import type { MessagePart } from "./message-text";
import type { InputsReader } from "./prepare-inputs";
import { type Display, inputDisplay, type Prepared } from "./prepare";

/** What one request asks of the results, and one run of a prepared definition. */

/** Units asked for, by result. Faults go to `problems`. */
export function requestedUnits(
  prepared: Prepared,
  asked: Readonly<Record<string, string>> | undefined,
  problems: FieldProblem[],
  remarks: Set<string>,
): Map<string, Unit> {
  const units = new Map<string, Unit>();
  for (const [symbol, text] of Object.entries(asked ?? {})) {
    const plan = prepared.results.find(({ declaration }) => declaration.symbol === symbol);
    if (!plan) {
      const symbols = prepared.results.map(({ declaration }) => declaration.symbol);
      const near = nearestName(symbol, symbols);
      problems.push({
        pointer: pointerTo("units", symbol),
        code: "unknown-member",
        message: `There is no result “${symbol.slice(0, 60)}”. ${near === null ? `Results: ${symbols.join(", ")}.` : `Did you mean “${near}”?`}`,
        ...(near !== null && { expected: near }),
      });
      continue;
    }
    const reading = parseUnit(text, { expect: plan.quantity });
    if (reading.ok) {
      units.set(symbol, reading.value);
      for (const remark of reading.notices) remarks.add(remark);
      continue;
    }
    problems.push({
      pointer: pointerTo("units", symbol),
      code: reading.fault.code,
      message: `${plan.declaration.label}: ${reading.fault.message}`,
      received: text.slice(0, 120),
      expected: plan.quantity.name,
      acceptedUnits: compatibleUnits(plan.quantity),
    });
  }
  return units;
}

/** Ten digits carry everything that was typed, without the last bits of a conversion there and back. */
function tidy(value: number): number {
  return Number(value.toPrecision(10));
}

/** Values of one run in words. */
export class RunWords {
  constructor(
    private readonly prepared: Prepared,
    private readonly inputs: InputsReader,
    private readonly units: ReadonlyMap<string, Unit>,
  ) {}

  display(symbol: string, declared: Display): Display {
    const unit = this.units.get(symbol);
    return unit ? { ...declared, unit } : declared;
  }

  /** A symbol's value with its unit: an input as it was given, a line to its significant digits. */
  value(symbol: string): string {
    const { frame, lineOf, planOf } = this.prepared;
    const line = lineOf.get(symbol);
    if (line) {
      const { unit, kind, digits } = this.display(symbol, line.display);
      const value = frame.values[line.index]!;
      if (typeof value === "number") return resultText(fromSi(value, unit, kind), unit.symbol, digits);
      const shown = Array.from(value, (si) => fromSi(si, unit, kind));
      return resultListText(shown, unit.symbol, digits);
    }
    const plan = planOf.get(symbol)?.value;
    switch (plan?.kind) {
      case "number": {
        const used = this.inputs.used[symbol];
        if (used && "si" in used) return amountText(used.value, used.unit);
        const { unit, kind } = inputDisplay(plan.number);
        return amountText(tidy(fromSi(frame.numbers[plan.index]!, unit, kind)), unit.symbol);
      }
      case "choice":
        return plan.labels[frame.choices[plan.index]!] ?? "";
      case "material": {
        const reader = this.inputs.readers.find((candidate) => candidate === frame.materials[plan.index]);
        return reader?.material?.name ?? "the stated constant";
      }
      default:
        return symbol;
    }
  }

  message(parts: readonly MessagePart[]): string {
    let text = "";
    for (const part of parts) text += "text" in part ? part.text : this.value(part.symbol);
    return text;
  }
}

function faultProblem(fault: RunFault, pointers: readonly string[]): FieldProblem[] {
  const { pointer, expected, received } = fault.details;
  const places = typeof pointer === "string" ? [pointer] : pointers;
  return places.map((place) => ({
    pointer: place,
    code: fault.code,
    message: fault.message,
    ...(typeof expected === "string" && { expected }),
    ...(received !== undefined && { received }),
  }));
}

/** What stopped a run, as the one problem of the request. Anything but a `RunFault` is a fault of ours and goes on. */
export function refusal(error: unknown, base: readonly (string | number)[]): CodedError {
  if (!(error instanceof RunFault)) throw error;
  return CodedError.from(faultProblem(error, [pointerTo(...base)]));
}

/** Several problems may be one broken relation between inputs: the sentence is counted once. */
export function refusalOf(problems: readonly FieldProblem[]): CodedError {
  const sentences = new Set(problems.map(({ message }) => message));
  const first = problems[0];
  if (!first || sentences.size === problems.length) return CodedError.from([...problems]);
  const rest = sentences.size - 1;
  const detail =
    rest === 0 ? first.message : `${first.message} (and ${rest} more ${rest === 1 ? "problem" : "problems"})`;
  return new CodedError(first.code, detail, [...problems]);
}

/** Relations between inputs that can be judged; broken ones become problems at each input named. */
export function judgeRequires(
  prepared: Prepared,
  inputs: InputsReader,
  base: readonly (string | number)[],
  problems: FieldProblem[],
): void {
  for (const { condition, inputs: named, message } of prepared.requires) {
    if (named.some((symbol) => inputs.faulty.has(symbol) || inputs.idle.has(symbol))) continue;
    const places = () =>
      named.length === 0 ? [pointerTo(...base)] : named.map((symbol) => pointerTo(...base, symbol));
    try {
      if (prepared.compiled.holds(prepared.frame, condition)) continue;
      const words = new RunWords(prepared, inputs, new Map());
      const text = words.message(message);
      for (const pointer of places()) problems.push({ pointer, code: "out-of-range", message: text });
    } catch (error) {
      if (!(error instanceof RunFault)) throw error;
      problems.push(...faultProblem(error, places()));
    }
  }
}

/** Refuses a line that came out below absolute zero. */
export function refuseBelowZero(prepared: Prepared, base: readonly (string | number)[]): void {
  for (const { index, symbol, line, isAbsoluteTemperature, display } of prepared.lines) {
    if (!isAbsoluteTemperature) continue;
    const value = prepared.frame.values[index]!;
    const lowest = typeof value === "number" ? value : value.reduce((least, one) => Math.min(least, one), 0);
    if (lowest >= absoluteZeroTolerance) continue;
    const text = resultText(fromSi(lowest, display.unit, "absolute"), display.unit.symbol, display.digits);
    throw CodedError.from([
      {
        pointer: pointerTo(...base),
        code: "out-of-range",
        message: `Line ${line}: ${symbol} comes out at ${text}, below absolute zero. These inputs have no physical answer.`,
      },
    ]);
  }
}
