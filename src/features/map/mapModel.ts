import type { FitAnswer } from '@shared/schemas/calc/fit';
import type { FitJson } from '@shared/schemas/fit';
import type { ResponseJson } from '@shared/schemas/response';
import { setPointOf, type SettingJson, type SetPointKey } from '@shared/schemas/setPoint';
import { toCoded } from '@shared/stats/coding/code';
import type { NumericFactor } from '@shared/stats/coding/factor';
import { settableValues } from '@shared/stats/coding/snap';
import { predictAt, predictorOf, type Prediction, type Predictor } from '@shared/stats/fit/predict';
import { factorsOf, fullSetting, variedSettings } from '@shared/study/plan';
import type { Evidence, ModelledRun } from '@shared/study/requests';
import { computedResults, deliveredSetting } from '@shared/study/results';

/** A kept model, ready to predict. */
export interface MapModel {
  readonly response: ResponseJson;
  readonly fit: FitJson;
  readonly answer: FitAnswer;
  readonly predictor: Predictor;
}

export function mapModelOf(
  evidence: Evidence,
  response: ResponseJson,
  fit: FitJson,
  answer: FitAnswer,
): MapModel {
  const { terms, unscaled, residualSd, df } = answer.covariance;
  const { kind, lower, upper, movedBy, lambda } = answer.transform;
  const predictor = predictorOf(
    factorsOf(evidence.brief, evidence.envelope),
    {
      names: terms,
      estimates: answer.terms.map(({ estimate }) => estimate),
      unscaled: (i, j) => unscaled[i]?.[j] ?? 0,
      residualSd,
      df,
    },
    { kind, lower: lower ?? 0, upper: upper ?? 1, movedBy, lambda: lambda ?? 1 },
  );
  return { response, fit, answer, predictor };
}

export const numericFactors = ({ brief, envelope }: Evidence): NumericFactor[] =>
  factorsOf(brief, envelope).filter((factor): factor is NumericFactor => !('levels' in factor));

/** The values that a set-point can be dialled to inside the Brief’s range. */
export function dialOf(evidence: Evidence, key: SetPointKey): number[] {
  const factor = numericFactors(evidence).find((each) => each.key === key);
  return factor ? settableValues(factor, factor.low, factor.high) : [];
}

/** Across and up: gap and voltage where both vary, else the first two. */
export function mapAxes({ brief }: Evidence): readonly [SetPointKey, SetPointKey] {
  const varied = brief.factors.map(({ key }) => key);
  const order = (['gap', 'voltage', 'pulses', 'frequency'] as const).filter((key) =>
    varied.includes(key),
  );
  return [order[0] ?? 'gap', order[1] ?? 'voltage'];
}

/** The settable value nearest the middle of each range; held ones as held. */
export function middleSetting(evidence: Evidence): SettingJson {
  const varied = Object.fromEntries(
    evidence.brief.factors.map(({ key }) => {
      const values = dialOf(evidence, key);
      return [key, values[Math.floor((values.length - 1) / 2)] ?? 0];
    }),
  );
  return fullSetting(evidence.brief, varied);
}

const OPTIONS = { confidence: 0.95, meanOf: 1, blockSd: 0 };

export const predictionAt = (
  model: MapModel,
  evidence: Evidence,
  setting: SettingJson,
): Prediction => predictAt(model.predictor, variedSettings(evidence.brief, setting), OPTIONS);

/** The exact value of a computed response. */
export function computedAt(
  { brief, envelope }: Evidence,
  response: ResponseJson,
  setting: SettingJson,
): number | null {
  if (response.kind !== 'specificEnergy' && response.kind !== 'duration') return null;
  return computedResults(envelope, setting, brief.batchMassG)[response.kind];
}

/** The limits of a goal as lines: where it begins to hold, and on which side. */
export function limitsOf(response: ResponseJson): { value: number; holdsAbove: boolean }[] {
  const { aim, low, high } = response;
  const floor = low === null ? [] : [{ value: low, holdsAbove: true }];
  const ceiling = high === null ? [] : [{ value: high, holdsAbove: false }];
  if (aim === 'maximise') return floor;
  if (aim === 'minimise') return ceiling;
  return aim === 'observe' ? [] : [...floor, ...ceiling];
}

const NEAR = 0.45;

/** How a run lies to a slice: on it when its other set-points are near those shown. */
export function isOnSlice(
  evidence: Evidence,
  axes: readonly SetPointKey[],
  run: ModelledRun,
  setting: SettingJson,
): boolean {
  const delivered = deliveredSetting(run.settings, run.actual);
  return numericFactors(evidence).every((factor) => {
    const key = factor.key as SetPointKey; // a study's factors are set-points
    if (axes.includes(key)) return true;
    return Math.abs(toCoded(factor, delivered[key]) - toCoded(factor, setting[key])) <= NEAR;
  });
}

export const axisWords = (key: SetPointKey) => {
  const { name, unit } = setPointOf(key);
  return { name, unit };
};
