import { fromCoded } from '../../stats/coding/code';
import {
  keeps,
  readConstraint,
  valuesOf,
  type ReadConstraint,
} from '../../stats/coding/constraint';
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

const isSame = (a: Settings, b: Settings) =>
  Object.entries(a).every(([key, value]) => b[key] === value);

/** Strides tried before a path that hardly moves is given up. */
const MAX_STRIDES = 2000;

/** What ends the path at these settings, or nothing. */
function limitAt(
  factors: readonly NumericFactor[],
  limits: readonly ReadConstraint[],
  at: Settings,
): string {
  const outside = factors.find((factor) => {
    const { min, max } = envelopeOf(factor);
    const value = Number(at[factor.key]);
    return value < min - 1e-9 || value > max + 1e-9;
  });
  if (outside) return `the rig’s limit for ${outside.key}`;
  const values = valuesOf(factors, at);
  return limits.every((limit) => keeps(limit, values)) ? '' : 'a limit of the rig';
}

interface Path {
  readonly direction: readonly number[];
  readonly step: number;
  readonly count: number;
}

/** Settable settings along a direction from the centre, as far as the limits allow. */
function walk(
  factors: readonly NumericFactor[],
  limits: readonly ReadConstraint[],
  { direction, step, count }: Path,
): { settings: Settings[]; stopped: string } {
  const settings: Settings[] = [];
  for (let i = 1; settings.length < count; i++) {
    if (i > MAX_STRIDES) return { settings, stopped: 'strides far shorter than the steps' };
    const at: Settings = Object.fromEntries(
      factors.map((factor, f) => [
        factor.key,
        snap(factor, Number(fromCoded(factor, i * step * direction[f]!).toPrecision(12))),
      ]),
    );
    const stopped = limitAt(factors, limits, at);
    if (stopped !== '') return { settings, stopped };
    // steps wider than the stride leave a setting as it was: it is not run twice
    if (!settings.some((other) => isSame(other, at))) settings.push(at);
  }
  return { settings, stopped: '' };
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
  const { settings, stopped } = walk(numeric, limits, { direction, step, count });
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
