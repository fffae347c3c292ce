import type { ConstraintInput } from '../schemas/calc/common';
import type { FitRequest } from '../schemas/calc/fit';
import { toCoded } from '../stats/coding/code';
import { keeps, readConstraint, slackOf } from '../stats/coding/constraint';
import { isCategorical, type Settings } from '../stats/coding/factor';
import { StatsError } from '../stats/errors';
import { fitModel } from '../stats/fit/fitModel';
import { leverageOfRow, meanOfRow, rowAt } from '../stats/fit/predict';
import { restored } from '../stats/fit/transform';
import { usedRuns } from './usedRuns';

/** A slice of a model over two factors, the others held. For maps; computed where it is drawn. */
export interface SurfaceRequest {
  readonly fit: FitRequest;
  readonly constraints: readonly ConstraintInput[];
  readonly x: { readonly key: string; readonly values: readonly number[] };
  readonly y: { readonly key: string; readonly values: readonly number[] };
  readonly at: Settings;
}

export interface SurfaceAnswer {
  /** Rows along y, columns along x; on the response's own scale. */
  readonly predicted: readonly (readonly number[])[];
  /** Standard deviation of the mean over that of one run. */
  readonly spread: readonly (readonly number[])[];
  readonly feasible: readonly (readonly boolean[])[];
  /** For each constraint how much room is left, in its own units; its edge runs where this is 0. */
  readonly slack: readonly (readonly (readonly number[])[])[];
}

/** Evaluates one model on a grid. @throws StatsError `unknown-term` when an axis is no numeric factor. */
export function surfaceAnswer({ fit, constraints, x, y, at }: SurfaceRequest): SurfaceAnswer {
  const { factors } = fit;
  const { predictor } = fitModel(fit, usedRuns(fit.runs).used);
  const place = (key: string) => {
    const i = factors.findIndex((factor) => factor.key === key);
    const factor = factors[i];
    if (!factor || isCategorical(factor))
      throw new StatsError('unknown-term', `${key} is no numeric factor of this model.`);
    return { i, factor };
  };
  const [px, py] = [place(x.key), place(y.key)];
  const values = factors.map((factor) => {
    const value = at[factor.key];
    return isCategorical(factor) ? factor.levels.indexOf(String(value)) : Number(value);
  });
  const coded = factors.map((factor, i) =>
    isCategorical(factor) ? values[i]! : toCoded(factor, values[i]!),
  );
  const limits = constraints.map((constraint) => readConstraint(factors, constraint));
  const over = <T>(make: () => T) =>
    y.values.map((v) => {
      values[py.i] = v;
      coded[py.i] = toCoded(py.factor, v);
      return x.values.map((u) => {
        values[px.i] = u;
        coded[px.i] = toCoded(px.factor, u);
        return make();
      });
    });
  return {
    predicted: over(() =>
      restored(predictor.transform, meanOfRow(predictor, rowAt(predictor, coded))),
    ),
    spread: over(() => Math.sqrt(Math.max(0, leverageOfRow(predictor, rowAt(predictor, coded))))),
    feasible: over(() => limits.every((limit) => keeps(limit, values))),
    slack: limits.map((limit) => over(() => slackOf(limit, values))),
  };
}
