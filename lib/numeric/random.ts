/** A repeatable stream of random numbers. */
export interface Random {
  /** Uniform on [0, 1), a multiple of 2^−53. */
  uniform(): number;
  /** Normal with mean 0 and standard deviation 1. */
  normal(): number;
}

/**
 * Random numbers from a whole seed from 0 to 2^53 − 1: xoshiro128** 1.1 (D. Blackman and S. Vigna, ACM Trans. Math. Softw.
 * 47 (2021) 36; period 2^128 − 1), its state filled by splitmix32 (G. L. Steele, D. Lea and C. H. Flood, OOPSLA 2014, in
 * 32 bits). Normal ones by the polar method (G. Marsaglia and T. A. Bray, SIAM Review 6 (1964) 260). The same seed gives
 * the same numbers on every machine, the normal ones as far as `Math.log` does. Throws RangeError on another seed.
 */
export function seededRandom(seed: number): Random {
  if (!Number.isSafeInteger(seed) || seed < 0)
    throw new RangeError(`The seed is ${seed}. It must be a whole number from 0 to 2^53 − 1.`);
  const fill = splitmix32(seed >>> 0);
  let a = fill();
  let b = fill();
  let c = fill() ^ Math.floor(seed / 2 ** 32);
  let d = fill();
  // A state of zeros would stay there.
  if ((a | b | c | d) === 0) d = 1;
  let spare: number | null = null;

  const next = (): number => {
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
  const uniform = (): number => {
    const high = next() >>> 5;
    const low = next() >>> 6;
    return (high * 67_108_864 + low) / 9_007_199_254_740_992;
  };
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
      if (square >= 1 || square === 0) continue;
      const factor = Math.sqrt((-2 * Math.log(square)) / square);
      spare = v * factor;
      return u * factor;
    }
  };
  return { uniform, normal };
}

function splitmix32(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x9e3779b9) | 0;
    let z = Math.imul(state ^ (state >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return z ^ (z >>> 16);
  };
}
