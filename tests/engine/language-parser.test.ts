import { describe, expect, it } from "vitest";
import { parseExpression, parseWorking, type Expression } from "@/lib/language";

/** The tree in prefix form, so that its shape can be read at a glance. */
function shape(tree: Expression | null): string {
  if (!tree) return "—";
  switch (tree.node) {
    case "number":
      return String(tree.value);
    case "text":
      return `"${tree.text}"`;
    case "name":
      return tree.name;
    case "member":
      return `${shape(tree.object)}.${tree.member}`;
    case "call":
      return `${shape(tree.callee)}[${tree.arguments.map(shape).join(" ")}]`;
    case "unary":
      return `(${tree.operator} ${shape(tree.operand)})`;
    case "binary":
      return `(${tree.operator} ${shape(tree.left)} ${shape(tree.right)})`;
    case "conditional":
      return `(? ${shape(tree.condition)} ${shape(tree.whenTrue)} ${shape(tree.whenFalse)})`;
  }
}

const read = (text: string) => {
  const { expression, diagnostics } = parseExpression(text);
  return diagnostics.length > 0 ? diagnostics.map((each) => each.code).join(", ") : shape(expression);
};

/** What the source says at each operator's span, outermost first. */
function pieces(text: string): string[] {
  const found: string[] = [];
  const visit = (tree: Expression) => {
    const { column, endColumn } = tree.span;
    found.push(text.slice(column - 1, endColumn - 1));
    if (tree.node === "binary") [tree.left, tree.right].forEach(visit);
    if (tree.node === "unary") visit(tree.operand);
    if (tree.node === "call") tree.arguments.forEach(visit);
    if (tree.node === "conditional") [tree.condition, tree.whenTrue, tree.whenFalse].forEach(visit);
  };
  const { expression } = parseExpression(text);
  if (expression) visit(expression);
  return found;
}

describe("grammar of expressions", () => {
  it.each([
    ["a + b*c", "(+ a (* b c))"],
    ["a - b - c", "(- (- a b) c)"],
    ["a/b*c", "(* (/ a b) c)"],
    ["-a^2", "(- (^ a 2))"],
    ["a^b^c", "(^ a (^ b c))"],
    ["2^-3", "(^ 2 (- 3))"],
    ["-a*b", "(* (- a) b)"],
    ["(a + b)*c", "(* (+ a b) c)"],
    ["a < b and c >= d or e == f", "(or (and (< a b) (>= c d)) (== e f))"],
    ["not (a == b) and c < d", "(and (not (== a b)) (< c d))"],
    ["a > 0 ? b : c > 0 ? d : e", "(? (> a 0) b (? (> c 0) d e))"],
    ["a > 0 ? b > 0 ? c : d : e", "(? (> a 0) (? (> b 0) c d) e)"],
    ["layers.material.k(T)", "layers.material.k[T]"],
    ["f(a ? b : c, g(d))", "f[(? a b c) g[d]]"],
    ["E + PI + length + case", "(+ (+ (+ E PI) length) case)"],
    ["sin(x)^2", "(^ sin[x] 2)"],
    ['x + "25 mm"', '(+ x "25 mm")'],
    ['case == "a"', '(== case "a")'],
    [".5 + 1. + 1e3", "(+ (+ 0.5 1) 1000)"],
  ])("reads %s as %s", (text, expected) => {
    expect(read(text)).toBe(expected);
  });

  it.each([
    ["a < b < c", "chained-comparison"],
    ["not a == b", "ambiguous-not"],
    ["a == not b", "ambiguous-not"],
    ["a = b", "assignment-inside"],
    ["max(a b)", "missing-operator"],
    ["2(x)", "call-of-number"],
    ["(a)(b)", "missing-operator"],
    ["a b", "missing-operator"],
    ["5mm", "missing-operator"],
    ["a.b.c.d", "too-many-dots"],
    ["f(x).y", "stray-dot"],
    ["a.(b)", "missing-member"],
    ["f()", "missing-argument"],
    ["()", "missing-operand"],
    ["f(a,)", "missing-operand"],
    ["a, b", "stray-comma"],
    ["a +", "missing-operand"],
    ["* a", "missing-operand"],
    ["a ? b", "missing-colon"],
    ["a : b", "stray-colon"],
    ["f(a ? b, c)", "missing-colon"],
    ["a)", "stray-bracket"],
    ["(a", "open-bracket"],
    ["true", "no-constant-condition"],
    ["", "missing-operand"],
    ["a not b", "missing-operator"],
    ["a in b", "missing-operator"],
    ["x -> y", "missing-operand"],
  ])("refuses %j as %s", (text, code) => {
    expect(read(text)).toBe(code);
  });

  it("gives every part the span of its own text, brackets included where they are its operand's", () => {
    expect(pieces("(a + b)*-(c - d)/f(x, (y))")).toEqual([
      "(a + b)*-(c - d)/f(x, (y))",
      "(a + b)*-(c - d)",
      "a + b",
      "a",
      "b",
      "-(c - d)",
      "c - d",
      "c",
      "d",
      "f(x, (y))",
      "x",
      "y",
    ]);
    expect(pieces("((a > 1)) ? (b) : ((c))^2")).toEqual([
      "((a > 1)) ? (b) : ((c))^2",
      "a > 1",
      "a",
      "1",
      "b",
      "((c))^2",
      "c",
      "2",
    ]);
  });

  it("points at the sign that is wrong and offers the mend", () => {
    const [found] = parseExpression("2*(a = b)").diagnostics;
    expect(found).toMatchObject({ line: 1, column: 6, endColumn: 7, mend: { text: "==" } });
  });

  it("keeps names of JavaScript's own members ordinary words to the grammar", () => {
    expect(read("toString + valueOf")).toBe("(+ toString valueOf)");
  });
});

describe("statements", () => {
  it("reads lines, functions and notes", () => {
    const { statements, diagnostics } = parseWorking(
      "# heading\n\nD_o = D + 2*t  # outside\nfilm(s, r) = (s + T_amb)/2\n",
    );
    expect(diagnostics).toEqual([]);
    expect(statements).toMatchObject([
      {
        statement: "line",
        name: "D_o",
        note: "outside",
        span: { line: 3, column: 1, endLine: 3, endColumn: 14 },
      },
      { statement: "function", name: "film", parameters: [{ name: "s" }, { name: "r" }], note: null },
    ]);
  });

  it("continues a line while a bracket is open, comments between", () => {
    const { statements, diagnostics } = parseWorking("a = (1 # one )\n  + 2)\nb = a");
    expect(diagnostics).toEqual([]);
    expect(statements).toMatchObject([
      { name: "a", span: { line: 1, endLine: 2, endColumn: 7 }, note: "one )" },
      { name: "b", span: { line: 3 } },
    ]);
  });

  it("ends a statement whose bracket was forgotten where the next one begins", () => {
    const { statements, diagnostics } = parseWorking("a = (1 + 2\nb = 3\nf(x) = (x\ng(x) = x");
    expect(diagnostics.map((each) => `${each.line}:${each.column} ${each.code}`)).toEqual([
      "1:5 open-bracket",
      "3:8 open-bracket",
    ]);
    expect(statements.map((statement) => statement.name)).toEqual(["b", "g"]);
  });

  it.each([
    ["hello", "1:1 not-a-statement"],
    ["a == 3", "1:3 not-a-statement"],
    ["2 = a", "1:1 not-a-name"],
    ["f(2) = 3", "1:3 wrong-parameters"],
    ["f() = 3", "1:2 wrong-parameters"],
    ["f(a,) = 3", "1:4 wrong-parameters"],
    ["a + b = 3", "1:3 not-a-name"],
    ["a =", "1:3 missing-operand"],
    ["true = 1", "1:1 not-a-name"],
    ["a = b = c", "1:7 assignment-inside"],
  ])("refuses %j at %s", (source, place) => {
    const [found] = parseWorking(source).diagnostics;
    expect(`${found?.line}:${found?.column} ${found?.code}`).toBe(place);
  });

  it("tells the faults of all statements together, each named by its line", () => {
    const { diagnostics } = parseWorking("a = 1 +\nb = 2\nc = a b\nd = a § b");
    expect(diagnostics.map((each) => each.message.slice(0, 7))).toEqual(["Line 1:", "Line 3:", "Line 4:"]);
  });
});
