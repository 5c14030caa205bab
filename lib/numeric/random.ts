/** A repeatable stream of random numbers. */
export interface Random {
  /** Uniform in the open interval (0, 1): 2⁵² values, equally spaced, about ½. */
  uniform(): number;
  /** Normal with mean 0 and standard deviation 1. */
  normal(): number;
}

/**
 * Random numbers from a whole seed from 0 to 2⁵³ − 1: xoshiro128** with its state filled by splitmix64, normal ones by the
 * polar method (G. Marsaglia and T. A. Bray, SIAM Review 6 (1964) 260). The same seed gives the same numbers on every
 * machine, the normal ones as far as `Math.log` does. Throws RangeError on another seed.
 */
export function seededRandom(seed: number): Random {
  if (!Number.isSafeInteger(seed) || seed < 0)
    throw new RangeError(`The seed is ${seed}. It must be a whole number from 0 to 2^53 − 1.`);
  const fill = splitMix64(BigInt(seed));
  const [first, second] = [fill(), fill()];
  const next = xoshiro128([lower(first), upper(first), lower(second), upper(second)]);
  let spare: number | null = null;

  const uniform = (): number => ((next() >>> 6) * 2 ** 26 + (next() >>> 6) + 0.5) * 2 ** -52;
  const normal = (): number => {
    if (spare !== null) {
      const kept = spare;
      spare = null;
      return kept;
    }
    for (;;) {
      const u = 2 * uniform() - 1;
      const v = 2 * uniform() - 1;
      const square = u * u + v * v;
      if (square >= 1) continue;
      const factor = Math.sqrt((-2 * Math.log(square)) / square);
      spare = v * factor;
      return u * factor;
    }
  };
  return { uniform, normal };
}

const lower = (word: bigint): number => Number(BigInt.asUintN(32, word));
const upper = (word: bigint): number => Number(word >> 32n);

/**
 * 32-bit words of xoshiro128** 1.1, period 2¹²⁸ − 1 (D. Blackman and S. Vigna, ACM Trans. Math. Softw. 47 (2021) 36). The
 * state may not be all zero.
 */
export function xoshiro128(state: readonly [number, number, number, number]): () => number {
  let [a, b, c, d] = state;
  return () => {
    const product = Math.imul(b, 5);
    const result = Math.imul((product << 7) | (product >>> 25), 9) >>> 0;
    const shifted = b << 9;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = (d << 11) | (d >>> 21);
    return result;
  };
}

/** 64-bit words of splitmix64 (G. L. Steele, D. Lea and C. H. Flood, OOPSLA 2014), of which no two in a row are zero. */
export function splitMix64(seed: bigint): () => bigint {
  let state = seed;
  return () => {
    state = BigInt.asUintN(64, state + 0x9e3779b97f4a7c15n);
    let z = BigInt.asUintN(64, (state ^ (state >> 30n)) * 0xbf58476d1ce4e5b9n);
    z = BigInt.asUintN(64, (z ^ (z >> 27n)) * 0x94d049bb133111ebn);
    return z ^ (z >> 31n);
  };
}
