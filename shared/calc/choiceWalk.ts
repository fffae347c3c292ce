import { Front } from '../stats/choice/nonDominated';
import { TopList } from '../stats/choice/topList';
import { objective, overallDesirability, shortfall } from '../stats/choice/desirability';
import { walkLattice } from '../stats/choice/latticeModels';
import { leverageOfRow, rowAt } from '../stats/fit/predict';
import { restored } from '../stats/fit/transform';
import { codedOf, type Choice, type Found } from './choice';
import { goalOnScale } from './choiceModels';
import { upperBounds, type BoundedGoal } from './probabilityBound';

/** The front of a larger lattice would take too long; its best settings are still exact. */
export const MAX_TRADE_OFF_POINTS = 400_000;
/** Settings whose joint probability is worked out at most, when ranking by it. */
export const MAX_JOINT = 3000;

export interface LongWork {
  readonly onProgress?: (share: number) => void;
  readonly shouldStop?: () => boolean;
}

/** Values of all goals' responses at a point of the walk, on their original scales. */
function goalValues(
  { models, exact, goals }: Choice,
  values: ArrayLike<number>,
  means: ArrayLike<number>,
  out: Float64Array,
): void {
  goals.forEach(({ source, index }, g) => {
    out[g] =
      source === 'model'
        ? restored(models[index]!.model.transform, means[index]!)
        : exact[index]!.valueAt(values);
  });
}

/** Whether every model has data there: no prediction less certain than at its least certain run. */
function hasSupport({ models, request }: Choice, coded: readonly number[]): boolean {
  if (request.support === 'region') return true;
  return models.every(
    ({ model, largestLeverage }) =>
      leverageOfRow(model.predictor, rowAt(model.predictor, coded)) <= largestLeverage + 1e-9,
  );
}

export interface Walked {
  readonly evaluated: number;
  readonly supported: number;
  readonly byDesirability: readonly Found[];
  /** When none meets all goals: those that miss by least. */
  readonly nearest: readonly Found[];
  readonly byBound: readonly { bound: number; found: Found }[];
  readonly front: Front<{ values: Float64Array; goals: Float64Array }>;
  readonly bestOfGoal: Float64Array;
}

export function walk(choice: Choice, work: LongWork): Walked {
  const { request, region, models, goals } = choice;
  const { factors, top } = request;
  const ranksByProbability = request.rankBy === 'probability';
  const byDesirability = new TopList<Found>(top);
  const nearest = new TopList<Found>(top);
  const byBound = new TopList<Found>(ranksByProbability ? MAX_JOINT : 1);
  const front = new Front<{ values: Float64Array; goals: Float64Array }>();
  const bestOfGoal = new Float64Array(goals.length).fill(Infinity);
  const at = new Float64Array(goals.length);
  const objectives = new Float64Array(goals.length);
  const boundOf = upperBounds(boundedGoals(choice));
  const doTrade = region.size <= MAX_TRADE_OFF_POINTS;
  let evaluated = 0;
  let supported = 0;
  let rows = 0;
  const rowCount = region.size / Math.max(...region.axes.map(({ values }) => values.length));
  walkLattice(
    region,
    models.map(({ model }) => model.predictor),
    ({ values, means }) => {
      evaluated++;
      goalValues(choice, values, means, at);
      const d = overallDesirability(goals, at);
      let miss = 0;
      goals.forEach((goal, g) => {
        const short = shortfall(goal, at[g]!);
        miss += short;
        objectives[g] = objective(goal, at[g]!);
      });
      // without a chance to be kept anywhere, the dearer question of support is not asked
      const mayLead = d > byDesirability.bar || -miss > nearest.bar;
      if (!doTrade && !ranksByProbability && !mayLead) return;
      const coded = codedOf(factors, values);
      if (!hasSupport(choice, coded)) return;
      supported++;
      goals.forEach(
        (goal, g) => (bestOfGoal[g] = Math.min(bestOfGoal[g]!, shortfall(goal, at[g]!))),
      );
      const keep = (): Found => ({ values: values.slice(), desirability: d });
      if (d > 0) byDesirability.offer(d, keep);
      nearest.offer(-miss, keep);
      if (ranksByProbability) byBound.offer(boundOf(at, means, coded), keep);
      if (doTrade) front.offer(objectives, () => ({ values: values.slice(), goals: at.slice() }));
    },
    () => {
      rows++;
      if (rows % 64 === 0) work.onProgress?.(Math.min(1, rows / rowCount));
      return work.shouldStop?.() !== true;
    },
  );
  return {
    evaluated,
    supported,
    byDesirability: byDesirability.sorted().map(({ item }) => item),
    nearest: nearest.sorted().map(({ item }) => item),
    byBound: byBound.sorted().map(({ score, item }) => ({ bound: score, found: item })),
    front,
    bestOfGoal,
  };
}

function boundedGoals({ goals, models }: Choice): BoundedGoal[] {
  return goals.map((goal) =>
    goal.source === 'exact'
      ? { goal, predictor: null, index: -1, low: 0, high: 0 }
      : {
          goal,
          predictor: models[goal.index]!.model.predictor,
          index: goal.index,
          ...goalOnScale(goal, models[goal.index]!.model.transform),
        },
  );
}
