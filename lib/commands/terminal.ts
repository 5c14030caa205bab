import { closeDatabase } from "@/db/client";
import { CodedError } from "@/lib/core/errors";

export function say(text: string): void {
  process.stdout.write(`${text}\n`);
}

/** Runs a command, and ends the process: with 0, or with 1 and sentences that say why. */
export async function runCommand(work: () => Promise<void>): Promise<never> {
  let code = 0;
  try {
    await work();
  } catch (error) {
    code = 1;
    process.stderr.write(`${explain(error)}\n`);
  } finally {
    closeDatabase();
  }
  process.exit(code);
}

function explain(error: unknown): string {
  if (error instanceof CodedError) {
    const lines = error.problems.map(
      (problem) => `  ${problem.pointer.replace(/^#\/?/, "")}: ${problem.message}`,
    );
    return lines.length === 0 ? error.message : lines.join("\n");
  }
  if (!(error instanceof Error)) return String(error);
  return process.env.DEBUG ? (error.stack ?? error.message) : error.message;
}
