import { Router } from 'express';
import { pathIdSchema } from '@shared/schemas/identity';
import { mayReadStudies, studyPolicy } from '@shared/policies/study';
import {
  importAnswerSchema,
  importInputSchema,
  recordedRunSchema,
  runJsonSchema,
  runRecordSchema,
  voidInputSchema,
} from '@shared/schemas/run';
import { z } from 'zod';
import { authorize } from '../authorize';
import type { Context } from '../context';
import { endpoint } from '../endpoint';
import { notFound, stale } from '../errors';
import { Person } from '../models/Person';
import { Run } from '../models/Run';
import { presentRun } from '../presenters/run';
import { importRuns } from '../services/importRuns';
import { loadStudy } from '../services/loadStudy';
import { recordRun } from '../services/recordRun';
import { voidRun } from '../services/voidRun';

const studyPath = z.strictObject({ studyId: pathIdSchema });
const runPath = z.strictObject({ studyId: pathIdSchema, runId: pathIdSchema });

async function loadRun(params: z.output<typeof runPath>, ctx: Context) {
  const loaded = await loadStudy(params.studyId, ctx, { forWrite: true });
  const run = await Run.findOne({
    where: { id: params.runId, studyId: loaded.study.id },
    include: { model: Person, as: 'operator' },
    transaction: ctx.transaction,
  });
  if (!run) throw notFound('run');
  return { ...loaded, run };
}

export const runsRouter = Router();

endpoint(runsRouter, {
  method: 'get',
  path: '/studies/:studyId/runs',
  summary: 'The runs of a study in run order, with their derived results',
  access: 'signedIn',
  params: studyPath,
  answer: z.array(runJsonSchema),
  async handle({ ctx, params }) {
    authorize(mayReadStudies, ctx.actor, undefined);
    const { study } = await loadStudy(params.studyId, ctx);
    const runs = await Run.findAll({
      where: { studyId: study.id },
      include: { model: Person, as: 'operator' },
      order: [['number', 'ASC']],
      transaction: ctx.transaction,
    });
    return runs.map((run) => presentRun(run, study));
  },
});

endpoint(runsRouter, {
  method: 'put',
  path: '/studies/:studyId/runs/:runId',
  summary: 'Record a run, or correct a recorded one with a reason',
  access: 'signedIn',
  params: runPath,
  body: runRecordSchema,
  answer: recordedRunSchema,
  async handle({ ctx, params, body }) {
    const { study, facts, run } = await loadRun(params, ctx);
    authorize(studyPolicy.recordRun, ctx.actor, facts);
    if (run.version !== body.version) throw stale(presentRun(run, study));
    return recordRun(run, study, body, ctx);
  },
});

endpoint(runsRouter, {
  method: 'post',
  path: '/studies/:studyId/runs/:runId/void',
  summary: 'Mark a run void, with the reason',
  access: 'signedIn',
  params: runPath,
  body: voidInputSchema,
  answer: runJsonSchema,
  async handle({ ctx, params, body }) {
    const { study, facts, run } = await loadRun(params, ctx);
    authorize(studyPolicy.voidRun, ctx.actor, facts);
    if (run.version !== body.version) throw stale(presentRun(run, study));
    await voidRun(run, study, body.why, ctx);
    return presentRun(run, study);
  },
});

endpoint(runsRouter, {
  method: 'post',
  path: '/studies/:studyId/runs/import',
  summary: 'Read a CSV of runs with sieve masses; nothing is saved until it is accepted',
  access: 'signedIn',
  params: studyPath,
  body: importInputSchema,
  answer: importAnswerSchema,
  async handle({ ctx, params, body }) {
    const { study, facts } = await loadStudy(params.studyId, ctx, { forWrite: true });
    authorize(studyPolicy.recordRun, ctx.actor, facts);
    return importRuns(study, body, ctx);
  },
});
