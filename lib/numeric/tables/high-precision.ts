/**
 * The functions of the tables to about 50 digits and more, for the generator: power series where they converge (their
 * cancellation, at most e^120 at x = 60, is far within the arithmetic), beyond x = 60 Hankel's expansions, whose smallest
 * term there is e^−120. Formula numbers are those of the NIST Digital Library of Mathematical Functions (DLMF).
 */
import {
  absolute,
  cosineAndSine,
  divide,
  eulerConstant,
  exponential,
  type Fixed,
  fromRatio,
  logarithm,
  multiply,
  one,
  pi,
  squareRoot,
  sumSeries,
} from "./fixed-point";

type Order = 0 | 1;

const seriesEnd = fromRatio(60);
const euler = eulerConstant();
export const ln2: Fixed = logarithm(fromRatio(2));
const twoOverRootPi: Fixed = divide(fromRatio(2), squareRoot(pi));

/** Σ (±t)^k/(k!·(k+n)!) with t = (x/2)²: I_n or J_n over (x/2)^n (DLMF 10.25.2, 10.2.2). */
export function series(order: Order, t: Fixed, sign: 1n | -1n): Fixed {
  return sumSeries(one, (term, k) => (sign * multiply(term, t)) / BigInt(k * (k + order)));
}

/** The same sum with each term times ψ(k+1) + ψ(k+n+1) (DLMF 10.31.1, 10.8.1). */
export function psiSeries(order: Order, t: Fixed, sign: 1n | -1n): Fixed {
  let harmonic = 0n;
  let term = one;
  let psi = -2n * euler + (order === 1 ? one : 0n);
  let sum = psi;
  for (let k = 1; term !== 0n; k += 1) {
    term = (sign * multiply(term, t)) / BigInt(k * (k + order));
    harmonic += fromRatio(1, k);
    psi = 2n * (harmonic - euler) + (order === 1 ? fromRatio(1, k + 1) : 0n);
    sum += multiply(term, psi);
  }
  return sum;
}

const quarterSquare = (x: Fixed): Fixed => multiply(x, x) / 4n;

/** I_n(x) by its series. */
function besselI(order: Order, x: Fixed): Fixed {
  const sum = series(order, quarterSquare(x), 1n);
  return order === 0 ? sum : multiply(x / 2n, sum);
}

/** K_0 = −ln(x/2)·I_0 + ½Σ…, K_1 = 1/x + ln(x/2)·I_1 − (x/4)·Σ… (DLMF 10.31.1). */
function besselK(order: Order, x: Fixed): Fixed {
  const logarithmic = multiply(logarithm(x) - ln2, besselI(order, x));
  const psi = psiSeries(order, quarterSquare(x), 1n);
  return order === 0 ? psi / 2n - logarithmic : divide(one, x) + logarithmic - multiply(x, psi) / 4n;
}

/** J_n and Y_n by their series (DLMF 10.2.2, 10.8.1). */
function besselJY(order: Order, x: Fixed): readonly [Fixed, Fixed] {
  const t = quarterSquare(x);
  const sum = series(order, t, -1n);
  const j = order === 0 ? sum : multiply(x / 2n, sum);
  const psi = psiSeries(order, t, -1n);
  const regular = order === 0 ? psi : multiply(x / 2n, psi) + divide(fromRatio(2), x);
  return [j, divide(2n * multiply(logarithm(x) - ln2, j) - regular, pi)];
}

/** Terms a_k(n)·u^k of Hankel's expansions (DLMF 10.17.1), while they fall. */
function hankelTerms(order: Order, u: Fixed): Fixed[] {
  const terms = [one];
  for (let k = 1; ; k += 1) {
    const last = terms.at(-1)!;
    const next = (multiply(last, u) * BigInt(4 * order - (2 * k - 1) ** 2)) / BigInt(8 * k);
    if (next === 0n || absolute(next) >= absolute(last)) return terms;
    terms.push(next);
  }
}

/** √x·e^−x·I_n(x) at x = 1/u. */
export function scaledI(order: Order, u: Fixed): Fixed {
  const x = divide(one, u);
  if (x < seriesEnd) return multiply(multiply(squareRoot(x), exponential(-x)), besselI(order, x));
  const sum = hankelTerms(order, u).reduce((total, term, k) => total + (k % 2 === 0 ? term : -term), 0n);
  return divide(sum, squareRoot(2n * pi));
}

/** e^−x·I_n(x). */
export function dampedI(order: Order, x: Fixed): Fixed {
  return multiply(exponential(-x), besselI(order, x));
}

/** √x·e^x·K_n(x) at x = 1/u. */
export function scaledK(order: Order, u: Fixed): Fixed {
  const x = divide(one, u);
  if (x < seriesEnd) return multiply(multiply(squareRoot(x), exponential(x)), besselK(order, x));
  const sum = hankelTerms(order, u).reduce((total, term) => total + term, 0n);
  return multiply(sum, squareRoot(pi / 2n));
}

/**
 * P and Q of J_n = √(2/(πx))·(P·cos χ − Q·sin χ), Y_n = √(2/(πx))·(P·sin χ + Q·cos χ), χ = x − nπ/2 − π/4
 * (DLMF 10.17.3), at x = 1/u.
 */
export function hankelPQ(order: Order, u: Fixed): { readonly p: Fixed; readonly q: Fixed } {
  const x = divide(one, u);
  if (x < seriesEnd) {
    const [j, y] = besselJY(order, x);
    const [cosine, sine] = cosineAndSine(x - (BigInt(2 * order + 1) * pi) / 4n);
    const root = squareRoot(multiply(pi, x) / 2n);
    return {
      p: multiply(root, multiply(j, cosine) + multiply(y, sine)),
      q: multiply(root, multiply(y, cosine) - multiply(j, sine)),
    };
  }
  const terms = hankelTerms(order, u);
  const alternate = (parity: number) =>
    terms
      .filter((_, k) => k % 2 === parity)
      .reduce((total, term, k) => total + (k % 2 === 0 ? term : -term), 0n);
  return { p: alternate(0), q: alternate(1) };
}

/** erf x over x, t = x²: 2/√π·Σ (−t)^k/(k!·(2k+1)) (DLMF 7.6.1). */
export function erfOverX(t: Fixed): Fixed {
  let power = one;
  const sum = sumSeries(one, (_, k) => {
    power = multiply(-power, t) / BigInt(k);
    return power / BigInt(2 * k + 1);
  });
  return multiply(twoOverRootPi, sum);
}

/** e^(x²)·erfc x; beyond x = 12 by its asymptotic expansion (DLMF 7.12.1), whose smallest term there is e^−144. */
export function erfcx(x: Fixed): Fixed {
  const square = multiply(x, x);
  if (x < fromRatio(12)) return multiply(exponential(square), one - multiply(x, erfOverX(square)));
  let sum = one;
  let term = one;
  for (let k = 1; ; k += 1) {
    const next = divide(-term * BigInt(2 * k - 1), 2n * square);
    if (next === 0n || absolute(next) >= absolute(term)) break;
    term = next;
    sum += term;
  }
  return divide(multiply(twoOverRootPi / 2n, sum), x);
}
