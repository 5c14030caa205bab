import { prepare } from "@/lib/calculation/execute";
import type { MaterialSnapshots } from "@/lib/calculation/materials-needed";
import { checkDefinition } from "@/lib/calculation/program";
import { runAllCases, type CaseOutcome } from "@/lib/calculation/worked-case";
import type { SuppliedTemplate } from "./read-shelf";

/** What keeps a supplied template from being issued, as sentences: errors of the check, or worked cases that fail. */
export function faultsOf({ content }: SuppliedTemplate, materials: MaterialSnapshots): string[] {
  const errors = checkDefinition(content).diagnostics.filter((found) => found.severity === "error");
  if (errors.length > 0) {
    return errors.map(
      ({ path, line, message }) => `${path}${line === undefined ? "" : `, line ${line}`}: ${message}`,
    );
  }
  return runAllCases(prepare(content), materials)
    .filter((outcome) => !outcome.passed)
    .map((outcome) => `Worked case “${outcome.title}” fails: ${reasonOf(outcome)}`);
}

function reasonOf({ refused, deviations }: CaseOutcome): string {
  const missed = deviations
    .filter((deviation) => !deviation.passed)
    .map(
      ({ symbol, index, expected, found, unit, tolerance }) =>
        `${symbol}${index === undefined ? "" : `[${index}]`} is ${found ?? "missing"}, expected ${expected} ± ${tolerance} ${unit}`,
    );
  return [...(refused === null ? [] : [`refused, ${refused.message}`]), ...missed].join("; ");
}
