import { bestOn } from '../../stats/design/criteria';
import { informationOf } from '../../stats/design/designMatrix';
import { makeRegion } from '../../stats/design/designRegion';
import { optimalDesign } from '../../stats/design/optimalDesign';
import { regionMoments } from '../../stats/design/regionMoments';
import { settableLattice } from '../../stats/design/settableLattice';
import { settle } from '../../stats/design/settle';
import { cholesky, inverseOf } from '../../stats/linalg/cholesky';
import { compileRow } from '../../stats/model/compileRow';
import { modelMatrix, pointOf, type Point } from '../../stats/model/modelMatrix';
import { seeded } from '../../stats/random/random';
import type { NextBasis, NextRuns } from './basis';

/** Average of x'(X'X)⁻¹x over the region: the variance of the mean over that of one run. */
function averageVariance(
  { request, model }: NextBasis,
  points: readonly Point[],
  moments: Float64Array,
): number | null {
  const p = model.terms.length;
  const l = cholesky(informationOf(modelMatrix(request.factors, model.terms, points)), p);
  if (!l) return null;
  return inverseOf(l, p).reduce((sum, value, i) => sum + value * moments[i]!, 0);
}

/** Runs that improve the model most, given those that are there: D- or I-optimal augmentation. */
export function augment(basis: NextBasis): NextRuns {
  const { request, model, used } = basis;
  const { factors, constraints, count, criterion, seed } = request;
  const region = makeRegion(factors, constraints, request.region);
  const { terms } = model;
  const rowAt = compileRow(factors, terms);
  const random = seeded(seed, 'augment');
  const moments = regionMoments(region, terms, rowAt);
  const kept = used.map(({ settings }) => pointOf(factors, settings));
  const best = bestOn(region, terms);
  const design = optimalDesign(
    {
      lattice: settableLattice(region),
      rowAt,
      terms: terms.length,
      moments,
      criterion,
      blocks: 1,
      kept: kept.map((point) => ({ point, block: 1 })),
      free: new Array<number>(count).fill(1),
      support: best?.support ?? [],
    },
    random,
  );
  const added = design.points.map(({ point }) => settle(factors, point, true));
  const before = averageVariance(basis, kept, moments);
  const after = averageVariance(basis, [...kept, ...added.map(({ point }) => point)], moments);
  const fall =
    before === null || after === null
      ? 'make the variance of a prediction finite'
      : `lower the average variance of a prediction by ${Math.round(100 * (1 - after / before))} %`;
  return {
    settings: added.map(({ settings }) => settings),
    why: `These ${count} settings ${fall}: they lie where the model knows least.`,
    gain: {
      ...(before === null ? {} : { averageVarianceBefore: before }),
      ...(after === null ? {} : { averageVarianceAfter: after }),
    },
    warnings: [],
  };
}
