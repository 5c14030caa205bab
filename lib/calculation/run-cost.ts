import type { TypedProgram } from "@/lib/language";
import { CostMeter } from "@/lib/language/compile/cost";

/** Static size of one run without the bodies of special forms: nodes, and nodes for each row of a table. */
export interface RunCost {
  readonly fixed: number;
  readonly perRow: ReadonlyMap<string, number>;
}

/** What one run of a program costs, in the steps that fuel counts: about 10 ns each. */
export function runCost(program: TypedProgram): RunCost {
  const meter = new CostMeter(program);
  const perRow = new Map<string, number>();
  let fixed = 0;
  const expressions = [...program.lines, ...program.conditions].map(({ expression }) => expression);
  for (const expression of expressions) {
    const cost = meter.of(expression);
    fixed += cost.fixed;
    for (const { length, amount } of cost.perElement.values()) {
      fixed += amount * Math.max(0, length.plus);
      if (length.table !== null) perRow.set(length.table, (perRow.get(length.table) ?? 0) + amount);
    }
  }
  return { fixed, perRow };
}
