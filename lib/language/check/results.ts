import { isTemperature, quantityByName, sameDimension } from "@/lib/units";
import type { Findings } from "../diagnostics";
import type { ProgramSource, ResultSource } from "../types";
import type { ProgramState } from "./context";
import { nearest } from "./names";
import { replace } from "./place";
import { isAbsolute, isDifference } from "./reading";
import { declaredType, type LineSymbol } from "./symbols";
import { withLength } from "./value";
import { describe } from "./words";

/** Holds the declared results against the lines, and looks for every symbol that figures and messages read. */
export function judgeResults(source: ProgramSource, state: ProgramState, findings: Findings): void {
  const seen = new Set<string>();
  for (const result of source.results) {
    const at = findings.at(result.path);
    state.used.add(result.symbol);
    if (seen.has(result.symbol))
      at.add({ code: "name-taken", message: `\`${result.symbol}\` is declared as a result twice.` });
    seen.add(result.symbol);
    const symbol = state.symbols.own.get(result.symbol);
    if (symbol?.is === "line") judgeResult(result, symbol, state, at);
    else
      at.add({
        code: "unknown-name",
        message: symbol
          ? `the result \`${result.symbol}\` is ${symbol.is === "input" ? "an input" : "a function"}, not a line of the working.`
          : `the result \`${result.symbol}\` has no line in the working.`,
        hint: hintFor(result.symbol, state, "line"),
      });
  }
  for (const use of source.uses) {
    const [name = "", column] = use.symbol.split(".");
    const symbol = state.symbols.own.get(name);
    state.used.add(name);
    const table = symbol?.is === "input" && symbol.declaration.kind === "table" ? symbol.declaration : null;
    const found =
      symbol !== undefined &&
      symbol.is !== "function" &&
      (column === undefined || table?.columns.some((each) => each.symbol === column) === true);
    if (!found)
      findings.at(use.path).add({
        code: "unknown-name",
        message: `\`${use.symbol}\` is neither an input nor a line of the working.`,
        hint: hintFor(name, state, "any"),
      });
  }
}

function hintFor(name: string, state: ProgramState, kind: "line" | "any"): string {
  const names = [...state.symbols.own]
    .filter(([, symbol]) => symbol.is === "line" || (kind === "any" && symbol.is === "input"))
    .map(([own]) => own);
  const near = nearest(name, names);
  return near ? `Did you mean \`${near}\`?` : "Add a line that defines it.";
}

function judgeResult(
  result: ResultSource,
  symbol: LineSymbol,
  state: ProgramState,
  findings: Findings,
): void {
  const quantity = quantityByName(result.quantity);
  const declared = declaredType(result.quantity, result.unit);
  if (!quantity)
    findings.add({
      code: "unknown-quantity",
      message: `the quantity "${result.quantity}" of the result \`${result.symbol}\` is not in the catalogue.`,
      hint: "Choose a quantity of the catalogue.",
    });
  if (!symbol.checked || !declared) return;
  const { type } = symbol.checked;
  const { nameSpan, expression } = symbol.read;
  const where = `\`${result.symbol}\` on line ${nameSpan.line}`;
  if (!sameDimension(type.dimension, declared.dimension)) {
    findings.add({
      code: "unit-mismatch",
      message: `${where} is ${describe(withLength(type, null))}, but the result is declared as ${result.quantity} in ${result.unit}.`,
      hint: "Correct the line, or the declared quantity.",
    });
    return;
  }
  if (isTemperature(type.dimension)) judgeTemperature(result, symbol, where, findings, state);
  if ((type.length !== null) !== result.list)
    findings.add({
      code: "list-mismatch",
      message: type.length
        ? `${where} is a list, but the result is declared as one number.`
        : `${where} is one number, but the result is declared as a list.`,
      hint:
        expression && type.length
          ? "Declare the result as a list, or take `first(…)` or `last(…)`."
          : "Correct the declaration of the result.",
    });
}

function judgeTemperature(
  result: ResultSource,
  symbol: LineSymbol,
  where: string,
  findings: Findings,
  state: ProgramState,
): void {
  const type = symbol.checked?.type;
  const wantsAbsolute = quantityByName(result.quantity)?.kind !== "difference";
  if (!type || (wantsAbsolute ? isAbsolute(type) : isDifference(type))) return;
  const { expression } = symbol.read;
  if (type.temperature === "none") {
    // The line is at fault, not the declaration, and there it is mended.
    const cast = expression && `as_temperature(${state.working.text(expression.span)})`;
    state.working.tell({
      span: expression?.span ?? symbol.read.span,
      code: "no-temperature",
      message: `\`${result.symbol}\` comes from a product or power of absolute temperatures and has no reading as ${result.quantity}.`,
      hint: cast ? `If it is a temperature, say so: \`${cast}\`.` : "Say so with `as_temperature(…)`.",
      mend: expression && cast ? replace(expression.span, cast, "Declare it a temperature") : null,
    });
    return;
  }
  findings.add({
    code: "temperature-kinds",
    message: wantsAbsolute
      ? `${where} is a temperature difference, but the result is declared as an absolute temperature.`
      : `${where} is an absolute temperature, but the result is declared as a difference.`,
    hint: wantsAbsolute
      ? "Add the temperature from which it is counted, or declare it as temperature difference."
      : "Subtract a temperature, or declare it as temperature.",
  });
}
