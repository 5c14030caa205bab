import { execFile } from "node:child_process";
import { promisify } from "node:util";

export interface CommandOutcome {
  code: number;
  stdout: string;
  stderr: string;
}

/** Runs a command of lib/commands as the terminal does. */
export function runCommandFile(
  name: string,
  args: string[] = [],
  more: Record<string, string> = {},
): Promise<CommandOutcome> {
  const command = ["--conditions=react-server", "--import", "tsx", `lib/commands/${name}.ts`, ...args];
  return promisify(execFile)(process.execPath, command, { env: { ...process.env, ...more } }).then(
    ({ stdout, stderr }) => ({ code: 0, stdout, stderr }),
    (error: CommandOutcome) => error,
  );
}
