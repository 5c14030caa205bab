import type { Diagnostic } from "@/lib/language";

/** Largest definition or material, as JSON in bytes. */
const largestDefinition = 256 * 1024;

/** A diagnostic when the value is larger than 256 kB as JSON or cannot be JSON at all, else null. */
export function sizeDiagnostic(value: unknown): Diagnostic | null {
  const problem = (code: string, message: string): Diagnostic => ({
    path: "#",
    severity: "error",
    code,
    message,
  });
  let text: string | undefined;
  try {
    text = JSON.stringify(value);
  } catch (error) {
    // A cycle, or nesting deeper than the stack: no JSON that can be kept.
    if (error instanceof TypeError || error instanceof RangeError)
      return problem("not-json", "This cannot be written as JSON.");
    throw error;
  }
  if (text === undefined) return problem("not-json", "This cannot be written as JSON.");
  const bytes = new TextEncoder().encode(text).length;
  if (bytes <= largestDefinition) return null;
  return problem(
    "too-large",
    `The definition has ${Math.ceil(bytes / 1024)} kB; at most ${largestDefinition / 1024} kB are kept. Shorten texts, tables or cases.`,
  );
}
