import type { Settings } from '../../stats/coding/factor';
import { bestSettable } from '../../stats/design/climbLattice';
import { makeRegion } from '../../stats/design/designRegion';
import { settableLattice } from '../../stats/design/settableLattice';
import { settle } from '../../stats/design/settle';
import { StatsError } from '../../stats/errors';
import { meanOfRow, predictAt, rowAt } from '../../stats/fit/predict';
import { seeded } from '../../stats/random/random';
import type { NextBasis, NextRuns } from './basis';
import { scoreFor } from './improve';

/** The best predicted settable setting. */
function bestSetting(basis: NextBasis): Settings {
  const { factors, constraints, region: kind, seed } = basis.request;
  const { predictor } = basis.model;
  const score = scoreFor(basis);
  const region = makeRegion(factors, constraints, kind);
  const [best] = bestSettable(
    region,
    settableLattice(region),
    (point) => score(meanOfRow(predictor, rowAt(predictor, point))),
    seeded(seed, 'confirm'),
  );
  if (!best) throw new StatsError('no-feasible-point', 'The limits leave no settable combination.');
  return settle(factors, best.point, true).settings;
}

const figure = (value: number | null) =>
  value === null ? '—' : String(Number(value.toPrecision(4)));

/** Repeats of one setting, with the interval that their mean has to meet, written down beforehand. */
export function confirm(basis: NextBasis): NextRuns {
  const { request, model } = basis;
  const { count, confidence } = request;
  const at = request.at ?? bestSetting(basis);
  const { piLow, piHigh } = predictAt(model.predictor, at, {
    confidence,
    meanOf: count,
    blockSd: 0,
  });
  return {
    settings: Array.from({ length: count }, () => at),
    why: `Holds if the mean of ${count} new run${count > 1 ? 's' : ''} lies within ${figure(piLow)} to ${figure(piHigh)}: the ${Math.round(100 * confidence)} % prediction interval, fixed before they are done.`,
    gain: {
      ...(piLow === null ? {} : { meanLow: piLow }),
      ...(piHigh === null ? {} : { meanHigh: piHigh }),
    },
    warnings: [
      {
        code: 'day-not-included',
        message:
          'Day-to-day variation not included: do them on the day of other runs, or expect more spread.',
      },
    ],
  };
}
