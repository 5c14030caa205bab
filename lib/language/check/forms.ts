import { isDimensionless, isTemperature } from "@/lib/units";
import type { SpecialFormName, SpecialFormRow } from "../functions";
import { limits } from "../limits";
import type { Expression, NumberType, Typed } from "../types";
import { beyondReach, productOf } from "./reach";
import { withLocals, type Check, type Context } from "./context";
import { isAbsolute, isDifference } from "./reading";
import { alike, asNumber, finished, type Operand } from "./unify";
import { bareNumber, numberType, numberValue, type NumberValue } from "./value";
import { describe } from "./words";

type CallExpression = Extract<Expression, { node: "call" }>;

/** `balance argmin integral series fixed_point`: the first argument is bound in the last. Null after an error. */
export function specialForm(
  row: SpecialFormRow,
  expression: CallExpression,
  check: Check,
  context: Context,
): NumberValue | null {
  const { place, state } = context;
  const wanted = row.parameters.length;
  if (expression.arguments.length !== wanted)
    return place.fault(
      expression.span,
      "argument-count",
      `\`${row.name}\` takes ${wanted} arguments, not ${expression.arguments.length}.`,
      { hint: `Write \`${row.name}(${row.parameters.join(", ")})\`.` },
    );
  state.iterates = true;
  const [variable, ...rest] = expression.arguments;
  const body = rest.pop();
  if (!variable || !body) throw new TypeError("The arguments of a special form were counted.");
  const bounds = rest.map((bound) => ({
    expression: bound,
    value: asNumber(check(bound, context), bound, context),
  }));
  const name = boundName(variable, row, context);
  const known = bounds.filter((bound): bound is Operand => bound.value !== null);
  const type = known.length === bounds.length ? variableType(row.name, known, expression, context) : null;
  if (name === null || !type) return null;
  const slot = state.slots++;
  const value = asNumber(
    check(body, withLocals(context, [[name, { slot, type, law: false }]])),
    body,
    context,
  );
  if (!value || !finished({ expression: body, value }, context)) return null;
  const result = resultType(row.name, type, { expression: body, value }, expression, context);
  if (!result) return null;
  const typed = formNode(row.name, slot, known, value, result, expression);
  const form = numberValue(typed, result, [...known.map((bound) => bound.value), value], { law: value.law });
  const forms = Math.max(form.forms, 1 + value.forms);
  if (forms > limits.specialFormDepth)
    return place.fault(
      expression.span,
      "forms-too-deep",
      `special forms are nested ${forms} deep. The limit is ${limits.specialFormDepth}.`,
      { hint: "Give an inner one a line of its own." },
    );
  return { ...form, forms };
}

function boundName(variable: Expression, row: SpecialFormRow, context: Context): string | null {
  const { place, state } = context;
  if (variable.node !== "name")
    return place.fault(
      variable.span,
      "variable-wanted",
      `the first argument of \`${row.name}\` is the name of a new variable, not ${place.quote(variable.span)}.`,
      { hint: `Write \`${row.name}(${row.parameters.join(", ")})\`.` },
    );
  const taken = context.locals.has(variable.name)
    ? `\`${variable.name}\` is a variable here already.`
    : state.symbols.taken(variable.name);
  if (taken)
    return place.fault(variable.span, "name-taken", `the variable of \`${row.name}\`: ${taken}`, {
      hint: "Choose a name that is not in use.",
    });
  return variable.name;
}

/** Dimension and kind of the variable come from its bounds; a literal 0 takes the other bound's. */
function variableType(
  form: SpecialFormName,
  bounds: readonly Operand[],
  expression: CallExpression,
  context: Context,
): NumberType | null {
  if (form !== "fixed_point" && !bounds.map((bound) => isSingle(bound, context)).every(Boolean)) return null;
  const common = alike(bounds, expression, "bounds", context);
  if (!common) return null;
  if (form === "series") {
    const wrong = bounds.find((bound) => !isDimensionless(bound.value.type.dimension));
    if (wrong)
      return context.place.fault(
        wrong.expression.span,
        "bare-number-wanted",
        `\`series\` counts whole numbers, but ${context.place.quote(wrong.expression.span)} is ` +
          `${describe(wrong.value.type)}.`,
      );
    return bareNumber;
  }
  // A variable whose bounds are both 0 is a bare number, no longer the literal 0.
  return common.literalZero ? numberType(common.dimension, common.temperature, common.length) : common;
}

function isSingle({ expression, value }: Operand, context: Context): boolean {
  if (!value.type.length) return true;
  context.place.fault(
    expression.span,
    "number-wanted",
    `${context.place.quote(expression.span)} is a list; one number is wanted here.`,
  );
  return false;
}

function resultType(
  form: SpecialFormName,
  variable: NumberType,
  body: Operand,
  expression: CallExpression,
  context: Context,
): NumberType | null {
  const { place } = context;
  const { type } = body.value;
  if (form === "fixed_point") return fixedPointType(variable, body, expression, context);
  if (!isSingle(body, context)) return null;
  switch (form) {
    case "balance":
      if (isTemperature(type.dimension) && isAbsolute(type))
        return place.fault(
          body.expression.span,
          "absolute-balance",
          `${place.quote(body.expression.span)} is an absolute temperature, which is nowhere zero.`,
          { hint: "Subtract the temperature that it should equal." },
        );
      return variable;
    case "argmin":
      return variable;
    case "series":
      if (isTemperature(type.dimension) && !isDifference(type))
        return place.fault(
          body.expression.span,
          "absolute-sum",
          `\`series\` adds up ${describe(type)}; only differences can be summed.`,
        );
      return type;
    case "integral": {
      // The step of an absolute temperature is a difference.
      const step = isTemperature(variable.dimension) ? numberType(variable.dimension) : variable;
      if (type.literalZero) return type;
      return productOf(type, step) ?? beyondReach(expression, context);
    }
  }
}

function fixedPointType(
  variable: NumberType,
  body: Operand,
  expression: CallExpression,
  context: Context,
): NumberType | null {
  const { place } = context;
  const start: Operand = {
    expression: expression.arguments[1] ?? expression,
    value: { ...body.value, type: variable },
  };
  const common = alike([start, body], expression, "joins", context);
  if (!common) return null;
  if ((body.value.type.length === null) !== (variable.length === null))
    return place.fault(
      body.expression.span,
      "length-mismatch",
      `\`fixed_point\` starts from ${variable.length ? "a list" : "one number"} but its expression gives ` +
        `${body.value.type.length ? "a list" : "one number"}.`,
      { hint: "Both must be one number, or lists of one length." },
    );
  return variable;
}

function formNode(
  form: SpecialFormName,
  slot: number,
  bounds: readonly Operand[],
  body: NumberValue,
  type: NumberType,
  expression: CallExpression,
): Typed {
  const common = { slot, body: body.typed, type, span: expression.span };
  const [lower, upper] = bounds.map((bound) => bound.value.typed);
  if (!lower) throw new TypeError("The bounds of a special form were counted.");
  if (form === "fixed_point") return { node: "fixed-point", start: lower, ...common };
  if (!upper) throw new TypeError("The bounds of a special form were counted.");
  return { node: form, lower, upper, ...common };
}
