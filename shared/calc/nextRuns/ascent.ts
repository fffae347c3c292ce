import { fromCoded } from '../../stats/coding/code';
import { keeps, readConstraint, valuesOf } from '../../stats/coding/constraint';
import {
  envelopeOf,
  isCategorical,
  type NumericFactor,
  type Settings,
} from '../../stats/coding/factor';
import { snap } from '../../stats/coding/snap';
import { StatsError } from '../../stats/errors';
import { order } from '../../stats/model/term';
import type { NextBasis, NextRuns } from './basis';

/** Slopes of the straight terms, in the order of the factors. */
function gradientOf({ model }: NextBasis): number[] {
  const { predictor } = model;
  return predictor.factors.map((_, i) => {
    const j = predictor.terms.findIndex((term) => order(term) === 1 && term.powers[i] === 1);
    return j < 0 ? 0 : predictor.coefficients[j]!;
  });
}

/**
 * Runs along the path of steepest ascent (or descent) from the centre, in coded units of the straight
 * terms, snapped to steps, as far as the rig goes.
 *
 * @see Box & Wilson (1951), J. R. Statist. Soc. B 13: 1–45; NIST/SEMATECH e-Handbook 5.5.3.1.1.
 */
export function ascent(basis: NextBasis): NextRuns {
  const { request } = basis;
  const { factors, constraints, count, step, aim } = request;
  if (factors.some(isCategorical))
    throw new StatsError('not-available', 'An ascent needs factors with numbers for levels.');
  const numeric = factors as readonly NumericFactor[];
  const gradient = gradientOf(basis);
  const largest = Math.max(...gradient.map(Math.abs));
  if (!(largest > 0))
    throw new StatsError(
      'not-available',
      'The model has no straight terms with a slope, so there is no direction to go.',
    );
  const sign = aim === 'minimise' ? -1 : 1;
  const direction = gradient.map((slope) => (sign * slope) / largest);
  const limits = constraints.map((constraint) => readConstraint(factors, constraint));
  const settings: Settings[] = [];
  let stopped = '';
  for (let i = 1; settings.length < count && stopped === ''; i++) {
    const at: Settings = Object.fromEntries(
      numeric.map((factor, f) => [
        factor.key,
        snap(factor, Number(fromCoded(factor, i * step * direction[f]!).toPrecision(12))),
      ]),
    );
    const outside = numeric.find((factor) => {
      const { min, max } = envelopeOf(factor);
      const value = at[factor.key] as number; // made just above
      return value < min - 1e-9 || value > max + 1e-9;
    });
    if (outside) stopped = `the rig’s limit for ${outside.key}`;
    else if (!limits.every((limit) => keeps(limit, valuesOf(factors, at))))
      stopped = 'a limit of the rig';
    else settings.push(at);
  }
  if (settings.length === 0)
    throw new StatsError(
      'no-feasible-point',
      `The first step of the path already meets ${stopped}. Take a smaller step.`,
    );
  return {
    settings,
    why: `From the centre along the steepest ${sign > 0 ? 'ascent' : 'descent'} of the straight terms: stop when two runs in a row are no better.`,
    gain: {},
    warnings:
      stopped === ''
        ? []
        : [
            {
              code: 'path-ends',
              message: `The path ends after ${settings.length} run${settings.length > 1 ? 's' : ''} at ${stopped}.`,
            },
          ],
  };
}
