import {
  besselI,
  besselIScaled,
  besselJ,
  besselJZero,
  besselK,
  besselKScaled,
  besselY,
} from "@/lib/numeric/bessel";
import { erf, erfc, erfcx } from "@/lib/numeric/erf";

/** Nearest whole number, halves away from zero: 2.5 → 3, −2.5 → −3. */
export function roundHalfAway(x: number): number {
  return x < 0 ? -Math.round(-x) : Math.round(x);
}

/**
 * Power of a number by a number. Unlike `Math.pow`, a base that is not a number never becomes 1 under the exponent 0,
 * so a fault cannot hide in it.
 */
export function power(base: number, exponent: number): number {
  return base !== base ? base : Math.pow(base, exponent);
}

function meanOf(...values: number[]): number {
  let sum = 0;
  for (const value of values) sum += value;
  return sum / values.length;
}

/** x held between lo and hi. */
function clamp(x: number, lo: number, hi: number): number {
  return Math.min(Math.max(x, lo), hi);
}

/**
 * Functions of the language that act on numbers (on lists element by element), by row name. Those of `Math` are emitted
 * as such; the others reach generated code as parameters under the names here.
 */
export const scalarFunctions = {
  sqrt: Math.sqrt,
  cbrt: Math.cbrt,
  exp: Math.exp,
  ln: Math.log,
  log10: Math.log10,
  sin: Math.sin,
  cos: Math.cos,
  tan: Math.tan,
  asin: Math.asin,
  acos: Math.acos,
  atan: Math.atan,
  atan2: Math.atan2,
  sinh: Math.sinh,
  cosh: Math.cosh,
  tanh: Math.tanh,
  asinh: Math.asinh,
  acosh: Math.acosh,
  atanh: Math.atanh,
  abs: Math.abs,
  sign: Math.sign,
  floor: Math.floor,
  ceil: Math.ceil,
  round: roundHalfAway,
  min: Math.min,
  max: Math.max,
  mean: meanOf,
  clamp,
  erf,
  erfc,
  erfcx,
  bessel_j: besselJ,
  bessel_y: besselY,
  bessel_i: besselI,
  bessel_k: besselK,
  bessel_ie: besselIScaled,
  bessel_ke: besselKScaled,
  bessel_j_zero: besselJZero,
} as const satisfies Record<string, (...values: number[]) => number>;

export type ScalarFunction = keyof typeof scalarFunctions;

export function isScalarFunction(name: string): name is ScalarFunction {
  return Object.hasOwn(scalarFunctions, name);
}

/** Row names whose code is a function of `Math`, with its name there. */
export const mathNames: Readonly<Partial<Record<ScalarFunction, string>>> = {
  sqrt: "sqrt",
  cbrt: "cbrt",
  exp: "exp",
  ln: "log",
  log10: "log10",
  sin: "sin",
  cos: "cos",
  tan: "tan",
  asin: "asin",
  acos: "acos",
  atan: "atan",
  atan2: "atan2",
  sinh: "sinh",
  cosh: "cosh",
  tanh: "tanh",
  asinh: "asinh",
  acosh: "acosh",
  atanh: "atanh",
  abs: "abs",
  sign: "sign",
  floor: "floor",
  ceil: "ceil",
  min: "min",
  max: "max",
};
