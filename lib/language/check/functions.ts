import { isDimensionless, isTemperature } from "@/lib/units";
import type { FunctionRow } from "../functions";
import { limits } from "../limits";
import type { Expression, ListLength, NumberType } from "../types";
import { beyondReach, rootType } from "./reach";
import type { Context } from "./context";
import { replace } from "./place";
import { holdsAbsolute } from "./reading";
import { alike, commonLength, finished, type Operand } from "./unify";
import { bareNumber, numberType, numberValue, withLength, type NumberValue } from "./value";
import { describe } from "./words";

/** A call of a function of the language whose arguments were read: typed by the rule of its row. Null after an error. */
export function languageCall(
  row: FunctionRow,
  operands: readonly Operand[],
  expression: Expression,
  context: Context,
): NumberValue | null {
  if (!operands.map((operand) => finished(operand, context)).every(Boolean)) return null;
  const type = new RuleReader(row, operands, expression, context).type();
  if (!type) return null;
  return numberValue(
    {
      node: "call",
      function: row.name,
      arguments: operands.map((operand) => operand.value.typed),
      type,
      span: expression.span,
    },
    type,
    operands.map((operand) => operand.value),
    { law: row.rule === "keep" && operands.some((operand) => operand.value.law) },
  );
}

class RuleReader {
  constructor(
    private readonly row: FunctionRow,
    private readonly operands: readonly Operand[],
    private readonly whole: Expression,
    private readonly context: Context,
  ) {}

  type(): NumberType | null {
    const first = this.operand(0);
    const type = first.value.type;
    switch (this.row.rule) {
      case "dimensionless":
      case "whole":
        return this.bare(first) ? withLength(bareNumber, type.length) : null;
      case "root":
        return rootType(type, this.row.degree ?? 2) ?? beyondReach(this.whole, this.context);
      case "keep":
        return type;
      case "sign":
        return withLength(bareNumber, type.length);
      case "ratio": {
        const common = alike(this.operands, this.whole, "compares", this.context);
        return common && withLength(bareNumber, common.length);
      }
      case "alike":
        return this.alike(first);
      case "clamp":
        return alike(this.operands, this.whole, "compares", this.context);
      case "interpolate":
        return this.interpolate();
      case "bessel":
        return this.bessel();
      case "sum":
      case "cumsum":
        return this.sum(first);
      case "product":
        return this.list(first) && this.bare(first) ? bareNumber : null;
      case "element":
        return this.list(first) ? withLength(type, null) : null;
      case "at":
        return this.list(first) && this.single(this.operand(1)) && this.bare(this.operand(1))
          ? withLength(type, null)
          : null;
      case "count":
        return this.list(first) ? bareNumber : null;
      case "extend":
        return this.extend(first);
      case "shorten":
        return this.shorten(first);
      case "reverse":
        return this.list(first) ? type : null;
      case "weighted-mean":
        return this.weightedMean(first);
      case "number-in":
      case "as-temperature":
        throw new TypeError(`${this.row.name} is replaced before it is typed by its rule.`);
    }
  }

  private alike(first: Operand): NumberType | null {
    const common = alike(
      this.operands,
      this.whole,
      this.row.name === "mean" ? "averages" : "compares",
      this.context,
    );
    if (!common || this.operands.length > 1) return common;
    return this.list(first) ? withLength(common, null) : null;
  }

  private interpolate(): NumberType | null {
    const [x, xs, ys] = [this.operand(0), this.operand(1), this.operand(2)];
    if (!this.list(xs) || !this.list(ys)) return null;
    const length = commonLength([xs.value.type, ys.value.type], this.whole, this.context);
    if (length === undefined) return null;
    const single = (operand: Operand): Operand => ({
      ...operand,
      value: { ...operand.value, type: withLength(operand.value.type, null) },
    });
    if (!alike([single(xs), single(x)], this.whole, "compares", this.context)) return null;
    return withLength(ys.value.type, x.value.type.length);
  }

  private bessel(): NumberType | null {
    const [order, x] = [this.operand(0), this.operand(1)];
    const { literal, typed } = order.value;
    const whole = literal !== null && literal.d === 1 && literal.n >= 0 && typed.node === "constant";
    const { place } = this.context;
    if (!whole)
      return place.fault(
        order.expression.span,
        "order",
        `the order of \`${this.row.name}\` must be a whole number written out, not ${place.quote(order.expression.span)}.`,
        { hint: "Write 0, 1, 2, …" },
      );
    if (literal.n > limits.besselOrder)
      return place.fault(
        order.expression.span,
        "order",
        `the order of \`${this.row.name}\` is above ${limits.besselOrder}. The limit is ${limits.besselOrder}.`,
      );
    return this.bare(x) ? withLength(bareNumber, x.value.type.length) : null;
  }

  private sum(list: Operand): NumberType | null {
    if (!this.list(list)) return null;
    const { type } = list.value;
    if (isTemperature(type.dimension) && holdsAbsolute(type)) {
      const { place } = this.context;
      const text = place.text(list.expression.span);
      return place.fault(
        this.whole.span,
        "absolute-sum",
        `${place.quote(this.whole.span)} adds absolute temperatures.`,
        {
          hint: `Write \`mean(${text})\` for their mean.`,
          ...(this.row.rule === "sum" && {
            mend: replace(this.whole.span, `mean(${text})`, "Take the mean"),
          }),
        },
      );
    }
    return this.row.rule === "sum" ? withLength(type, null) : type;
  }

  private extend(list: Operand): NumberType | null {
    const value = this.operand(1);
    if (!this.list(list) || !this.single(value)) return null;
    const common = alike([list, value], this.whole, "joins", this.context);
    return common?.length ? withLength(common, { ...common.length, plus: common.length.plus + 1 }) : null;
  }

  private shorten(list: Operand): NumberType | null {
    const { type } = list.value;
    if (!this.list(list) || !type.length) return null;
    const shorter: ListLength = { ...type.length, plus: type.length.plus - 1 };
    if (this.leastLength(shorter) < 0) {
      const { place } = this.context;
      return place.fault(
        this.whole.span,
        "empty-list",
        `${place.quote(this.whole.span)} can shorten an empty list.`,
        {
          hint: `Ask for more rows of \`${shorter.table ?? ""}\`.`,
        },
      );
    }
    return withLength(type, shorter);
  }

  private leastLength(length: ListLength): number {
    const table = length.table === null ? undefined : this.context.state.symbols.own.get(length.table);
    const rows = table?.is === "input" && table.declaration.kind === "table" ? table.declaration.minRows : 0;
    return rows + length.plus;
  }

  private weightedMean(xs: Operand): NumberType | null {
    const weights = this.operand(1);
    if (!this.list(xs) || !this.list(weights)) return null;
    const length = commonLength([xs.value.type, weights.value.type], this.whole, this.context);
    if (length === undefined) return null;
    const { dimension, temperature } = xs.value.type;
    return numberType(dimension, temperature);
  }

  private bare({ expression, value }: Operand): boolean {
    if (isDimensionless(value.type.dimension)) return true;
    const { place } = this.context;
    const text = place.text(expression.span);
    place.fault(
      expression.span,
      "bare-number-wanted",
      `\`${this.row.name}\` takes a bare number, but ${place.quote(expression.span)} is ${describe(value.type)}.`,
      {
        hint:
          this.row.rule === "whole"
            ? `Say in which unit: \`${this.row.name}(number_in(${text}, "unit"))\`.`
            : "Divide it by a quantity of the same dimension.",
      },
    );
    return false;
  }

  private list({ expression, value }: Operand): boolean {
    if (value.type.length) return true;
    const { place } = this.context;
    place.fault(
      expression.span,
      "list-wanted",
      `\`${this.row.name}\` takes a list, but ${place.quote(expression.span)} is one number.`,
      { hint: "Lists come from the columns of a table." },
    );
    return false;
  }

  private single({ expression, value }: Operand): boolean {
    if (!value.type.length) return true;
    const { place } = this.context;
    place.fault(
      expression.span,
      "number-wanted",
      `\`${this.row.name}\` takes one number here, but ${place.quote(expression.span)} is a list.`,
      { hint: "Take `first(…)`, `last(…)` or `at(…, i)` of it." },
    );
    return false;
  }

  private operand(index: number): Operand {
    const operand = this.operands[index];
    if (!operand) throw new TypeError(`${this.row.name} lacks an argument that was counted before.`);
    return operand;
  }
}
