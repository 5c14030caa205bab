import { parseUnit } from "@/lib/units";
import type { ConstantRow } from "../functions";
import type { Expression, InputDeclaration } from "../types";
import type { Context } from "./context";
import { nearest } from "./names";
import { replace } from "./place";
import { absolute, plain } from "./reading";
import { declaredType, scaleOf } from "./symbols";
import { constantNode, numberType, numberValue, type NumberValue, type Value } from "./value";

type NameExpression = Extract<Expression, { node: "name" }>;

/** What a name stands for where it is read. */
export function nameValue(expression: NameExpression, context: Context): Value | null {
  const { state, place } = context;
  const { name: word, span } = expression;
  const local = context.locals.get(word);
  if (local) {
    const { slot, type, law } = local;
    return numberValue({ node: "slot", slot, symbol: word, type, span }, type, [], { law });
  }
  const symbol = state.symbols.own.get(word);
  if (!symbol) {
    const constant = state.symbols.constants.get(word);
    return constant ? constantValue(constant, expression) : unknownName(expression, context);
  }
  switch (symbol.is) {
    case "input":
      return input(expression, symbol.declaration, context);
    case "function":
      return place.fault(span, "function-as-value", `\`${word}\` is a function and needs its arguments.`, {
        hint: `Write \`${word}(${(symbol.read.parameters ?? []).map((each) => each.name).join(", ")})\`.`,
      });
    case "line": {
      if (!isVisible(symbol.statement, expression, context)) return null;
      state.used.add(word);
      context.named.add(word);
      if (!symbol.checked) return null;
      const { index, type, law } = symbol.checked;
      return numberValue({ node: "line", index, symbol: word, type, span }, type, [], { law });
    }
  }
}

/** Lines and functions are seen below their definition only, and not at all where inputs alone are. */
export function isVisible(statement: number, expression: NameExpression, context: Context): boolean {
  if (statement < context.before) return true;
  const { place, state } = context;
  const symbol = state.symbols.own.get(expression.name);
  if (context.before < 0) {
    place.fault(
      expression.span,
      "inputs-only",
      `\`${expression.name}\` comes from the working; this condition is judged before it and sees inputs only.`,
      { hint: "Move the condition to a limit." },
    );
    return false;
  }
  const line = symbol?.is === "line" || symbol?.is === "function" ? symbol.read.nameSpan.line : 0;
  const itself = statement === context.before;
  place.fault(
    expression.span,
    itself ? "self-reference" : "defined-below",
    itself
      ? `\`${expression.name}\` refers to itself.`
      : `\`${expression.name}\` is defined below, on line ${line}.`,
    {
      hint: itself
        ? "A value that depends on itself is found with `fixed_point` or `balance`."
        : "Lines are evaluated from top to bottom: move its definition up.",
    },
  );
  return false;
}

function input(expression: NameExpression, declaration: InputDeclaration, context: Context): Value | null {
  const { state, place } = context;
  const { name: word, span } = expression;
  const { layout } = state.symbols;
  state.used.add(word);
  context.named.add(word);
  switch (declaration.kind) {
    case "number": {
      const type = declaredType(declaration.quantity, declaration.unit);
      if (!type) return null;
      return numberValue(
        { node: "input", index: layout.numbers.indexOf(word), symbol: word, type, span },
        type,
        [],
      );
    }
    case "choice":
      return { is: "choice", index: layout.choices.indexOf(word), declaration, table: null };
    case "material":
      return {
        is: "material",
        source: { from: "input", index: layout.materials.indexOf(word) },
        declaration,
        length: null,
      };
    case "table": {
      const first = declaration.columns.find((column) => column.kind !== "text");
      return place.fault(span, "table-as-value", `\`${word}\` is a table.`, {
        hint: `Read one of its columns: \`${word}.${first?.symbol ?? "column"}\`.`,
      });
    }
  }
}

/** Constants in whose presence an absolute temperature belongs into a product. */
const lawConstants: ReadonlySet<string> = new Set(["R_gas", "k_B", "sigma_SB"]);

function constantValue(row: ConstantRow, expression: NameExpression): NumberValue {
  const unit = parseUnit(row.unit);
  if (!unit.ok) throw new TypeError(`The unit of the constant ${row.name} cannot be read.`);
  const reading = scaleOf(unit.value) === "absolute" ? absolute : plain;
  const type = numberType(unit.value.dimension, reading);
  return numberValue(constantNode(row.value, type, expression.span), type, [], {
    law: lawConstants.has(row.name),
  });
}

/** Names of other tools and of mathematics, with what they are called here. */
const otherNames: Readonly<Record<string, string>> = {
  PI: "pi",
  Pi: "pi",
  E: "exp(1)",
  e: "exp(1)",
  sigma: "sigma_SB",
  R: "R_gas",
  g: "g_n",
  kB: "k_B",
  NA: "N_A",
};

function unknownName(expression: NameExpression, context: Context): null {
  const { place, state } = context;
  const { name: word, span } = expression;
  if (state.symbols.functions.has(word) || state.symbols.forms.has(word)) {
    const row = state.symbols.functions.get(word) ?? state.symbols.forms.get(word);
    return place.fault(span, "function-as-value", `\`${word}\` is a function and needs its arguments.`, {
      hint: `Write \`${word}(${row?.parameters.join(", ") ?? ""})\`.`,
    });
  }
  const near = nearest(word, [...context.locals.keys(), ...state.symbols.names()]);
  const meant = near ?? (Object.hasOwn(otherNames, word) ? (otherNames[word] ?? null) : null);
  return place.fault(span, "unknown-name", `\`${word}\` is not known here.`, {
    hint: meant
      ? `Did you mean \`${meant}\`?`
      : "Names are those of inputs, of lines above, of functions and constants.",
    mend: meant ? replace(span, meant) : null,
  });
}

/** Functions of other tools, with what is written here. */
const otherFunctions: Readonly<Record<string, string>> = {
  log: "`ln(x)` is the natural logarithm, `log10(x)` the one to base 10. Write the one that is meant.",
  lg: "Write `log10(x)`.",
  log2: "Write `ln(x)/ln(2)`.",
  pow: "Write `a^b`.",
  power: "Write `a^b`.",
  if: "Write `condition ? value : other value`.",
  hypot: "Write `sqrt(a^2 + b^2)`.",
  average: "Write `mean(…)`.",
  arctan: "Write `atan(x)`.",
  solve: "Write `balance(x, lo, hi, expr)`.",
  root: "Write `balance(x, lo, hi, expr)`, or `sqrt(x)`.",
  length: "Write `count(list)`.",
};

export function unknownFunction(callee: NameExpression, context: Context): null {
  const { place, state } = context;
  const { name: word, span } = callee;
  if (state.symbols.constants.has(word))
    return place.fault(span, "not-a-function", `\`${word}\` is a constant and cannot be called.`, {
      hint: "Write `*` to multiply.",
    });
  const other = Object.hasOwn(otherFunctions, word) ? otherFunctions[word] : undefined;
  const functions = [...state.symbols.own]
    .filter(([, symbol]) => symbol.is === "function")
    .map(([own]) => own)
    .concat([...state.symbols.functions.keys()], [...state.symbols.forms.keys()]);
  const near = other === undefined ? nearest(word, functions) : null;
  return place.fault(span, "unknown-function", `there is no function \`${word}\`.`, {
    hint:
      other ?? (near ? `Did you mean \`${near}\`?` : "A function is defined with `name(x) = expression`."),
    mend: near ? replace(span, near) : null,
  });
}
