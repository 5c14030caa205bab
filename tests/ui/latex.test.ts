import { readFileSync, readdirSync } from "node:fs";
import path from "node:path";
import katex from "katex";
import { describe, expect, it } from "vitest";
import { typesetWorking } from "@/app/_components/run/typeset";
import { Definition } from "@/lib/calculation/definition";
import { parseExpression } from "@/lib/language";
import { expressionLatex, symbolLatex } from "@/lib/sheet/latex";

function latexOf(text: string): string {
  const { expression } = parseExpression(text);
  if (!expression) throw new Error(`${text} is no expression.`);
  return expressionLatex(expression);
}

describe("symbols", () => {
  it.each([
    ["T_surface", "T_{\\text{surface}}"],
    ["eps", "\\varepsilon"],
    ["T_inf", "T_{\\infty}"],
    ["R2", "R_{\\text{2}}"],
    ["Bi", "\\mathrm{Bi}"],
    ["sigma_SB", "\\sigma_{\\text{SB}}"],
  ])("%s is set as %s", (symbol, latex) => {
    expect(symbolLatex(symbol)).toBe(latex);
  });
});

describe("expressions", () => {
  it.each([
    ["(a + b)/c", "\\frac{a+b}{c}"],
    ["a - (b - c)", "a-\\left(b-c\\right)"],
    ["a*(b + c)", "a\\,\\left(b+c\\right)"],
    ["2*10", "2\\cdot 10"],
    ["(-a)^2", "\\left(-a\\right)^{2}"],
    ["-a^2", "-a^{2}"],
    ["sqrt(a)", "\\sqrt{a}"],
    ["ln(a/b)", "\\ln\\left(\\frac{a}{b}\\right)"],
    ['number_in(T, "K")', "\\left\\{T\\right\\}_{\\text{K}}"],
    ["integral(x, 0, L, x^2)", "\\int_{0}^{L} x^{2}\\,\\mathrm{d}x"],
    ["a > 0 ? b : c", "\\begin{cases}b & a > 0\\\\c & \\text{otherwise}\\end{cases}"],
  ])("%s reads %s", (text, latex) => {
    expect(latexOf(text)).toBe(latex);
  });

  it("sets texts of a definition as text, whatever they hold", () => {
    const { expression } = parseExpression('case == "x"');
    if (expression?.node !== "binary" || expression.right.node !== "text") throw new Error("No comparison.");
    for (const text of [
      "\\href{javascript:alert(1)}{x}",
      "1 }\\url{https://elsewhere.example}",
      "$% #&_^~{",
    ]) {
      const hostile = { ...expression, right: { ...expression.right, text } };
      const html = katex.renderToString(expressionLatex(hostile), { throwOnError: true, trust: true });
      expect(html).not.toMatch(/<a |href=/);
    }
  });
});

describe("the shelf", () => {
  const folder = path.join("db", "seed", "templates");
  it.each(readdirSync(folder))("%s is typeset without a fault, one row a statement", (file) => {
    const definition = Definition.parse(JSON.parse(readFileSync(path.join(folder, file), "utf8")));
    const rows = typesetWorking(definition);
    expect(rows.length).toBeGreaterThan(0);
    for (const row of rows) expect(row.html, row.symbol).not.toMatch(/katex-error/);
  });
});
