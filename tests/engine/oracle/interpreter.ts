import type { Expression, PropertyName, Statement } from "@/lib/language/types";
import * as own from "./numerics";
import { constants, interpolate, OracleFault, quantity, scalars, several, units } from "./vocabulary";

/**
 * Independent judge of the compiler: a tree-walking interpreter of the syntax tree with its own units, numerics and rules,
 * written from the language's description. It knows no types; shapes are those of the values.
 */

export type Value = number | number[] | boolean | string | Material | Material[] | Option | Option[];

export interface Material {
  readonly material: Readonly<Partial<Record<PropertyName, (temperature: number) => number>>>;
}

export interface Option {
  readonly option: string;
  readonly fields: Readonly<Record<string, number>>;
}

/** A table is its columns. */
export type Inputs = Readonly<Record<string, Value | Readonly<Record<string, Value>>>>;

type Scope = ReadonlyMap<string, Value>;

export interface OracleOptions {
  /** Relative disturbance of each operation's result, to find how sensitive a program is. */
  readonly noise?: () => number;
}

const listFunctions = new Set([
  "first",
  "last",
  "at",
  "count",
  "prepend",
  "append",
  "drop_first",
  "drop_last",
  "reverse",
]);

export class Interpreter {
  private readonly functions = new Map<string, Extract<Statement, { statement: "function" }>>();
  readonly lines = new Map<string, Value>();
  private judging = true;

  constructor(
    private readonly inputs: Inputs,
    private readonly options: OracleOptions = {},
  ) {}

  /** Runs all statements in order. Throws `OracleFault` with the line's symbol. */
  run(statements: readonly Statement[]): ReadonlyMap<string, Value> {
    for (const statement of statements) {
      if (statement.statement === "function") {
        this.functions.set(statement.name, statement);
        continue;
      }
      try {
        this.lines.set(statement.name, this.judge(this.evaluate(statement.expression, new Map())));
      } catch (error) {
        throw error instanceof OracleFault ? new OracleFault(error.code, statement.name) : error;
      }
    }
    return this.lines;
  }

  private judge(value: Value): Value {
    const numbers = typeof value === "number" ? [value] : Array.isArray(value) ? value : [];
    if (this.judging && numbers.some((x) => typeof x === "number" && !Number.isFinite(x))) {
      throw new OracleFault("not-finite");
    }
    return value;
  }

  private disturbed(x: number): number {
    return this.options.noise ? x * (1 + this.options.noise()) : x;
  }

  private spread(f: (...xs: number[]) => number, values: readonly Value[]): Value {
    const lists = values.filter((value): value is number[] => Array.isArray(value));
    const first = lists[0];
    if (!first) return this.disturbed(f(...(values as number[])));
    if (lists.some((list) => list.length !== first.length)) throw new OracleFault("out-of-range");
    return first.map((_, i) =>
      this.disturbed(
        f(...values.map((value) => (Array.isArray(value) ? (value[i] as number) : (value as number)))),
      ),
    );
  }

  evaluate(expression: Expression, scope: Scope): Value {
    switch (expression.node) {
      case "number":
        return expression.value;
      case "text":
        return quantity(expression.text) ?? expression.text;
      case "name":
        return this.name(expression.name, scope);
      case "member":
        return this.member(expression, scope);
      case "call":
        return this.call(expression, scope);
      case "unary": {
        const operand = this.evaluate(expression.operand, scope);
        if (expression.operator === "not") return !operand;
        return expression.operator === "+" ? operand : this.spread((x) => -x, [operand]);
      }
      case "binary":
        return this.binary(expression, scope);
      case "conditional":
        return this.evaluate(
          this.evaluate(expression.condition, scope) ? expression.whenTrue : expression.whenFalse,
          scope,
        );
    }
  }

  private name(name: string, scope: Scope): Value {
    const value = scope.get(name) ?? this.lines.get(name) ?? this.inputs[name] ?? constants[name];
    if (value === undefined) throw new Error(`The oracle does not know ${name}.`);
    return value as Value;
  }

  private member(expression: Extract<Expression, { node: "member" }>, scope: Scope): Value {
    const { object, member } = expression;
    const owner = object.node === "name" ? (this.inputs[object.name] ?? null) : this.evaluate(object, scope);
    if (owner === null || typeof owner !== "object") throw new Error("The oracle does not know this member.");
    if (Array.isArray(owner)) return (owner as Option[]).map((option) => option.fields[member]!);
    if ("fields" in owner) return (owner as Option).fields[member]!;
    return (owner as Record<string, Value>)[member]!;
  }

  private binary(expression: Extract<Expression, { node: "binary" }>, scope: Scope): Value {
    const { operator } = expression;
    const left = this.evaluate(expression.left, scope);
    if (operator === "and") return left && this.evaluate(expression.right, scope);
    if (operator === "or") return left || this.evaluate(expression.right, scope);
    const right = this.evaluate(expression.right, scope);
    switch (operator) {
      case "+":
        return this.spread((a, b) => a + b, [left, right]);
      case "-":
        return this.spread((a, b) => a - b, [left, right]);
      case "*":
        return this.spread((a, b) => a * b, [left, right]);
      case "/":
        return this.spread((a, b) => a / b, [left, right]);
      case "^":
        return this.spread((a, b) => (Number.isNaN(a) ? NaN : a ** b), [left, right]);
    }
    const key = [left, right].find((side): side is Option => typeof side === "object" && "option" in side);
    if (key) {
      const text = [expression.left, expression.right].find((side) => side.node === "text");
      if (text?.node !== "text") throw new Error("A choice is compared with a text.");
      return (key.option === text.text) === (operator === "==");
    }
    const [a, b] = [left as number, right as number];
    if (this.judging && (Number.isNaN(a) || Number.isNaN(b))) throw new OracleFault("not-finite");
    switch (operator) {
      case "==":
        return a === b;
      case "!=":
        return a !== b;
      case "<":
        return a < b;
      case "<=":
        return a <= b;
      case ">":
        return a > b;
      case ">=":
        return a >= b;
    }
  }

  private call(expression: Extract<Expression, { node: "call" }>, scope: Scope): Value {
    const { callee } = expression;
    if (callee.node === "member") return this.property(callee, expression.arguments, scope);
    if (callee.node !== "name") throw new Error("A call names its function.");
    const { name } = callee;
    if (["balance", "argmin", "integral", "series", "fixed_point"].includes(name)) {
      return this.form(name, expression.arguments, scope);
    }
    if (name === "number_in") {
      const unit = expression.arguments[1]!;
      const [factor, shift] = units[unit.node === "text" ? unit.text : ""]!;
      return this.spread((x) => x / factor - shift, [this.evaluate(expression.arguments[0]!, scope)]);
    }
    const values = expression.arguments.map((argument) => this.evaluate(argument, scope));
    const own_ = this.functions.get(name);
    if (own_) {
      const inside = new Map(own_.parameters.map((parameter, i) => [parameter.name, values[i]!]));
      return this.judge(this.evaluate(own_.expression, inside));
    }
    if (name === "as_temperature") return values[0]!;
    const value = this.builtIn(name, values);
    return listFunctions.has(name) ? value : this.judge(value);
  }

  private builtIn(name: string, values: readonly Value[]): Value {
    const list = values[0] as number[];
    const other = values[1] as number;
    switch (name) {
      case "sum":
        return this.disturbed(list.reduce((a, b) => a + b, 0));
      case "product":
        return this.disturbed(list.reduce((a, b) => a * b, 1));
      case "cumsum":
        return list.map((_, i) => this.disturbed(list.slice(0, i + 1).reduce((a, b) => a + b, 0)));
      case "count":
        return list.length;
      case "first":
      case "last":
        if (list.length === 0) throw new OracleFault("out-of-range");
        return list.at(name === "first" ? 0 : -1)!;
      case "at":
        if (!Number.isInteger(other) || other < 1 || other > list.length)
          throw new OracleFault("out-of-range");
        return list[other - 1]!;
      case "prepend":
        return [other, ...list];
      case "append":
        return [...list, other];
      case "drop_first":
      case "drop_last":
        if (list.length === 0) throw new OracleFault("out-of-range");
        return name === "drop_first" ? list.slice(1) : list.slice(0, -1);
      case "reverse":
        return [...list].reverse();
      case "weighted_mean": {
        const weights = values[1] as unknown as number[];
        const total = weights.reduce((a, b) => a + b, 0);
        return this.disturbed(list.reduce((a, x, i) => a + x * weights[i]!, 0) / total);
      }
      case "interpolate":
        return this.spread((x) => interpolate(x, values[1] as number[], values[2] as number[]), [values[0]!]);
      case "min":
      case "max":
      case "mean":
        return Array.isArray(list) && values.length === 1
          ? this.disturbed(several[name]!(...list))
          : this.spread(several[name]!, values);
    }
    const f = scalars[name];
    if (!f) throw new Error(`The oracle does not know ${name}.`);
    return this.spread(f, values);
  }

  private property(
    callee: Extract<Expression, { node: "member" }>,
    argumentsGiven: readonly Expression[],
    scope: Scope,
  ): Value {
    const owner =
      callee.object.node === "name"
        ? (this.inputs[callee.object.name] as Material)
        : (this.member(callee.object as Extract<Expression, { node: "member" }>, scope) as Material[]);
    const values = argumentsGiven.map((argument) => this.evaluate(argument, scope));
    const [, property = "", operation = "value"] = /^(.*?)(?:_(mean|integral))?$/.exec(callee.member) ?? [];
    const read = (material: Material, [a = NaN, b = NaN]: number[]): number => {
      const f = material.material[property as PropertyName]!;
      if (operation === "value") return f(a);
      const integral = own.romberg(f, a, b);
      return operation === "integral" ? integral : a === b ? f(a) : integral / (b - a);
    };
    if (!Array.isArray(owner)) return this.spread((...xs) => read(owner, xs), values);
    return this.spread((i, ...xs) => read(owner[i]!, xs), [owner.map((_, i) => i), ...values]);
  }

  private form(name: string, argumentsGiven: readonly Expression[], scope: Scope): Value {
    const variable = argumentsGiven[0]!;
    const body = argumentsGiven.at(-1)!;
    if (variable.node !== "name") throw new Error("A special form begins with its variable.");
    const at = (x: Value): Value => this.evaluate(body, new Map([...scope, [variable.name, x]]));
    const number = (x: number): number => {
      const y = at(x) as number;
      if (Number.isNaN(y)) throw new OracleFault("not-finite");
      return y;
    };
    const lower = this.evaluate(argumentsGiven[1]!, scope) as number;
    if (name === "fixed_point") return this.solved(at, this.fixedPoint(at, lower));
    const upper = this.evaluate(argumentsGiven[2]!, scope) as number;
    if (Number.isNaN(lower) || Number.isNaN(upper)) throw new OracleFault("not-finite");
    if (name === "series") {
      if (!Number.isInteger(lower) || !Number.isInteger(upper)) throw new OracleFault("out-of-range");
      let sum: Value = 0;
      for (let n = lower; n <= upper; n++) sum = this.spread((a, b) => a + b, [sum, at(n)]);
      return sum;
    }
    if (name === "integral") {
      const value = own.romberg(number, lower, upper);
      if (!Number.isFinite(value)) throw new OracleFault("not-finite");
      return value;
    }
    if (lower > upper) throw new OracleFault("crossed-bounds");
    const x = this.unjudged(() =>
      name === "balance" ? own.bisect(number, lower, upper) : own.scanMinimum(number, lower, upper),
    );
    if (x === null) throw new OracleFault("no-solution");
    // A minimum is known to about the square root of the rounding only.
    const blur = name === "argmin" && this.options.noise ? 1e6 * this.options.noise() * (upper - lower) : 0;
    return this.solved(at, Math.min(upper, Math.max(lower, x + blur)));
  }

  private solved(at: (x: Value) => Value, x: Value): Value {
    if (this.judging) at(x);
    return x;
  }

  private fixedPoint(at: (x: Value) => Value, start: Value): Value {
    return this.unjudged(() => {
      let x = start;
      // A disturbed run cannot settle: it ends near the answer.
      const steps = this.options.noise ? 80 : 400;
      for (let step = 0; step < steps; step++) {
        const y = at(x);
        const pairs = Array.isArray(x) ? x.map((each, i) => [each, (y as number[])[i]]) : [[x, y]];
        if (pairs.every(([a, b]) => Math.abs((a as number) - (b as number)) <= 1e-12 * Math.abs(a as number)))
          return y;
        x = Array.isArray(x)
          ? x.map((each, i) => ((each as number) + (y as number[])[i]!) / 2)
          : ((x as number) + (y as number)) / 2;
        if (!Number.isFinite(Array.isArray(x) ? (x[0] as number) : (x as number)))
          throw new OracleFault("not-finite");
      }
      if (this.options.noise) return x;
      throw new OracleFault("not-converged");
    });
  }

  private unjudged<T>(work: () => T): T {
    const before = this.judging;
    this.judging = false;
    try {
      return work();
    } finally {
      this.judging = before;
    }
  }
}
