import { fitRequestSchema } from '@shared/schemas/calc/fit';
import { fitAnswer } from '@shared/calc/fit';
import type { FitInput } from '@shared/schemas/fit';
import { isComputed, type ResponseJson } from '@shared/schemas/response';
import { fitRequestOf, type Evidence, type ModelChoice } from '@shared/study/requests';
import type { Context } from '../context';
import { because } from '../context';
import { impossible } from '../errors';
import { Fit } from '../models/Fit';
import type { Study } from '../models/Study';
import { contentHash } from './contentHash';
import { evidenceOf, type StudyEvidence } from './evidenceOf';

function responseOf(evidence: Evidence, key: string): ResponseJson {
  const response = evidence.brief.responses.find((each) => each.key === key);
  if (!response)
    throw impossible('unknown-response', `This study has no response ‘${key}’.`, 'responseKey');
  if (isComputed(response))
    throw impossible(
      'computed',
      `${response.name} follows exactly from the settings, so it needs no model.`,
      'responseKey',
    );
  return response;
}

function checkExclusions(input: FitInput, evidence: StudyEvidence): void {
  input.exclusions.forEach(({ runId }, i) => {
    if (!evidence.runs.some(({ id }) => id === runId))
      throw impossible(
        'unknown-run',
        'This run does not belong to the study.',
        `exclusions.${i}.runId`,
      );
  });
}

/** Hash of what goes into a model: factors, settings, values, exclusions. A later change shows as stale. */
export function dataHash(evidence: Evidence, responseKey: string, choice: ModelChoice): string {
  const { factors, runs } = fitRequestOf(evidence, responseOf(evidence, responseKey), choice);
  return contentHash({ factors, runs });
}

/**
 * Computes a model from the study's runs, stores it with its answer, and makes it the one the study
 * stands on for this response; the former one stays readable.
 */
export async function keepFit(study: Study, input: FitInput, ctx: Context): Promise<Fit> {
  const evidence = await evidenceOf(study, ctx);
  const response = responseOf(evidence, input.responseKey);
  checkExclusions(input, evidence);
  const request = fitRequestOf(evidence, response, input);
  const answer = fitAnswer(fitRequestSchema.parse(request));
  const reasoned = because(ctx, input.why);
  const former = await Fit.findAll({
    where: { studyId: study.id, responseKey: response.key, isKept: true },
    transaction: ctx.transaction,
  });
  for (const fit of former) await fit.update({ isKept: false }, reasoned);
  return Fit.create(
    {
      ...input,
      labId: study.labId,
      studyId: study.id,
      dataHash: contentHash({ factors: request.factors, runs: request.runs }),
      answer,
      madeById: ctx.actor.id,
    },
    reasoned,
  );
}
