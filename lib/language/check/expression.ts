import { rational, type Rational } from "@/lib/units";
import { limits } from "../limits";
import type { Expression } from "../types";
import { arithmetic, negate } from "./arithmetic";
import { asCondition, compare, conditional, logic, negation } from "./compare";
import { LimitMet, type Context } from "./context";
import { asTemperature, numberIn, quantityText } from "./conversions";
import { specialForm } from "./forms";
import { languageCall } from "./functions";
import { member, propertyCall } from "./members";
import { ownCall } from "./own-functions";
import { replace } from "./place";
import { exactOrNull } from "./reading";
import { isVisible, nameValue, unknownFunction } from "./references";
import { asNumber, type Operand } from "./unify";
import { bareNumber, constantNode, literalZero, numberValue, type NumberValue, type Value } from "./value";

type CallExpression = Extract<Expression, { node: "call" }>;

/**
 * Checks dimension, temperature reading and shape of an expression and builds its typed tree. Everything that is wrong
 * in it is told; null then stands for its value, which accuses nothing else.
 */
export function check(expression: Expression, context: Context): Value | null {
  const { state, place } = context;
  if (++state.nodes > limits.nodes) throw new LimitMet();
  if (state.depth >= limits.depth)
    return place.fault(
      expression.span,
      "too-deep",
      `with the functions that it calls, this expression is more than ${limits.depth} levels deep. ` +
        `The limit is ${limits.depth}.`,
      { hint: "Give parts of it lines of their own." },
    );
  state.depth++;
  const value = checkNode(expression, context);
  state.depth--;
  return value;
}

function checkNode(expression: Expression, context: Context): Value | null {
  switch (expression.node) {
    case "number":
      return literal(expression);
    case "text":
      return quantityText(expression, context);
    case "name":
      return nameValue(expression, context);
    case "member":
      return member(expression, check, context);
    case "call":
      return call(expression, context);
    case "conditional":
      return conditional(expression, check, context);
    case "unary": {
      const { operand, operator, span } = expression;
      const value = check(operand, context);
      if (operator === "not") {
        const test = asCondition(value, operand, context);
        return test && negation(test, span);
      }
      const number = asNumber(value, operand, context);
      return number && operator === "-" ? negate(number, expression) : number;
    }
    case "binary": {
      const { operator } = expression;
      switch (operator) {
        case "and":
        case "or":
          return logic(expression, operator, check, context);
        case "==":
        case "!=":
        case "<":
        case "<=":
        case ">":
        case ">=":
          return compare(expression, operator, check, context);
      }
      const left = asNumber(check(expression.left, context), expression.left, context);
      const right = asNumber(check(expression.right, context), expression.right, context);
      return left && right && arithmetic(expression, operator, left, right, context);
    }
  }
}

function literal(expression: Extract<Expression, { node: "number" }>): NumberValue {
  const { value, span } = expression;
  const type = value === 0 ? literalZero : bareNumber;
  return numberValue(constantNode(value, type, span), type, [], { literal: exactDecimal(value) });
}

/** The decimal fraction that was written: 0.3333 is 3333/10000. */
function exactDecimal(value: number): Rational | null {
  const [, whole = "", decimals = "", exponent = "0"] =
    /^(\d+)(?:\.(\d+))?(?:e([+-]\d+))?$/.exec(String(value)) ?? [];
  if (whole === "") return null;
  const shift = Number(exponent) - decimals.length;
  const digits = Number(whole + decimals);
  return exactOrNull(() => (shift < 0 ? rational(digits, 10 ** -shift) : rational(digits * 10 ** shift)));
}

function call(expression: CallExpression, context: Context): Value | null {
  const { callee } = expression;
  if (callee.node === "member") return propertyCall(expression, callee, check, context);
  if (callee.node !== "name") throw new TypeError("The grammar lets names and members be called only.");
  const { state, place } = context;
  const word = callee.name;
  const symbol = state.symbols.own.get(word);
  if (!context.locals.has(word) && !symbol) {
    const form = state.symbols.forms.get(word);
    if (form) return specialForm(form, expression, check, context);
    if (word === "number_in") return numberIn(expression, check, context);
    if (word === "as_temperature") return asTemperature(expression, check, context);
  }
  const operands = expression.arguments.map((argument): Operand | null => {
    const value = asNumber(check(argument, context), argument, context);
    return value && { expression: argument, value };
  });
  if (context.locals.has(word) || symbol?.is === "line" || symbol?.is === "input") {
    if (symbol) state.used.add(word);
    const first = expression.arguments[0];
    const product = first && `${word}*(${place.text(first.span)})`;
    return place.fault(callee.span, "not-a-function", `\`${word}\` is a value and cannot be called.`, {
      hint: product ? `Write \`${product}\` to multiply.` : "Write `*` to multiply.",
      mend:
        product && expression.arguments.length === 1 ? replace(expression.span, product, "Multiply") : null,
    });
  }
  if (symbol) {
    return isVisible(symbol.statement, callee, context)
      ? ownCall(symbol, expression, operands, check, context)
      : null;
  }
  const row = state.symbols.functions.get(word);
  if (!row) return unknownFunction(callee, context);
  const enough = row.variadic
    ? operands.length >= row.parameters.length
    : operands.length === row.parameters.length;
  if (!enough) {
    const count = row.parameters.length;
    return place.fault(
      expression.span,
      "argument-count",
      `\`${word}\` takes ${count === 1 ? "one argument" : `${count} arguments`}, not ${operands.length}.`,
      { hint: `Write \`${word}(${row.parameters.join(", ")})\`.` },
    );
  }
  const known = operands.filter((operand): operand is Operand => operand !== null);
  return known.length === operands.length ? languageCall(row, known, expression, context) : null;
}
