import { chebyshev } from "./chebyshev";
import {
  j0Near,
  j1Near,
  p0Middle,
  p0Tail,
  p1Middle,
  p1Tail,
  q0Middle,
  q0Tail,
  q1Middle,
  q1Tail,
  y0Near,
  y1Near,
} from "./tables/bessel";

/*
 * Bessel functions J and Y of orders 0 and 1 for x > 0, from which the other orders follow: Chebyshev tables of our own
 * (tables/generate.ts) up to x = 4, beyond them Hankel's form J = √(2/(πx))·(P·cos χ − Q·sin χ). The cosine and sine of
 * χ = x − π/4 − nπ/2 are made of those of x, so that no digit of the phase is lost to the subtraction. Error below 1e-15
 * of the amplitude √(J² + Y²).
 */

const twoOverPi = 2 / Math.PI;
const rootOfPi = Math.sqrt(Math.PI);

/** Which of the functions Hankel's form is asked for. */
function hankel(order: 0 | 1, kind: "j" | "y", x: number): number {
  if (x === Infinity) return 0;
  const far = x > 10;
  const t = far ? 20 / x - 1 : (40 / x - 7) / 3;
  const cosine = Math.cos(x);
  const sine = Math.sin(x);
  let p: number;
  let q: number;
  if (order === 0) {
    p = chebyshev(far ? p0Tail : p0Middle, t);
    q = chebyshev(far ? q0Tail : q0Middle, t) / x;
  } else {
    p = chebyshev(far ? p1Tail : p1Middle, t);
    q = chebyshev(far ? q1Tail : q1Middle, t) / x;
  }
  // √2·cos χ and √2·sin χ.
  const phaseCosine = order === 0 ? cosine + sine : sine - cosine;
  const phaseSine = order === 0 ? sine - cosine : -sine - cosine;
  const sum = kind === "j" ? p * phaseCosine - q * phaseSine : p * phaseSine + q * phaseCosine;
  return sum / (rootOfPi * Math.sqrt(x));
}

export function j0(x: number): number {
  if (x > 4) return hankel(0, "j", x);
  return chebyshev(j0Near, (x * x) / 8 - 1);
}

export function j1(x: number): number {
  if (x > 4) return hankel(1, "j", x);
  return 0.5 * x * chebyshev(j1Near, (x * x) / 8 - 1);
}

export function y0(x: number): number {
  if (x > 4) return hankel(0, "y", x);
  return twoOverPi * (Math.log(x) * j0(x) + chebyshev(y0Near, (x * x) / 8 - 1));
}

export function y1(x: number): number {
  if (x > 4) return hankel(1, "y", x);
  // 2/(πx) overflows later than 1/x does.
  return twoOverPi * (Math.log(x) * j1(x) + x * chebyshev(y1Near, (x * x) / 8 - 1)) - twoOverPi / x;
}
