import { nearestName } from "@/lib/core/nearest";
import type { CheckResult, Diagnostic } from "@/lib/language";
import { isTemperature, parseUnit, quantityByName, type Quantity } from "@/lib/units";
import { checkQuantity, checkUnit } from "./check-inputs";
import type { Definition, Figure, Result, WorkedCase } from "./definition";
import { messageSymbols } from "./message-text";
import { type FigureSymbol, figureSymbols } from "./program-source";

/** Faults of what reads the working: results, limits, figures, worked cases. */

type Add = (path: string, code: string, message: string, hint?: string) => void;
type Shape = "number" | "list" | "function" | "number-input" | "table" | "other" | "unknown";

/** What each symbol of a definition is, once its lines are checked. `unknown` where a line has an error. */
function shapes(definition: Definition, check: CheckResult): Map<string, Shape> {
  const found = new Map<string, Shape>();
  for (const input of definition.inputs) {
    found.set(
      input.symbol,
      input.kind === "number" ? "number-input" : input.kind === "table" ? "table" : "other",
    );
  }
  for (const line of check.lines) {
    const shape: Shape = line.isFunction
      ? "function"
      : !line.type
        ? "unknown"
        : line.type.length
          ? "list"
          : "number";
    found.set(line.symbol, shape);
  }
  return found;
}

const words: Readonly<Record<FigureSymbol["wants"], string>> = {
  number: "a single value",
  list: "a list",
  any: "a value",
  "number-input": "a number input",
  table: "a table",
};

function fits(shape: Shape, wants: FigureSymbol["wants"]): boolean {
  if (shape === "unknown" || wants === "any") return true;
  if (wants === "number") return shape === "number" || shape === "number-input";
  return shape === wants;
}

function checkFigure(
  figure: Figure,
  index: number,
  definition: Definition,
  known: Map<string, Shape>,
  add: Add,
): void {
  for (const { symbol, path, wants } of figureSymbols(figure, index, definition.inputs)) {
    const shape = known.get(symbol);
    // A name that does not exist is told by the check of the working, which is given these symbols.
    if (shape === undefined || fits(shape, wants)) continue;
    add(path, "figure-symbol", `\`${symbol}\` must be ${words[wants]} for this figure.`);
  }
  if (figure.kind === "section" && Array.isArray(figure.layers) && Array.isArray(figure.temperatures)) {
    const faces = figure.layers.length + 1;
    if (figure.temperatures.length !== faces) {
      add(
        `#/figures/${index}/temperatures`,
        "figure-length",
        `The section has ${faces - 1} layers and ${figure.temperatures.length} temperatures; it needs ${faces}, one for each face.`,
      );
    }
  }
  if (figure.kind === "section" && figure.shape === "round" && figure.inner === undefined) {
    add(
      `#/figures/${index}/inner`,
      "figure-symbol",
      "A round section needs the symbol of its inside diameter.",
    );
  }
  if (figure.kind !== "curve") return;
  if (figure.x.from === figure.x.to) {
    add(`#/figures/${index}/x/to`, "figure-range", "The curve begins and ends at the same value.");
  }
  if (figure.x.scale === "log" && (figure.x.from <= 0 || figure.x.to <= 0)) {
    add(`#/figures/${index}/x/from`, "figure-range", "A logarithmic axis needs ends greater than 0.");
  }
  figure.y.forEach((symbol, i) => {
    if (!known.has(symbol) || definition.results.some((result) => result.symbol === symbol)) return;
    add(`#/figures/${index}/y/${i}`, "figure-symbol", `\`${symbol}\` is no result; a curve draws results.`);
  });
}

function checkResult(result: Result, index: number, add: Add): Quantity | null {
  const quantity = checkQuantity(result.quantity, `#/results/${index}/quantity`, add);
  return quantity && checkUnit(result.unit, quantity, `#/results/${index}/unit`, add) ? quantity : null;
}

function checkExpected(worked: WorkedCase, path: string, definition: Definition, add: Add): void {
  for (const [symbol, expected] of Object.entries(worked.expected ?? {})) {
    const at = `${path}/expected/${symbol}`;
    const result = definition.results.find((row) => row.symbol === symbol);
    if (!result) {
      const near = nearestName(
        symbol,
        definition.results.map((row) => row.symbol),
      );
      add(
        at,
        "unknown-result",
        `\`${symbol}\` is no result.`,
        near === null ? undefined : `Did you mean \`${near}\`?`,
      );
      continue;
    }
    const quantity = quantityByName(result.quantity);
    if (quantity) checkUnit(expected.unit, quantity, `${at}/unit`, add);
    const isList = expected.values !== undefined;
    if (isList === (expected.value !== undefined)) {
      add(at, "case-value", `\`${symbol}\` needs either \`value\` or \`values\`.`);
    } else if (isList !== (result.list ?? false)) {
      add(
        at,
        "case-value",
        `\`${symbol}\` is ${result.list ? "a list: give `values`" : "a single value: give `value`"}.`,
      );
    }
    if (expected.relTol === undefined && expected.absTol === undefined) {
      add(
        at,
        "tolerance-missing",
        `\`${symbol}\` has no tolerance.`,
        "Give absTol or relTol, that of the source's rounding.",
      );
    }
    if (expected.relTol !== undefined && quantity?.kind === "absolute" && isTemperature(quantity.dimension)) {
      add(
        `${at}/relTol`,
        "relative-temperature",
        `\`${symbol}\` is an absolute temperature; a share of it depends on the scale's zero.`,
        "Give absTol, a difference in degrees.",
      );
    }
  }
}

function checkGivenUnit(unit: string, quantityName: string, path: string, add: Add): void {
  const quantity = quantityByName(quantityName);
  if (quantity && parseUnit(quantity.unit).ok) checkUnit(unit, quantity, path, add);
}

function checkCaseInputs(worked: WorkedCase, path: string, definition: Definition, add: Add): void {
  const known = definition.inputs.map(({ symbol }) => symbol);
  for (const [symbol, given] of Object.entries(worked.inputs)) {
    const at = `${path}/inputs/${symbol}`;
    const input = definition.inputs.find((row) => row.symbol === symbol);
    if (!input) {
      const near = nearestName(symbol, known);
      add(
        at,
        "unknown-input",
        `There is no input \`${symbol}\`.`,
        near === null ? undefined : `Did you mean \`${near}\`?`,
      );
      continue;
    }
    // A case that must be refused gives bad values on purpose.
    if (worked.refused !== undefined) continue;
    if (
      input.kind === "number" &&
      typeof given === "object" &&
      "unit" in given &&
      typeof given.unit === "string"
    ) {
      checkGivenUnit(given.unit, input.quantity, `${at}/unit`, add);
    }
    if (input.kind === "choice" && !input.options.some(({ key }) => key === given)) {
      add(at, "unknown-option", `\`${String(given)}\` is no option of \`${symbol}\`.`);
    }
    if (input.kind !== "table" || !Array.isArray(given)) continue;
    given.forEach((row, i) => {
      for (const [name, cell] of Object.entries(row)) {
        const column = input.columns.find((declared) => declared.symbol === name);
        if (!column) add(`${at}/${i}/${name}`, "unknown-column", `\`${symbol}\` has no column \`${name}\`.`);
        else if (column.kind === "number" && typeof cell === "object") {
          checkGivenUnit(cell.unit, column.quantity, `${at}/${i}/${name}/unit`, add);
        }
      }
    });
  }
}

function checkCase(worked: WorkedCase, index: number, definition: Definition, add: Add): void {
  const path = `#/cases/${index}`;
  checkCaseInputs(worked, path, definition, add);
  checkExpected(worked, path, definition, add);
  const expects = Object.keys(worked.expected ?? {}).length > 0;
  if (expects === (worked.refused !== undefined)) {
    add(
      path,
      "case-without-end",
      expects
        ? `The case “${worked.title}” expects results and a refusal at once.`
        : `The case “${worked.title}” expects nothing.`,
      "Give expected results, or the code with which the run must be refused.",
    );
  }
}

function checkMessages(definition: Definition, known: Map<string, Shape>, add: Add): void {
  const inputs = new Set(definition.inputs.map(({ symbol }) => symbol));
  definition.requires.forEach(({ message }, i) => {
    for (const symbol of messageSymbols(message)) {
      if (!inputs.has(symbol))
        add(
          `#/requires/${i}/message`,
          "unknown-name",
          `\`${symbol}\` is no input; this message can show inputs only.`,
        );
    }
  });
  const codes = definition.limits.map(({ code }) => code);
  definition.limits.forEach(({ code, label, message }, i) => {
    if (codes.indexOf(code) !== i)
      add(`#/limits/${i}/code`, "duplicate-code", `Two limits have the code \`${code}\`.`);
    for (const [member, text] of [
      ["label", label],
      ["message", message],
    ] as const) {
      for (const symbol of messageSymbols(text)) {
        const shape = known.get(symbol);
        if (shape === "function" || shape === "table") {
          add(
            `#/limits/${i}/${member}`,
            "message-symbol",
            `\`${symbol}\` is a ${shape}; a message shows values.`,
          );
        }
      }
    }
  });
}

/** Diagnostics of results, messages, figures and worked cases. */
export function checkUses(definition: Definition, check: CheckResult): Diagnostic[] {
  const found: Diagnostic[] = [];
  const add: Add = (path, code, message, hint) =>
    found.push({ path, severity: "error", code, message, ...(hint !== undefined && { hint }) });
  const known = shapes(definition, check);
  const results = definition.results.map(({ symbol }) => symbol);
  definition.results.forEach((result, i) => {
    if (results.indexOf(result.symbol) !== i)
      add(`#/results/${i}/symbol`, "duplicate-result", `\`${result.symbol}\` is listed twice.`);
    checkResult(result, i, add);
  });
  checkMessages(definition, known, add);
  definition.figures.forEach((figure, i) => checkFigure(figure, i, definition, known, add));
  definition.cases.forEach((worked, i) => checkCase(worked, i, definition, add));
  return found;
}
