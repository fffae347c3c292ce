import type { ChartSize } from './axes';
import type { Domain } from './frame';
import type { Point } from './geometry';

export interface SlabInput {
  readonly x: Domain;
  readonly y: Domain;
  /** The pegs' height; on a log scale the caller gives logarithms. */
  readonly z: Domain;
  /** What can be dialled, as a ring over x and y. */
  readonly settable: readonly Point[];
  readonly pegs: readonly {
    readonly x: number;
    readonly y: number;
    readonly z: number;
    readonly isSettable: boolean;
  }[];
}

/** All runs at one place of the floor; repeats of a height are counted. */
export interface Peg {
  readonly x: number;
  readonly y: number;
  readonly isSettable: boolean;
  readonly heads: readonly { readonly z: number; readonly count: number }[];
}

/** Gathers runs into pegs, the far ones first so that the near ones stand before them. */
export function pegsOf(runs: SlabInput['pegs']): Peg[] {
  const places = new Map<string, { x: number; y: number; isSettable: boolean; zs: number[] }>();
  for (const { x, y, z, isSettable } of runs) {
    const key = `${x} ${y}`;
    const place = places.get(key) ?? { x, y, isSettable: true, zs: [] };
    places.set(key, {
      ...place,
      isSettable: place.isSettable && isSettable,
      zs: [...place.zs, z],
    });
  }
  return [...places.values()]
    .sort((one, other) => other.y - one.y || one.x - other.x)
    .map(({ x, y, isSettable, zs }) => ({
      x,
      y,
      isSettable,
      heads: [...new Set(zs)]
        .sort((a, b) => a - b)
        .map((z) => ({ z, count: zs.filter((each) => each === z).length })),
    }));
}

const INSET = 8;
const SKEW = 0.24;

/** From settings to pixels on the tilted floor; with a height, above it. */
export function slabScale({ x, y, z }: SlabInput, { width, height }: ChartSize) {
  const along = (width - 2 * INSET) / (1 + SKEW);
  const deep = height * 0.46;
  const rise = height * 0.38;
  const base = height - 8;
  const share = (value: number, { low, high }: Domain) => (value - low) / (high - low || 1);
  return (u: number, v: number, w?: number): Point => {
    const [a, c] = [share(u, x), share(v, y)];
    const up = w === undefined ? 0 : (0.14 + 0.8 * share(w, z)) * rise;
    return [INSET + a * along + c * along * SKEW, base - c * deep - up];
  };
}
