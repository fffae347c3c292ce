import { bestSettable, type ScoredPoint } from '../../stats/design/climbLattice';
import { makeRegion } from '../../stats/design/designRegion';
import { settableLattice } from '../../stats/design/settableLattice';
import { settle } from '../../stats/design/settle';
import { normalTails } from '../../stats/distributions/tails';
import { leverageOfRow, meanOfRow, rowAt } from '../../stats/fit/predict';
import { restored, transformed } from '../../stats/fit/transform';
import { seeded } from '../../stats/random/random';
import type { NextBasis, NextRuns } from './basis';

const density = (z: number) => Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI);
/** Settings nearer than this in coded units teach the same. */
const APART = 0.35;

/** How far a mean lies on the better side, for an aim; larger is better. */
export function scoreFor({ request, model }: NextBasis): (mean: number) => number {
  const { aim, target } = request;
  const wanted = target === undefined ? 0 : transformed(model.predictor.transform, target);
  if (aim === 'maximise') return (mean) => mean;
  return aim === 'minimise' ? (mean) => -mean : (mean) => -Math.abs(mean - wanted);
}

/** The best first, then each next one that is not next to those taken; near ones only to fill up. */
function apart(ranked: readonly ScoredPoint[], count: number): ScoredPoint[] {
  const chosen: ScoredPoint[] = [];
  for (const each of ranked) {
    if (chosen.length === count) break;
    const distance = (other: ScoredPoint) =>
      Math.hypot(...other.point.map((x, i) => x - each.point[i]!));
    if (chosen.every((other) => distance(other) >= APART)) chosen.push(each);
  }
  const rest = ranked.filter((each) => !chosen.includes(each));
  return [...chosen, ...rest.slice(0, count - chosen.length)];
}

/**
 * Settings where the expected improvement over the best run so far is largest, apart from each other.
 * Expectation is over the fitted model's uncertainty of the mean, on the analysed scale.
 *
 * @see Jones, Schonlau & Welch (1998), J. Global Optimization 13: 455–492.
 */
export function improve(basis: NextBasis): NextRuns {
  const { request, model } = basis;
  const { factors, constraints, count, aim, seed } = request;
  const { predictor, fit } = model;
  const sd = predictor.residualSd ?? 0;
  const score = scoreFor(basis);
  const best = Math.max(...fit.fitted.map(score));
  const improvement = (point: readonly number[]) => {
    const row = rowAt(predictor, point);
    const spread = sd * Math.sqrt(Math.max(0, leverageOfRow(predictor, row)));
    const ahead = score(meanOfRow(predictor, row)) - best;
    if (spread <= 0) return Math.max(0, ahead);
    const z = ahead / spread;
    return ahead * normalTails(z).lower + spread * density(z);
  };
  const region = makeRegion(factors, constraints, request.region);
  const random = seeded(seed, 'improve');
  const ranked = bestSettable(region, settableLattice(region), improvement, random);
  return {
    settings: apart(ranked, count).map(({ point }) => settle(factors, point, true).settings),
    why: 'Here the model expects most to be gained on the best run so far, or knows too little to rule it out.',
    gain: {
      expectedImprovement: ranked[0]?.score ?? 0,
      predictedFirst: restored(predictor.transform, aim === 'minimise' ? -best : best),
    },
    warnings: [],
  };
}
