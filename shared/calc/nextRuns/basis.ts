import type { NextAnswer, NextRequest } from '../../schemas/calc/next';
import { toCoded } from '../../stats/coding/code';
import { isCategorical, type Factor, type Settings } from '../../stats/coding/factor';
import { fitModel, type FittedModel } from '../../stats/fit/fitModel';
import { predictPoint } from '../../stats/fit/predict';
import { pointOf } from '../../stats/model/modelMatrix';
import { usedRuns, type UsedRun } from '../usedRuns';

/** What every purpose starts from: the fitted model and its runs. */
export interface NextBasis {
  readonly request: NextRequest;
  readonly model: FittedModel;
  readonly used: readonly UsedRun[];
}

export type NextRuns = Omit<NextAnswer, 'runs'> & { readonly settings: readonly Settings[] };

export function basisOf(request: NextRequest): NextBasis {
  const { used } = usedRuns(request.runs);
  return { request, model: fitModel(request, used), used };
}

export function settingsAt(factors: readonly Factor[], values: ArrayLike<number>): Settings {
  return Object.fromEntries(
    factors.map((factor, i) => [
      factor.key,
      isCategorical(factor) ? factor.levels[values[i]!]! : values[i]!,
    ]),
  );
}

/** Settings with their coded values and what the model expects there, for one run. */
export function presentRuns(
  { request, model }: NextBasis,
  settings: readonly Settings[],
): NextAnswer['runs'] {
  return settings.map((each) => {
    const point = pointOf(request.factors, each);
    const { predicted, piLow, piHigh } = predictPoint(model.predictor, point, {
      confidence: request.confidence,
      meanOf: 1,
      blockSd: 0,
    });
    const coded = Object.fromEntries(
      request.factors.map((factor) => {
        const value = each[factor.key]!;
        return [
          factor.key,
          isCategorical(factor) || typeof value !== 'number' ? value : toCoded(factor, value),
        ];
      }),
    );
    return { settings: each, coded, predicted, piLow, piHigh };
  });
}
