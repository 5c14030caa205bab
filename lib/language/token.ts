import type { Span } from "./types";

export type TokenKind =
  | "number"
  | "name"
  | "text"
  | "operator"
  | "open"
  | "close"
  | "comma"
  | "dot"
  | "assign"
  | "newline"
  | "comment"
  /** Something that is not in the language; already reported. */
  | "unreadable";

/** One word of a working. `text` is what the grammar sees; for a quoted text it is the content without quotes. */
export interface Token {
  readonly kind: TokenKind;
  readonly text: string;
  readonly line: number;
  readonly column: number;
  readonly endColumn: number;
  /** Place in the source, for cutting out pieces of it. */
  readonly start: number;
  readonly end: number;
}

export function tokenSpan(token: Token): Span {
  return { line: token.line, column: token.column, endLine: token.line, endColumn: token.endColumn };
}

/** From the beginning of the first to the end of the last token. */
export function spanOver(first: Token, last: Token): Span {
  return { line: first.line, column: first.column, endLine: last.line, endColumn: last.endColumn };
}

export function joinSpans(first: Span, last: Span): Span {
  return {
    line: first.line,
    column: first.column,
    endLine: last.endLine,
    endColumn: last.endColumn,
  };
}
