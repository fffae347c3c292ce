import { toCoded } from '../coding/code';
import { keeps, readConstraint, type Constraint, type ReadConstraint } from '../coding/constraint';
import { envelopeOf, isCategorical, type Factor } from '../coding/factor';
import { settableValues } from '../coding/snap';
import { StatsError } from '../errors';

export type RegionKind = 'range' | 'envelope';

/** Values that a factor may take in a region: settings, and the same coded. */
export interface Axis {
  readonly values: Float64Array;
  readonly coded: Float64Array;
}

/** Levels for a factor without steps: enough for a second-order surface, ends and middle included. */
const CONTINUOUS_LEVELS = 21;

function axisOf(factor: Factor, region: RegionKind, levels: number): Axis {
  if (isCategorical(factor)) {
    const places = Float64Array.from(factor.levels, (_, i) => i);
    return { values: places, coded: places };
  }
  const { min, max } = envelopeOf(factor);
  const [low, high] = region === 'range' ? [factor.low, factor.high] : [min, max];
  const settable = settableValues(factor, low, high);
  const isLog = factor.scale === 'log';
  const continuous = Array.from({ length: levels }, (_, i) => {
    const share = i / (levels - 1);
    return isLog ? low * (high / low) ** share : low + share * (high - low);
  });
  const values = Float64Array.from(factor.step === undefined ? continuous : settable);
  if (values.length === 0)
    throw new StatsError(
      'no-feasible-point',
      `No settable value of ${factor.key} lies between ${low} and ${high}.`,
    );
  return { values, coded: values.map((value) => toCoded(factor, value)) };
}

/** The region in which a design or a choice may lie: settable values, inside the constraints. */
export interface Region {
  readonly factors: readonly Factor[];
  readonly axes: readonly Axis[];
  readonly constraints: readonly ReadConstraint[];
  /** Number of combinations before the constraints. */
  readonly size: number;
}

/**
 * The lattice of settable combinations of a region.
 *
 * @param levels values taken of a factor without steps.
 * @throws StatsError `no-feasible-point` when a factor has no settable value in its range.
 */
export function regionOf(
  factors: readonly Factor[],
  constraints: readonly Constraint[],
  region: RegionKind,
  levels = CONTINUOUS_LEVELS,
): Region {
  const axes = factors.map((factor) => axisOf(factor, region, levels));
  return {
    factors,
    axes,
    constraints: constraints.map((constraint) => readConstraint(factors, constraint)),
    size: axes.reduce((product, { values }) => product * values.length, 1),
  };
}

/** Whether settings (in the order of the factors) keep all constraints of the region. */
export function isInside({ constraints }: Region, values: ArrayLike<number>): boolean {
  return constraints.every((constraint) => keeps(constraint, values));
}
