import type { EffectWord } from './effectWord';

export type PointType =
  'factorial' | 'axial' | 'centre' | 'edge' | 'optimal' | 'spaceFilling' | 'included';

/** One point of a design: coded for numeric factors, the level’s place for categorical ones. */
export interface CodedPoint {
  readonly point: readonly number[];
  /** From 1. */
  readonly block: number;
  readonly pointType: PointType;
}

/** A design before centre points, replicates and order, in its standard order. */
export interface CodedDesign {
  readonly points: readonly CodedPoint[];
  /** How many blocks the points are in. */
  readonly blocks: number;
  readonly alpha?: number;
  readonly generators?: readonly string[];
  readonly relation?: readonly EffectWord[];
  /** Effects that the blocks take with them. */
  readonly confounded?: readonly EffectWord[];
}

export function pointsOf(
  coded: readonly (readonly number[])[],
  pointType: PointType,
  block: (i: number) => number = () => 1,
): CodedPoint[] {
  return coded.map((point, i) => ({ point, pointType, block: block(i) }));
}

/** All combinations of the levels, in standard (Yates) order: the first factor changes fastest. */
export function levelGrid(levels: readonly (readonly number[])[]): number[][] {
  let grid: number[][] = [[]];
  for (const each of levels) grid = each.flatMap((level) => grid.map((point) => [...point, level]));
  return grid;
}
