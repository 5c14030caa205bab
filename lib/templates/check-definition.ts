import "server-only";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { checkDefinition as check } from "@/lib/calculation/program";
import type { Diagnostic, LineReport } from "@/lib/language";
import { siUnitSymbol } from "@/lib/units";
import type { DefinitionCheck } from "./schemas";

/** Everything that is wrong with a definition that is not saved, and what was found about its lines. */
export async function checkDefinition(
  actor: Actor,
  input: { definition?: unknown },
): Promise<DefinitionCheck> {
  permit(actor, "definition.check");
  const { diagnostics, check: found } = check(input.definition);
  return {
    ok: !diagnostics.some((diagnostic: Diagnostic) => diagnostic.severity === "error"),
    diagnostics: diagnostics.map(plain),
    lines: (found?.lines ?? []).flatMap(lineView),
  };
}

/** The same members, without those that are undefined and as arrays that may be written. */
function plain(diagnostic: Diagnostic): DefinitionCheck["diagnostics"][number] {
  return { ...diagnostic };
}

function lineView(line: LineReport): DefinitionCheck["lines"] {
  if (line.type === null) return [];
  const { length } = line.type;
  return [
    {
      symbol: line.symbol,
      quantity: line.quantity?.name ?? null,
      unit: line.unit ?? siUnitSymbol(line.type.dimension),
      shape: length === null ? "number" : lengthText(length),
    },
  ];
}

function lengthText({ table, plus }: { table: string | null; plus: number }): string {
  if (table === null) return `list of ${plus}`;
  if (plus === 0) return `list, one per row of ${table}`;
  return `list, rows of ${table} ${plus > 0 ? "plus" : "less"} ${Math.abs(plus)}`;
}
