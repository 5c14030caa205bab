import { literal, type Kind, type Random } from "./random";

/** Random well-typed expressions of the language as source text. */

/** Length of a list against the rows of the table; null for a number. */
export type Shape = number | null;

export interface Named {
  readonly text: string;
  readonly kind: Kind;
  readonly shape: Shape;
}

export interface RandomFunction {
  readonly name: string;
  readonly parameters: readonly { readonly name: string; readonly kind: Kind }[];
  readonly kind: Kind;
  /** May be called with lists: it computes element by element and reads every parameter. */
  readonly elementwise: boolean;
}

/** kind = left operator right, by dimension. */
const products: readonly (readonly [Kind, Kind, "*" | "/", Kind])[] = [
  ["number", "length", "/", "length"],
  ["number", "difference", "/", "difference"],
  ["number", "temperature", "/", "temperature"],
  ["number", "flux", "/", "flux"],
  ["length", "conductivity", "/", "coefficient"],
  ["length", "area", "/", "length"],
  ["area", "length", "*", "length"],
  ["area", "power", "/", "flux"],
  ["difference", "flux", "/", "coefficient"],
  ["conductivity", "coefficient", "*", "length"],
  ["coefficient", "conductivity", "/", "length"],
  ["coefficient", "flux", "/", "difference"],
  ["flux", "coefficient", "*", "difference"],
  ["flux", "power", "/", "area"],
  ["power", "flux", "*", "area"],
];

const everyKind: readonly Kind[] = [
  "number",
  "length",
  "area",
  "temperature",
  "difference",
  "conductivity",
  "coefficient",
  "flux",
  "power",
];

export interface Surroundings {
  readonly random: Random;
  /** Everything that may be read by name: inputs, columns, earlier lines, parameters, bound variables. */
  readonly scope: Named[];
  readonly functions: readonly RandomFunction[];
  /** No conditionals, forms or reductions: the expression computes element by element. */
  readonly plain: boolean;
  /** Special forms that may still be nested. */
  forms: number;
  /** Special forms that the program may still hold. */
  readonly budget: { left: number };
  /** Next bound variable. */
  readonly names: { next: number };
}

export class RandomExpressions {
  constructor(readonly at: Surroundings) {}

  private get random(): Random {
    return this.at.random;
  }

  private literal(kind: Kind): string {
    return literal(this.random, kind);
  }

  /** An expression of that kind and shape. */
  of(kind: Kind, shape: Shape, depth: number): string {
    if (depth <= 0) return this.leaf(kind, shape);
    if (shape !== null) return this.list(kind, shape, depth);
    const { random } = this;
    const roll = random.next();
    if (roll < 0.12) return this.leaf(kind, null);
    if (!this.at.plain) {
      if (roll < 0.22) return this.reduced(kind, depth - 1);
      if (roll < 0.3) {
        return `(${this.condition(depth - 1)} ? ${this.of(kind, null, depth - 1)} : ${this.of(kind, null, depth - 1)})`;
      }
      // A form within a form multiplies the work of the oracle, so it is rarer.
      const often = this.at.forms > 1 ? 0.42 : 0.32;
      if (roll < often && this.at.forms > 0 && this.at.budget.left > 0) return this.form(kind, depth - 1);
    }
    if (roll < 0.52)
      return this.called(kind, null, depth - 1) ?? this.computed(kind, [null, null], depth - 1);
    return this.computed(kind, [null, null], depth - 1);
  }

  /** Above zero, for denominators and roots. Now and then any value, so that faults are met as well. */
  positive(kind: Kind, shape: Shape, depth: number): string {
    if (kind === "temperature") return this.literal(kind);
    if (this.random.chance(0.03)) return this.of(kind, shape, depth);
    if (depth <= 0 || this.random.chance(0.5)) {
      if (shape === null) return this.literal(kind);
    }
    return `(abs(${this.of(kind, shape, depth - 1)}) + ${this.literal(kind)})`;
  }

  private leaf(kind: Kind, shape: Shape): string {
    const named = this.at.scope.filter((each) => each.kind === kind && each.shape === shape);
    if (named.length > 0 && (shape !== null || this.random.chance(0.75))) return this.random.pick(named).text;
    if (shape === null) return this.literal(kind);
    if (shape > 0) return `prepend(${this.leaf(kind, shape - 1)}, ${this.leaf(kind, null)})`;
    if (shape < 0) return `drop_last(${this.leaf(kind, shape + 1)})`;
    if (kind === "temperature") return `(${this.leaf("temperature", null)} + ${this.leaf("difference", 0)})`;
    return `(${this.leaf("number", 0)}*${this.literal(kind)})`;
  }

  /** One arithmetic step or function; `shapes` are those of its operands. */
  private computed(kind: Kind, shapes: readonly [Shape, Shape], depth: number): string {
    const { random } = this;
    const [a, b] = shapes;
    const own = (shape: Shape): string => this.of(kind, shape, depth);
    if (kind === "temperature") {
      const difference = `(${own(a)} ${random.pick(["+", "-"])} ${this.of("difference", b, depth)})`;
      return random.pick([
        difference,
        difference,
        `mean(${own(a)}, ${own(b)})`,
        `((${own(a)} + ${own(b)})/2)`,
        `(${own(a)} + ${this.of("number", null, depth)}*(${own(b)} - ${this.leaf(kind, null)}))`,
        `${random.pick(["min", "max"])}(${own(a)}, ${own(b)})`,
        `as_temperature(b*${own(a ?? b)})`,
      ]);
    }
    const rows = products.filter(([result]) => result === kind);
    if (rows.length > 0 && random.chance(0.35)) {
      const [, left, operator, right] = random.pick(rows);
      const second = operator === "/" ? this.positive(right, b, depth) : this.of(right, b, depth);
      return `(${this.of(left, a, depth)}${operator}${second})`;
    }
    if (kind === "difference" && random.chance(0.3)) {
      return `(${this.of("temperature", a, depth)} - ${this.of("temperature", b, depth)})`;
    }
    if (kind === "conductivity" && random.chance(0.3)) return this.property(a ?? b, depth);
    if (kind === "length" && random.chance(0.15)) return `sqrt(${this.positive("area", a ?? b, depth)})`;
    if (kind === "area" && random.chance(0.2)) return `(${this.of("length", a ?? b, depth)}^2)`;
    if (kind === "number" && random.chance(0.55)) return this.function(a ?? b, depth);
    return random.pick([
      () => `(${own(a)} + ${own(b)})`,
      () => `(${own(a)} - ${own(b)})`,
      () => `(${own(a)}*${this.of("number", b, depth)})`,
      () => `(${own(a)}/${this.positive("number", b, depth)})`,
      () => `(-${own(a ?? b)})`,
      () => `abs(${own(a ?? b)})`,
      () => `${random.pick(["min", "max", "mean"])}(${own(a)}, ${own(b)})`,
      () => `clamp(${own(a)}, ${this.literal(kind)}, ${own(b)})`,
    ])();
  }

  /** A bare number as a function of another. */
  private function(shape: Shape, depth: number): string {
    const { random } = this;
    const x = (): string => this.of("number", shape, depth);
    // Now and then a step that is not defined everywhere, so that faults are compared as well.
    if (random.chance(0.03)) {
      return random.pick([
        `sqrt(${x()})`,
        `ln(${x()})`,
        `(1/floor(${x()}))`,
        `acosh(${x()})`,
        `(${x()}^0.3)`,
      ]);
    }
    const bounded = (): string => `clamp(${x()}, -${random.whole(1, 2)}, ${random.whole(2, 4)})`;
    return random.pick([
      () => `${random.pick(["sin", "cos", "tanh", "atan", "erf", "asinh"])}(${x()})`,
      () => `${random.pick(["exp", "sinh", "cosh", "erfc", "erfcx"])}(${bounded()})`,
      () => `${random.pick(["ln", "log10", "sqrt", "cbrt"])}(${this.positive("number", shape, depth)})`,
      () => `(${x()}^${random.pick(["2", "3", "4", "5", "(-1)", "(-2)"])})`,
      () =>
        `(${this.positive("number", shape, depth)}^${random.pick(["0.5", "1.5", "(-0.5)", "(1/3)", "0.7", "(9/16)"])})`,
      () => `(${this.positive("number", shape, depth)}^${bounded()})`,
      () => `atan2(${x()}, ${this.positive("number", shape, depth)})`,
      () => `${random.pick(["floor", "ceil", "round", "sign"])}(${x()})`,
      () => `number_in(${this.of("length", shape, depth)}, "mm")`,
      () => `number_in(${this.of("temperature", shape, depth)}, "K")`,
      () =>
        `bessel_${random.pick(["i", "k", "ie", "ke", "j"])}(${random.whole(0, 2)}, ${this.positive("number", shape, 0)})`,
    ])();
  }

  private property(shape: Shape, depth: number): string {
    const { random } = this;
    const owner = shape === 0 && random.chance(0.5) ? "rows.m" : "wall";
    const t = (wanted: Shape): string => this.of("temperature", wanted, Math.min(depth, 1));
    return random.chance(0.5) ? `${owner}.k(${t(shape)})` : `${owner}.k_mean(${t(shape)}, ${t(null)})`;
  }

  private called(kind: Kind, shape: Shape, depth: number): string | null {
    const fitting = this.at.functions.filter(
      (each) => each.kind === kind && (shape === null || (each.elementwise && each.parameters.length > 0)),
    );
    if (fitting.length === 0) return null;
    const chosen = this.random.pick(fitting);
    const given = chosen.parameters.map((parameter) => this.of(parameter.kind, shape, depth));
    return `${chosen.name}(${given.join(", ")})`;
  }

  condition(depth: number): string {
    const { random } = this;
    const roll = random.next();
    if (roll < 0.25) return `(mode ${random.pick(["==", "!="])} "${random.pick(["plain", "rough"])}")`;
    if (roll < 0.4 && depth > 0) {
      return `(${this.condition(depth - 1)} ${random.pick(["and", "or"])} ${this.condition(depth - 1)})`;
    }
    if (roll < 0.48) return `(not ${this.condition(depth - 1)})`;
    const kind = random.pick(everyKind);
    return `(${this.of(kind, null, depth)} ${random.pick(["<", "<=", ">", ">="])} ${this.of(kind, null, depth)})`;
  }

  private list(kind: Kind, shape: number, depth: number): string {
    const { random } = this;
    const roll = random.next();
    const same = (): string => this.of(kind, shape, depth - 1);
    if (roll < 0.15) return this.leaf(kind, shape);
    if (!this.at.plain) {
      if (roll < 0.22 && shape > -1)
        return `${random.pick(["prepend", "append"])}(${this.of(kind, shape - 1, depth - 1)}, ${this.of(kind, null, depth - 1)})`;
      if (roll < 0.29)
        return `${random.pick(["drop_first", "drop_last"])}(${this.of(kind, shape + 1, depth - 1)})`;
      if (roll < 0.33) return `reverse(${same()})`;
      if (roll < 0.39 && kind !== "temperature") return `cumsum(${same()})`;
      if (roll < 0.43) {
        const other = random.chance(0.7) ? same() : same();
        return `(${this.condition(0)} ? ${same()} : ${other})`;
      }
      if (roll < 0.47 && this.at.forms > 0 && this.at.budget.left > 0)
        return this.listForm(kind, shape, depth - 1);
    }
    if (roll < 0.57) {
      const call = this.called(kind, shape, depth - 1);
      if (call) return call;
    }
    const shapes = random.pick<readonly [Shape, Shape]>([
      [shape, shape],
      [shape, null],
      [null, shape],
    ]);
    return this.spreadSafely(kind, shapes, shape, depth - 1);
  }

  /** Steps that drop one operand could drop the only list, so a list is added to the result where it is needed. */
  private spreadSafely(kind: Kind, shapes: readonly [Shape, Shape], shape: number, depth: number): string {
    const text = this.computed(kind, shapes, depth);
    if (shapes[0] !== null && shapes[1] !== null) return text;
    return kind === "temperature"
      ? `(${text} + ${this.leaf("difference", shape)})`
      : `(${text} + ${this.leaf(kind, shape)})`;
  }

  private reduced(kind: Kind, depth: number): string {
    const { random } = this;
    const shape = random.pick([0, 0, 0, 1]);
    const list = (wanted = shape): string => this.of(kind, wanted, depth);
    if (random.chance(0.03)) return `at(${list()}, ${random.whole(1, 5)})`;
    const options = [
      () => `${random.pick(["mean", "min", "max", "first", "last"])}(${list()})`,
      () => `at(${list()}, 1)`,
      () => `at(${list(0)}, count(rows.t))`,
      () => `weighted_mean(${list()}, ${this.positive("number", shape, 1)})`,
      () => `interpolate(mean(first(cumsum(rows.t)), last(cumsum(rows.t))), cumsum(rows.t), ${list(0)})`,
    ];
    if (kind !== "temperature")
      options.push(
        () => `sum(${list()})`,
        () => `sum(${list()})`,
      );
    if (kind === "number")
      options.push(
        () => `product(${list()})`,
        () => `count(${this.leaf("length", shape)})`,
      );
    return random.pick(options)();
  }

  /** A special form of that kind whose solution exists: it is built around a middle and a width. */
  private form(kind: Kind, depth: number): string {
    this.at.budget.left--;
    const variable = `v${this.at.names.next++}`;
    const width = this.literal(kind === "temperature" ? "difference" : kind);
    // The middle is written several times, so it holds no form of its own.
    const middle = new RandomExpressions({ ...this.at, forms: 0, functions: [] }).of(
      kind,
      null,
      Math.min(depth, 1),
    );
    const inside = (bound: Named): RandomExpressions =>
      new RandomExpressions({ ...this.at, scope: [...this.at.scope, bound], forms: this.at.forms - 1 });
    const within = inside({ text: variable, kind, shape: null });
    const relative = `((${variable} - ${middle})/${width})`;
    const shift = `clamp(${within.of("number", null, depth)}, -0.9, 0.9)`;
    const still = `clamp(${this.of("number", null, depth)}, -0.9, 0.9)`;
    const options = [
      () =>
        `balance(${variable}, ${middle} - ${width}, ${middle} + ${width}, ${relative} + ${this.random.between(0.1, 2)}*${relative}^3 - ${still})`,
      () =>
        `balance(${variable}, ${middle} - ${width}, ${middle} + ${width}, ${relative} + exp(${relative}) - 1 - 0.3*${still} + 0.0001*${shift})`,
      () => `argmin(${variable}, ${middle} - ${width}, ${middle} + ${width}, (${relative} - ${still})^2 + 1)`,
      () => `fixed_point(${variable}, ${middle}, ${middle} + ${width}*(0.3*sin(${relative}) + ${still}))`,
    ];
    if (this.random.chance(0.05)) {
      return this.random.pick([
        `balance(${variable}, ${middle} - ${width}, ${middle} + ${width}, ${relative}^2 + 0.1)`,
        `argmin(${variable}, ${middle} + ${width}, ${middle} - ${width}, ${relative}^2)`,
        `balance(${variable}, ${middle} - ${width}, ${middle} + ${width}, ${relative} + 0*ln(${relative} + 0.5))`,
      ]);
    }
    if (kind !== "temperature") {
      const n = `v${this.at.names.next++}`;
      const counted = inside({ text: n, kind: "number", shape: null });
      options.push(
        () =>
          `series(${n}, ${this.random.whole(0, 2)}, ${this.random.whole(1, 6)}, ${counted.of(kind, null, depth)}/(${n} + 1)^2)`,
        () =>
          `integral(${n}, ${this.random.between(0, 1)}, ${this.random.between(1, 2)}, ${this.of(kind, null, depth)}*exp(-${n}^2)*cos(${n}))`,
      );
    }
    return this.random.pick(options)();
  }

  private listForm(kind: Kind, shape: number, depth: number): string {
    this.at.budget.left--;
    const variable = `v${this.at.names.next++}`;
    const plain = new RandomExpressions({ ...this.at, forms: 0, functions: [] });
    const base = plain.of(kind, shape, Math.min(depth, 1));
    return kind === "temperature"
      ? `fixed_point(${variable}, ${base}, ${base} + 0.3*(${variable} - ${base}) + ${this.literal("difference")})`
      : `fixed_point(${variable}, ${base}, ${base} + 0.4*abs(${variable}) + ${this.literal(kind)})`;
  }
}
