import { dimension, multiply, sameDimension } from "@/lib/units";
import {
  propertyNames,
  type Expression,
  type InputDeclaration,
  type ListLength,
  type NumberType,
  type PropertyName,
  type PropertyOperation,
  type Typed,
} from "../types";
import type { Check, Context } from "./context";
import { nearest } from "./names";
import { replace } from "./place";
import { isAbsolute } from "./reading";
import { declaredType, optionField, propertyDimensions } from "./symbols";
import { asNumber, castHint, commonLength, finished, type Operand } from "./unify";
import {
  numberType,
  numberValue,
  withLength,
  type ChoiceValue,
  type MaterialValue,
  type Value,
} from "./value";
import { describe } from "./words";

type MemberExpression = Extract<Expression, { node: "member" }>;
type CallExpression = Extract<Expression, { node: "call" }>;
type Table = Extract<InputDeclaration, { kind: "table" }>;

/** `layers.t`, `finish.eps`, `layers.finish.eps`. Properties of materials are read by a call. */
export function member(expression: MemberExpression, check: Check, context: Context): Value | null {
  const table = tableNamed(expression.object, context);
  if (table) return column(expression, table, context);
  const object = check(expression.object, context);
  if (!object) return null;
  const { place } = context;
  const name = expression.member;
  switch (object.is) {
    case "choice":
      return optionMember(expression, object, context);
    case "material":
      return place.fault(
        expression.span,
        "property-without-argument",
        `${place.quote(expression.span)} is a property, which depends on temperature.`,
        { hint: `Write \`${place.text(expression.span)}(T)\` with the temperature.` },
      );
    default:
      return place.fault(
        expression.memberSpan,
        "no-member",
        `${place.quote(expression.object.span)} has no members, so \`.${name}\` means nothing.`,
        { hint: "Tables, choices and materials have members." },
      );
  }
}

function tableNamed(expression: Expression, context: Context): Table | null {
  if (expression.node !== "name" || context.locals.has(expression.name)) return null;
  const symbol = context.state.symbols.own.get(expression.name);
  return symbol?.is === "input" && symbol.declaration.kind === "table" ? symbol.declaration : null;
}

function column(expression: MemberExpression, table: Table, context: Context): Value | null {
  const { place, state } = context;
  const name = expression.member;
  state.used.add(table.symbol);
  context.named.add(table.symbol);
  const declaration = table.columns.find((each) => each.symbol === name);
  if (!declaration) {
    const names = table.columns.filter((each) => each.kind !== "text").map((each) => each.symbol);
    const near = nearest(name, names);
    return place.fault(
      expression.memberSpan,
      "unknown-column",
      `the table \`${table.symbol}\` has no column \`${name}\`.`,
      {
        hint: near ? `Did you mean \`${table.symbol}.${near}\`?` : `Its columns are ${names.join(", ")}.`,
        mend: near ? replace(expression.memberSpan, near) : null,
      },
    );
  }
  const length: ListLength = { table: table.symbol, plus: 0 };
  const { layout } = state.symbols;
  const placeIn = (list: readonly { readonly table: string; readonly column: string }[]) =>
    list.findIndex((each) => each.table === table.symbol && each.column === name);
  switch (declaration.kind) {
    case "text":
      return place.fault(
        expression.span,
        "text-column",
        `\`${table.symbol}.${name}\` is a text that names a row; a working cannot read it.`,
      );
    case "choice":
      return { is: "choice", index: placeIn(layout.choiceColumns), declaration, table: table.symbol };
    case "material":
      return {
        is: "material",
        source: { from: "column", index: placeIn(layout.columnMaterials) },
        declaration,
        length,
      };
    case "number": {
      const single = declaredType(declaration.quantity, declaration.unit);
      if (!single) return null;
      const type = withLength(single, length);
      return numberValue(
        {
          node: "column",
          index: placeIn(layout.columns),
          symbol: table.symbol,
          column: name,
          type,
          span: expression.span,
        },
        type,
        [],
      );
    }
  }
}

function optionMember(expression: MemberExpression, choice: ChoiceValue, context: Context): Value | null {
  const { place } = context;
  const { options, symbol } = choice.declaration;
  const name = expression.member;
  const values: number[] = [];
  let type: NumberType | null = null;
  for (const option of options) {
    const written = Object.hasOwn(option.values, name) ? option.values[name] : undefined;
    const field = written && optionField(written);
    if (written && !field)
      return place.fault(
        expression.span,
        "unreadable-unit",
        `the unit "${written.unit}" of \`${name}\` in option "${option.key}" of \`${symbol}\` cannot be read.`,
      );
    values.push(field ? field.value : NaN);
    if (!field) continue;
    if (type && !sameDimension(type.dimension, field.type.dimension))
      return place.fault(
        expression.span,
        "unit-mismatch",
        `the options of \`${symbol}\` give \`${name}\` as ${describe(type)} and as ${describe(field.type)}.`,
        { hint: "Give it the same dimension in every option." },
      );
    type = field.type;
  }
  if (!type) {
    const fields = [...new Set(options.flatMap((option) => Object.keys(option.values)))];
    const near = nearest(name, fields);
    return place.fault(
      expression.memberSpan,
      "unknown-field",
      `no option of \`${symbol}\` has a field \`${name}\`.`,
      {
        hint: near
          ? `Did you mean \`${near}\`?`
          : fields.length > 0
            ? `Its fields are ${fields.join(", ")}.`
            : "Its options have no fields; compare it with a key.",
        mend: near ? replace(expression.memberSpan, near) : null,
      },
    );
  }
  if (choice.table === null) {
    const typed: Typed = { node: "option-field", choice: choice.index, values, type, span: expression.span };
    return numberValue(typed, type, []);
  }
  const list = withLength(type, { table: choice.table, plus: 0 });
  return numberValue(
    { node: "column-option-field", choiceColumn: choice.index, values, type: list, span: expression.span },
    list,
    [],
  );
}

/** `wall.k(T)`, `layers.material.k_mean(T1, T2)`: on a material column element by element. */
export function propertyCall(
  expression: CallExpression,
  callee: MemberExpression,
  check: Check,
  context: Context,
): Value | null {
  const { place } = context;
  const object = check(callee.object, context);
  const found = expression.arguments.map((each) => ({
    expression: each,
    value: asNumber(check(each, context), each, context),
  }));
  if (!object) return null;
  if (object.is !== "material")
    return place.fault(
      callee.span,
      "not-a-function",
      `${place.quote(callee.span)} is not a property of a material and cannot be called.`,
    );
  const asked = readProperty(callee, object, context);
  if (!asked) return null;
  const { property, operation } = asked;
  const count = operation === "value" ? 1 : 2;
  if (found.length !== count)
    return place.fault(
      expression.span,
      "argument-count",
      `${place.quote(callee.span)} takes ${count === 1 ? "one temperature" : "two temperatures"}, not ${found.length}.`,
    );
  const operands = found.filter((each): each is Operand => each.value !== null);
  if (operands.length < found.length) return null;
  if (!operands.map((operand) => isTemperatureArgument(operand, callee, context)).every(Boolean)) return null;
  const own = numberType(propertyDimensions[property], undefined, object.length);
  const length = commonLength([...operands.map(({ value }) => value.type), own], expression, context);
  if (length === undefined) return null;
  const type = numberType(
    operation === "integral" ? multiply(own.dimension, dimension({ temperature: 1 })) : own.dimension,
    undefined,
    length,
  );
  return numberValue(
    {
      node: "property",
      material: object.source,
      property,
      operation,
      arguments: operands.map((operand) => operand.value.typed),
      type,
      span: expression.span,
    },
    type,
    operands.map((operand) => operand.value),
  );
}

function readProperty(
  callee: MemberExpression,
  material: MaterialValue,
  context: Context,
): { readonly property: PropertyName; readonly operation: PropertyOperation } | null {
  const { place } = context;
  const { needs, symbol } = material.declaration;
  const [base, operation] = callee.member.endsWith("_mean")
    ? [callee.member.slice(0, -"_mean".length), "mean" as const]
    : callee.member.endsWith("_integral")
      ? [callee.member.slice(0, -"_integral".length), "integral" as const]
      : [callee.member, "value" as const];
  const property = propertyNames.find((name) => name === base);
  if (!property) {
    const near = nearest(base, propertyNames);
    return place.fault(
      callee.memberSpan,
      "unknown-property",
      `a material has no property \`${callee.member}\`.`,
      {
        hint: near
          ? `Did you mean \`${near}\`?`
          : `Properties are ${propertyNames.join(", ")}, each also with _mean and _integral.`,
        mend: near ? replace(callee.memberSpan, near) : null,
      },
    );
  }
  if (!needs.includes(property))
    return place.fault(
      callee.memberSpan,
      "property-not-needed",
      `\`${symbol}\` does not declare that it needs \`${property}\`.`,
      {
        hint: `It needs ${needs.join(", ")}. Add ${property} to its properties, so that only materials with it are offered.`,
      },
    );
  return { property, operation };
}

function isTemperatureArgument(operand: Operand, callee: MemberExpression, context: Context): boolean {
  if (!finished(operand, context)) return false;
  const { type } = operand.value;
  const { place } = context;
  if (isAbsolute(type)) return true;
  const { span } = operand.expression;
  const unread = type.temperature === "none" && sameDimension(type.dimension, temperature);
  place.fault(
    span,
    type.literalZero ? "zero-temperature" : "temperature-wanted",
    `${place.quote(callee.span)} takes an absolute temperature, but ${place.quote(span)} is ` +
      `${describe(type)}.`,
    unread
      ? castHint(operand, context)
      : { hint: 'An absolute temperature is an input, or a text such as "60 °C".' },
  );
  return false;
}

const temperature = dimension({ temperature: 1 });
