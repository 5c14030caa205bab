import type { InputDeclaration, PropertyReader } from "@/lib/language/types";
import type { Inputs, Material, Option } from "./interpreter";
import { romberg } from "./numerics";
import { Random, type Kind } from "./random";
import { RandomExpressions, type Named, type RandomFunction, type Surroundings } from "./random-expression";

/** A random program with inputs for several runs. */
export interface RandomProgram {
  readonly working: string;
  readonly runs: readonly Inputs[];
}

const number = (symbol: string, quantity: string, unit: string): InputDeclaration => ({
  kind: "number",
  symbol,
  label: symbol,
  quantity,
  unit,
});

const finishes = { kind: "choice", label: "finish" } as const;
const options = [
  { key: "plain", values: { eps: { value: 0.9, unit: "1" } } },
  { key: "rough", values: { eps: { value: 0.35, unit: "1" } } },
] as const;

/** Inputs that every random program may read. */
export const randomInputs: readonly InputDeclaration[] = [
  number("a", "ratio", "1"),
  number("b", "ratio", "1"),
  number("L", "length", "m"),
  number("T_1", "temperature", "K"),
  number("T_2", "temperature", "K"),
  number("k_0", "thermal conductivity", "W/(m·K)"),
  number("h_1", "heat transfer coefficient", "W/(m²·K)"),
  { ...finishes, symbol: "mode", options },
  { kind: "material", symbol: "wall", label: "wall", needs: ["k"] },
  {
    kind: "table",
    symbol: "rows",
    label: "rows",
    minRows: 1,
    maxRows: 5,
    columns: [
      { kind: "number", symbol: "t", label: "t", quantity: "length", unit: "m" },
      { kind: "number", symbol: "k", label: "k", quantity: "thermal conductivity", unit: "W/(m·K)" },
      { kind: "number", symbol: "T", label: "T", quantity: "temperature", unit: "K" },
      { ...finishes, symbol: "finish", options },
      { kind: "material", symbol: "m", label: "m", needs: ["k"] },
    ],
  },
];

const inputScope: readonly Named[] = [
  { text: "a", kind: "number", shape: null },
  { text: "b", kind: "number", shape: null },
  { text: "mode.eps", kind: "number", shape: null },
  { text: "L", kind: "length", shape: null },
  { text: "T_1", kind: "temperature", shape: null },
  { text: "T_2", kind: "temperature", shape: null },
  { text: "k_0", kind: "conductivity", shape: null },
  { text: "h_1", kind: "coefficient", shape: null },
  { text: "rows.t", kind: "length", shape: 0 },
  { text: "rows.k", kind: "conductivity", shape: 0 },
  { text: "rows.T", kind: "temperature", shape: 0 },
  { text: "rows.finish.eps", kind: "number", shape: 0 },
];

const kinds: readonly Kind[] = [
  "number",
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

/** A line of a working may hold this many characters. */
const longestLine = 1900;

/** The program of a seed: lines and functions of several quantities, numbers and lists, all forms. */
export function randomProgram(seed: number): RandomProgram {
  const random = new Random(seed);
  const scope: Named[] = [...inputScope];
  const functions: RandomFunction[] = [];
  const names = { next: 1 };
  const budget = { left: 3 };
  const lines: string[] = [];
  const expressions = (more: Partial<Surroundings>): RandomExpressions =>
    new RandomExpressions({ random, scope, functions, plain: false, forms: 2, budget, names, ...more });
  for (let statement = random.whole(3, 8); statement > 0; statement--) {
    const kind = random.pick(kinds);
    if (random.chance(0.3)) {
      const made = randomFunction(random, kind, names, expressions);
      if (made.text.length > longestLine) continue;
      lines.push(made.text);
      functions.push(made.function);
      continue;
    }
    const shape = random.chance(0.3) ? random.pick([0, 0, 1]) : null;
    const name = `y${names.next++}`;
    const text = `${name} = ${expressions({}).of(kind, shape, random.whole(1, 4))}`;
    if (text.length > longestLine) continue;
    lines.push(text);
    scope.push({ text: name, kind, shape });
  }
  if (lines.length === 0) lines.push("y0 = a");
  const rows = [random.whole(1, 4), random.whole(1, 4)];
  return { working: lines.join("\n"), runs: rows.map((count) => randomRun(random, count)) };
}

function randomFunction(
  random: Random,
  kind: Kind,
  names: { next: number },
  expressions: (more: Partial<Surroundings>) => RandomExpressions,
): { text: string; function: RandomFunction } {
  const name = `f${names.next++}`;
  const parameters = Array.from({ length: random.whole(1, 3) }, () => ({
    name: `p${names.next++}`,
    kind: random.pick(kinds),
  }));
  const plain = random.chance(0.5);
  const own: Named[] = parameters.map((each) => ({ text: each.name, kind: each.kind, shape: null }));
  const inputs = inputScope.filter((each) => !plain || each.shape === null);
  // Parameters are named twice, so that they are read more often than inputs.
  const body = expressions({ scope: [...inputs, ...own, ...own], plain }).of(kind, null, random.whole(1, 3));
  const readsAll = parameters.every((each) => new RegExp(`\\b${each.name}\\b`).test(body));
  return {
    text: `${name}(${parameters.map((each) => each.name).join(", ")}) = ${body}`,
    function: { name, parameters, kind, elementwise: plain && readsAll },
  };
}

function randomRun(random: Random, rows: number): Inputs {
  const list = <T>(make: () => T): T[] => Array.from({ length: rows }, make);
  return {
    a: random.between(-2, 3),
    b: random.between(0.1, 2),
    L: random.between(0.01, 0.6),
    T_1: random.between(280, 700),
    T_2: random.between(280, 700),
    k_0: random.between(0.03, 40),
    h_1: random.between(2, 90),
    mode: randomOption(random),
    wall: randomMaterial(random),
    rows: {
      t: list(() => random.between(0.01, 0.3)),
      k: list(() => random.between(0.03, 40)),
      T: list(() => random.between(280, 700)),
      finish: list(() => randomOption(random)),
      m: list(() => randomMaterial(random)),
    },
  };
}

function randomOption(random: Random): Option {
  const { key, values } = random.pick(options);
  return { option: key, fields: { eps: values.eps.value } };
}

function randomMaterial(random: Random): Material {
  const [c0, c1] = [random.between(0.1, 20), random.between(0.0001, 0.01)];
  return { material: { k: (temperature) => c0 * (1 + c1 * temperature + 1e-6 * temperature ** 2) } };
}

/** The same material as generated code reads it; its integrals are exact for polynomials of second degree. */
export function readerOf(material: Material): PropertyReader {
  const value: PropertyReader["value"] = (property, temperature) => material.material[property]!(temperature);
  const integral: PropertyReader["integral"] = (property, from, to) =>
    romberg((temperature) => value(property, temperature, true), from, to, 2);
  return {
    value,
    integral,
    mean: (property, from, to, judged) =>
      from === to ? value(property, from, judged) : integral(property, from, to, judged) / (to - from),
  };
}

export function optionIndex(option: Option): number {
  return options.findIndex((each) => each.key === option.option);
}
