import type { BinaryOperator, Expression, Span, Typed } from "../types";
import type { Check, Context } from "./context";
import { replace } from "./place";
import { alike, asNumber } from "./unify";
import {
  condition,
  conditionValue,
  numberValue,
  type ChoiceValue,
  type ConditionValue,
  type NumberValue,
  type Value,
} from "./value";

type BinaryExpression = Extract<Expression, { node: "binary" }>;
export type Comparison = Extract<BinaryOperator, "==" | "!=" | "<" | "<=" | ">" | ">=">;

/** A comparison of two numbers, or of a choice with the key of an option. */
export function compare(
  expression: BinaryExpression,
  operator: Comparison,
  check: Check,
  context: Context,
): ConditionValue | null {
  const sides = [expression.left, expression.right] as const;
  const keyed = sides.find((side) => side.node === "text");
  const other = keyed === sides[0] ? sides[1] : sides[0];
  // A text beside a choice is a key, not a quantity: look at the other side first.
  const first = check(keyed ? other : sides[0], context);
  if (first?.is === "choice") {
    const key = keyed ?? sides[1];
    return choiceTest(expression, operator, first, key, context);
  }
  const second = check(keyed ?? sides[1], context);
  if (second?.is === "choice") return choiceTest(expression, operator, second, sides[0], context);
  const firstNumber = asNumber(first, keyed ? other : sides[0], context);
  const secondNumber = asNumber(second, keyed ?? sides[1], context);
  if (!firstNumber || !secondNumber) return null;
  const [left, right] = keyed === sides[0] ? [secondNumber, firstNumber] : [firstNumber, secondNumber];
  return compareNumbers(expression, operator, left, right, context);
}

function compareNumbers(
  expression: BinaryExpression,
  operator: Comparison,
  left: NumberValue,
  right: NumberValue,
  context: Context,
): ConditionValue | null {
  const operands = [
    { expression: expression.left, value: left },
    { expression: expression.right, value: right },
  ];
  const list = operands.find((operand) => operand.value.type.length !== null);
  if (list)
    return context.place.fault(
      list.expression.span,
      "list-compared",
      `${context.place.quote(list.expression.span)} is a list; a comparison needs one number.`,
      { hint: "Take `min(…)`, `max(…)`, `first(…)` or `last(…)` of it." },
    );
  if (!alike(operands, expression, "compares", context)) return null;
  const typed: Typed = {
    node: "comparison",
    operator,
    left: left.typed,
    right: right.typed,
    tolerant: context.tolerant,
    type: condition,
    span: expression.span,
  };
  const turned = left.typed.node === "constant" && right.typed.node !== "constant";
  const compared = turned
    ? { value: right.typed, bound: left.typed }
    : { value: left.typed, bound: right.typed };
  return conditionValue(typed, [left, right], compared);
}

function choiceTest(
  expression: BinaryExpression,
  operator: Comparison,
  choice: ChoiceValue,
  key: Expression,
  context: Context,
): ConditionValue | null {
  const { place } = context;
  const { symbol, options } = choice.declaration;
  const keys = options.map((option) => `"${option.key}"`).join(", ");
  if (key.node !== "text")
    return place.fault(
      key.span,
      "choice-as-value",
      `the choice \`${symbol}\` is compared with ${place.quote(key.span)}, which is no key of an option.`,
      { hint: `Its keys are ${keys}.` },
    );
  if (choice.table !== null)
    return place.fault(
      expression.span,
      "list-compared",
      `\`${choice.table}.${symbol}\` has an option in each row; a comparison needs one.`,
      { hint: `Read a field of the options: \`${choice.table}.${symbol}.field\`.` },
    );
  if (operator !== "==" && operator !== "!=")
    return place.fault(expression.span, "choice-order", `the options of \`${symbol}\` have no order.`, {
      hint: "Compare them with `==` or `!=`.",
    });
  const option = options.findIndex((each) => each.key === key.text);
  if (option < 0)
    return place.fault(key.span, "unknown-option", `\`${symbol}\` has no option "${key.text}".`, {
      hint: `Its keys are ${keys}.`,
      mend: options.length === 1 && options[0] ? replace(key.span, `"${options[0].key}"`) : null,
    });
  const typed: Typed = {
    node: "option-test",
    choice: choice.index,
    option,
    equal: operator === "==",
    type: condition,
    span: expression.span,
  };
  return conditionValue(typed, []);
}

/** A condition; a number in its place is told as an error. */
export function asCondition(
  value: Value | null,
  expression: Expression,
  context: Context,
): ConditionValue | null {
  if (!value || value.is === "condition") return value;
  return context.place.fault(
    expression.span,
    "value-as-condition",
    `${context.place.quote(expression.span)} is not a condition.`,
    { hint: "Compare it: `x > 0`." },
  );
}

/** `and`, `or` of two conditions. */
export function logic(
  expression: BinaryExpression,
  operator: "and" | "or",
  check: Check,
  context: Context,
): ConditionValue | null {
  const left = asCondition(check(expression.left, context), expression.left, context);
  const right = asCondition(check(expression.right, context), expression.right, context);
  if (!left || !right) return null;
  return conditionValue(
    { node: "logic", operator, left: left.typed, right: right.typed, type: condition, span: expression.span },
    [left, right],
  );
}

export function negation(operand: ConditionValue, span: Span): ConditionValue {
  return conditionValue({ node: "not", operand: operand.typed, type: condition, span }, [operand]);
}

/** `c ? a : b`: both branches alike; a number spreads where the other is a list. */
export function conditional(
  expression: Extract<Expression, { node: "conditional" }>,
  check: Check,
  context: Context,
): NumberValue | null {
  const { whenTrue, whenFalse } = expression;
  const test = asCondition(check(expression.condition, context), expression.condition, context);
  const yes = asNumber(check(whenTrue, context), whenTrue, context);
  const no = asNumber(check(whenFalse, context), whenFalse, context);
  if (!yes || !no) return null;
  const branches = [
    { expression: whenTrue, value: yes },
    { expression: whenFalse, value: no },
  ];
  const type = alike(branches, expression, "chooses", context);
  if (!type || !test) return null;
  return numberValue(
    {
      node: "conditional",
      condition: test.typed,
      whenTrue: yes.typed,
      whenFalse: no.typed,
      type,
      span: expression.span,
    },
    type,
    [test, yes, no],
    { law: yes.law && no.law },
  );
}
