import "server-only";
import katex from "katex";
import type { Definition } from "@/lib/calculation/definition";
import { checkDefinition } from "@/lib/calculation/program";
import { expressionLatex, symbolLatex } from "@/lib/sheet/latex";
import type { WorkingRow } from "./working-table";

/** The working of a definition as KaTeX markup, one row a statement. */
export function typesetWorking(definition: Definition): WorkingRow[] {
  const { check } = checkDefinition(definition);
  return (check?.lines ?? []).map((line) => {
    const left = line.isFunction
      ? `${symbolLatex(line.symbol)}(${line.parameters.map(symbolLatex).join(",\\,")})`
      : symbolLatex(line.symbol);
    const html = katex.renderToString(`\\displaystyle ${left}=${expressionLatex(line.expression)}`, {
      output: "htmlAndMathml",
      throwOnError: false,
      strict: "ignore",
      trust: false,
    });
    return {
      line: line.line,
      symbol: line.symbol,
      isFunction: line.isFunction,
      html,
      note: line.note,
      unit: line.unit,
    };
  });
}
