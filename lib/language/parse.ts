import { Findings, inReadingOrder, workingPath } from "./diagnostics";
import { judgeGrammar } from "./grammar";
import { lex } from "./lexer";
import { expressionParser, type ExpressionParser } from "./parser";
import { limitBroken, readHead, splitStatements, statementSpan, type RawStatement } from "./statements";
import { tokenSpan, type Token } from "./token";
import type { Diagnostic, Expression, Span, Statement } from "./types";

/** A statement as far as it could be read: a broken one still defines its name, so that its readers are not accused. */
export interface ReadStatement {
  readonly name: string;
  readonly nameSpan: Span;
  readonly span: Span;
  /** null for a line. */
  readonly parameters: readonly { readonly name: string; readonly span: Span }[] | null;
  /** null when its text has an error. */
  readonly expression: Expression | null;
  readonly note: string | null;
  /** Source text of the right-hand side, comments left out, on one line. */
  readonly text: string;
}

/** Reads a whole working; what is wrong goes to `findings`, statement by statement. */
export function readWorking(source: string, findings: Findings): ReadStatement[] {
  const parser = expressionParser();
  const statements: ReadStatement[] = [];
  for (const raw of splitStatements(lex(source, findings), findings)) {
    const statement = readStatement(raw, parser, source, findings);
    if (statement) statements.push(statement);
  }
  return statements;
}

function readStatement(
  raw: RawStatement,
  parser: ExpressionParser,
  source: string,
  findings: Findings,
): ReadStatement | null {
  const head = readHead(raw, findings);
  const first = raw.tokens[0];
  const name = head?.name ?? (first?.kind === "name" ? first : null);
  if (!name) return null;
  const readable = head !== null && raw.readable;
  return {
    name: name.text,
    nameSpan: tokenSpan(name),
    span: statementSpan(raw),
    parameters: head?.parameters?.map((each) => ({ name: each.text, span: tokenSpan(each) })) ?? null,
    expression: readable ? readTokens(head.body, raw.tokens.at(-1) ?? name, parser, findings) : null,
    note: raw.note,
    text: head ? sourceText(head.body, source) : "",
  };
}

function readTokens(
  tokens: readonly Token[],
  before: Token | null,
  parser: ExpressionParser,
  findings: Findings,
): Expression | null {
  if (!judgeGrammar(tokens, before, findings)) return null;
  try {
    return parser.parse(tokens);
  } catch (error) {
    // Two grammars disagree: no working should come here, and if one does it is an error of its text, not a crash.
    const first = tokens[0] ?? before;
    findings.add({
      code: "unreadable-expression",
      message: `this expression cannot be read (${error instanceof Error ? error.message : String(error)}).`,
      ...(first && { span: tokenSpan(first) }),
    });
    return null;
  }
}

/** Words as they stand, each line break and comment between them replaced by one blank. */
function sourceText(tokens: readonly Token[], source: string): string {
  let text = "";
  let previous: Token | null = null;
  for (const token of tokens) {
    if (previous) text += previous.line === token.line ? source.slice(previous.end, token.start) : " ";
    text += source.slice(token.start, token.end);
    previous = token;
  }
  return text;
}

/** Reads the text of a condition, or of any single expression. */
export function readExpression(source: string, findings: Findings): Expression | null {
  const before = findings.count;
  const tokens = lex(source, findings).filter(
    (token) => token.kind !== "newline" && token.kind !== "comment",
  );
  const broken = limitBroken(tokens);
  if (broken) findings.add({ ...broken.finding, span: tokenSpan(broken.token) });
  return findings.count > before ? null : readTokens(tokens, null, expressionParser(), findings);
}

/** Lexer and parser for a working, for readers that need its syntax only. Statements with errors are left out. */
export function parseWorking(text: string): {
  readonly statements: readonly Statement[];
  readonly diagnostics: readonly Diagnostic[];
} {
  const findings = new Findings(workingPath);
  const statements = readWorking(text, findings).flatMap((read): Statement[] => {
    const { name, nameSpan, span, note, expression, parameters } = read;
    if (!expression) return [];
    const common = { name, nameSpan, span, note, expression };
    return [parameters ? { statement: "function", parameters, ...common } : { statement: "line", ...common }];
  });
  return { statements, diagnostics: inReadingOrder(findings.diagnostics) };
}

/** The same for one expression. The expression is null when there are errors. */
export function parseExpression(text: string): {
  readonly expression: Expression | null;
  readonly diagnostics: readonly Diagnostic[];
} {
  const findings = new Findings("");
  const expression = readExpression(text, findings);
  return { expression, diagnostics: inReadingOrder(findings.diagnostics) };
}
