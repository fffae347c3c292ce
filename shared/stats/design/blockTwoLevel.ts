import { StatsError } from '../errors';
import { closureOf, letters, type EffectWord } from './effectWord';

/** Combinations of block words looked at; beyond it the best so far is taken. */
const MAX_LOOKED_AT = 200_000;

/** How bad a set of confounded effects is: main effects, two-factor, three-factor products lost. */
type Cost = readonly [number, number, number];

const isBetter = (a: Cost, b: Cost) => {
  const i = a.findIndex((value, j) => value !== b[j]);
  return i >= 0 && a[i]! < b[i]!;
};

/** The shortest word of an alias chain: what a block contrast takes with it first. */
function shortest(mask: number, relation: readonly EffectWord[]): number {
  return relation.reduce(
    (least, word) => Math.min(least, letters(mask ^ word.mask)),
    letters(mask),
  );
}

/** Effects of each length lost when a contrast is confounded, aliases included. */
function costOf(masks: readonly number[], relation: readonly EffectWord[]): Cost {
  const cost = [0, 0, 0];
  for (const mask of masks) {
    for (const length of [mask, ...relation.map((word) => mask ^ word.mask)].map(letters))
      if (length <= 3) cost[length - 1]! += 1;
  }
  return [cost[0]!, cost[1]!, cost[2]!];
}

/**
 * Words whose signs part 2^n runs into 2^b blocks, so that no main effect and as few two-factor products
 * as possible are confounded with blocks.
 *
 * @param basic places of the n basic factors. @param count b, the number of words.
 * @param relation the fraction’s defining relation (empty for a full factorial).
 * @returns b masks of basic factors; every alias chain has just one member in these alone.
 * @throws StatsError `not-available` when every way confounds a main effect.
 * @see Box, Hunter & Hunter (2005), 2nd ed., §5.9; NIST/SEMATECH e-Handbook 5.3.3.3.3.
 */
export function blockWords(
  basic: readonly number[],
  count: number,
  relation: readonly EffectWord[],
): number[] {
  const candidates = basic
    .reduce((all, place) => [...all, ...all.map((mask) => mask | (1 << place))], [0])
    .filter((mask) => shortest(mask, relation) >= 2)
    // long words first; among equals the one that is usually printed
    .sort((a, b) => shortest(b, relation) - shortest(a, relation) || a - b);
  let best: { words: number[]; cost: Cost } | null = null;
  let lookedAt = 0;
  const visit = (from: number, words: number[], span: number[]): void => {
    if (lookedAt++ > MAX_LOOKED_AT) return;
    const cost = costOf(span, relation);
    if (cost[0] > 0 || (best && !isBetter(cost, best.cost))) return;
    if (words.length === count) {
      best = { words, cost };
      return;
    }
    for (let i = from; i < candidates.length; i++) {
      const next = candidates[i]!;
      if (span.includes(next)) continue;
      visit(i + 1, [...words, next], [...span, next, ...span.map((mask) => mask ^ next)]);
    }
  };
  visit(0, [], []);
  // the assignment happens inside the closure, which the compiler does not follow
  const found = best as { words: number[]; cost: Cost } | null;
  if (!found)
    throw new StatsError(
      'not-available',
      `${2 ** basic.length} runs cannot be parted into ${2 ** count} blocks without losing a main effect. Take fewer blocks.`,
    );
  return found.words;
}

/** Block of a run, from 1: the signs of the block words, read as binary digits. */
export function blockOf(signs: readonly number[], words: readonly number[]): number {
  return words.reduce((block, mask, j) => {
    const product = signs.reduce((all, sign, i) => ((mask >> i) & 1 ? all * sign : all), 1);
    return product > 0 ? block + 2 ** j : block;
  }, 1);
}

/** All effects that block words confound, aliases left out. */
export function confoundedBy(words: readonly number[]): EffectWord[] {
  return closureOf(words.map((mask) => ({ mask, sign: 1 })));
}
