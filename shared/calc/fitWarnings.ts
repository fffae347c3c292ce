import type { FitAnswer } from '../schemas/calc/fit';
import type { FittedModel } from '../stats/fit/fitModel';
import type { RunSelection } from './usedRuns';

type Warning = FitAnswer['warnings'][number];

const LEAST_DIGITS = 8;
const ILL_CONDITIONED = 1e8;
const HIGH_VIF = 10;
const FEW_DF = 3;
const LARGE_RESIDUAL = 3.5;

const list = (ids: readonly (string | number)[]) => ids.join(', ');

function runWarnings({ used, missing, excluded }: RunSelection): Warning[] {
  const all = used.length + missing.length + excluded.length;
  const warnings: Warning[] = [];
  if (missing.length > 0)
    warnings.push({
      code: 'missing',
      message: `${missing.length} of ${all} runs have no result and were left out: ${list(missing)}.`,
    });
  if (excluded.length > 0)
    warnings.push({
      code: 'excluded',
      message: `Left out on purpose: ${list(excluded)}. Look at the model with and without.`,
    });
  return warnings;
}

function scaleWarnings({ transform, fit }: FittedModel): Warning[] {
  if (transform.movedBy === 0) return [];
  return [
    {
      code: 'moved-off-bounds',
      message: `A value lies on a bound, where the logit is infinite: all ${fit.n} values were moved a little towards the middle (Smithson & Verkuilen 2006).`,
    },
  ];
}

function solverWarnings({ summary }: FittedModel): Warning[] {
  const warnings: Warning[] = [];
  if (summary.agreementDigits < LEAST_DIGITS)
    warnings.push({
      code: 'solvers-disagree',
      message: `Two solvers agree to ${summary.agreementDigits.toFixed(1)} digits only: the terms are close to inseparable.`,
    });
  if (summary.conditionNumber > ILL_CONDITIONED)
    warnings.push({
      code: 'ill-conditioned',
      message:
        'Some terms moved almost together in these runs; their separate effects are uncertain.',
    });
  return warnings;
}

function inferenceWarnings(answer: Pick<FitAnswer, 'terms' | 'anova' | 'reason'>): Warning[] {
  const warnings: Warning[] = [];
  const inflated = answer.terms.filter(({ vif }) => vif !== null && vif > HIGH_VIF);
  if (inflated.length > 0)
    warnings.push({
      code: 'collinear',
      message: `${list(inflated.map(({ term }) => term))} moved together with other terms (VIF above ${HIGH_VIF}).`,
    });
  const { df } = answer.anova.residual;
  if (df > 0 && df < FEW_DF)
    warnings.push({
      code: 'few-degrees-of-freedom',
      message: `Only ${df} degree${df > 1 ? 's' : ''} of freedom are left to judge the error: intervals are very wide.`,
    });
  if (answer.reason !== null) warnings.push({ code: 'no-inference', message: answer.reason });
  return warnings;
}

function outlierWarnings(diagnostics: FitAnswer['diagnostics']): Warning[] {
  const far = diagnostics.filter(
    ({ studentizedExternal: r }) => r !== null && Math.abs(r) > LARGE_RESIDUAL,
  );
  if (far.length === 0) return [];
  return [
    {
      code: 'large-residual',
      message: `Far from the model: run ${list(far.map(({ id }) => id))}. Look for a cause at the bench before leaving anything out.`,
    },
  ];
}

/** What a person should know before believing a fit, each as one sentence. */
export function fitWarnings(
  model: FittedModel,
  answer: Pick<FitAnswer, 'terms' | 'anova' | 'reason' | 'diagnostics'>,
  selection: RunSelection,
): Warning[] {
  return [
    ...runWarnings(selection),
    ...scaleWarnings(model),
    ...solverWarnings(model),
    ...inferenceWarnings(answer),
    ...outlierWarnings(answer.diagnostics),
  ];
}
