import type { Findings } from "../diagnostics";
import type { ReadStatement } from "../parse";
import type { ProgramSource } from "../types";
import type { ProgramState } from "./context";

/** Names inputs, lines and functions that nothing reads. */
export function remarkUnused(
  source: ProgramSource,
  reads: readonly ReadStatement[],
  state: ProgramState,
  findings: Findings,
): void {
  // A statement that cannot be read may well use what nothing else uses.
  if (reads.some((read) => !read.expression)) return;
  source.inputs.forEach((input, i) => {
    if (!state.used.has(input.symbol))
      findings.at(`#/inputs/${i}`).add({
        severity: "remark",
        code: "unused-input",
        message: `the input \`${input.symbol}\` is not used.`,
        hint: "Use it in the working, or remove it.",
      });
  });
  for (const read of reads)
    if (!state.used.has(read.name))
      findings.add({
        severity: "remark",
        code: read.parameters ? "unused-function" : "unused-line",
        message: `\`${read.name}\` is not used.`,
        span: read.nameSpan,
        hint: read.parameters
          ? "A function is checked where it is called. Call it, or remove it."
          : "Declare it as a result, use it in a limit or figure, or remove it.",
      });
}
