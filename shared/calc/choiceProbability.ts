import { holds } from '../stats/choice/desirability';
import type { JointDraws } from '../stats/choice/joint';
import { TopList } from '../stats/choice/topList';
import { leverageOfRow, rowAt } from '../stats/fit/predict';
import { codedOf, type Choice, type Found } from './choice';
import { goalOnScale } from './choiceModels';
import { MAX_JOINT, type Walked } from './choiceWalk';

/** The probability that all goals hold for one new run, by draws that are the same at every setting. */
export function probabilityAt(
  choice: Choice,
  joint: JointDraws | null,
  values: Float64Array,
): { probability: number; error: number } | null {
  const { request, models, exact, goals } = choice;
  const { draws, factors } = request;
  const exactHold = goals.every(
    (goal) => goal.source === 'model' || holds(goal, exact[goal.index]!.valueAt(values)),
  );
  const modelled = goals.filter(({ source }) => source === 'model');
  if (modelled.length === 0 || !exactHold) return { probability: exactHold ? 1 : 0, error: 0 };
  if (!joint) return null;
  const coded = codedOf(factors, values);
  const own = models.map(({ model }) => rowAt(model.predictor, coded));
  const limits = models.map((_, r) =>
    modelled
      .filter(({ index }) => index === r)
      .map((goal) => goalOnScale(goal, models[r]!.model.transform)),
  );
  const hits = joint.count(
    {
      means: models.map(({ model }, r) =>
        own[r]!.reduce((sum, x, j) => sum + x * model.predictor.coefficients[j]!, 0),
      ),
      leverages: models.map(({ model }, r) => leverageOfRow(model.predictor, own[r]!)),
      rows: models.map(({ model }, r) => withBlockColumns(model.columns.names, own[r]!)),
    },
    (r, z) => limits[r]!.every(({ low, high }) => z >= low && z <= high),
  );
  const probability = hits / draws;
  return { probability, error: Math.sqrt((probability * (1 - probability)) / draws) };
}

/** A row with its block columns at 0, their mean. */
function withBlockColumns(names: readonly string[], row: Float64Array): Float64Array {
  let next = 0;
  return Float64Array.from(names, (name) => (name.startsWith('block[') ? 0 : row[next++]!));
}

/** By descending bound: once the next bound is no better than the last of the best, nothing can change. */
export function rankByProbability(
  choice: Choice,
  joint: JointDraws | null,
  walked: Walked,
): { ranked: Found[]; isProven: boolean } {
  const best = new TopList<Found>(choice.request.top);
  for (const { bound, found } of walked.byBound) {
    if (bound <= best.bar) return { ranked: best.sorted().map(({ item }) => item), isProven: true };
    const chance = probabilityAt(choice, joint, found.values)?.probability ?? 0;
    // equal chances: the more desirable one first
    best.offer(chance + 1e-9 * found.desirability, () => found);
  }
  return {
    ranked: best.sorted().map(({ item }) => item),
    isProven: walked.byBound.length < MAX_JOINT,
  };
}
