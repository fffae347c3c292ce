/**
 * A seeded generator: xoshiro128** with its state filled by splitmix32 from the seed and a name, in
 * 32-bit integer arithmetic only, so one seed gives one sequence on every machine.
 *
 * @see Blackman & Vigna (2021), Scrambled linear pseudorandom number generators, ACM TOMS 47(4).
 */
export interface Random {
  /** Uniform on [0, 1), 32 bits. */
  next(): number;
  /** Standard normal deviate. */
  normal(): number;
  /** Whole number from 0 to below `n`, without bias. */
  below(n: number): number;
}

function splitmix32(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let z = state;
    z = Math.imul(z ^ (z >>> 16), 0x21f0aaad);
    z = Math.imul(z ^ (z >>> 15), 0x735a2d97);
    return (z ^ (z >>> 15)) >>> 0;
  };
}

/** FNV-1a: the same seed gives unrelated streams under different names. */
function hashName(name: string): number {
  let hash = 0x811c9dc5;
  for (let i = 0; i < name.length; i++) hash = Math.imul(hash ^ name.charCodeAt(i), 0x01000193);
  return hash >>> 0;
}

const rotl = (x: number, k: number) => ((x << k) | (x >>> (32 - k))) >>> 0;

/**
 * @param seed whole number, 0 to 2³² − 1.
 * @param stream what the numbers are for.
 */
export function seeded(seed: number, stream: string): Random {
  const fill = splitmix32((seed ^ hashName(stream)) >>> 0);
  let [a, b, c, d] = [fill(), fill(), fill(), fill()];
  const bits = (): number => {
    const result = Math.imul(rotl(Math.imul(b, 5) >>> 0, 7), 9) >>> 0;
    const t = (b << 9) >>> 0;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= t;
    d = rotl(d, 11);
    return result;
  };
  let spare: number | null = null;
  const next = () => bits() / 4_294_967_296;
  return {
    next,
    normal() {
      if (spare !== null) {
        const kept = spare;
        spare = null;
        return kept;
      }
      // polar method: Marsaglia & Bray (1964), SIAM Review 6: 260–264
      for (;;) {
        const u = 2 * next() - 1;
        const v = 2 * next() - 1;
        const s = u * u + v * v;
        if (s >= 1 || s === 0) continue;
        const factor = Math.sqrt((-2 * Math.log(s)) / s);
        spare = v * factor;
        return u * factor;
      }
    },
    below(n) {
      const limit = 4_294_967_296 - (4_294_967_296 % n);
      for (;;) {
        const value = bits();
        if (value < limit) return value % n;
      }
    },
  };
}

/** A copy in random order (Fisher–Yates, from the last place down). */
export function shuffled<T>(items: readonly T[], random: Random): T[] {
  const out = [...items];
  for (let i = out.length - 1; i > 0; i--) {
    const j = random.below(i + 1);
    [out[i], out[j]] = [out[j]!, out[i]!];
  }
  return out;
}

/** A χ² deviate with whole degrees of freedom, as a sum of squares. */
export function chiSquareDeviate(df: number, random: Random): number {
  let sum = 0;
  for (let i = 0; i < df; i++) sum += random.normal() ** 2;
  return sum;
}
