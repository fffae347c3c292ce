import type { Point } from './geometry';

/** A residual of so many spreads fills the ring to its rim. */
export const FULL_AT_SPREADS = 2;

/**
 * Path data of the filled part of a run ring: it rises from the datum line for a run above the model and
 * hangs from it for one below. Empty on the model.
 */
export function ringFill([x, y]: Point, radius: number, residualShare: number): string {
  const share = Math.max(-1, Math.min(1, residualShare / FULL_AT_SPREADS));
  const level = Math.abs(share) * radius;
  if (level < 0.05) return '';
  const half = Math.sqrt(Math.max(0, radius ** 2 - level ** 2));
  const way = share > 0 ? -1 : 1;
  const sweep = share > 0 ? 1 : 0;
  const edge = y + way * level;
  // datum line, round to the level, across, and back
  return (
    `M${x - radius} ${y}A${radius} ${radius} 0 0 ${sweep} ${x - half} ${edge}` +
    `L${x + half} ${edge}A${radius} ${radius} 0 0 ${sweep} ${x + radius} ${y}Z`
  );
}

/** Centres of the rings of replicates around their common setting, the first at the top. */
export function rosette([x, y]: Point, count: number, radius = 15): Point[] {
  return Array.from({ length: count }, (_, index): Point => {
    const angle = (2 * Math.PI * index) / count - Math.PI / 2;
    return [x + radius * Math.cos(angle), y + radius * Math.sin(angle)];
  });
}
