import type { Diagnostic, Mend, Severity, Span } from "./types";

export interface Finding {
  readonly severity?: Severity;
  readonly code: string;
  /** The sentence without its place; the place is put before it for a working. */
  readonly message: string;
  readonly span?: Span;
  readonly hint?: string;
  readonly mend?: Mend;
}

/**
 * Collects everything that is found about one text of a definition. Lines of a working are named in the sentence
 * ("Line 4: …"); other texts are named by their path alone.
 */
export class Findings {
  readonly diagnostics: Diagnostic[];
  private readonly seen: Set<string>;
  private readonly path: string;

  constructor(path: string, shared?: Findings) {
    this.path = path;
    this.diagnostics = shared?.diagnostics ?? [];
    this.seen = shared?.seen ?? new Set();
  }

  /** The same list, for another text of the definition. */
  at(path: string): Findings {
    return new Findings(path, this);
  }

  add(finding: Finding): void {
    const { span, severity = "error", code, message, hint, mend } = finding;
    // A function is checked once for each combination of argument types: one fault of its text is told once.
    const key = `${this.path} ${span?.line ?? 0} ${span?.column ?? 0} ${span?.endColumn ?? 0} ${code}`;
    if (this.seen.has(key)) return;
    this.seen.add(key);
    const place = span && this.path === workingPath ? `Line ${span.line}: ` : "";
    this.diagnostics.push({
      path: this.path,
      ...(span && {
        line: span.line,
        column: span.column,
        endLine: span.endLine,
        endColumn: span.endColumn,
      }),
      severity,
      code,
      message: place === "" ? capitalised(message) : place + message,
      ...(hint !== undefined && { hint }),
      ...(mend && { mend }),
    });
  }

  get count(): number {
    return this.diagnostics.length;
  }

  get errors(): boolean {
    return this.diagnostics.some((diagnostic) => diagnostic.severity === "error");
  }
}

export const workingPath = "#/working";

function capitalised(sentence: string): string {
  return sentence.slice(0, 1).toUpperCase() + sentence.slice(1);
}

/** In the order in which a reader meets them: the working first, then the other texts by path; by place within one. */
export function inReadingOrder(diagnostics: readonly Diagnostic[]): Diagnostic[] {
  const rank = (path: string) => (path === workingPath ? "" : path);
  return diagnostics
    .map((diagnostic, index) => ({ diagnostic, index }))
    .sort(
      (a, b) =>
        (rank(a.diagnostic.path) < rank(b.diagnostic.path)
          ? -1
          : rank(a.diagnostic.path) > rank(b.diagnostic.path)
            ? 1
            : 0) ||
        (a.diagnostic.line ?? 0) - (b.diagnostic.line ?? 0) ||
        (a.diagnostic.column ?? 0) - (b.diagnostic.column ?? 0) ||
        a.index - b.index,
    )
    .map((entry) => entry.diagnostic);
}
