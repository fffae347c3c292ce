import { StatsError } from '../errors';
import { blockOf, blockWords, confoundedBy } from './blockTwoLevel';
import { levelGrid, pointsOf, type CodedDesign } from './codedDesign';
import { closureOf, letters, type EffectWord } from './effectWord';
import { wordOf, type Generator } from './fractionGenerators';

/** b for 2^b blocks. */
function powerOfTwo(blocks: number): number {
  const power = Math.round(Math.log2(blocks));
  if (2 ** power === blocks) return power;
  throw new StatsError(
    'not-available',
    `Two-level runs part into 2, 4, 8 … blocks, not ${blocks}. Or repeat the whole design once in each block.`,
  );
}

/** The runs of a 2^(k−p) fraction (p = 0: full factorial), ±1, in standard order of the basic factors. */
export function fractionRuns(factors: number, generators: readonly Generator[]): number[][] {
  const set = new Map(generators.map((generator) => [generator.factor, generator]));
  const basic = Array.from({ length: factors }, (_, i) => i).filter((i) => !set.has(i));
  return levelGrid(basic.map(() => [-1, 1])).map((levels) => {
    const run = new Array<number>(factors).fill(0);
    basic.forEach((place, i) => {
      run[place] = levels[i]!;
    });
    for (const { factor, mask, sign } of generators)
      run[factor] = basic.reduce((all, i) => ((mask >> i) & 1 ? all * run[i]! : all), sign);
    return run;
  });
}

/**
 * A two-level design, full or fractional, in 2^b blocks.
 *
 * @param generators empty for the full factorial.
 * @throws StatsError `not-available` when the blocks are no power of two, or cost a main effect.
 * @see Box, Hunter & Hunter (2005), Statistics for Experimenters, 2nd ed., ch. 5–6.
 */
export function twoLevelDesign(
  factors: number,
  generators: readonly Generator[],
  blocks: number,
): CodedDesign {
  const relation = closureOf(generators.map(wordOf));
  const runs = fractionRuns(factors, generators);
  if (blocks === 1) return { points: pointsOf(runs, 'factorial'), blocks, relation };
  const set = new Set(generators.map(({ factor }) => factor));
  const basic = Array.from({ length: factors }, (_, i) => i).filter((i) => !set.has(i));
  const count = powerOfTwo(blocks);
  if (count >= basic.length)
    throw new StatsError(
      'not-available',
      `${runs.length} runs do not part into ${blocks} blocks that still tell the factors apart.`,
    );
  const words = blockWords(basic, count, relation);
  return {
    points: pointsOf(runs, 'factorial', (i) => blockOf(runs[i]!, words)),
    blocks,
    relation,
    confounded: confoundedBy(words),
  };
}

/**
 * The fold-over of a fraction: its runs again with signs reversed, of all factors or of one.
 *
 * @returns both halves, the second as block 2 when `blocks` is 2, and the relation of the whole: the
 *   words whose sign the reversal keeps.
 * @see Box, Hunter & Hunter (2005), 2nd ed., §6.9.
 */
export function foldOver(design: CodedDesign, only: number | null, blocks: number): CodedDesign {
  if (blocks > 2 || design.blocks > 1)
    throw new StatsError(
      'not-available',
      'A fold-over has one block, or two: the fraction and its reversal.',
    );
  const folded = design.points.map(({ point, pointType }) => ({
    point: point.map((sign, i) => (only === null || only === i ? -sign : sign)),
    pointType,
    block: blocks,
  }));
  // reversing an even number of its factors keeps the sign of a word
  const keepsSign = ({ mask }: EffectWord) =>
    letters(only === null ? mask : mask & (1 << only)) % 2 === 0;
  return {
    points: [...design.points, ...folded],
    blocks,
    relation: (design.relation ?? []).filter(keepsSign),
  };
}
