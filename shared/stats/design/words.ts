/**
 * Words of two-level fractions as bit masks: bit i stands for factor i; the product of two words is their
 * exclusive or.
 */
export type Word = number;

export function lettersIn(word: Word): number {
  let count = 0;
  for (let rest = word; rest > 0; rest &= rest - 1) count++;
  return count;
}

/** All products of the generating words but the identity: the defining relation. */
export function definingWords(generators: readonly Word[]): Word[] {
  let words: Word[] = [0];
  for (const generator of generators) words = [...words, ...words.map((word) => word ^ generator)];
  return words.filter((word) => word !== 0).sort((a, b) => lettersIn(a) - lettersIn(b) || a - b);
}

/** Length of the shortest defining word; Infinity for a full factorial. */
export function resolutionOf(words: readonly Word[]): number {
  return words.reduce((shortest, word) => Math.min(shortest, lettersIn(word)), Infinity);
}

/** Counts of defining words by length, for comparing fractions by aberration. */
function lengthPattern(words: readonly Word[], k: number): number[] {
  const pattern = new Array<number>(k + 1).fill(0);
  for (const word of words) pattern[lettersIn(word)]!++;
  return pattern;
}

function isBetter(a: readonly number[], b: readonly number[]): boolean {
  for (let i = 0; i < a.length; i++) if (a[i] !== b[i]) return a[i]! < b[i]!;
  return false;
}

/** Where trying all sets of generators would take too long, they are added one by one. */
const MAX_SETS = 500_000;

function choose(n: number, k: number): number {
  let value = 1;
  for (let i = 1; i <= k; i++) value = (value * (n - k + i)) / i;
  return value;
}

function subsets<T>(
  items: readonly T[],
  size: number,
  visit: (chosen: readonly T[]) => void,
): void {
  const chosen: T[] = [];
  const walk = (from: number): void => {
    if (chosen.length === size) {
      visit(chosen);
      return;
    }
    for (let i = from; i <= items.length - (size - chosen.length); i++) {
      chosen.push(items[i]!);
      walk(i + 1);
      chosen.pop();
    }
  };
  walk(0);
}

/**
 * Generators of a 2^(k−p) fraction with the fewest short words (minimum aberration), found by trying all
 * sets of interactions of the k − p basic factors.
 *
 * @returns for each added factor the word of basic factors that it equals.
 * @see Fries & Hunter (1980), Technometrics 22: 601–608.
 */
export function bestGenerators(k: number, p: number): Word[] {
  const base = k - p;
  const interactions = Array.from({ length: 2 ** base }, (_, word) => word)
    .filter((word) => lettersIn(word) >= 2)
    .sort((a, b) => lettersIn(b) - lettersIn(a) || a - b);
  const patternOf = (words: readonly Word[]) =>
    lengthPattern(definingWords(words.map((word, i) => word | (1 << (base + i)))), k);
  let best: readonly Word[] = [];
  let bestPattern: number[] | null = null;
  const consider = (words: readonly Word[]): void => {
    const pattern = patternOf(words);
    if (bestPattern && !isBetter(pattern, bestPattern)) return;
    best = [...words];
    bestPattern = pattern;
  };
  if (choose(interactions.length, p) <= MAX_SETS) subsets(interactions, p, consider);
  else
    for (let size = 1; size <= p; size++) {
      const before = best;
      bestPattern = null;
      for (const word of interactions)
        if (!before.includes(word)) consider([...before.slice(0, size - 1), word]);
    }
  return [...best];
}
