import { regionMoments, rowsAt } from '../../stats/design/evaluation';
import { optimalDesign } from '../../stats/design/optimal';
import { regionOf } from '../../stats/design/region';
import { cholesky, gramOf, inverseOf } from '../../stats/linalg/cholesky';
import { fromCoded } from '../../stats/coding/code';
import { isCategorical, type Setting, type Settings } from '../../stats/coding/factor';
import { snap } from '../../stats/coding/snap';
import { pointOf, type Point } from '../../stats/model/modelMatrix';
import type { NextBasis, NextRuns } from './basis';

/** Average of x'(X'X)⁻¹x over the region: the variance of the mean over that of one run. */
function averageVariance(
  { request, model }: NextBasis,
  points: readonly Point[],
  moments: Float64Array,
): number {
  const p = model.terms.length;
  const l = cholesky(gramOf(rowsAt(request.factors, model.terms, points), p), p);
  if (!l) return Infinity;
  return inverseOf(l, p).reduce((sum, value, i) => sum + value * moments[i]!, 0);
}

/** Runs that improve the model most, given those that are there: D- or I-optimal augmentation. */
export function augment(basis: NextBasis): NextRuns {
  const { request, model, used } = basis;
  const { factors, constraints, region: kind, count, criterion, seed } = request;
  const region = regionOf(factors, constraints, kind);
  const kept = used.map(({ settings }) => pointOf(factors, settings));
  const { points } = optimalDesign(region, {
    terms: model.terms,
    count,
    criterion,
    kept: kept.map((coded) => ({ coded, block: 1 })),
    blocks: Array.from({ length: count }, () => 1),
    seed,
  });
  const settings = points.map((point): Settings =>
    Object.fromEntries(
      factors.map((factor, i) => {
        const x = point[i]!;
        const value: Setting = isCategorical(factor)
          ? factor.levels[x]!
          : snap(factor, Number(fromCoded(factor, x).toPrecision(12)));
        return [factor.key, value] as const;
      }),
    ),
  );
  const moments = regionMoments(region, model.terms);
  const before = averageVariance(basis, kept, moments);
  const after = averageVariance(basis, [...kept, ...points], moments);
  const percent = Math.round(100 * (1 - after / before));
  return {
    settings,
    why: `These ${count} settings lower the average variance of a prediction by ${percent} %: they lie where the model knows least.`,
    gain: { averageVarianceBefore: before, averageVarianceAfter: after },
    warnings: [],
  };
}
