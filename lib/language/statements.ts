import type { Findings } from "./diagnostics";
import { limits } from "./limits";
import { spanOver, tokenSpan, type Token } from "./token";

/** The words of one statement without comments and line ends, and the note beside it. */
export interface RawStatement {
  readonly tokens: readonly Token[];
  readonly note: string | null;
  /** Everything in it could be read, so that its grammar can be judged. */
  readonly readable: boolean;
}

/** Joins physical lines to statements: a line continues while a bracket is open. */
export function splitStatements(tokens: readonly Token[], findings: Findings): RawStatement[] {
  const statements: RawStatement[] = [];
  let words: Token[] = [];
  let notes: string[] = [];
  let open: Token[] = [];
  let readable = true;

  const finish = () => {
    if (words.length > 0)
      statements.push({ tokens: words, note: notes.length > 0 ? notes.join(" ") : null, readable });
    words = [];
    notes = [];
    open = [];
    readable = true;
  };
  const unclosed = () => {
    const bracket = open.at(-1);
    if (!bracket) return;
    readable = false;
    findings.add({
      code: "open-bracket",
      message: "the bracket that opens here is not closed.",
      span: tokenSpan(bracket),
      hint: "Close it with `)`.",
    });
  };

  tokens.forEach((token, index) => {
    switch (token.kind) {
      case "newline":
        if (open.length === 0) finish();
        return;
      case "comment":
        if (words.length > 0 && token.text !== "") notes.push(token.text);
        return;
    }
    // A new statement cannot begin inside a bracket: the bracket was forgotten above.
    if (open.length > 0 && tokens[index - 1]?.kind === "newline" && beginsStatement(tokens, index)) {
      unclosed();
      finish();
    }
    words.push(token);
    if (token.kind === "unreadable") readable = false;
    if (token.kind === "open") open.push(token);
    if (token.kind === "close") open.pop();
  });
  if (open.length > 0) unclosed();
  finish();
  return statements.map((statement) => withinLimits(statement, findings));
}

function beginsStatement(tokens: readonly Token[], index: number): boolean {
  if (tokens[index]?.kind !== "name") return false;
  const next = tokens[index + 1];
  if (next?.kind === "assign") return true;
  if (next?.kind !== "open") return false;
  for (let i = index + 2, depth = 1; i < tokens.length; i++) {
    const token = tokens[i];
    if (!token || token.kind === "newline") return false;
    if (token.kind === "open") depth++;
    if (token.kind === "close" && --depth === 0) return tokens[i + 1]?.kind === "assign";
  }
  return false;
}

function withinLimits(statement: RawStatement, findings: Findings): RawStatement {
  const fault = limitBroken(statement.tokens);
  if (!fault) return statement;
  findings.add({ ...fault.finding, span: tokenSpan(fault.token) });
  return { ...statement, readable: false };
}

interface BrokenLimit {
  readonly token: Token;
  readonly finding: { readonly code: string; readonly message: string; readonly hint?: string };
}

/** The first limit on words, brackets, signs that a statement or condition breaks. */
export function limitBroken(tokens: readonly Token[]): BrokenLimit | null {
  const first = tokens[0];
  if (!first) return null;
  if (tokens.length > limits.lineTokens) {
    const hint = "Split it into several lines.";
    const message = `this statement has ${tokens.length} words and signs. The limit is ${limits.lineTokens}.`;
    return { token: first, finding: { code: "too-many-words", message, hint } };
  }
  const characters = tokens.reduce((sum, token) => sum + token.end - token.start, 0);
  if (characters > limits.lineCharacters) {
    const hint = "Split it into several lines.";
    const message = `this statement has ${characters} characters. The limit is ${limits.lineCharacters}.`;
    return { token: first, finding: { code: "line-too-long", message, hint } };
  }
  let depth = 0;
  let signs = 0;
  for (const token of tokens) {
    depth += token.kind === "open" ? 1 : token.kind === "close" ? -1 : 0;
    if (depth > limits.bracketDepth) {
      const message = `brackets are nested more than ${limits.bracketDepth} deep. The limit is ${limits.bracketDepth}.`;
      return {
        token,
        finding: { code: "too-deep", message, hint: "Give parts of it names on lines of their own." },
      };
    }
    signs = token.kind === "operator" ? signs + 1 : 0;
    if (signs > limits.signsInARow) {
      const message = `more than ${limits.signsInARow} signs follow each other. The limit is ${limits.signsInARow}.`;
      return { token, finding: { code: "too-many-signs", message } };
    }
  }
  return null;
}

export interface StatementHead {
  readonly name: Token;
  /** null for a line, the parameters of a function otherwise. */
  readonly parameters: readonly Token[] | null;
  /** Words to the right of `=`. */
  readonly body: readonly Token[];
}

/** Splits `name = …` and `name(a, b) = …`; reports what is wrong with the left-hand side. */
export function readHead(statement: RawStatement, findings: Findings): StatementHead | null {
  const { tokens } = statement;
  const [name, next] = tokens;
  if (!name) return null;
  const fail = (code: string, message: string, hint: string, at: Token = name): null => {
    if (statement.readable) findings.add({ code, message, hint, span: tokenSpan(at) });
    return null;
  };
  const assign = tokens.findIndex((token) => token.kind === "assign");
  if (assign < 0) {
    const equality = tokens.find((token) => token.text === "==" && token.kind === "operator");
    if (equality && next === equality)
      return fail(
        "not-a-statement",
        "`==` compares. A line is defined with one `=`.",
        "Write `=`.",
        equality,
      );
    const message = "this is not a statement: it has no `=`.";
    return fail("not-a-statement", message, "Write `name = expression` or `name(x) = expression`.");
  }
  if (name.kind !== "name" || name.text === "true" || name.text === "false") {
    const message = `\`${name.text}\` cannot stand to the left of \`=\`.`;
    return fail("not-a-name", message, "A line begins with the name that it defines.");
  }
  if (assign === 1) return { name, parameters: null, body: tokens.slice(2) };
  if (next?.kind !== "open" || tokens[assign - 1]?.kind !== "close") {
    const message = "the left-hand side of `=` is not a name.";
    return fail("not-a-name", message, "Write `name = expression` or `name(x) = expression`.", next ?? name);
  }
  const inner = tokens.slice(2, assign - 1);
  const wrong = inner.find((token, i) => token.kind !== (i % 2 === 0 ? "name" : "comma"));
  if (wrong || inner.length % 2 === 0) {
    const message = `the parameters of \`${name.text}\` are not names with commas between them.`;
    const at = wrong ?? inner.at(-1) ?? next;
    return fail(
      "wrong-parameters",
      message,
      `Write \`${name.text}(x) = …\` or \`${name.text}(x, y) = …\`.`,
      at,
    );
  }
  return { name, parameters: inner.filter((_, i) => i % 2 === 0), body: tokens.slice(assign + 1) };
}

/** Span of all words of a statement. */
export function statementSpan(statement: RawStatement) {
  const first = statement.tokens[0];
  const last = statement.tokens.at(-1);
  if (!first || !last) throw new TypeError("A statement has at least one word.");
  return spanOver(first, last);
}
