import type { Point } from './geometry';

export interface Placed {
  readonly at: Point;
  /** Moved away from its point, so that a leader is drawn. */
  readonly hasMoved: boolean;
}

const REACH = 20;
const TRIES = 24;

/** Puts squares on their points; one that would touch an earlier one spirals outward until it is free. */
export function stepAside(points: readonly Point[]): Placed[] {
  const placed: Placed[] = [];
  const isFree = ([x, y]: Point) =>
    placed.every(({ at }) => Math.abs(at[0] - x) >= REACH || Math.abs(at[1] - y) >= REACH);
  for (const [x, y] of points) {
    let at: Point = [x, y];
    for (let k = 1; !isFree(at) && k <= TRIES; k++) {
      // golden angle: no two tries point the same way
      const angle = k * 2.4;
      const reach = REACH + 3 * k;
      at = [x + reach * Math.cos(angle), y + reach * Math.sin(angle)];
    }
    placed.push({ at, hasMoved: at[0] !== x || at[1] !== y });
  }
  return placed;
}
