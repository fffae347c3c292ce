import { toCoded } from '../coding/code';
import { keeps, readConstraint, type Constraint, type ReadConstraint } from '../coding/constraint';
import { envelopeOf, isCategorical, type Factor } from '../coding/factor';
import { settableValues } from '../coding/snap';
import { StatsError } from '../errors';
import { seeded } from '../random/random';

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

/** Visits every combination inside the constraints; `places` index into the axes and are reused. */
export function visitLattice(
  region: Region,
  visit: (places: Int32Array, values: Float64Array) => void,
): void {
  const { axes } = region;
  const k = axes.length;
  const places = new Int32Array(k);
  const values = Float64Array.from(axes, (axis) => axis.values[0]!);
  for (;;) {
    if (isInside(region, values)) visit(places, values);
    let i = k - 1;
    while (i >= 0 && places[i]! + 1 >= axes[i]!.values.length) {
      places[i] = 0;
      values[i] = axes[i]!.values[0]!;
      i--;
    }
    if (i < 0) return;
    places[i]!++;
    values[i] = axes[i]!.values[places[i]!]!;
  }
}

const codedAt = ({ axes }: Region, places: ArrayLike<number>) =>
  axes.map((axis, i) => axis.coded[places[i]!]!);

/** A lattice with every axis thinned to at most `most` values, ends and the value nearest the centre kept. */
function thinned(region: Region, most: number): Region {
  const axes = region.axes.map((axis, i): Axis => {
    const n = axis.values.length;
    if (n <= most || isCategorical(region.factors[i]!)) return axis;
    const wanted = new Set(
      Array.from({ length: most }, (_, j) => Math.round((j * (n - 1)) / (most - 1))),
    );
    const kept = [...wanted].sort((a, b) => a - b);
    return {
      values: Float64Array.from(kept, (j) => axis.values[j]!),
      coded: Float64Array.from(kept, (j) => axis.coded[j]!),
    };
  });
  return {
    ...region,
    axes,
    size: axes.reduce((product, { values }) => product * values.length, 1),
  };
}

/** Full lattice when it is small, else thinned until it has at most `most` combinations. */
export function latticePoints(region: Region, most: number): number[][] {
  let used = region;
  const longest = Math.max(...region.axes.map(({ values }) => values.length));
  for (let levels = longest; used.size > most && levels > 3; levels--)
    used = thinned(region, levels);
  const points: number[][] = [];
  visitLattice(used, (places) => points.push(codedAt(used, places)));
  return points;
}

/**
 * Points that stand for the region when variance is averaged over it: the lattice itself when it has at
 * most `most` combinations, else that many drawn from it with a fixed seed.
 *
 * @throws StatsError `no-feasible-point` when the constraints leave nothing.
 */
export function samplePoints(region: Region, most: number): number[][] {
  const points: number[][] = [];
  if (region.size <= most) visitLattice(region, (places) => points.push(codedAt(region, places)));
  else {
    const random = seeded(1, 'region sample');
    const values = new Float64Array(region.axes.length);
    for (let tries = 0; points.length < most && tries < 60 * most; tries++) {
      const places = region.axes.map((axis) => random.below(axis.values.length));
      places.forEach((place, i) => (values[i] = region.axes[i]!.values[place]!));
      if (isInside(region, values)) points.push(codedAt(region, places));
    }
  }
  if (points.length === 0)
    throw new StatsError(
      'no-feasible-point',
      'The limits leave no settable combination in these ranges. Widen a range or check the limits.',
    );
  return points;
}
