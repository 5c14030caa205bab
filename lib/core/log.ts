import "server-only";

/** Structured log: one JSON object per line, on standard output (errors on standard error). */

type Fields = Record<string, unknown>;
type Level = "info" | "warn" | "error";

const secretName = /pass(word|code)?$|secret|token|cookie|authorization|^key$|setUpCode/i;

/** Drizzle writes the values of a failed statement into its message; they are not for the log. */
const withoutValues = (text: string) =>
  text.replace(/\nparams: [^]*?(?=\n +at |$)/, "\nparams: [not logged]");

function plain(value: unknown, depth: number): unknown {
  if (value instanceof Error) {
    return {
      name: value.name,
      message: withoutValues(value.message),
      stack: withoutValues(value.stack ?? ""),
      cause: plain(value.cause, depth + 1),
    };
  }
  if (value instanceof Date) return value.toISOString();
  if (typeof value === "bigint") return value.toString();
  if (typeof value !== "object" || value === null) return value;
  if (depth > 4) return "…";
  if (Array.isArray(value)) return value.map((item) => plain(item, depth + 1));
  return Object.fromEntries(
    Object.entries(value).map(([name, item]) => [
      name,
      secretName.test(name) ? "[not logged]" : plain(item, depth + 1),
    ]),
  );
}

function write(level: Level, event: string, fields: Fields): void {
  const line = JSON.stringify({
    time: new Date().toISOString(),
    level,
    event,
    ...(plain(fields, 0) as Fields),
  });
  (level === "error" ? process.stderr : process.stdout).write(`${line}\n`);
}

/** Members whose name tells of a secret (password, token, cookie, key …) are left out of the line. */
export const log = {
  info: (event: string, fields: Fields = {}) => write("info", event, fields),
  warn: (event: string, fields: Fields = {}) => write("warn", event, fields),
  error: (event: string, fields: Fields = {}) => write("error", event, fields),
};
