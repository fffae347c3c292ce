import { isCategorical, type Factor } from '../coding/factor';
import type { Random } from '../random/random';
import { shuffled } from '../random/random';
import type { CodedDesign, CodedPoint } from './codedDesign';
import { shareOut } from './shareOut';

/** A point with its place in the standard order, from 1. */
export interface OrderedPoint extends CodedPoint {
  readonly standardOrder: number;
}

/** The centre of the numeric factors; categorical factors take their levels in turn. */
export function centreOf(factors: readonly Factor[], turn: number): number[] {
  return factors.map((factor) => (isCategorical(factor) ? turn % factor.levels.length : 0));
}

export interface Arrangement {
  readonly factors: readonly Factor[];
  readonly replicates: number;
  /** Each replicate of the points is a block of its own (times the blocks of the design). */
  readonly replicatesAreBlocks: boolean;
  readonly centrePoints: number;
}

/**
 * A design with its replicates and centre points, in standard order: the points as built, again for each
 * replicate, then the centre points, shared out over the blocks as evenly as can be.
 */
export function arrange(design: CodedDesign, arrangement: Arrangement): OrderedPoint[] {
  const { factors, replicates, replicatesAreBlocks, centrePoints } = arrangement;
  const blocks = design.blocks * (replicatesAreBlocks ? replicates : 1);
  const repeated = Array.from({ length: replicates }, (_, replicate) =>
    design.points.map((each) => ({
      ...each,
      block: each.block + (replicatesAreBlocks ? replicate * design.blocks : 0),
    })),
  ).flat();
  let turn = 0;
  const centres = shareOut(centrePoints, blocks).flatMap((count, i) =>
    Array.from({ length: count }, (): CodedPoint => ({
      point: centreOf(factors, turn++),
      pointType: 'centre',
      block: i + 1,
    })),
  );
  return [...repeated, ...centres].map((each, i) => ({ ...each, standardOrder: i + 1 }));
}

/**
 * Run order: block by block; inside a block shuffled, or in standard order without a generator.
 *
 * @see Box, Hunter & Hunter (2005), Statistics for Experimenters, 2nd ed., ch. 3 (randomise in blocks).
 */
export function inRunOrder<T extends { block: number; standardOrder: number }>(
  points: readonly T[],
  random: Random | null,
): T[] {
  const blocks = [...new Set(points.map(({ block }) => block))].sort((a, b) => a - b);
  return blocks.flatMap((block) => {
    const own = points
      .filter((each) => each.block === block)
      .sort((a, b) => a.standardOrder - b.standardOrder);
    return random ? shuffled(own, random) : own;
  });
}
