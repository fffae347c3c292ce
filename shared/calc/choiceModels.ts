import {
  highestFrequencyHz,
  pulseEnergyJ,
  specificEnergyKwhPerT,
} from '../comminution/energy/pulseEnergy';
import type { ChooseRequest, ComputedResponse } from '../schemas/calc/choose';
import type { Factor } from '../stats/coding/factor';
import { StatsError } from '../stats/errors';
import type { Goal } from '../stats/choice/desirability';
import type { JointResponse } from '../stats/choice/joint';
import { fitModel, type FittedModel } from '../stats/fit/fitModel';
import { transformed, type Transform } from '../stats/fit/transform';
import { toNumber } from '../stats/linalg/dd';
import { ddGet } from '../stats/linalg/ddMatrix';
import { usedRuns, type UsedRun } from './usedRuns';

/** A modelled response of a choice with its runs. */
export interface ChoiceModel {
  readonly key: string;
  readonly model: FittedModel;
  readonly used: readonly UsedRun[];
  /** The largest x'(X'X)⁻¹x at any run: beyond it there are no data. */
  readonly largestLeverage: number;
}

/** @throws StatsError whose message names the response. */
export function choiceModels(request: ChooseRequest): ChoiceModel[] {
  return request.responses.map(({ key, ...spec }) => {
    const { used } = usedRuns(spec.runs);
    try {
      const model = fitModel({ factors: request.factors, ...spec }, used);
      return { key, model, used, largestLeverage: largestLeverageOf(model) };
    } catch (error) {
      if (error instanceof StatsError)
        throw new StatsError(error.code, `${key}: ${error.message}`, error.details);
      throw error;
    }
  });
}

/** Over the runs, with blocks at their mean as predictions are. */
function largestLeverageOf({ columns, fit, predictor }: FittedModel): number {
  const kept = columns.names.flatMap((name, j) => (name.startsWith('block[') ? [] : [j]));
  const p = kept.length;
  let largest = 0;
  for (let i = 0; i < fit.n; i++) {
    const root = toNumber(columns.rootWeights[i]!);
    const row = kept.map((j) => toNumber(ddGet(columns.x, i, j)) / root);
    let sum = 0;
    for (let a = 0; a < p; a++)
      for (let b = 0; b < p; b++) sum += row[a]! * predictor.unscaled[a * p + b]! * row[b]!;
    largest = Math.max(largest, sum);
  }
  return largest;
}

/** As the joint uncertainty takes it: rows with blocks, on the analysed scale. */
export function jointResponseOf({ model, used }: ChoiceModel): JointResponse {
  const { columns, fit, z, summary } = model;
  const p = columns.names.length;
  return {
    rows: z.map((_, i) =>
      Float64Array.from({ length: p }, (_unused, j) => toNumber(ddGet(columns.x, i, j))),
    ),
    z,
    keys: used.map(({ id, block }) => `${id} ${block}`),
    names: columns.names,
    residuals: fit.residuals,
    residualSd: summary.residualSd,
    df: fit.n - fit.p,
    isWeighted: used.some(({ weight }) => weight !== 1),
  };
}

/** A goal's limits on the analysed scale: every transformation rises. Beyond its domain: no limit. */
export function goalOnScale(goal: Goal, transform: Transform): { low: number; high: number } {
  const at = (value: number, outside: number) => {
    const image = transformed(transform, value);
    return Number.isNaN(image) ? outside : image;
  };
  const low = goal.aim === 'minimise' ? -Infinity : at(goal.low, -Infinity);
  const high = goal.aim === 'maximise' ? Infinity : at(goal.high, Infinity);
  return { low, high };
}

/** A response that follows exactly from the settings (in the order of the factors). */
export interface ExactResponse {
  readonly key: string;
  readonly valueAt: (values: ArrayLike<number>) => number;
}

type SetPoint = 'voltage' | 'gap' | 'pulses' | 'frequency';

function reader(
  factors: readonly Factor[],
  fixed: ChooseRequest['fixed'],
  key: SetPoint,
  what: string,
): (values: ArrayLike<number>) => number {
  const place = factors.findIndex((factor) => factor.key === key);
  if (place >= 0) return (values) => values[place]!;
  const held = fixed[key];
  if (typeof held === 'number') return () => held;
  throw new StatsError(
    'unknown-term',
    `${what} needs the ${key}: as a factor, or held in ‘fixed’.`,
  );
}

function needed(value: number | undefined, field: string, { key }: ComputedResponse): number {
  if (value !== undefined) return value;
  throw new StatsError('unknown-term', `${key} needs ‘${field}’.`);
}

/** @throws StatsError `unknown-term` when a set-point or a constant is missing. */
export function exactResponses({ factors, fixed, computed }: ChooseRequest): ExactResponse[] {
  return computed.map((response): ExactResponse => {
    const { key, kind } = response;
    const read = (setPoint: SetPoint) => reader(factors, fixed, setPoint, key);
    if (kind === 'field') {
      const [voltage, gap] = [read('voltage'), read('gap')];
      return { key, valueAt: (values) => voltage(values) / gap(values) };
    }
    const [voltage, pulses] = [read('voltage'), read('pulses')];
    if (kind === 'duration') {
      const frequency = read('frequency');
      const { capacitanceNf, chargingPowerW } = response;
      return {
        key,
        valueAt(values) {
          const limit =
            capacitanceNf !== undefined && chargingPowerW !== undefined
              ? highestFrequencyHz(chargingPowerW, pulseEnergyJ(capacitanceNf, voltage(values)))
              : Infinity;
          return pulses(values) / Math.min(limit, frequency(values));
        },
      };
    }
    const capacitanceNf = needed(response.capacitanceNf, 'capacitanceNf', response);
    const totalJ = (values: ArrayLike<number>) =>
      pulses(values) * pulseEnergyJ(capacitanceNf, voltage(values));
    if (kind === 'totalEnergy') return { key, valueAt: totalJ };
    const massG = needed(response.massG, 'massG', response);
    return { key, valueAt: (values) => specificEnergyKwhPerT(totalJ(values), massG) };
  });
}
