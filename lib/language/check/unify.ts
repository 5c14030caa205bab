import { isDimensionless, isTemperature, sameDimension, siUnitSymbol } from "@/lib/units";
import type { Expression, ListLength, NumberType } from "../types";
import type { Context } from "./context";
import { replace } from "./place";
import { isAbsolute, isDifference, isFinished, sameReading } from "./reading";
import { sameLength, withLength, type NumberValue, type Value } from "./value";
import { describe, describeLength, quantityOf } from "./words";

/** A value with the expression it came from. */
export interface Operand {
  readonly expression: Expression;
  readonly value: NumberValue;
}

/** A number or list of numbers; a condition, choice or material in its place is told as an error. */
export function asNumber(value: Value | null, expression: Expression, context: Context): NumberValue | null {
  if (!value || value.is === "number") return value;
  const quoted = context.place.quote(expression.span);
  const told = {
    condition: [
      "condition-as-value",
      `${quoted} is a condition, not a number.`,
      "Choose between two values with `condition ? value : other value`.",
    ],
    choice: [
      "choice-as-value",
      `${quoted} is a choice, not a number.`,
      'Compare it with an option, `… == "key"`, or read a field of the option.',
    ],
    material: [
      "material-as-value",
      `${quoted} is a material, not a number.`,
      "Read a property of it at a temperature, such as `.k(T)`.",
    ],
  } as const;
  const [code, message, hint] = told[value.is];
  return context.place.fault(expression.span, code, message, { hint });
}

/** Refuses a sum of temperatures that is neither a temperature nor a difference, with the likely mend. */
export function finished(operand: Operand, context: Context): boolean {
  const { expression, value } = operand;
  if (isFinished(value.type)) return true;
  const { place } = context;
  const { span } = expression;
  const quoted = place.quote(span);
  const { sum } = value;
  if (sum && expression.node === "binary") {
    const left = place.text(expression.left.span);
    const right = place.text(expression.right.span);
    if (sum.operator === "+" && isAbsolute(sum.left) && isAbsolute(sum.right)) {
      const mend = `(${place.text(span)})/2`;
      place.fault(span, "absolute-sum", `${quoted} adds two absolute temperatures.`, {
        hint: `Write \`${mend}\` for their mean, or add a difference to one of them.`,
        mend: replace(span, mend, "Take the mean"),
      });
      return false;
    }
    if (sum.operator === "-" && isDifference(sum.left) && isAbsolute(sum.right)) {
      const mend = `${withBrackets(expression.right, right)} - ${withBrackets(expression.left, left)}`;
      place.fault(
        span,
        "absolute-from-difference",
        `${quoted} subtracts an absolute temperature from a temperature difference.`,
        { hint: `Write \`${mend}\`.`, mend: replace(span, mend, "Exchange the two") },
      );
      return false;
    }
  }
  place.fault(span, "absolute-sum", `${quoted} is neither a temperature nor a temperature difference.`, {
    hint: "The shares of its absolute temperatures must add up to 1 (a temperature) or to 0 (a difference).",
  });
  return false;
}

function withBrackets(expression: Expression, text: string): string {
  return expression.node === "binary" || expression.node === "conditional" || expression.node === "unary"
    ? `(${text})`
    : text;
}

/**
 * Common length of operands that are joined element by element: a number spreads. `null` length is a single number;
 * `undefined` means that two lists differ, which is told.
 */
export function commonLength(
  types: readonly NumberType[],
  whole: Expression,
  context: Context,
): ListLength | null | undefined {
  let length: ListLength | null = null;
  for (const { length: own } of types) {
    if (!own) continue;
    if (length && !sameLength(length, own)) {
      context.place.fault(
        whole.span,
        "length-mismatch",
        `${context.place.quote(whole.span)} joins lists of different length: ` +
          `${describeLength(length)}, and ${describeLength(own)}.`,
        {
          hint:
            length.table === own.table
              ? "Shorten one with `drop_first` or `drop_last`, or lengthen one with `prepend` or `append`."
              : "Only lists of the same table can be joined row by row.",
        },
      );
      return undefined;
    }
    length = own;
  }
  return length;
}

/**
 * Common type of values of which one is taken (branches, `min`, list elements): equal dimension and reading, which the
 * result keeps. Null after an error.
 */
export function alike(
  operands: readonly Operand[],
  whole: Expression,
  verb: Verb,
  context: Context,
): NumberType | null {
  const { place } = context;
  if (!operands.map((operand) => finished(operand, context)).every(Boolean)) return null;
  const length = commonLength(
    operands.map(({ value }) => value.type),
    whole,
    context,
  );
  if (length === undefined) return null;
  const first = operands.find((operand) => !operand.value.type.literalZero) ?? operands[0];
  if (!first) return null;
  const type = first.value.type;
  let reading = type.temperature;
  for (const { value, expression } of operands) {
    const other = value.type;
    if (other === type) continue;
    if (other.literalZero) {
      if (isTemperature(type.dimension) && isAbsolute(type)) return zeroForTemperature(expression, context);
      continue;
    }
    if (!sameDimension(type.dimension, other.dimension))
      return dimensionsDiffer(first, { value, expression }, whole, verb, context);
    if (!isTemperature(type.dimension)) {
      if (other.temperature === "none") reading = "none";
      continue;
    }
    if (!sameReading(type.temperature, other.temperature)) {
      const unread = [first, { value, expression }].find((each) => each.value.type.temperature === "none");
      return place.fault(
        whole.span,
        "temperature-kinds",
        `${place.quote(whole.span)} ${together(verb, describe(type), describe(other))}.`,
        unread
          ? castHint(unread, context)
          : {
              hint: "An absolute temperature and a difference are different things: subtract two temperatures first.",
            },
      );
    }
  }
  return withLength(reading === type.temperature ? type : { ...type, temperature: reading }, length);
}

export function castHint(operand: Operand, context: Context) {
  const cast = `as_temperature(${context.place.text(operand.expression.span)})`;
  return {
    hint: `If it is a temperature, say so: \`${cast}\`.`,
    mend: replace(operand.expression.span, cast, "Declare it a temperature"),
  };
}

function zeroForTemperature(expression: Expression, context: Context): null {
  const { span } = expression;
  return context.place.fault(span, "zero-temperature", "0 is no absolute temperature without its unit.", {
    hint: 'Write "0 °C" or "0 K".',
    ...(expression.node === "number" && { mend: replace(span, '"0 °C"') }),
  });
}

/** Tells that two dimensions differ; a bare number beside a dimension is named. */
export function dimensionsDiffer(
  left: Operand,
  right: Operand,
  whole: Expression,
  verb: Verb,
  context: Context,
): null {
  const { place } = context;
  const bare = [left, right].find((operand) => isDimensionless(operand.value.type.dimension));
  if (!bare)
    return place.fault(
      whole.span,
      "unit-mismatch",
      `${place.quote(whole.span)} ${together(verb, elementOf(left), elementOf(right))}.`,
      { hint: "Both must have the same dimension. Look for a factor that is missing." },
    );
  const named = `the bare number ${place.quote(bare.expression.span)}`;
  const text = `"${place.text(bare.expression.span)} ${likelyUnit(bare === left ? right : left, verb)}"`;
  const literal = bare.expression.node === "number";
  return place.fault(
    bare.expression.span,
    "bare-number",
    `${place.quote(whole.span)} ` +
      `${bare === left ? together(verb, named, elementOf(right)) : together(verb, elementOf(left), named)}.`,
    {
      hint: literal
        ? `Write it with its unit, such as ${text}.`
        : 'Give it a unit, or make the other a bare number with `number_in(x, "unit")`.',
      mend: literal ? replace(bare.expression.span, text) : null,
    },
  );
}

/** What joins two values, in the words of the sentence that refuses them. */
export type Verb = "adds" | "subtracts" | "compares" | "averages" | "joins" | "chooses" | "bounds";

function together(verb: Verb, left: string, right: string): string {
  switch (verb) {
    case "subtracts":
      return `subtracts ${right} from ${left}`;
    case "compares":
      return `compares ${left} with ${right}`;
    case "chooses":
      return `chooses between ${left} and ${right}`;
    case "bounds":
      return `has bounds of two kinds, ${left} and ${right}`;
    default:
      return `${verb} ${left} and ${right}`;
  }
}

function elementOf(operand: Operand): string {
  return describe(withLength(operand.value.type, null));
}

/** Unit that was probably meant: the one that the catalogue prefers; in a sum with a temperature a difference. */
function likelyUnit(operand: Operand, verb: Verb): string {
  const { type } = operand.value;
  if (isTemperature(type.dimension))
    return isAbsolute(type) && verb !== "adds" && verb !== "subtracts" ? "°C" : "ΔK";
  return quantityOf(type)?.unit ?? siUnitSymbol(type.dimension);
}
