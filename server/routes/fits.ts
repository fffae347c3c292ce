import { Router } from 'express';
import { fitDetailSchema, fitInputSchema, fitJsonSchema } from '@shared/schemas/fit';
import { pathIdSchema } from '@shared/schemas/identity';
import { mayReadStudies, studyPolicy } from '@shared/policies/study';
import { z } from 'zod';
import { authorize } from '../authorize';
import { endpoint } from '../endpoint';
import { notFound } from '../errors';
import { Fit } from '../models/Fit';
import { presentFit } from '../presenters/fit';
import { evidenceOf } from '../services/evidenceOf';
import { dataHash, keepFit } from '../services/keepFit';
import { loadStudy } from '../services/loadStudy';

const studyPath = z.strictObject({ studyId: pathIdSchema });
const fitPath = z.strictObject({ studyId: pathIdSchema, fitId: pathIdSchema });

export const fitsRouter = Router();

endpoint(fitsRouter, {
  method: 'get',
  path: '/studies/:studyId/fits',
  summary: 'The models of a study, kept and former, newest first',
  access: 'signedIn',
  params: studyPath,
  answer: z.array(fitJsonSchema),
  async handle({ ctx, params }) {
    authorize(mayReadStudies, ctx.actor, undefined);
    const { study } = await loadStudy(params.studyId, ctx);
    const fits = await Fit.findAll({
      where: { studyId: study.id },
      include: 'madeBy',
      order: [['id', 'DESC']],
      transaction: ctx.transaction,
    });
    if (fits.length === 0) return [];
    const evidence = await evidenceOf(study, ctx);
    return fits.map((fit) =>
      presentFit(fit, dataHash(evidence, fit.responseKey, fit) !== fit.dataHash),
    );
  },
});

endpoint(fitsRouter, {
  method: 'get',
  path: '/studies/:studyId/fits/:fitId',
  summary: 'One model with the full answer that was stored with it',
  access: 'signedIn',
  params: fitPath,
  answer: fitDetailSchema,
  async handle({ ctx, params }) {
    authorize(mayReadStudies, ctx.actor, undefined);
    const { study } = await loadStudy(params.studyId, ctx);
    const fit = await Fit.findOne({
      where: { id: params.fitId, studyId: study.id },
      include: 'madeBy',
      transaction: ctx.transaction,
    });
    if (!fit) throw notFound('model');
    const evidence = await evidenceOf(study, ctx);
    const isStale = dataHash(evidence, fit.responseKey, fit) !== fit.dataHash;
    return { ...presentFit(fit, isStale), answer: { ...fit.answer } };
  },
});

endpoint(fitsRouter, {
  method: 'post',
  path: '/studies/:studyId/fits',
  summary: 'Compute a model, store it and keep it for its response',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  params: studyPath,
  body: fitInputSchema,
  answer: fitJsonSchema,
  async handle({ ctx, params, body }) {
    const { study, facts } = await loadStudy(params.studyId, ctx, { forWrite: true });
    authorize(studyPolicy.fit, ctx.actor, facts);
    const fit = await keepFit(study, body, ctx);
    await fit.reload({ include: 'madeBy', transaction: ctx.transaction });
    return presentFit(fit, false);
  },
});
