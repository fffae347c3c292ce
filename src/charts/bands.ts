/** Nine bands need eight limits between them. */
export const BAND_COUNT = 9;

const ROUND = [1, 2.5, 5, 10];

/** The smallest of 1, 2.5 and 5 times a power of ten that is not below the given step. */
export function roundStep(least: number): number {
  if (!(least > 0) || !isFinite(least)) return 1;
  const power = 10 ** Math.floor(Math.log10(least));
  const factor = ROUND.find((each) => each * power >= least * (1 - 1e-9)) ?? 10;
  return Number((factor * power).toPrecision(12));
}

export interface Bands {
  /** Between two limits. */
  readonly step: number;
  /** Ascending, in the response's unit; band k lies below limits[k]. */
  readonly limits: readonly number[];
}

/**
 * Nine bands in round steps of 1, 2.5 or 5, so chosen that the values use most of them: the finest step
 * whose eight limits catch every multiple inside the extent but at most one at either end, centred.
 */
export function chooseBands({ low, high }: { low: number; high: number }): Bands {
  const gaps = BAND_COUNT - 1;
  let step = roundStep((high - low) / (gaps + 3));
  const first = () => Math.floor(low / step + 1e-9) + 1;
  const last = () => Math.ceil(high / step - 1e-9) - 1;
  while (last() - first() + 1 > gaps + 2) step = roundStep(step * 1.01);
  const spare = gaps - (last() - first() + 1);
  const start = first() - Math.ceil(spare / 2);
  const limits = Array.from({ length: gaps }, (_, k) =>
    Number(((start + k) * step).toPrecision(12)),
  );
  return { step, limits };
}

/** 0 for the band below the first limit, 8 for the one above the last. */
export function bandOf({ limits }: Bands, value: number): number {
  return limits.filter((limit) => value >= limit).length;
}

/** Every second limit is an index line: the heavier one, whose label is wanted first. */
export function isIndex({ step }: Bands, limit: number): boolean {
  return Math.abs(Math.round(limit / step) % 2) === 0;
}

/** From this band on, lines and labels take the colour for the other end of the scale. */
export const FIRST_DARK_BAND = 6;
