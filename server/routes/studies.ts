import { Router } from 'express';
import { pathIdSchema } from '@shared/schemas/identity';
import { addRunsSchema, freezeInputSchema } from '@shared/schemas/matrix';
import {
  briefUpdateSchema,
  studyInputSchema,
  studyJsonSchema,
  studySummarySchema,
} from '@shared/schemas/study';
import { mayReadStudies, studyPolicy } from '@shared/policies/study';
import { z } from 'zod';
import { authorize } from '../authorize';
import { because } from '../context';
import { endpoint } from '../endpoint';
import { notFound, stale } from '../errors';
import { Sample } from '../models/Sample';
import { presentStudySummary } from '../presenters/study';
import { addRuns } from '../services/addRuns';
import { freezeMatrix } from '../services/freezeMatrix';
import { listStudies, loadStudy } from '../services/loadStudy';
import { openStudy } from '../services/openStudy';
import { saveBrief } from '../services/saveBrief';
import { studyPage } from '../services/studyPage';

const studyPath = z.strictObject({ studyId: pathIdSchema });

export const studiesRouter = Router();

endpoint(studiesRouter, {
  method: 'get',
  path: '/studies',
  summary: 'The studies of the lab, last touched first',
  access: 'signedIn',
  answer: z.array(studySummarySchema),
  async handle({ ctx }) {
    authorize(mayReadStudies, ctx.actor, undefined);
    return (await listStudies(ctx)).map(presentStudySummary);
  },
});

endpoint(studiesRouter, {
  method: 'post',
  path: '/studies',
  summary: 'Open a study on a sample',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  body: studyInputSchema,
  answer: studyJsonSchema,
  async handle({ ctx, body }) {
    authorize(studyPolicy.open, ctx.actor, { stage: 'brief', isFrozen: false, isReleased: false });
    const where = { id: body.sampleId, labId: ctx.actor.labId };
    const sample = await Sample.findOne({ where, transaction: ctx.transaction });
    if (!sample) throw notFound('sample');
    const study = await openStudy({ ...body, isSimulated: sample.isSimulated }, ctx);
    return studyPage(study.id, ctx);
  },
});

endpoint(studiesRouter, {
  method: 'get',
  path: '/studies/:studyId',
  summary: 'A study: Brief, rig, stock, matrix and how far it is',
  access: 'signedIn',
  params: studyPath,
  answer: studyJsonSchema,
  async handle({ ctx, params }) {
    authorize(mayReadStudies, ctx.actor, undefined);
    return studyPage(params.studyId, ctx);
  },
});

endpoint(studiesRouter, {
  method: 'put',
  path: '/studies/:studyId/brief',
  summary: 'Save the Brief',
  access: 'signedIn',
  params: studyPath,
  body: briefUpdateSchema,
  answer: studyJsonSchema,
  async handle({ ctx, params, body }) {
    const { study, facts } = await loadStudy(params.studyId, ctx, { forWrite: true });
    authorize(studyPolicy.editBrief, ctx.actor, facts);
    if (study.version !== body.version) throw stale(await studyPage(study.id, ctx));
    await saveBrief(study, body.brief, ctx);
    return studyPage(study.id, ctx);
  },
});

endpoint(studiesRouter, {
  method: 'post',
  path: '/studies/:studyId/matrix',
  summary: 'Freeze a matrix: its runs are made and their sample is reserved',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  params: studyPath,
  body: freezeInputSchema,
  answer: studyJsonSchema,
  async handle({ ctx, params, body }) {
    const { study, facts } = await loadStudy(params.studyId, ctx, { forWrite: true });
    authorize(studyPolicy.freeze, ctx.actor, facts);
    if (study.version !== body.version) throw stale(await studyPage(study.id, ctx));
    await freezeMatrix(study, body.plan, ctx);
    return studyPage(study.id, ctx);
  },
});

endpoint(studiesRouter, {
  method: 'post',
  path: '/studies/:studyId/added-runs',
  summary: 'Add runs in a new block, which sends the study back to the bench',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  params: studyPath,
  body: addRunsSchema,
  answer: studyJsonSchema,
  async handle({ ctx, params, body }) {
    const { study, facts } = await loadStudy(params.studyId, ctx, { forWrite: true });
    authorize(studyPolicy.addRuns, ctx.actor, facts);
    if (study.version !== body.version) throw stale(await studyPage(study.id, ctx));
    await addRuns(study, body, because(ctx, body.why));
    return studyPage(study.id, ctx);
  },
});
