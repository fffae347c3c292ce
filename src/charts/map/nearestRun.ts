import type { Frame } from '../frame';
import { distance, type Point } from '../geometry';
import { placedRuns } from './runs';
import type { MapRun } from './mapInput';

/** Half of the 24 px target of a ring. */
const REACH = 12;

/** The run under the pointer, or null. Rings step aside for replicates, so it is asked where they are drawn. */
export function nearestRun(runs: readonly MapRun[], frame: Frame, at: Point): MapRun | null {
  let best: { gap: number; run: MapRun } | null = null;
  for (const placed of placedRuns(runs, frame)) {
    const gap = distance(placed.at, at);
    if (gap <= REACH && (!best || gap < best.gap)) best = { gap, run: placed.run };
  }
  return best?.run ?? null;
}
