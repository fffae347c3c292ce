import { walkLattice } from '../../stats/choice/latticeModels';
import { TopList } from '../../stats/choice/topList';
import { toCoded } from '../../stats/coding/code';
import { isCategorical } from '../../stats/coding/factor';
import { regionOf } from '../../stats/design/region';
import { normalTails } from '../../stats/distributions/tails';
import { leverageOfRow, rowAt } from '../../stats/fit/predict';
import { restored, transformed } from '../../stats/fit/transform';
import { settingsAt, type NextBasis, type NextRuns } from './basis';

const density = (z: number) => Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI);
/** Settings nearer than this in coded units teach the same. */
const APART = 0.35;
const POOL = 400;

/**
 * Settings where the expected improvement over the best run so far is largest, apart from each other.
 * Expectation is over the fitted model's uncertainty of the mean, on the analysed scale.
 *
 * @see Jones, Schonlau & Welch (1998), J. Global Optimization 13: 455–492.
 */
export function improve(basis: NextBasis): NextRuns {
  const { request, model } = basis;
  const { factors, constraints, region: kind, count, aim, target } = request;
  const { predictor, fit } = model;
  const sd = predictor.residualSd ?? 0;
  const wanted = target === undefined ? 0 : transformed(predictor.transform, target);
  const score = (mean: number) =>
    aim === 'maximise' ? mean : aim === 'minimise' ? -mean : -Math.abs(mean - wanted);
  const best = Math.max(...fit.fitted.map(score));
  const pool = new TopList<{ values: Float64Array; coded: number[] }>(POOL);
  walkLattice(regionOf(factors, constraints, kind), [predictor], ({ values, means }) => {
    const coded = factors.map((factor, i) =>
      isCategorical(factor) ? values[i]! : toCoded(factor, values[i]!),
    );
    const spread = sd * Math.sqrt(Math.max(0, leverageOfRow(predictor, rowAt(predictor, coded))));
    const ahead = score(means[0]!) - best;
    const z = spread > 0 ? ahead / spread : ahead > 0 ? Infinity : -Infinity;
    const gain =
      spread > 0 ? ahead * normalTails(z).lower + spread * density(z) : Math.max(0, ahead);
    pool.offer(gain, () => ({ values: values.slice(), coded }));
  });
  const chosen: { values: Float64Array; coded: number[] }[] = [];
  const sorted = pool.sorted();
  for (const { item } of sorted) {
    const isApart = chosen.every(
      (other) => Math.hypot(...other.coded.map((x, i) => x - item.coded[i]!)) >= APART,
    );
    if (isApart) chosen.push(item);
    if (chosen.length === count) break;
  }
  for (const { item } of sorted) {
    if (chosen.length >= count) break;
    if (!chosen.includes(item)) chosen.push(item);
  }
  const first = sorted[0]?.score ?? 0;
  return {
    settings: chosen.map(({ values }) => settingsAt(factors, values)),
    why: 'Here the model expects most to be gained on the best run so far, or knows too little to rule it out.',
    gain: {
      expectedImprovement: first,
      predictedFirst: restored(predictor.transform, aim === 'minimise' ? -best : best),
    },
    warnings: [],
  };
}
