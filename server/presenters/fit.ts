import type { FitJson } from '@shared/schemas/fit';
import type { Fit } from '../models/Fit';
import { byLine } from './byLine';

/** A stored model. `isStale`: the runs that it was made from have changed since. */
export function presentFit(fit: Fit, isStale: boolean): FitJson {
  const { summary, anova } = fit.answer;
  return {
    id: fit.id,
    studyId: fit.studyId,
    responseKey: fit.responseKey,
    terms: fit.terms,
    transform: fit.transform,
    settingsUsed: fit.settingsUsed,
    exclusions: fit.exclusions,
    why: fit.why,
    isKept: fit.isKept,
    dataHash: fit.dataHash,
    isStale,
    summary: {
      n: summary.n,
      parameters: summary.parameters,
      rSquared: summary.rSquared,
      adjustedRSquared: summary.adjustedRSquared,
      predictedRSquared: summary.predictedRSquared,
      residualSd: summary.residualSd,
      lackOfFitP: anova.lackOfFit?.p ?? null,
      agreementDigits: summary.agreementDigits,
    },
    by: byLine(fit.madeBy),
    createdAt: fit.createdAt.toISOString(),
  };
}
