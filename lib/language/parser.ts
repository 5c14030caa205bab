import { Parser } from "expr-eval";
import type { BinaryOperator, Expression, Span, UnaryOperator } from "./types";
import { joinSpans, spanOver, tokenSpan, type Token } from "./token";

/**
 * Reading of expressions with the grammar of the expr-eval package, which is used for parsing only. Its instructions
 * carry no places, but names, numbers and texts occur in them in source order, so they are matched with our words.
 */

const unaryOperators: ReadonlySet<string> = new Set(["-", "+", "not"]);
const binaryOperators: ReadonlySet<string> = new Set([
  "+",
  "-",
  "*",
  "/",
  "^",
  "==",
  "!=",
  "<",
  "<=",
  ">",
  ">=",
  "and",
  "or",
]);

/** A table of the package that holds names only: no implementation, no prototype. */
function names(words: Iterable<string>): Readonly<Record<string, true>> {
  const table = Object.create(null) as Record<string, true>;
  for (const word of words) table[word] = true;
  return Object.freeze(table);
}

/** One instruction of the package; a branch is a list of instructions in itself. */
interface Instruction {
  readonly type: string;
  readonly value: unknown;
}

export interface ExpressionParser {
  /** Tree of an expression whose grammar was judged before. Throws when the package reads it otherwise. */
  parse(tokens: readonly Token[]): Expression;
}

/** The package's parser, left with nothing but what the language has. Constants stay names, so that they keep their units. */
export function expressionParser(): ExpressionParser {
  const parser = new Parser({
    allowMemberAccess: true,
    operators: Object.assign(
      {
        remainder: false,
        factorial: false,
        concatenate: false,
        in: false,
        assignment: false,
        fndef: false,
        length: false,
      },
      { array: false },
    ),
  });
  Object.assign(parser, {
    unaryOps: names(unaryOperators),
    binaryOps: names(binaryOperators),
    ternaryOps: names(["?"]),
    functions: names([]),
    consts: names([]),
  });
  return {
    parse(tokens) {
      const text = tokens.map((token) => (token.kind === "text" ? `"${token.text}"` : token.text)).join(" ");
      const parsed: unknown = parser.parse(text);
      return new TreeBuilder(tokens).build(instructionsOf(parsed));
    },
  };
}

function instructionsOf(parsed: unknown): readonly Instruction[] {
  if (typeof parsed === "object" && parsed !== null && "tokens" in parsed && Array.isArray(parsed.tokens))
    return parsed.tokens;
  throw new TypeError("The grammar package gave no instructions.");
}

/** A tree with the words that it covers, first to last. */
interface Piece {
  readonly tree: Expression;
  readonly first: number;
  readonly last: number;
}

class TreeBuilder {
  /** Partner of each bracket. */
  private readonly partner = new Map<number, number>();
  private next = 0;

  constructor(private readonly tokens: readonly Token[]) {
    const open: number[] = [];
    tokens.forEach((token, i) => {
      if (token.kind === "open") open.push(i);
      if (token.kind !== "close") return;
      const partner = open.pop();
      if (partner === undefined) return;
      this.partner.set(partner, i);
      this.partner.set(i, partner);
    });
  }

  build(instructions: readonly Instruction[]): Expression {
    const { tree } = this.piece(instructions);
    if (this.operandAt(this.next) !== -1) throw new TypeError("The grammar package left words unread.");
    return tree;
  }

  private piece(instructions: readonly Instruction[]): Piece {
    const stack: Piece[] = [];
    const pop = (): Piece => {
      const piece = stack.pop();
      if (!piece) throw new TypeError("An instruction of the grammar package lacks its operand.");
      return piece;
    };
    const pending: (readonly Instruction[])[] = [];
    for (const { type, value } of instructions) {
      switch (type) {
        case "IVAR":
        case "INUMBER":
          stack.push(this.leaf(value));
          break;
        case "IMEMBER":
          stack.push(this.member(pop(), value));
          break;
        case "IOP1":
          stack.push(this.unary(pop(), value));
          break;
        case "IFUNCALL": {
          const count = typeof value === "number" ? value : 0;
          const found = stack.splice(stack.length - count, count);
          stack.push(this.call(pop(), found));
          break;
        }
        // Branches and right sides of `and` and `or` come as lists of their own, read when their operator comes.
        case "IEXPR":
          pending.push(Array.isArray(value) ? value : []);
          break;
        case "IOP2": {
          const branch = pending.pop();
          const right = branch ? this.piece(branch) : pop();
          stack.push(this.binary(pop(), right, value));
          break;
        }
        case "IOP3": {
          const [whenTrue = [], whenFalse = []] = pending.splice(-2);
          const condition = pop();
          stack.push(this.conditional(condition, this.piece(whenTrue), this.piece(whenFalse)));
          break;
        }
        default:
          throw new TypeError(
            `The grammar package gave the instruction ${type}, which the language does not have.`,
          );
      }
    }
    const result = pop();
    if (stack.length > 0 || pending.length > 0)
      throw new TypeError("The grammar package read more than one expression.");
    return result;
  }

  private operandAt(from: number): number {
    for (let i = from; i < this.tokens.length; i++) {
      const kind = this.token(i).kind;
      if (kind === "name" || kind === "number" || kind === "text") return i;
    }
    return -1;
  }

  private take(value: unknown): number {
    const index = this.operandAt(this.next);
    const token = this.tokens[index];
    const same =
      token !== undefined && (token.kind === "number" ? Number(token.text) === value : token.text === value);
    if (!same) throw new TypeError(`The grammar package read ${String(value)} where another word stands.`);
    this.next = index + 1;
    return index;
  }

  private leaf(value: unknown): Piece {
    const index = this.take(value);
    const token = this.token(index);
    const span = tokenSpan(token);
    const tree: Expression =
      token.kind === "number"
        ? { node: "number", value: Number(token.text), span }
        : token.kind === "text"
          ? { node: "text", text: token.text, span }
          : { node: "name", name: token.text, span };
    return { tree, first: index, last: index };
  }

  private member(object: Piece, value: unknown): Piece {
    const index = this.take(value);
    const memberSpan = tokenSpan(this.token(index));
    const span = joinSpans(object.tree.span, memberSpan);
    return {
      tree: { node: "member", object: object.tree, member: this.token(index).text, span, memberSpan },
      first: object.first,
      last: index,
    };
  }

  private unary(bare: Piece, value: unknown): Piece {
    const operand = this.withBrackets(bare);
    const first = operand.first - 1;
    if (typeof value !== "string" || !isUnary(value) || this.token(first).text !== value)
      throw new TypeError(`The grammar package gave the sign ${String(value)} where another stands.`);
    const span = this.span(first, operand.last);
    return {
      tree: { node: "unary", operator: value, operand: operand.tree, span },
      first,
      last: operand.last,
    };
  }

  private binary(bareLeft: Piece, bareRight: Piece, value: unknown): Piece {
    const left = this.withBrackets(bareLeft);
    const right = this.withBrackets(bareRight);
    if (typeof value !== "string" || !isBinary(value) || this.token(left.last + 1).text !== value)
      throw new TypeError(`The grammar package gave the sign ${String(value)} where another stands.`);
    const span = this.span(left.first, right.last);
    return {
      tree: { node: "binary", operator: value, left: left.tree, right: right.tree, span },
      first: left.first,
      last: right.last,
    };
  }

  private conditional(bareCondition: Piece, whenTrue: Piece, bareFalse: Piece): Piece {
    const condition = this.withBrackets(bareCondition);
    const whenFalse = this.withBrackets(bareFalse);
    const span = this.span(condition.first, whenFalse.last);
    return {
      tree: {
        node: "conditional",
        condition: condition.tree,
        whenTrue: whenTrue.tree,
        whenFalse: whenFalse.tree,
        span,
      },
      first: condition.first,
      last: whenFalse.last,
    };
  }

  private call(callee: Piece, found: readonly Piece[]): Piece {
    const last = this.partner.get(callee.last + 1);
    if (last === undefined) throw new TypeError("The grammar package read a call where none stands.");
    return {
      tree: {
        node: "call",
        callee: callee.tree,
        arguments: found.map((piece) => piece.tree),
        span: this.span(callee.first, last),
      },
      first: callee.first,
      last,
    };
  }

  /** The piece with the brackets directly around it, so that spans of what contains it are whole pieces of text. */
  private withBrackets(piece: Piece): Piece {
    let { first, last } = piece;
    while (first > 0 && this.partner.get(first - 1) === last + 1) {
      first--;
      last++;
    }
    return { tree: piece.tree, first, last };
  }

  private token(index: number): Token {
    const token = this.tokens[index];
    if (!token) throw new TypeError("The grammar package read beyond the words of the expression.");
    return token;
  }

  private span(first: number, last: number): Span {
    return spanOver(this.token(first), this.token(last));
  }
}

function isUnary(word: string): word is UnaryOperator {
  return unaryOperators.has(word);
}

function isBinary(word: string): word is BinaryOperator {
  return binaryOperators.has(word);
}
