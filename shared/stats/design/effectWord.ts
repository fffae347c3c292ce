/**
 * An effect of two-level factors as a word: bit i is set when factor i is in the product. `sign` is −1
 * for a word that equals −I in a fraction.
 */
export interface EffectWord {
  readonly mask: number;
  readonly sign: 1 | -1;
}

/** How many factors are in a word. */
export function letters(mask: number): number {
  let count = 0;
  for (let rest = mask; rest !== 0; rest &= rest - 1) count++;
  return count;
}

/** The factors in a word, by their places. */
export function placesOf(mask: number, factors: number): number[] {
  return Array.from({ length: factors }, (_, i) => i).filter((i) => (mask >> i) & 1);
}

function product(a: EffectWord, b: EffectWord): EffectWord {
  return { mask: a.mask ^ b.mask, sign: a.sign === b.sign ? 1 : -1 };
}

/** First short words, then by the first factor that differs. */
function inOrder(a: EffectWord, b: EffectWord): number {
  const byLength = letters(a.mask) - letters(b.mask);
  if (byLength !== 0) return byLength;
  const differ = a.mask ^ b.mask;
  const first = differ & -differ;
  return a.mask & first ? -1 : 1;
}

/**
 * All products of some words: the defining relation of a fraction, or what blocks confound. The
 * identity is left out.
 *
 * @see Box, Hunter & Hunter (2005), Statistics for Experimenters, 2nd ed., ch. 6.
 */
export function closureOf(generators: readonly EffectWord[]): EffectWord[] {
  let all: EffectWord[] = [{ mask: 0, sign: 1 }];
  for (const generator of generators)
    all = [...all, ...all.map((word) => product(word, generator))];
  return all.filter(({ mask }) => mask !== 0).sort(inOrder);
}

/** Length of the shortest word; null for a full factorial, which confounds nothing. */
export function resolutionOf(relation: readonly EffectWord[]): number | null {
  const lengths = relation.map(({ mask }) => letters(mask));
  return lengths.length === 0 ? null : Math.min(...lengths);
}

/** Number of words by length. */
export function wordLengths(relation: readonly EffectWord[]): Record<number, number> {
  const counts: Record<number, number> = {};
  for (const { mask } of relation) counts[letters(mask)] = (counts[letters(mask)] ?? 0) + 1;
  return counts;
}

/**
 * Which main effects and two-factor products cannot be told apart: groups of two and more. Longer
 * products are left out, as is usual: they are taken to be small.
 */
export function aliasChains(relation: readonly EffectWord[], factors: number): EffectWord[][] {
  const effects: EffectWord[] = [];
  for (let i = 0; i < factors; i++) effects.push({ mask: 1 << i, sign: 1 });
  for (let i = 0; i < factors; i++)
    for (let j = i + 1; j < factors; j++) effects.push({ mask: (1 << i) | (1 << j), sign: 1 });
  const known = new Set(effects.map(({ mask }) => mask));
  const seen = new Set<number>();
  const chains: EffectWord[][] = [];
  for (const effect of effects) {
    if (seen.has(effect.mask)) continue;
    const others = relation
      .map((word) => product(word, effect))
      .filter(({ mask }) => known.has(mask))
      .sort(inOrder);
    others.forEach(({ mask }) => seen.add(mask));
    if (others.length > 0) chains.push([effect, ...others]);
  }
  return chains;
}
