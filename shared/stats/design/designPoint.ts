export type DesignPointType =
  'factorial' | 'axial' | 'centre' | 'edge' | 'optimal' | 'spaceFilling' | 'included';

/** A point before it is laid out: coded values in the order of the factors (level places for categorical). */
export interface DesignPoint {
  readonly coded: readonly number[];
  readonly type: DesignPointType;
  readonly block: number;
}

/** Shares `count` centre points out over blocks, as evenly as can be, the first blocks first. */
export function centrePoints(k: number, count: number, blocks: number): DesignPoint[] {
  return Array.from({ length: count }, (_, i) => ({
    coded: new Array<number>(k).fill(0),
    type: 'centre' as const,
    block: (i % blocks) + 1,
  }));
}

/** All combinations of coded levels, the first factor changing fastest: standard (Yates) order. */
export function combinations(levels: readonly (readonly number[])[]): number[][] {
  return levels.reduce<number[][]>(
    (points, own) => own.flatMap((level) => points.map((point) => [...point, level])),
    [[]],
  );
}
