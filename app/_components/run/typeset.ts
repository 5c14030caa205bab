import "server-only";
import katex from "katex";
import type { Definition } from "@/lib/calculation/definition";
import { checkDefinition } from "@/lib/calculation/program";
import { parseWorking } from "@/lib/language";
import { expressionLatex, symbolLatex } from "@/lib/sheet/latex";
import type { WorkingRow } from "./working-table";

/** The working of a definition as KaTeX markup, one row a statement. */
export function typesetWorking(definition: Definition): WorkingRow[] {
  const { check } = checkDefinition(definition);
  const parameters = new Map(
    parseWorking(definition.working).statements.flatMap((statement) =>
      statement.statement === "function"
        ? [
            [
              statement.name,
              statement.parameters.map((parameter) => symbolLatex(parameter.name)).join(",\\,"),
            ],
          ]
        : [],
    ),
  );
  return (check?.lines ?? []).map((line) => {
    const name = symbolLatex(line.symbol);
    const left = line.isFunction ? `${name}\\left(${parameters.get(line.symbol) ?? ""}\\right)` : name;
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
