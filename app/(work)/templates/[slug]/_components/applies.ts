import type { Definition, Input } from "@/lib/calculation/definition";
import { parseExpression, type Expression } from "@/lib/language";
import type { FormValues } from "./form-state";

/**
 * Is an input of use with the options chosen at present? The browser may not compile code, and `appliesWhen` compares
 * choices, so a small walk over the syntax tree answers it. What it cannot judge counts as applying; the server decides.
 */
export function makeApplies(definition: Definition): (values: FormValues) => (input: Input) => boolean {
  const conditions = new Map<string, Expression>();
  for (const input of definition.inputs) {
    const parsed = input.appliesWhen ? parseExpression(input.appliesWhen).expression : null;
    if (parsed) conditions.set(input.symbol, parsed);
  }
  return (values) => (input) => {
    const condition = conditions.get(input.symbol);
    return condition === undefined || judge(condition, values) !== false;
  };
}

function judge(expression: Expression, values: FormValues): boolean | null {
  if (expression.node === "unary" && expression.operator === "not") {
    const inner = judge(expression.operand, values);
    return inner === null ? null : !inner;
  }
  if (expression.node !== "binary") return null;
  const { operator, left, right } = expression;
  if (operator === "and" || operator === "or") {
    const a = judge(left, values);
    const b = judge(right, values);
    if (a === null || b === null) return null;
    return operator === "and" ? a && b : a || b;
  }
  const [name, text] = left.node === "name" ? [left, right] : [right, left];
  if ((operator !== "==" && operator !== "!=") || name.node !== "name" || text.node !== "text") return null;
  const state = values.inputs[name.name];
  if (state?.kind !== "choice") return null;
  return (state.option === text.text) === (operator === "==");
}
