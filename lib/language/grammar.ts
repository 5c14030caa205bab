import { parseUnit } from "@/lib/units";
import type { Findings } from "./diagnostics";
import { limits } from "./limits";
import { tokenSpan, type Token } from "./token";

/** An open bracket, or the expression as a whole. */
interface Level {
  readonly opens: Token | null;
  readonly isCall: boolean;
  /** `?` that wait for their `:`. */
  readonly questions: Token[];
  /** Comparison since the last `and`, `or`, `?`, `:`, comma. */
  comparison: Token | null;
  /** `not` since then. */
  negation: Token | null;
}

const comparisons: ReadonlySet<string> = new Set(["==", "!=", "<", "<=", ">", ">="]);
const signs: ReadonlySet<string> = new Set(["+", "-", "not"]);

/**
 * Judges the grammar of one expression and reports its first fault with its place. What passes here is read by the
 * grammar package without error; what the package would read but the language does not have is refused.
 * `end` is the word before the expression, for a place when it is empty.
 */
export function judgeGrammar(tokens: readonly Token[], before: Token | null, findings: Findings): boolean {
  return new Judge(tokens, before, findings).judge();
}

class Judge {
  private readonly levels: Level[] = [newLevel(null, false)];
  private dots = 0;

  constructor(
    private readonly tokens: readonly Token[],
    private readonly before: Token | null,
    private readonly findings: Findings,
  ) {}

  judge(): boolean {
    let wantsOperand = true;
    for (let i = 0; i < this.tokens.length; i++) {
      const token = this.tokens[i];
      if (!token) break;
      const next: boolean | null = wantsOperand ? this.operand(token, i) : this.operator(token, i);
      if (next === null) return false;
      wantsOperand = next;
    }
    return this.end(wantsOperand);
  }

  /** Each answers whether an operand is wanted next, or null after a fault. */
  private operand(token: Token, i: number): boolean | null {
    const previous = this.tokens[i - 1];
    switch (token.kind) {
      case "number":
      case "text":
        return false;
      case "name":
        if (previous?.kind !== "dot") this.dots = 0;
        if (token.text === "true" || token.text === "false")
          return this.fault(token, "no-constant-condition", `\`${token.text}\` is not a value here.`, {
            hint: "Write the comparison that is meant.",
          });
        return false;
      case "open":
        if (previous?.kind === "dot") break;
        this.levels.push(newLevel(token, false));
        return true;
      case "operator":
        if (signs.has(token.text) && previous?.kind !== "dot") {
          if (token.text === "not") {
            if (this.level.comparison)
              return this.fault(token, "ambiguous-not", "`not` after a comparison needs brackets.", {
                hint: "Write `a == (not b)`, or better the contrary comparison.",
              });
            this.level.negation = token;
          }
          return true;
        }
        break;
      case "close":
        if (previous?.kind === "open" && this.level.isCall)
          return this.fault(token, "missing-argument", "this call has no argument.", {
            hint: "Write the argument between the brackets.",
          });
        if (previous?.kind === "open")
          return this.fault(token, "missing-operand", "these brackets are empty.", {});
        break;
    }
    if (previous?.kind === "dot")
      return this.fault(token, "missing-member", "after the dot stands no name.", {
        hint: "Write the name of a column, field or property: `layers.t`.",
      });
    const after = previous ? ` after ${quoted(previous)}` : "";
    return this.fault(token, "missing-operand", `a value is missing${after}, before ${quoted(token)}.`, {});
  }

  private operator(token: Token, i: number): boolean | null {
    const previous = this.tokens[i - 1];
    switch (token.kind) {
      case "operator":
        return this.binary(token);
      case "open":
        if (previous?.kind === "name") {
          this.levels.push(newLevel(token, true));
          return true;
        }
        return this.fault(
          token,
          previous?.kind === "number" ? "call-of-number" : "missing-operator",
          previous?.kind === "number"
            ? `\`${previous.text}(…)\` calls a number.`
            : "between a value and an opening bracket stands no sign.",
          { hint: "Write `*` to multiply.", insert: { title: "Multiply", at: token, text: "*" } },
        );
      case "close":
        return this.close(token);
      case "comma":
        if (!this.level.isCall)
          return this.fault(token, "stray-comma", "a comma stands only between the arguments of a call.", {
            hint: "The decimal sign is a point: 0.5.",
          });
        if (!this.conditionalsComplete()) return null;
        this.forgetComparison();
        return true;
      case "dot":
        if (previous?.kind !== "name")
          return this.fault(token, "stray-dot", "a dot stands only between a name and its member.", {
            hint: "Write `layers.t`, or give the value a name on a line of its own.",
          });
        if (++this.dots > limits.dotsInAName)
          return this.fault(token, "too-many-dots", `a name has at most ${limits.dotsInAName} dots.`, {});
        return true;
      case "assign":
        return this.fault(
          token,
          "assignment-inside",
          "`=` defines a line and cannot stand inside an expression.",
          {
            hint: "Write `==` to compare.",
            replace: { title: "Compare", at: token, text: "==" },
          },
        );
      default:
        return this.missingOperator(token, previous);
    }
  }

  private binary(token: Token): boolean | null {
    const level = this.level;
    if (token.text === "not")
      return this.fault(token, "missing-operator", "before `not` stands no `and` or `or`.", {});
    if (comparisons.has(token.text)) {
      if (level.negation)
        return this.fault(level.negation, "ambiguous-not", "`not` before a comparison needs brackets.", {
          hint: `Write \`not (a ${token.text} b)\`, or the contrary comparison.`,
        });
      if (level.comparison)
        return this.fault(token, "chained-comparison", "comparisons cannot be chained.", {
          hint: "Write `a < b and b < c`.",
        });
      level.comparison = token;
      return true;
    }
    if (token.text === "and" || token.text === "or" || token.text === "?") this.forgetComparison();
    if (token.text === "?") level.questions.push(token);
    if (token.text === ":") {
      if (!level.questions.pop())
        return this.fault(token, "stray-colon", "this `:` has no `?` before it.", {
          hint: "Write `condition ? value : other value`.",
        });
      this.forgetComparison();
    }
    return true;
  }

  private close(token: Token): boolean | null {
    if (!this.level.opens)
      return this.fault(token, "stray-bracket", "this bracket closes none that is open.", {
        replace: { title: "Delete it", at: token, text: "" },
      });
    if (!this.conditionalsComplete()) return null;
    this.levels.pop();
    return false;
  }

  private missingOperator(token: Token, previous: Token | undefined): null {
    const before = previous ? quoted(previous) : "a value";
    if (previous?.kind === "number" && token.kind === "name" && previous.end === token.start) {
      const isUnit = parseUnit(token.text).ok;
      const product = `\`${previous.text}*${token.text}\``;
      return this.fault(token, "missing-operator", `between ${before} and ${quoted(token)} stands no sign.`, {
        hint: isUnit
          ? `Write "${previous.text} ${token.text}" for a quantity with unit, or ${product} for a product.`
          : `Write ${product}.`,
        ...(!isUnit && { insert: { title: "Multiply", at: token, text: "*" } }),
      });
    }
    return this.fault(token, "missing-operator", `between ${before} and ${quoted(token)} stands no sign.`, {
      hint: this.level.isCall
        ? "Write a comma between arguments, or `*` to multiply."
        : "Write `*` to multiply.",
    });
  }

  private end(wantsOperand: boolean): boolean {
    const last = this.tokens.at(-1) ?? this.before;
    if (wantsOperand) {
      if (last) this.fault(last, "missing-operand", `a value is missing after ${quoted(last)}.`, {});
      else this.findings.add({ code: "missing-operand", message: "the text is empty." });
      return false;
    }
    const opens = this.level.opens;
    if (opens) {
      this.fault(opens, "open-bracket", "the bracket that opens here is not closed.", {
        hint: "Close it with `)`.",
      });
      return false;
    }
    return this.conditionalsComplete();
  }

  private conditionalsComplete(): boolean {
    const question = this.level.questions.at(-1);
    if (!question) return true;
    this.fault(question, "missing-colon", "this `?` has no `:` after it.", {
      hint: "Write `condition ? value : other value`.",
    });
    return false;
  }

  private get level(): Level {
    const level = this.levels.at(-1);
    if (!level) throw new TypeError("The expression itself is always a level.");
    return level;
  }

  private forgetComparison(): void {
    this.level.comparison = null;
    this.level.negation = null;
  }

  private fault(
    token: Token,
    code: string,
    message: string,
    mend: {
      readonly hint?: string;
      readonly insert?: { readonly title: string; readonly at: Token; readonly text: string };
      readonly replace?: { readonly title: string; readonly at: Token; readonly text: string };
    },
  ): null {
    const span = tokenSpan(token);
    const { hint, insert, replace } = mend;
    this.findings.add({
      code,
      message,
      span,
      ...(hint !== undefined && { hint }),
      ...(replace && { mend: { title: replace.title, span: tokenSpan(replace.at), text: replace.text } }),
      ...(insert && {
        mend: { title: insert.title, span: { ...span, endColumn: span.column }, text: insert.text },
      }),
    });
    return null;
  }
}

function newLevel(opens: Token | null, isCall: boolean): Level {
  return { opens, isCall, questions: [], comparison: null, negation: null };
}

function quoted(token: Token): string {
  return token.kind === "text" ? `"${token.text}"` : `\`${token.text}\``;
}
