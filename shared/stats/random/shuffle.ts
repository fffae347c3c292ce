import type { Random } from './generator';

/**
 * The items in random order, every order equally likely. The list given is left as it is.
 *
 * @see Durstenfeld (1964), Algorithm 235: Random permutation, CACM 7: 420.
 */
export function shuffle<T>(items: readonly T[], random: Random): T[] {
  const out = [...items];
  for (let i = out.length - 1; i > 0; i--) {
    const j = random.below(i + 1);
    [out[i], out[j]] = [out[j]!, out[i]!];
  }
  return out;
}
