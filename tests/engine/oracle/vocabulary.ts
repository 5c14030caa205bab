import * as own from "./numerics";

/** Units, constants and functions of numbers as the oracle understands them. */

export class OracleFault extends Error {
  constructor(
    readonly code: string,
    readonly symbol: string | null = null,
  ) {
    super(code);
  }
}

/** Units that texts may use: factor and shift to SI. */
export const units: Readonly<Record<string, readonly [number, number]>> = {
  m: [1, 0],
  mm: [1e-3, 0],
  "m²": [1, 0],
  s: [1, 0],
  h: [3600, 0],
  K: [1, 0],
  "°C": [1, 273.15],
  ΔK: [1, 0],
  "Δ°C": [1, 0],
  W: [1, 0],
  "W/m²": [1, 0],
  "W/(m·K)": [1, 0],
  "W/(m²·K)": [1, 0],
};

export const constants: Readonly<Record<string, number>> = { pi: Math.PI, sigma_SB: 5.670374419184429e-8 };

/** SI value of a text in quotes; null when it is no quantity. */
export function quantity(text: string): number | null {
  const [, number = "", unit = ""] = /^(-?[\d.]+(?:e-?\d+)?) (.+)$/.exec(text) ?? [];
  const known = units[unit];
  return known ? (Number(number) + known[1]) * known[0] : null;
}

/** Value on straight lines between points. */
export function interpolate(x: number, xs: readonly number[], ys: readonly number[]): number {
  for (let i = 1; i < xs.length; i++) if (!(xs[i]! > xs[i - 1]!)) throw new OracleFault("out-of-range");
  for (let i = 0; i < xs.length; i++) {
    if (xs[i] === x) return ys[i]!;
    if (i > 0 && xs[i - 1]! < x && x < xs[i]!) {
      const share = (x - xs[i - 1]!) / (xs[i]! - xs[i - 1]!);
      return (1 - share) * ys[i - 1]! + share * ys[i]!;
    }
  }
  throw new OracleFault("out-of-range");
}

/** Functions of any number of arguments. */
export const several: Readonly<Record<string, (...xs: number[]) => number>> = {
  min: (...xs) => xs.reduce((a, b) => (a !== a || a < b ? a : b)),
  max: (...xs) => xs.reduce((a, b) => (a !== a || a > b ? a : b)),
  mean: (...xs) => xs.reduce((a, b) => a + b, 0) / xs.length,
};

/** Functions of numbers. */
export const scalars: Readonly<Record<string, (...xs: number[]) => number>> = {
  sqrt: (x) => x ** 0.5,
  cbrt: (x) => (x < 0 ? -((-x) ** (1 / 3)) : x ** (1 / 3)),
  exp: (x) => Math.E ** x,
  ln: Math.log,
  log10: (x) => Math.log(x) / Math.LN10,
  sin: Math.sin,
  cos: Math.cos,
  tan: Math.tan,
  asin: Math.asin,
  acos: Math.acos,
  atan: Math.atan,
  atan2: Math.atan2,
  sinh: (x) => (Math.abs(x) < 0.5 ? Math.sinh(x) : (Math.exp(x) - Math.exp(-x)) / 2),
  cosh: (x) => (Math.exp(x) + Math.exp(-x)) / 2,
  tanh: Math.tanh,
  asinh: Math.asinh,
  acosh: Math.acosh,
  atanh: Math.atanh,
  abs: (x) => (x < 0 ? -x : x),
  sign: (x) => (x > 0 ? 1 : x < 0 ? -1 : x),
  floor: Math.floor,
  ceil: Math.ceil,
  round: (x) => (x < 0 ? -Math.floor(-x + 0.5) : Math.floor(x + 0.5)),
  clamp: (x, low, high) => Math.min(Math.max(x, low), high),
  erf: own.erf,
  erfc: own.erfc,
  erfcx: own.erfcx,
  bessel_j: own.besselJ,
  bessel_y: own.besselY,
  bessel_i: own.besselI,
  bessel_k: own.besselK,
  bessel_ie: own.besselIScaled,
  bessel_ke: own.besselKScaled,
  bessel_j_zero: own.besselJZero,
};
