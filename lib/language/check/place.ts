import type { Finding, Findings } from "../diagnostics";
import type { Mend, Span } from "../types";

/** One text of the definition: where its faults are told, and what a span of it says. */
export class Place {
  private constructor(
    private readonly findings: Findings,
    private readonly lines: readonly string[],
    /** The call in which a function is being checked. */
    private readonly call: string | null,
  ) {}

  static of(findings: Findings, source: string): Place {
    return new Place(findings, source.split("\n"), null);
  }

  /** The same text, read for one call of a function: what depends on the arguments names the call. */
  inCall(call: string): Place {
    return new Place(this.findings, this.lines, call);
  }

  /** Source between two places, in one line, without comments between them. */
  text(span: Span): string {
    if (span.line === span.endLine)
      return (this.lines[span.line - 1] ?? "").slice(span.column - 1, span.endColumn - 1);
    const pieces: string[] = [];
    for (let line = span.line; line <= span.endLine; line++) {
      const whole = this.lines[line - 1] ?? "";
      const from = line === span.line ? span.column - 1 : 0;
      const piece =
        line === span.endLine ? whole.slice(from, span.endColumn - 1) : withoutComment(whole.slice(from));
      pieces.push(piece.trim());
    }
    return pieces.join(" ");
  }

  /** The source in back quotes, cut where it is long. */
  quote(span: Span): string {
    const text = this.text(span);
    return text.length > 60 ? `\`${text.slice(0, 57)}…\`` : `\`${text}\``;
  }

  /** Tells an error and answers null, the value of what has an error. */
  fault(span: Span, code: string, message: string, more: { hint?: string; mend?: Mend | null } = {}): null {
    this.tell({ span, code, message, ...more });
    return null;
  }

  tell(finding: Omit<Finding, "mend"> & { readonly mend?: Mend | null | undefined }): void {
    const { mend, message, ...rest } = finding;
    const called = this.call !== null && dependsOnArguments.has(finding.code);
    this.findings.add({
      ...rest,
      message: called ? `${message.replace(/\.$/, "")} (in ${this.call}).` : message,
      ...(mend && { mend }),
    });
  }
}

/** Faults that a function has for some arguments and not for others. */
const dependsOnArguments: ReadonlySet<string> = new Set([
  "absolute-from-difference",
  "absolute-product",
  "absolute-sum",
  "bare-number",
  "bare-number-wanted",
  "dimension-limit",
  "exponent",
  "length-mismatch",
  "list-wanted",
  "no-temperature",
  "number-wanted",
  "temperature-kinds",
  "temperature-wanted",
  "unit-mismatch",
]);

/** Quotes cannot hold a # of a comment: a text ends on its line. */
function withoutComment(line: string): string {
  return line.replace(/^((?:[^"#]|"[^"]*")*)#.*$/, "$1");
}

export function replace(span: Span, text: string, title = `Write ${text}`): Mend {
  return { title, span, text };
}
