import type { ChooseRequest } from '../schemas/calc/choose';
import { toCoded } from '../stats/coding/code';
import { isCategorical, type Factor } from '../stats/coding/factor';
import type { Goal } from '../stats/choice/desirability';
import { regionOf, type Axis, type Region } from '../stats/design/region';
import { StatsError } from '../stats/errors';
import type { ChoiceModel, ExactResponse } from './choiceModels';

/** Beyond this many combinations the lattice is thinned first. */
export const MAX_EXHAUSTIVE = 5e7;

/** A goal with where its response comes from: a model or an exact formula, by place. */
export interface PlacedGoal extends Goal {
  readonly response: string;
  readonly source: 'model' | 'exact';
  readonly index: number;
}

export interface Choice {
  readonly request: ChooseRequest;
  readonly region: Region;
  readonly models: readonly ChoiceModel[];
  readonly exact: readonly ExactResponse[];
  readonly goals: readonly PlacedGoal[];
}

/** What the walk keeps of a setting. */
export interface Found {
  readonly values: Float64Array;
  readonly desirability: number;
}

export function placeGoals(
  request: ChooseRequest,
  models: readonly ChoiceModel[],
  exact: readonly ExactResponse[],
): PlacedGoal[] {
  return request.goals.map((goal) => {
    const { low = 0, high = 0, target = (low + high) / 2, ...rest } = goal;
    const model = models.findIndex(({ key }) => key === goal.response);
    const index = model >= 0 ? model : exact.findIndex(({ key }) => key === goal.response);
    return { ...rest, low, high, target, source: model >= 0 ? 'model' : 'exact', index };
  });
}

/** An axis held at one value. */
function heldAxis(factor: Factor, value: number | string): Axis {
  if (isCategorical(factor)) {
    const place = factor.levels.indexOf(String(value));
    if (place < 0) throw new StatsError('out-of-bounds', `${factor.key} has no level ‘${value}’.`);
    return { values: Float64Array.of(place), coded: Float64Array.of(place) };
  }
  if (typeof value !== 'number')
    throw new StatsError(
      'out-of-bounds',
      `${factor.key} is held at ‘${value}’, which is no number.`,
    );
  return { values: Float64Array.of(value), coded: Float64Array.of(toCoded(factor, value)) };
}

export function heldRegion(request: ChooseRequest): Region {
  const { factors, constraints, region, fixed } = request;
  const free = regionOf(factors, constraints, region);
  const axes = free.axes.map((axis, i) => {
    const factor = factors[i]!;
    const value = fixed[factor.key];
    return value === undefined ? axis : heldAxis(factor, value);
  });
  return {
    ...free,
    axes,
    size: axes.reduce((product, { values }) => product * values.length, 1),
  };
}

/** Thins the longest axis by two until the lattice can be walked. */
export function coarse(region: Region): Region {
  let axes = [...region.axes];
  const size = () => axes.reduce((product, { values }) => product * values.length, 1);
  while (size() > MAX_EXHAUSTIVE / 10) {
    const longest = axes.reduce(
      (best, { values }, i) => (values.length > axes[best]!.values.length ? i : best),
      0,
    );
    axes = axes.map((axis, i) =>
      i === longest
        ? {
            values: axis.values.filter((_, j) => j % 2 === 0),
            coded: axis.coded.filter((_, j) => j % 2 === 0),
          }
        : axis,
    );
  }
  return { ...region, axes, size: size() };
}

export function settingsOf(factors: readonly Factor[], values: ArrayLike<number>) {
  return Object.fromEntries(
    factors.map((factor, i) => [
      factor.key,
      isCategorical(factor) ? factor.levels[values[i]!]! : values[i]!,
    ]),
  );
}

export const codedOf = (factors: readonly Factor[], values: ArrayLike<number>) =>
  factors.map((factor, i) => (isCategorical(factor) ? values[i]! : toCoded(factor, values[i]!)));
