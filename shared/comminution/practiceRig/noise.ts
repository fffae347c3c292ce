import type { Random } from '../../stats/random/generator';
import { normal } from '../../stats/random/normal';

/** Chance in one run. Without a seed nothing is left to chance: expected values take its place. */
export interface Noise {
  readonly random: Random | null;
  /** A normal deviate with this SD; 0 without chance. */
  readonly gauss: (sd: number) => number;
}

export function noiseOf(random: Random | null): Noise {
  return { random, gauss: (sd) => (random ? sd * normal(random) : 0) };
}
