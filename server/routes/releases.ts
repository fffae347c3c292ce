import { Router } from 'express';
import { pathIdSchema } from '@shared/schemas/identity';
import {
  candidateInputSchema,
  candidateJsonSchema,
  releaseInputSchema,
  releaseJsonSchema,
} from '@shared/schemas/release';
import { mayReadStudies, studyPolicy } from '@shared/policies/study';
import { z } from 'zod';
import { authorize } from '../authorize';
import { endpoint } from '../endpoint';
import { stale } from '../errors';
import { signatureTries } from '../middleware/limits';
import { Candidate } from '../models/Candidate';
import { Release } from '../models/Release';
import { presentCandidate, presentRelease } from '../presenters/release';
import { loadStudy } from '../services/loadStudy';
import { signRelease } from '../services/signRelease';
import { studyPage } from '../services/studyPage';
import { takeCandidate } from '../services/takeCandidate';

const studyPath = z.strictObject({ studyId: pathIdSchema });

export const releasesRouter = Router();
releasesRouter.use('/studies/:studyId/releases', signatureTries());

endpoint(releasesRouter, {
  method: 'get',
  path: '/studies/:studyId/candidates',
  summary: 'Settings put forward for release',
  access: 'signedIn',
  params: studyPath,
  answer: z.array(candidateJsonSchema),
  async handle({ ctx, params }) {
    authorize(mayReadStudies, ctx.actor, undefined);
    const { study } = await loadStudy(params.studyId, ctx);
    const candidates = await Candidate.findAll({
      where: { studyId: study.id },
      include: 'by',
      order: [['letter', 'ASC']],
      transaction: ctx.transaction,
    });
    return candidates.map(presentCandidate);
  },
});

endpoint(releasesRouter, {
  method: 'post',
  path: '/studies/:studyId/candidates',
  summary: 'Put a setting forward for release',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  params: studyPath,
  body: candidateInputSchema,
  answer: candidateJsonSchema,
  async handle({ ctx, params, body }) {
    const { study, facts } = await loadStudy(params.studyId, ctx, { forWrite: true });
    authorize(studyPolicy.nominate, ctx.actor, facts);
    const candidate = await takeCandidate(study, body, ctx);
    await candidate.reload({ include: 'by', transaction: ctx.transaction });
    return presentCandidate(candidate);
  },
});

endpoint(releasesRouter, {
  method: 'get',
  path: '/studies/:studyId/releases',
  summary: 'Signed settings of a study',
  access: 'signedIn',
  params: studyPath,
  answer: z.array(releaseJsonSchema),
  async handle({ ctx, params }) {
    authorize(mayReadStudies, ctx.actor, undefined);
    const { study } = await loadStudy(params.studyId, ctx);
    const releases = await Release.findAll({
      where: { studyId: study.id },
      order: [['revision', 'DESC']],
      transaction: ctx.transaction,
    });
    return releases.map(presentRelease);
  },
});

endpoint(releasesRouter, {
  method: 'post',
  path: '/studies/:studyId/releases',
  summary: 'Sign settings for use; asks for the password again',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  params: studyPath,
  body: releaseInputSchema,
  answer: releaseJsonSchema,
  async handle({ ctx, params, body }) {
    const { study, facts } = await loadStudy(params.studyId, ctx, { forWrite: true });
    authorize(studyPolicy.sign, ctx.actor, facts);
    if (study.version !== body.version) throw stale(await studyPage(study.id, ctx));
    return presentRelease(await signRelease(study, body, ctx));
  },
});
