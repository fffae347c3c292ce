/**
 * A factor with numbers for levels. `low` and `high` are coded −1 and +1 (on ln u for `scale: 'log'`);
 * `min` and `max` are the hard envelope (default `low`, `high`); settable values are `min + i·step`
 * (no step: any value).
 */
export interface NumericFactor {
  readonly key: string;
  readonly name?: string | undefined;
  readonly unit?: string | undefined;
  readonly low: number;
  readonly high: number;
  readonly min?: number | undefined;
  readonly max?: number | undefined;
  readonly step?: number | undefined;
  readonly scale?: 'linear' | 'log' | undefined;
}

/** A factor with names for levels, coded sum to zero: the last level is −1 in every column. */
export interface CategoricalFactor {
  readonly key: string;
  readonly name?: string | undefined;
  readonly levels: readonly string[];
}

export type Factor = NumericFactor | CategoricalFactor;

/** The value of one factor in one run: a number in the factor's unit, or the name of a level. */
export type Setting = number | string;
export type Settings = Readonly<Record<string, Setting>>;

export function isCategorical(factor: Factor): factor is CategoricalFactor {
  return 'levels' in factor && Array.isArray(factor.levels);
}

/** The hard limits of a numeric factor, in its own unit. */
export function envelopeOf(factor: NumericFactor): { min: number; max: number } {
  return { min: factor.min ?? factor.low, max: factor.max ?? factor.high };
}
