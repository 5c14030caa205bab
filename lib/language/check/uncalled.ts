import type { Expression } from "../types";
import type { Context } from "./context";
import { check } from "./expression";
import { unknownFunction } from "./references";
import type { FunctionSymbol } from "./symbols";

/**
 * A function is checked where it is called, with the types that it is given there. One that nobody calls has no types,
 * but the names in it can be judged: what is told of an uncalled function is told here.
 */
export function judgeNames(symbol: FunctionSymbol, context: Context): void {
  if (!symbol.read.expression) return;
  visit(
    symbol.read.expression,
    new Set((symbol.read.parameters ?? []).map((parameter) => parameter.name)),
    context,
  );
}

function visit(expression: Expression, bound: ReadonlySet<string>, context: Context): void {
  switch (expression.node) {
    case "number":
      return;
    case "text":
      return;
    case "name":
      if (!bound.has(expression.name)) check(expression, context);
      return;
    case "member":
      if (expression.object.node === "member") return visit(expression.object, bound, context);
      return object(expression.object, bound, context);
    case "unary":
      return visit(expression.operand, bound, context);
    case "binary":
      visit(expression.left, bound, context);
      return visit(expression.right, bound, context);
    case "conditional":
      visit(expression.condition, bound, context);
      visit(expression.whenTrue, bound, context);
      return visit(expression.whenFalse, bound, context);
    case "call": {
      const { callee } = expression;
      const form = callee.node === "name" && context.state.symbols.forms.has(callee.name);
      const [variable] = expression.arguments;
      const inner = form && variable?.node === "name" ? new Set([...bound, variable.name]) : bound;
      if (callee.node === "member") visit(callee, bound, context);
      else if (callee.node === "name" && !bound.has(callee.name)) functionNamed(callee, context);
      expression.arguments.forEach((argument, i) => {
        if (!(form && i === 0)) visit(argument, inner, context);
      });
    }
  }
}

function object(expression: Expression, bound: ReadonlySet<string>, context: Context): void {
  if (expression.node !== "name" || bound.has(expression.name)) return;
  // A table is no value by itself, but its columns are.
  const symbol = context.state.symbols.own.get(expression.name);
  if (symbol?.is === "input") context.state.used.add(expression.name);
  else check(expression, context);
}

function functionNamed(callee: Extract<Expression, { node: "name" }>, context: Context): void {
  const { symbols, used } = context.state;
  if (symbols.own.has(callee.name)) used.add(callee.name);
  else if (!symbols.functions.has(callee.name) && !symbols.forms.has(callee.name))
    unknownFunction(callee, context);
}
