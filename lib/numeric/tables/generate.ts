/**
 * Writes the Chebyshev tables beside this file: `npx tsx lib/numeric/tables/generate.ts`. Everything is computed here on
 * BigInt (fixed-point.ts, high-precision.ts), nothing is taken over; a test compares the committed tables with this.
 */
import { writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { cosineAndSine, divide, type Fixed, fromRatio, multiply, one, pi, toNumber } from "./fixed-point";
import {
  dampedI,
  erfcx,
  erfOverX,
  hankelPQ,
  ln2,
  psiSeries,
  scaledI,
  scaledK,
  series,
} from "./high-precision";

interface Table {
  readonly name: string;
  /** What the sum stands for, written into the file. */
  readonly meaning: string;
  /** Ends of the variable v, which goes to −1 … 1. */
  readonly from: Fixed;
  readonly to: Fixed;
  readonly f: (v: Fixed) => Fixed;
}

/** Nodes of the discrete cosine transform: twice what the longest table needs. */
const nodes = 56;
/** Terms below this part of the largest are left off: a tenth of the rounding of a double. */
const cut = 1e-17;

const cosines = Array.from(
  { length: 4 * nodes },
  (_, index) => cosineAndSine((pi * BigInt(index)) / BigInt(2 * nodes))[0],
);

/** Chebyshev coefficients on the interval by interpolation in the zeros of T_56; the first one already halved. */
function coefficients({ from, to, f }: Table): number[] {
  const values = Array.from({ length: nodes }, (_, node) =>
    f((from + to) / 2n + multiply((to - from) / 2n, cosines[2 * node + 1]!)),
  );
  const all = values.map((_, degree) => {
    const sum = values.reduce(
      (total, value, node) => total + multiply(value, cosines[(degree * (2 * node + 1)) % (4 * nodes)]!),
      0n,
    );
    return toNumber((degree === 0 ? sum : 2n * sum) / BigInt(nodes));
  });
  const largest = Math.max(...all.map(Math.abs));
  const length = all.findLastIndex((value) => Math.abs(value) > cut * largest) + 1;
  if (length > nodes / 2) throw new RangeError("A table needs more nodes than are used.");
  return all.slice(0, length);
}

const square = (v: Fixed): Fixed => v / 4n;
const reciprocal = (x: number): Fixed => fromRatio(1, x);
const both = <T>(make: (order: 0 | 1) => T): T[] => [make(0), make(1)];

/** (x/2)^−n·I_n less its value at 0, over t = (x/2)². */
const remainder = (order: 0 | 1, t: Fixed): Fixed => divide(series(order, t, 1n) - one, t);

const modified: readonly Table[] = both((order): Table[] => [
  {
    name: `i${order}Near`,
    meaning: `(2/x)^${order}·I_${order}(x) = 1 + (x²/4)·Σ, 0 ≤ x ≤ 2, in x²`,
    from: 0n,
    to: fromRatio(4),
    f: (v) => remainder(order, square(v)),
  },
  {
    name: `i${order}Middle`,
    meaning: `e^−x·I_${order}(x), 2 ≤ x ≤ 5, in x`,
    from: fromRatio(2),
    to: fromRatio(5),
    f: (v) => dampedI(order, v),
  },
  {
    name: `i${order}Far`,
    meaning: `√x·e^−x·I_${order}(x), 5 ≤ x ≤ 12, in 1/x`,
    from: reciprocal(12),
    to: reciprocal(5),
    f: (v) => scaledI(order, v),
  },
  {
    name: `i${order}Tail`,
    meaning: `√x·e^−x·I_${order}(x), x ≥ 12, in 1/x`,
    from: 0n,
    to: reciprocal(12),
    f: (v) => scaledI(order, v),
  },
  order === 0
    ? {
        name: "k0Near",
        meaning: "K_0(x) + ln x·I_0(x), 0 < x ≤ 1, in x²",
        from: 0n,
        to: one,
        f: (v) => multiply(ln2, series(0, square(v), 1n)) + psiSeries(0, square(v), 1n) / 2n,
      }
    : {
        name: "k1Near",
        meaning: "(K_1(x) − 1/x − ln x·I_1(x))/x, 0 < x ≤ 1, in x²",
        from: 0n,
        to: one,
        f: (v) => -(multiply(ln2, series(1, square(v), 1n)) / 2n + psiSeries(1, square(v), 1n) / 4n),
      },
  {
    name: `k${order}Middle`,
    meaning: `√x·e^x·K_${order}(x), 1 ≤ x ≤ 3, in 1/x`,
    from: reciprocal(3),
    to: one,
    f: (v) => scaledK(order, v),
  },
  {
    name: `k${order}Far`,
    meaning: `√x·e^x·K_${order}(x), 3 ≤ x ≤ 8, in 1/x`,
    from: reciprocal(8),
    to: reciprocal(3),
    f: (v) => scaledK(order, v),
  },
  {
    name: `k${order}Tail`,
    meaning: `√x·e^x·K_${order}(x), x ≥ 8, in 1/x`,
    from: 0n,
    to: reciprocal(8),
    f: (v) => scaledK(order, v),
  },
]).flat();

const ordinary: readonly Table[] = both((order): Table[] => [
  {
    name: `j${order}Near`,
    meaning: `(2/x)^${order}·J_${order}(x), 0 ≤ x ≤ 4, in x²`,
    from: 0n,
    to: fromRatio(16),
    f: (v) => series(order, square(v), -1n),
  },
  order === 0
    ? {
        name: "y0Near",
        meaning: "(π/2)·Y_0(x) − ln x·J_0(x), 0 < x ≤ 4, in x²",
        from: 0n,
        to: fromRatio(16),
        f: (v) => -(multiply(ln2, series(0, square(v), -1n)) + psiSeries(0, square(v), -1n) / 2n),
      }
    : {
        name: "y1Near",
        meaning: "((π/2)·Y_1(x) + 1/x − ln x·J_1(x))/x, 0 < x ≤ 4, in x²",
        from: 0n,
        to: fromRatio(16),
        f: (v) => -(multiply(ln2, series(1, square(v), -1n)) / 2n + psiSeries(1, square(v), -1n) / 4n),
      },
  {
    name: `p${order}Middle`,
    meaning: `P_${order}(x) of Hankel's form, 4 ≤ x ≤ 10, in 1/x`,
    from: reciprocal(10),
    to: reciprocal(4),
    f: (v) => hankelPQ(order, v).p,
  },
  {
    name: `q${order}Middle`,
    meaning: `x·Q_${order}(x) of Hankel's form, 4 ≤ x ≤ 10, in 1/x`,
    from: reciprocal(10),
    to: reciprocal(4),
    f: (v) => divide(hankelPQ(order, v).q, v),
  },
  {
    name: `p${order}Tail`,
    meaning: `P_${order}(x) of Hankel's form, x ≥ 10, in 1/x`,
    from: 0n,
    to: reciprocal(10),
    f: (v) => hankelPQ(order, v).p,
  },
  {
    name: `q${order}Tail`,
    meaning: `x·Q_${order}(x) of Hankel's form, x ≥ 10, in 1/x`,
    from: 0n,
    to: reciprocal(10),
    f: (v) => divide(hankelPQ(order, v).q, v),
  },
]).flat();

const errorFunction: readonly Table[] = [
  {
    name: "erfNear",
    meaning: "erf(x)/x, 0 ≤ x ≤ 1, in x²",
    from: 0n,
    to: one,
    f: erfOverX,
  },
  {
    name: "erfcxMiddle",
    meaning: "e^(x²)·erfc x, 0.5 ≤ x ≤ 2, in x",
    from: fromRatio(1, 2),
    to: fromRatio(2),
    f: erfcx,
  },
  {
    name: "erfcxFar",
    meaning: "x·e^(x²)·erfc x, 2 ≤ x ≤ 5, in 1/x",
    from: reciprocal(5),
    to: reciprocal(2),
    f: (v) => divide(erfcx(divide(one, v)), v),
  },
  {
    name: "erfcxTail",
    meaning: "x·e^(x²)·erfc x, x ≥ 5, in 1/x",
    from: 0n,
    to: reciprocal(5),
    f: (v) => divide(erfcx(divide(one, v)), v),
  },
];

function fileText(tables: readonly Table[]): string {
  const head =
    "/* Written by generate.ts, do not edit. Chebyshev coefficients, the first one halved; the variable named goes\n" +
    "   linearly to −1 … 1 over the interval. */\n";
  return tables.reduce((text, table) => {
    const lines = coefficients(table).map((value) => `  ${value},\n`);
    return `${text}\n/** ${table.meaning}. */\nexport const ${table.name} = Float64Array.of(\n${lines.join("")});\n`;
  }, head);
}

/** Name of each table file and the text that belongs in it. */
export function tableFiles(): Record<string, string> {
  return {
    "modified-bessel.ts": fileText(modified),
    "bessel.ts": fileText(ordinary),
    "error-function.ts": fileText(errorFunction),
  };
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  for (const [name, text] of Object.entries(tableFiles())) {
    writeFileSync(new URL(name, import.meta.url), text);
  }
}
