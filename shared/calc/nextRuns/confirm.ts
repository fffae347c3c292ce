import { walkLattice } from '../../stats/choice/latticeModels';
import { TopList } from '../../stats/choice/topList';
import type { Settings } from '../../stats/coding/factor';
import { regionOf } from '../../stats/design/region';
import { StatsError } from '../../stats/errors';
import { predictAt } from '../../stats/fit/predict';
import { transformed } from '../../stats/fit/transform';
import { settingsAt, type NextBasis, type NextRuns } from './basis';

/** The best predicted settable setting. */
function bestSetting({ request, model }: NextBasis): Settings {
  const { factors, constraints, region, aim, target } = request;
  const { transform } = model.predictor;
  const wanted = target === undefined ? 0 : transformed(transform, target);
  const top = new TopList<Float64Array>(1);
  walkLattice(regionOf(factors, constraints, region), [model.predictor], ({ values, means }) => {
    const mean = means[0]!;
    const score = aim === 'maximise' ? mean : aim === 'minimise' ? -mean : -Math.abs(mean - wanted);
    top.offer(score, () => values.slice());
  });
  const [best] = top.sorted();
  if (!best) throw new StatsError('no-feasible-point', 'The limits leave no settable combination.');
  return settingsAt(factors, best.item);
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
