/**
 * Exact factors: a fraction of whole numbers times a power of π. Unit factors are multiplied here and rounded once,
 * so `kcal/(h·m·°C)` is the double nearest to 1.163 and no order of factors changes a bit.
 */
export interface Exact {
  readonly n: bigint;
  readonly d: bigint;
  readonly pi: number;
}

export const exactOne: Exact = { n: 1n, d: 1n, pi: 0 };

export function multiplyExact(a: Exact, b: Exact): Exact {
  return { n: a.n * b.n, d: a.d * b.d, pi: a.pi + b.pi };
}

/** `a` to a whole power. */
export function powerExact(a: Exact, exponent: number): Exact {
  if (exponent === 1) return a;
  const times = BigInt(Math.abs(exponent));
  const [n, d] = exponent < 0 ? [a.d, a.n] : [a.n, a.d];
  return { n: n ** times, d: d ** times, pi: a.pi * exponent };
}

function decimalFraction(text: string): Exact {
  if (text === "pi") return { n: 1n, d: 1n, pi: 1 };
  const match = /^(\d+)(?:\.(\d+))?(?:e([+-]?\d+))?$/.exec(text);
  if (!match) throw new RangeError(`"${text}" is not a decimal number.`);
  const [, whole = "0", decimals = "", exponent = "0"] = match;
  const shift = Number(exponent) - decimals.length;
  const digits = BigInt(whole + decimals);
  return shift >= 0
    ? { n: digits * 10n ** BigInt(shift), d: 1n, pi: 0 }
    : { n: digits, d: 10n ** BigInt(-shift), pi: 0 };
}

/** Reads a definition of the catalogue: decimal numbers and `pi` joined by `*` and `/` from left to right. */
export function exact(definition: string): Exact {
  const parts = definition.split(/([*/])/).map((part) => part.trim());
  let result = decimalFraction(parts[0] ?? "");
  for (let i = 1; i < parts.length; i += 2) {
    const next = decimalFraction(parts[i + 1] ?? "");
    result = multiplyExact(result, parts[i] === "/" ? powerExact(next, -1) : next);
  }
  const divisor = greatestCommonDivisor(result.n, result.d);
  return { n: result.n / divisor, d: result.d / divisor, pi: result.pi };
}

function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  while (b !== 0n) [a, b] = [b, a % b];
  return a;
}

const bits = (x: bigint): number => x.toString(16).length * 4;

/** The nearest double (the power of π, where there is one, adds its own rounding). */
export function exactToNumber(a: Exact): number {
  const limit = BigInt(Number.MAX_SAFE_INTEGER);
  let ratio: number;
  if (a.n <= limit && a.d <= limit) {
    ratio = Number(a.n) / Number(a.d);
  } else {
    // Quotient with at least 64 bits and a sticky last bit: one rounding, in Number().
    const shift = Math.max(0, 64 + bits(a.d) - bits(a.n));
    const scaled = a.n << BigInt(shift);
    const quotient = scaled / a.d;
    const sticky = scaled % a.d === 0n ? 0n : 1n;
    ratio = scaleByPowerOfTwo(Number((quotient << 1n) | sticky), -shift - 1);
  }
  return a.pi === 0 ? ratio : ratio * Math.PI ** a.pi;
}

/** Steps keep 2^exponent itself in range. */
function scaleByPowerOfTwo(x: number, exponent: number): number {
  while (exponent < -1000) {
    x *= 2 ** -1000;
    exponent += 1000;
  }
  return x * 2 ** exponent;
}
