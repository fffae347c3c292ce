/** Named on plans and in answers, so that an order can be drawn again anywhere. */
export const GENERATOR = 'xoshiro128** seeded by SplitMix32';

/** A seeded stream of random numbers. It is an argument of every function that draws. */
export interface Random {
  /** Next 32 bits as a whole number, 0 … 2³²−1. */
  readonly bits: () => number;
  /** Uniform in [0, 1), 53 bits. */
  readonly uniform: () => number;
  /** Uniform whole number 0 … n−1, without bias; n from 1 to 2³². */
  readonly below: (n: number) => number;
}

const TWO_32 = 4_294_967_296;
const rotate = (x: number, k: number) => (x << k) | (x >>> (32 - k));

/** Four well-mixed words from any seed, also from 0 and from seeds that differ in one bit. */
function stateOf(seed: number): Uint32Array {
  let z = seed >>> 0;
  return Uint32Array.from({ length: 4 }, () => {
    z = (z + 0x9e3779b9) >>> 0;
    let word = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    word = Math.imul(word ^ (word >>> 13), 0xc2b2ae35);
    return word ^ (word >>> 16);
  });
}

/**
 * The stream that starts from four given words, not all 0. Whole-number arithmetic modulo 2³²: the same
 * on every machine.
 *
 * @see Blackman & Vigna (2021), Scrambled linear pseudorandom number generators, ACM TOMS 47(4), 36,
 *   doi 10.1145/3460772 (xoshiro128**).
 */
export function randomFrom(words: ArrayLike<number>): Random {
  const s = Uint32Array.from(words);
  const bits = () => {
    const result = Math.imul(rotate(Math.imul(s[1]!, 5), 7), 9) >>> 0;
    const t = s[1]! << 9;
    s[2]! ^= s[0]!;
    s[3]! ^= s[1]!;
    s[1]! ^= s[2]!;
    s[0]! ^= s[3]!;
    s[2]! ^= t;
    s[3] = rotate(s[3]!, 11);
    return result;
  };
  const below = (n: number) => {
    // draws above the last whole multiple of n would favour small numbers
    const limit = TWO_32 - (TWO_32 % n);
    for (;;) {
      const draw = bits();
      if (draw < limit) return draw % n;
    }
  };
  const uniform = () => {
    const high = bits() >>> 5;
    const low = bits() >>> 6;
    return (high * 67_108_864 + low) / 9_007_199_254_740_992;
  };
  return { bits, uniform, below };
}

/**
 * The stream of a seed.
 *
 * @param seed whole number 0 … 2³²−1; one seed, one stream.
 */
export function makeRandom(seed: number): Random {
  return randomFrom(stateOf(seed));
}
