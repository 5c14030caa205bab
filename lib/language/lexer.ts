import type { Findings } from "./diagnostics";
import { limits } from "./limits";
import { foreignSigns, spelledLetters } from "./signs";
import type { Token, TokenKind } from "./token";

const kindOfSign: Readonly<Record<string, TokenKind>> = {
  "(": "open",
  ")": "close",
  ",": "comma",
  ".": "dot",
  "=": "assign",
};

interface Patterns {
  readonly blank: RegExp;
  readonly comment: RegExp;
  readonly number: RegExp;
  readonly name: RegExp;
  readonly text: RegExp;
  readonly foreignText: RegExp;
  readonly sign: RegExp;
  readonly foreignWord: RegExp;
}

/** Sticky patterns carry a position, so each call has its own. */
const patterns = (): Patterns => ({
  blank: /[ \t\r\u00a0\u2009\u202f]+/y,
  comment: /#.*/y,
  number: /(?:[0-9]+\.?[0-9]*|\.[0-9]+)(?:[eE][+-]?[0-9]+)?/y,
  name: /[A-Za-z][A-Za-z0-9_]*/y,
  text: /"([^"]*)"/y,
  foreignText: /'([^']*)'|[“”„]([^“”„"]*)[“”"]/y,
  // Not where a sign of another language begins: `**`, `//`, `:=`, `===`, `<>`.
  sign: /[-+^?(),.]|\*(?!\*)|\/(?![/*])|:(?!=)|[<>!=]=(?!=)|<(?!>)|>|=(?![=<])/y,
  foreignWord: /[\p{L}\p{M}]+[\p{L}\p{M}\p{N}_]*/uy,
});

/**
 * Cuts a text into words with their places. Comments and line ends are words as well. What is not in the language is
 * reported here and gives an `unreadable` word, or the word that was meant.
 */
export function lex(source: string, findings: Findings): Token[] {
  const tokens: Token[] = [];
  if (source.length > limits.workingCharacters) {
    findings.add({
      code: "too-long",
      message: `the text has ${source.length} characters. The limit is ${limits.workingCharacters}.`,
      span: { line: 1, column: 1, endLine: 1, endColumn: 2 },
    });
    return tokens;
  }
  const lines = source.split("\n");
  if (lines.length > limits.workingLines) {
    findings.add({
      code: "too-many-lines",
      message: `the text has ${lines.length} lines. The limit is ${limits.workingLines}.`,
      span: { line: limits.workingLines + 1, column: 1, endLine: limits.workingLines + 1, endColumn: 2 },
    });
    return tokens;
  }
  const shared = patterns();
  let start = 0;
  lines.forEach((text, index) => {
    new LineLexer(text, index + 1, start, tokens, findings, shared).run();
    start += text.length + 1;
  });
  return tokens;
}

class LineLexer {
  private at = 0;

  constructor(
    private readonly text: string,
    private readonly line: number,
    private readonly start: number,
    private readonly tokens: Token[],
    private readonly findings: Findings,
    private readonly patterns: Patterns,
  ) {}

  run(): void {
    if (this.text.length > limits.lineCharacters) {
      this.at = this.text.length;
      this.push("unreadable", "", 0);
      this.report(
        "line-too-long",
        `this line has ${this.text.length} characters. The limit is ${limits.lineCharacters}.`,
        0,
        1,
      );
    }
    while (this.at < this.text.length) this.word();
    this.push("newline", "\n", this.at);
  }

  private word(): void {
    if (this.match(this.patterns.blank)) return;
    const from = this.at;
    const comment = this.match(this.patterns.comment);
    if (comment) return this.push("comment", comment[0].slice(1).trim(), from);
    const number = this.match(this.patterns.number);
    if (number) return this.number(number[0], from);
    const name = this.match(this.patterns.name);
    if (name) return this.name(name[0], from);
    const text = this.match(this.patterns.text);
    if (text) return this.quoted(text[1] ?? "", from);
    const sign = this.match(this.patterns.sign);
    if (sign) return this.push(kindOfSign[sign[0]] ?? "operator", sign[0], from);
    if (!this.foreign(from)) this.unknown(from);
  }

  private number(text: string, from: number): void {
    this.push("number", text, from);
    if (!Number.isFinite(Number(text))) {
      this.report(
        "number-too-large",
        `\`${text}\` is larger than any number that can be held.`,
        from,
        this.at,
      );
      return;
    }
    const radix = text === "0" ? /^[xXbBoO][0-9a-fA-F]+/.exec(this.text.slice(this.at)) : null;
    if (!radix) return;
    this.at += radix[0].length;
    this.tokens.pop();
    this.push("unreadable", "", from);
    this.report("foreign-number", `\`0${radix[0]}\` is not a decimal number.`, from, this.at, {
      hint: "Numbers are decimal: 12, 0.5, 1.2e-6.",
    });
  }

  private name(text: string, from: number): void {
    const word = text === "and" || text === "or" || text === "not";
    this.push(word ? "operator" : "name", text, from);
    if (text.length > limits.nameCharacters) {
      this.spoil();
      this.report(
        "name-too-long",
        `the name \`${text.slice(0, 20)}…\` has ${text.length} characters. The limit is ${limits.nameCharacters}.`,
        from,
        this.at,
      );
    }
  }

  private quoted(content: string, from: number): void {
    this.push("text", content, from);
    if (content.includes("\\")) {
      this.spoil();
      this.report(
        "unreadable-text",
        `\`"${content}"\` holds a backslash, which no quantity has.`,
        from,
        this.at,
      );
    }
  }

  private foreign(from: number): boolean {
    const text = this.match(this.patterns.foreignText);
    if (text) {
      const content = text[1] ?? text[2] ?? "";
      this.quoted(content, from);
      this.report("foreign-quotes", `${text[0]} has the wrong quotes.`, from, this.at, {
        hint: `Write "${content}".`,
        replace: `"${content}"`,
      });
      return true;
    }
    const rest = this.text.slice(from, from + 3);
    if (rest.startsWith("//") || rest.startsWith("/*")) {
      const end = rest.startsWith("/*") ? this.text.indexOf("*/", from + 2) : -1;
      this.at = end < 0 ? this.text.length : end + 2;
      this.push("unreadable", "", from);
      this.report("foreign-comment", `\`${rest.slice(0, 2)}\` does not begin a comment.`, from, from + 2, {
        hint: "A comment begins with # and ends with the line.",
      });
      return true;
    }
    const sign = foreignSigns.find((each) => rest.startsWith(each.sign));
    if (!sign) return false;
    this.at += sign.sign.length;
    if (sign.means === "") {
      this.push("unreadable", "", from);
      this.report("unknown-sign", `\`${sign.sign}\` is not a sign of this language.`, from, this.at, {
        hint: sign.hint,
      });
      return true;
    }
    for (const part of sign.means.match(/[a-z]+|[0-9]+|[<>=!]+|[-+*/^()]/g) ?? []) {
      const kind = /[0-9]/.test(part) ? "number" : (kindOfSign[part] ?? "operator");
      this.push(kind, part, from);
    }
    this.report("unknown-sign", `\`${sign.sign}\` is not a sign of this language.`, from, this.at, {
      hint: `Write \`${sign.means}\`.`,
      replace: sign.means,
    });
    return true;
  }

  private unknown(from: number): void {
    const word = this.match(this.patterns.foreignWord);
    if (word) {
      this.push("unreadable", "", from);
      const spelled = [...word[0]].map((letter) => spelledLetters[letter] ?? letter).join("");
      const ascii = /^[A-Za-z][A-Za-z0-9_]*$/.test(spelled);
      this.report(
        "foreign-letter",
        `the name \`${word[0]}\` has letters other than A–Z (${codePoint(firstForeign(word[0]))}).`,
        from,
        this.at,
        ascii
          ? { hint: `Write \`${spelled}\`.`, replace: spelled }
          : { hint: "Names consist of the letters A–Z and a–z, digits and _." },
      );
      return;
    }
    if (this.text[from] === '"') {
      this.at = this.text.length;
      this.push("unreadable", "", from);
      this.report("open-text", "the quotes that open here are not closed on this line.", from, this.at, {
        hint: 'A quantity with unit stands between two quotes: "25 mm".',
      });
      return;
    }
    const character = String.fromCodePoint(this.text.codePointAt(from) ?? 0);
    this.at += character.length;
    this.push("unreadable", "", from);
    const visible = /[\p{P}\p{S}\p{N}]/u.test(character);
    this.report(
      "unknown-sign",
      visible
        ? `\`${character}\` is not a sign of this language.`
        : `there is an invisible character here (${codePoint(character)}). Delete it.`,
      from,
      this.at,
      visible ? {} : { replace: "" },
    );
  }

  private match(pattern: RegExp): RegExpExecArray | null {
    pattern.lastIndex = this.at;
    const found = pattern.exec(this.text);
    if (found) this.at += found[0].length;
    return found;
  }

  private push(kind: TokenKind, text: string, from: number): void {
    this.tokens.push({
      kind,
      text,
      line: this.line,
      column: from + 1,
      endColumn: this.at + 1,
      start: this.start + from,
      end: this.start + this.at,
    });
  }

  /** Makes the last word unreadable, so that its statement is not judged further. */
  private spoil(): void {
    const last = this.tokens.pop();
    if (last) this.tokens.push({ ...last, kind: "unreadable" });
  }

  private report(
    code: string,
    message: string,
    from: number,
    to: number,
    mend: { readonly hint?: string | undefined; readonly replace?: string } = {},
  ): void {
    const span = { line: this.line, column: from + 1, endLine: this.line, endColumn: to + 1 };
    this.findings.add({
      code,
      message,
      span,
      ...(mend.hint !== undefined && { hint: mend.hint }),
      ...(mend.replace !== undefined && {
        mend: {
          title: mend.replace === "" ? "Delete it" : `Write ${mend.replace}`,
          span,
          text: mend.replace,
        },
      }),
    });
  }
}

function firstForeign(word: string): string {
  return [...word].find((letter) => !/[A-Za-z0-9_]/.test(letter)) ?? word;
}

function codePoint(character: string): string {
  return `U+${(character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, "0")}`;
}
