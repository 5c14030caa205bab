import { limits } from "../limits";
import type { Expression, FunctionInstance, Typed } from "../types";
import { withLocals, LimitMet, type Check, type CheckedFunction, type Context, type Local } from "./context";
import type { FunctionSymbol } from "./symbols";
import { asNumber, finished, type Operand } from "./unify";
import { numberValue, typeKey, type NumberValue } from "./value";

type CallExpression = Extract<Expression, { node: "call" }>;

/**
 * A call of a function of the working. Its body is checked with the types of these arguments; one result is remembered
 * for each combination, because functions that call each other twice would otherwise double the work at every level.
 */
export function ownCall(
  symbol: FunctionSymbol,
  expression: CallExpression,
  operands: readonly (Operand | null)[],
  check: Check,
  context: Context,
): NumberValue | null {
  const { place, state } = context;
  const { read } = symbol;
  const parameters = read.parameters ?? [];
  state.used.add(read.name);
  if (operands.length !== parameters.length) {
    const names = parameters.map((parameter) => parameter.name).join(", ");
    return place.fault(
      expression.span,
      "argument-count",
      `\`${read.name}\` takes ${counted(parameters.length)}, not ${operands.length}.`,
      { hint: `It is defined as \`${read.name}(${names})\` on line ${read.nameSpan.line}.` },
    );
  }
  const known = operands.filter((operand): operand is Operand => operand !== null);
  if (known.length < operands.length) return null;
  if (!known.map((operand) => finished(operand, context)).every(Boolean)) return null;
  const key = `${read.name}(${known.map((operand) => `${typeKey(operand.value.type)} ${operand.value.law}`).join(";")})`;
  let checked = state.remembered.get(key);
  if (checked === undefined) {
    checked = checkInstance(symbol, known, expression, check, context);
    state.remembered.set(key, checked);
  }
  if (!checked) return null;
  const { result, index } = checked;
  const { type } = result;
  const typed: Typed = {
    node: "function-call",
    instance: index,
    arguments: known.map((operand) => operand.value.typed),
    type,
    span: expression.span,
  };
  const call = numberValue(typed, type, [result, ...known.map((operand) => operand.value)], {
    law: result.law,
  });
  if (call.size > limits.nodes) throw new LimitMet();
  return call;
}

function counted(count: number): string {
  return count === 1 ? "one argument" : `${count} arguments`;
}

function checkInstance(
  symbol: FunctionSymbol,
  operands: readonly Operand[],
  call: CallExpression,
  check: Check,
  context: Context,
): CheckedFunction | null {
  const { state, place } = context;
  const { read } = symbol;
  if (!read.expression) return null;
  const parameters: FunctionInstance["parameters"] = (read.parameters ?? []).map((parameter, i) => {
    const operand = operands[i];
    if (!operand) throw new TypeError("The arguments of a function were counted.");
    return { slot: state.slots++, symbol: parameter.name, type: operand.value.type };
  });
  const locals = parameters.map(({ slot, symbol: name, type }, i): [string, Local] => [
    name,
    { slot, type, law: operands[i]?.value.law ?? false },
  ]);
  const inside: Context = {
    state,
    place: state.working.inCall(`the call ${place.quote(call.span)}`),
    before: symbol.statement,
    tolerant: false,
    named: new Set(),
    locals: new Map(),
  };
  const result = asNumber(check(read.expression, withLocals(inside, locals)), read.expression, inside);
  if (!result || !finished({ expression: read.expression, value: result }, inside)) return null;
  state.instances.push({ name: read.name, parameters, body: result.typed });
  return { index: state.instances.length - 1, result: { ...result, literal: null } };
}
