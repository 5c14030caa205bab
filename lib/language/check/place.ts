import type { Finding, Findings } from "../diagnostics";
import type { Mend, Span } from "../types";

/** One text of the definition: where its faults are told, and what a span of it says. */
export class Place {
  private readonly lines: readonly string[];

  constructor(
    readonly findings: Findings,
    source: string,
  ) {
    this.lines = source.split("\n");
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
    const { mend, ...rest } = finding;
    this.findings.add({ ...rest, ...(mend && { mend }) });
  }
}

/** Quotes cannot hold a # of a comment: a text ends on its line. */
function withoutComment(line: string): string {
  return line.replace(/^((?:[^"#]|"[^"]*")*)#.*$/, "$1");
}

export function replace(span: Span, text: string, title = `Write ${text}`): Mend {
  return { title, span, text };
}
