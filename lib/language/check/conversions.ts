import { isTemperature, parseAmount, parseUnit, sameDimension, toSi, type UnitFault } from "@/lib/units";
import type { Expression, NumberType, Span, Typed } from "../types";
import type { Check, Context } from "./context";
import { replace } from "./place";
import { absolute, isAbsolute, isDifference } from "./reading";
import { readingOf, scaleOf } from "./symbols";
import { asNumber, finished } from "./unify";
import { bareNumber, constantNode, numberType, numberValue, withLength, type NumberValue } from "./value";
import { describe, describeDimension } from "./words";

type CallExpression = Extract<Expression, { node: "call" }>;
type TextExpression = Extract<Expression, { node: "text" }>;

/** A text in quotes as a quantity: `"25 mm"`, `"60 °C"` (absolute), `"10 Δ°C"` (difference). */
export function quantityText(expression: TextExpression, context: Context): NumberValue | null {
  const { place } = context;
  const { text, span } = expression;
  const reading = parseAmount(text);
  if (!reading.ok) {
    unreadable(reading.fault, expression, context);
    return null;
  }
  tellNotices(reading.notices, span, context);
  const { value, unit } = reading.value;
  if (!unit)
    return place.fault(span, "text-without-unit", `"${text}" has no unit.`, {
      hint: `A bare number stands without quotes: ${text.trim()}.`,
      mend: replace(span, text.trim()),
    });
  const kind = scaleOf(unit);
  const type = numberType(unit.dimension, readingOf(kind));
  const si = toSi(value, unit, kind);
  if (kind === "absolute" && si < 0)
    return place.fault(span, "below-absolute-zero", `"${text}" lies below absolute zero.`, {
      hint: `A difference is written with Δ: "${text.replace(/(°C|°F|K)/, "Δ$1")}".`,
    });
  if (!Number.isFinite(si))
    return place.fault(span, "number-too-large", `"${text}" is too large to be held.`);
  return numberValue(constantNode(si, type, span), type, []);
}

function unreadable(fault: UnitFault, expression: TextExpression, context: Context): void {
  const { span, text } = expression;
  const inside = fault.end > fault.start && fault.end <= text.length;
  // Column 1 of the content lies behind the quote.
  const at: Span = inside
    ? { ...span, column: span.column + 1 + fault.start, endColumn: span.column + 1 + fault.end }
    : span;
  const [suggestion] = fault.suggestions;
  context.place.tell({
    span: at,
    code: fault.code,
    message: `"${text}" cannot be read. ${fault.message}`,
    ...(suggestion !== undefined && {
      hint: `Did you mean "${suggestion}"?`,
      mend: replace(span, `"${suggestion}"`),
    }),
  });
}

function tellNotices(notices: readonly string[], span: Span, context: Context): void {
  notices.forEach((notice, i) =>
    context.place.tell({
      severity: "remark",
      code: i === 0 ? "unit-notice" : `unit-notice-${i + 1}`,
      message: notice,
      span,
    }),
  );
}

/**
 * `number_in(x, "mm")`: the bare number of x in the unit, as arithmetic on constants: x/factor, less the unit's shift
 * where x is an absolute temperature or a gauge reading.
 */
export function numberIn(expression: CallExpression, check: Check, context: Context): NumberValue | null {
  const [asked, unitText] = expression.arguments;
  const { place } = context;
  if (!asked || !unitText || expression.arguments.length !== 2)
    return place.fault(expression.span, "argument-count", "`number_in` takes a value and a unit.", {
      hint: 'Write `number_in(x, "mm")`.',
    });
  const value = asNumber(check(asked, context), asked, context);
  if (unitText.node !== "text")
    return place.fault(
      unitText.span,
      "unit-wanted",
      "the second argument of `number_in` is a unit in quotes.",
      {
        hint: 'Write `number_in(x, "mm")`.',
      },
    );
  const reading = parseUnit(unitText.text);
  if (!reading.ok) {
    unreadable(reading.fault, unitText, context);
    return null;
  }
  tellNotices(reading.notices, unitText.span, context);
  if (!value || !finished({ expression: asked, value }, context)) return null;
  const unit = reading.value;
  const { type } = value;
  if (!type.literalZero && !sameDimension(type.dimension, unit.dimension))
    return place.fault(
      expression.span,
      "unit-mismatch",
      `${place.quote(asked.span)} is ${describe(type)} and has no number in ${unit.symbol}, a unit of ` +
        `${describeDimension(unit.dimension)}.`,
      { hint: "Name a unit of the same dimension." },
    );
  const shifted = unit.shift !== 0 && !(isTemperature(unit.dimension) && isDifference(type));
  if (isTemperature(unit.dimension)) {
    if (unit.differenceOnly && isAbsolute(type))
      return place.fault(
        unitText.span,
        "temperature-kinds",
        `${place.quote(asked.span)} is an absolute temperature, but ${unit.symbol} is a unit of differences.`,
        { hint: `Write "${unit.symbol.replace("Δ", "")}".` },
      );
    if (shifted && type.temperature === "none")
      return place.fault(
        asked.span,
        "no-temperature",
        `${place.quote(asked.span)} has no reading as a temperature, so it has no number in ${unit.symbol}.`,
        { hint: 'Take it in "K", or declare it with `as_temperature(…)`.' },
      );
  }
  const bare = withLength(bareNumber, type.length);
  const { span } = expression;
  let typed: Typed = value.typed;
  if (unit.factor !== 1) typed = joined("/", typed, unit.factor, bare, span);
  if (shifted) typed = joined("-", typed, unit.shift, bare, span);
  if (typed === value.typed) typed = { ...typed, type: bare };
  return numberValue(typed, bare, [value]);
}

function joined(operator: "/" | "-", left: Typed, constant: number, type: NumberType, span: Span): Typed {
  return { node: "arithmetic", operator, left, right: constantNode(constant, bareNumber, span), type, span };
}

/** `as_temperature(x)` declares a value in kelvin an absolute temperature; it leaves no node. */
export function asTemperature(
  expression: CallExpression,
  check: Check,
  context: Context,
): NumberValue | null {
  const [operand] = expression.arguments;
  const { place } = context;
  if (!operand || expression.arguments.length !== 1)
    return place.fault(expression.span, "argument-count", "`as_temperature` takes one value.");
  const value = asNumber(check(operand, context), operand, context);
  if (!value || !finished({ expression: operand, value }, context)) return null;
  const { type } = value;
  if (!isTemperature(type.dimension))
    return place.fault(
      operand.span,
      "temperature-wanted",
      `\`as_temperature\` takes a value in kelvin, but ${place.quote(operand.span)} is ${describe(type)}.`,
    );
  if (isAbsolute(type))
    place.tell({
      severity: "remark",
      code: "needless-cast",
      span: expression.span,
      message: `${place.quote(operand.span)} is an absolute temperature already.`,
      mend: replace(expression.span, place.text(operand.span), "Leave the cast away"),
    });
  const declared: NumberType = { ...type, temperature: absolute };
  return numberValue({ ...value.typed, type: declared }, declared, [value], { literal: null });
}
