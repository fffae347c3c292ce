import { fromCoded, toCoded } from '../coding/code';
import { envelopeOf, isCategorical, type Factor } from '../coding/factor';
import { settableValues } from '../coding/snap';
import { StatsError } from '../errors';
import type { RegionKind } from './region';
import { keeps, readConstraint, type Constraint } from '../coding/constraint';

/** Where a design may lie and predictions are averaged: continuous, in coded units. */
export interface DesignRegion {
  readonly factors: readonly Factor[];
  /** Bounds of each factor, coded; 0 … levels − 1 for a categorical one. */
  readonly low: readonly number[];
  readonly high: readonly number[];
  readonly hasLimits: boolean;
  /** Whether a point inside the bounds meets all limits. */
  readonly isFeasible: (point: ArrayLike<number>) => boolean;
}

/**
 * The region of a calculation.
 *
 * @throws StatsError `unknown-term` when a limit names no numeric factor.
 */
export function makeRegion(
  factors: readonly Factor[],
  constraints: readonly Constraint[],
  kind: RegionKind,
): DesignRegion {
  const limits = constraints.map((constraint) => readConstraint(factors, constraint));
  const bounds = factors.map((factor) => {
    if (isCategorical(factor)) return { low: 0, high: factor.levels.length - 1 };
    const { min, max } = envelopeOf(factor);
    return kind === 'range'
      ? { low: -1, high: 1 }
      : { low: toCoded(factor, min), high: toCoded(factor, max) };
  });
  const values = new Float64Array(factors.length);
  const isFeasible = (point: ArrayLike<number>) => {
    if (limits.length === 0) return true;
    factors.forEach((factor, i) => {
      values[i] = isCategorical(factor) ? NaN : fromCoded(factor, point[i]!);
    });
    return limits.every((limit) => keeps(limit, values));
  };
  return {
    factors,
    low: bounds.map(({ low }) => low),
    high: bounds.map(({ high }) => high),
    hasLimits: limits.length > 0,
    isFeasible,
  };
}

/** Values between which a factor without a step is set when a list is needed. */
const CONTINUOUS_LEVELS = 21;

/**
 * The values that each factor can take in the region, coded and ascending: settable ones, or 21 evenly
 * spaced for a factor without a step; all levels of a categorical factor.
 *
 * @throws StatsError `no-feasible-point` when a factor has no settable value in the region.
 */
export function settableLevels(region: DesignRegion): number[][] {
  return region.factors.map((factor, i) => {
    if (isCategorical(factor)) return factor.levels.map((_, level) => level);
    const [low, high] = [region.low[i]!, region.high[i]!];
    if (factor.step === undefined)
      return Array.from(
        { length: CONTINUOUS_LEVELS },
        (_, j) => low + ((high - low) * j) / (CONTINUOUS_LEVELS - 1),
      );
    const values = settableValues(factor, fromCoded(factor, low), fromCoded(factor, high));
    if (values.length > 0) return values.map((value) => toCoded(factor, value));
    throw new StatsError(
      'no-feasible-point',
      `${factor.key} has no settable value between ${factor.low} and ${factor.high}: its steps miss the range.`,
    );
  });
}

/** Tries for each point wanted, before the region counts as empty. */
const TRIES = 60;

/** The base of the additive sequence in d dimensions: the root of x^(d+1) = x + 1 above 1. */
function plasticNumber(dimensions: number): number {
  let x = 2;
  for (let i = 0; i < 60; i++) x = (1 + x) ** (1 / (dimensions + 1));
  return x;
}

/**
 * Points spread evenly over the region, the same ones each time. Fewer than asked for when the limits
 * leave little of the bounds.
 *
 * @throws StatsError `no-feasible-point` when none of the points tried meets the limits.
 * @see Roberts (2018), The unreasonable effectiveness of quasirandom sequences (additive recurrence on
 *   the generalised golden ratio).
 */
export function spreadOver(region: DesignRegion, count: number): number[][] {
  const { factors, low, high } = region;
  const base = plasticNumber(factors.length);
  const steps = factors.map((_, i) => base ** -(i + 1));
  const points: number[][] = [];
  for (let n = 1; n <= count * TRIES && points.length < count; n++) {
    const point = factors.map((factor, i) => {
      const share = (0.5 + n * steps[i]!) % 1;
      if (isCategorical(factor)) return Math.floor(share * factor.levels.length);
      return low[i]! + share * (high[i]! - low[i]!);
    });
    if (region.isFeasible(point)) points.push(point);
  }
  if (points.length > 0) return points;
  throw new StatsError(
    'no-feasible-point',
    'The limits leave no setting inside the ranges. Loosen a limit or widen a range.',
  );
}
