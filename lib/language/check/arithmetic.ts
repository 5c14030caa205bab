import {
  addRational,
  divide,
  isDimensionless,
  multiply,
  multiplyRational,
  power,
  rational,
  sameDimension,
  type Rational,
} from "@/lib/units";
import { limits } from "../limits";
import type { Expression, NumberType, Typed } from "../types";
import type { Context } from "./context";
import { replace } from "./place";
import { addReadings, exactOrNull, holdsAbsolute, productReading, scaleReading } from "./reading";
import { warnOfAbsoluteProduct } from "./absolute-product";
import { beyondReach, withinReach } from "./reach";
import { castHint, commonLength, dimensionsDiffer, type Operand } from "./unify";
import { constantNode, literalZero, numberType, numberValue, withLength, type NumberValue } from "./value";
import { describe } from "./words";

type Operator = "+" | "-" | "*" | "/" | "^";
type BinaryExpression = Extract<Expression, { node: "binary" }>;

const minusOne = rational(-1);

export function negate(operand: NumberValue, expression: Expression): NumberValue {
  const { type, literal } = operand;
  const negated = { ...type, temperature: scaleReading(type.temperature, minusOne) };
  const typed: Typed =
    operand.typed.node === "constant" && literal
      ? constantNode(-operand.typed.value, negated, expression.span)
      : { node: "negate", operand: operand.typed, type: negated, span: expression.span };
  return numberValue(typed, negated, [operand], {
    law: operand.law,
    literal: literal && multiplyRational(literal, minusOne),
  });
}

/** `left operator right` with both sides read. Null after an error. */
export function arithmetic(
  expression: BinaryExpression,
  operator: Operator,
  left: NumberValue,
  right: NumberValue,
  context: Context,
): NumberValue | null {
  const operands: [Operand, Operand] = [
    { expression: expression.left, value: left },
    { expression: expression.right, value: right },
  ];
  const length = commonLength([left.type, right.type], expression, context);
  if (length === undefined) return null;
  const single =
    operator === "+" || operator === "-"
      ? sumType(operator, operands, expression, context)
      : operator === "^"
        ? powerType(operands, expression, context)
        : productType(operator, operands, expression, context);
  if (!single) return null;
  const type = withLength(single, length);
  const literal = left.literal && right.literal ? literalOf(operator, left.literal, right.literal) : null;
  const typed = folded(expression, operator, left, right, type) ?? {
    node: "arithmetic",
    operator,
    left: left.typed,
    right: right.typed,
    type,
    span: expression.span,
  };
  const law = left.law || (operator === "^" ? holdsAbsolute(left.type) && !isOne(right.literal) : right.law);
  const sum =
    operator === "+" || operator === "-" ? { operator, left: left.type, right: right.type } : undefined;
  return numberValue(typed, type, [left, right], { law, literal, sum });
}

/** Literals among themselves are one constant, so that `1/3` is a number to the compiler. */
function folded(
  expression: BinaryExpression,
  operator: Operator,
  left: NumberValue,
  right: NumberValue,
  type: NumberType,
): Typed | null {
  const [a, b] = [left.typed, right.typed];
  if (!left.literal || !right.literal || a.node !== "constant" || b.node !== "constant") return null;
  const value = compute(operator, a.value, b.value);
  return Number.isFinite(value) ? constantNode(value, type, expression.span) : null;
}

function compute(operator: Operator, a: number, b: number): number {
  switch (operator) {
    case "+":
      return a + b;
    case "-":
      return a - b;
    case "*":
      return a * b;
    case "/":
      return a / b;
    case "^":
      return Math.pow(a, b);
  }
}

function literalOf(operator: Operator, a: Rational, b: Rational): Rational | null {
  return exactOrNull(() => {
    switch (operator) {
      case "+":
        return addRational(a, b);
      case "-":
        return addRational(a, multiplyRational(b, minusOne));
      case "*":
        return multiplyRational(a, b);
      case "/":
        return b.n === 0 ? null : multiplyRational(a, rational(b.d, b.n));
      case "^":
        return b.d === 1 && Math.abs(b.n) <= 16 && (b.n >= 0 || a.n !== 0)
          ? rational((b.n < 0 ? a.d : a.n) ** Math.abs(b.n), (b.n < 0 ? a.n : a.d) ** Math.abs(b.n))
          : null;
    }
  });
}

function isOne(literal: Rational | null): boolean {
  return literal !== null && literal.n === 1 && literal.d === 1;
}

function sumType(
  operator: "+" | "-",
  operands: readonly [Operand, Operand],
  expression: BinaryExpression,
  context: Context,
): NumberType | null {
  const [left, right] = operands;
  const [a, b] = [left.value.type, right.value.type];
  const b_signed = operator === "-" ? { ...b, temperature: scaleReading(b.temperature, minusOne) } : b;
  if (b.literalZero) return a;
  if (a.literalZero) return b_signed;
  const verb = operator === "+" ? "adds" : "subtracts";
  if (!sameDimension(a.dimension, b.dimension))
    return dimensionsDiffer(left, right, expression, verb, context);
  const temperature = addReadings(a, b_signed);
  if (temperature !== null) return { ...a, temperature };
  const { place } = context;
  const share = sharesOfTemperatures(expression, context);
  const unread = a.temperature === "none" ? left : right;
  return place.fault(
    expression.span,
    "no-temperature",
    `${place.quote(expression.span)} ${verb} ${place.quote(unread.expression.span)}, a product of absolute temperatures ` +
      "that is neither a temperature nor a difference.",
    share
      ? { hint: `Write \`${share}\`.`, mend: replace(expression.span, share, "Use a difference") }
      : {
          ...castHint(unread, context),
          hint: "Multiply a difference, as in `T1 + n*(T2 - T1)`, or declare a temperature with `as_temperature(…)`.",
        },
  );
}

/** `(1 - n)*T1 + n*T2` written as `T1 + n*(T2 - T1)`; null where the sum has another form. */
function sharesOfTemperatures(expression: BinaryExpression, context: Context): string | null {
  if (expression.operator !== "+") return null;
  const text = (part: Expression) => context.place.text(part.span);
  const factors = (part: Expression): [Expression, Expression][] =>
    part.node === "binary" && part.operator === "*"
      ? [
          [part.left, part.right],
          [part.right, part.left],
        ]
      : [];
  for (const [one, other] of [
    [expression.left, expression.right],
    [expression.right, expression.left],
  ] as const)
    for (const [rest, from] of factors(one))
      for (const [share, to] of factors(other))
        if (
          rest.node === "binary" &&
          rest.operator === "-" &&
          rest.left.node === "number" &&
          rest.left.value === 1 &&
          share.node === "name" &&
          text(rest.right) === text(share)
        )
          return `${text(from)} + ${text(share)}*(${text(to)} - ${text(from)})`;
  return null;
}

function productType(
  operator: "*" | "/",
  operands: readonly [Operand, Operand],
  expression: BinaryExpression,
  context: Context,
): NumberType | null {
  const [left, right] = operands.map((operand) => operand.value) as [NumberValue, NumberValue];
  const [a, b] = [left.type, right.type];
  if (a.literalZero || (b.literalZero && operator === "*")) return literalZero;
  if (left.literal && operator === "*")
    return { ...b, temperature: scaleReading(b.temperature, left.literal) };
  if (right.literal && right.literal.n !== 0) {
    const factor = operator === "*" ? right.literal : rational(right.literal.d, right.literal.n);
    return { ...a, temperature: scaleReading(a.temperature, factor) };
  }
  const dimension = exactOrNull(() =>
    operator === "*" ? multiply(a.dimension, b.dimension) : divide(a.dimension, b.dimension),
  );
  if (!dimension || !withinReach(dimension)) return beyondReach(expression, context);
  warnOfAbsoluteProduct(operator, operands, expression, context);
  return numberType(dimension, productReading(dimension, [a, b]));
}

function powerType(
  operands: readonly [Operand, Operand],
  expression: BinaryExpression,
  context: Context,
): NumberType | null {
  const [base, exponent] = operands;
  const { place } = context;
  if (!isDimensionless(exponent.value.type.dimension))
    return place.fault(
      exponent.expression.span,
      "exponent",
      `the exponent ${place.quote(exponent.expression.span)} has a dimension: ${describe(exponent.value.type)}.`,
      { hint: "An exponent is a bare number." },
    );
  const type = base.value.type;
  if (type.literalZero)
    return exponent.value.literal && exponent.value.literal.n > 0 ? literalZero : numberType(type.dimension);
  if (isDimensionless(type.dimension)) return numberType(type.dimension);
  const literal = exponent.value.literal;
  if (!literal || literal.d > limits.exponent || Math.abs(literal.n) > limits.exponent)
    return place.fault(
      exponent.expression.span,
      "exponent",
      `${place.quote(base.expression.span)} is ${describe(type)}; its exponent must be a constant fraction, not ` +
        `${place.quote(exponent.expression.span)}.`,
      { hint: "Write a number such as 2, 0.5 or (1/3), or make the base dimensionless first." },
    );
  if (isOne(literal)) return type;
  const dimension = exactOrNull(() => power(type.dimension, literal));
  if (!dimension || !withinReach(dimension)) return beyondReach(expression, context);
  return numberType(dimension, productReading(dimension, [type]));
}
