import { Router } from 'express';
import { pathIdSchema } from '@shared/schemas/identity';
import { samplePolicy } from '@shared/policies/lab';
import {
  sampleDetailSchema,
  sampleInputSchema,
  sampleJsonSchema,
  sampleUpdateSchema,
  stockEntryInputSchema,
} from '@shared/schemas/sample';
import { z } from 'zod';
import { authorize } from '../authorize';
import { because, type Context } from '../context';
import { endpoint } from '../endpoint';
import { notFound, stale } from '../errors';
import { Customer } from '../models/Customer';
import { Person } from '../models/Person';
import { Sample } from '../models/Sample';
import { StockEntry } from '../models/StockEntry';
import { Study } from '../models/Study';
import { presentSample, presentStockEntry } from '../presenters/sample';
import { countStock, stockOf, takeStock } from '../services/countStock';
import { registerSample } from '../services/registerSample';

const samplePath = z.strictObject({ sampleId: pathIdSchema });
const WITH_NAMES = [
  { model: Customer, as: 'customer' },
  { model: Person, as: 'registeredBy' },
];

async function findSample(sampleId: number, { actor, transaction }: Context): Promise<Sample> {
  const where = { id: sampleId, labId: actor.labId };
  const sample = await Sample.findOne({ where, include: WITH_NAMES, transaction });
  if (!sample) throw notFound('sample');
  return sample;
}

async function presentDetail(sample: Sample, ctx: Context) {
  const { transaction } = ctx;
  const [stock, ledger, studies] = await Promise.all([
    stockOf(sample.id, ctx),
    StockEntry.findAll({
      where: { sampleId: sample.id },
      include: { model: Person, as: 'by' },
      order: [['id', 'ASC']],
      transaction,
    }),
    Study.findAll({ where: { sampleId: sample.id }, order: [['id', 'ASC']], transaction }),
  ]);
  return {
    ...presentSample(sample, stock),
    ledger: ledger.map(presentStockEntry),
    studies: studies.map(({ id, code, title }) => ({ id, code, title })),
  };
}

export const samplesRouter = Router();

endpoint(samplesRouter, {
  method: 'get',
  path: '/samples',
  summary: 'The samples of the lab, newest first, with their stock',
  access: 'signedIn',
  answer: z.array(sampleJsonSchema),
  async handle({ ctx }) {
    authorize(samplePolicy.read, ctx.actor, undefined);
    const samples = await Sample.findAll({
      where: { labId: ctx.actor.labId },
      include: WITH_NAMES,
      order: [['id', 'DESC']],
      limit: 500,
      transaction: ctx.transaction,
    });
    const stock = await countStock(
      samples.map(({ id }) => id),
      ctx,
    );
    return samples.flatMap((sample) => {
      const each = stock.get(sample.id);
      return each ? [presentSample(sample, each)] : [];
    });
  },
});

endpoint(samplesRouter, {
  method: 'post',
  path: '/samples',
  summary: 'Register a sample; what must never go in is refused',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  body: sampleInputSchema,
  answer: sampleDetailSchema,
  async handle({ ctx, body }) {
    authorize(samplePolicy.register, ctx.actor, undefined);
    const { id } = await registerSample(body, ctx);
    return presentDetail(await findSample(id, ctx), ctx);
  },
});

endpoint(samplesRouter, {
  method: 'get',
  path: '/samples/:sampleId',
  summary: 'A sample with its ledger and its studies',
  access: 'signedIn',
  params: samplePath,
  answer: sampleDetailSchema,
  async handle({ ctx, params }) {
    authorize(samplePolicy.read, ctx.actor, undefined);
    return presentDetail(await findSample(params.sampleId, ctx), ctx);
  },
});

endpoint(samplesRouter, {
  method: 'put',
  path: '/samples/:sampleId',
  summary: 'Correct what was written at intake, with a reason',
  access: 'signedIn',
  params: samplePath,
  body: sampleUpdateSchema,
  answer: sampleDetailSchema,
  async handle({ ctx, params, body }) {
    authorize(samplePolicy.correct, ctx.actor, undefined);
    const sample = await findSample(params.sampleId, ctx);
    if (sample.version !== body.version) throw stale(await presentDetail(sample, ctx));
    const { name, description, storage, why } = body;
    await sample.update({ name, description, storage }, because(ctx, why));
    return presentDetail(sample, ctx);
  },
});

endpoint(samplesRouter, {
  method: 'post',
  path: '/samples/:sampleId/stock',
  summary: 'Enter stock received, lost or sent back',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  params: samplePath,
  body: stockEntryInputSchema,
  answer: sampleDetailSchema,
  async handle({ ctx, params, body }) {
    authorize(samplePolicy.enterStock, ctx.actor, undefined);
    const sample = await findSample(params.sampleId, ctx);
    const { kind, massG, note } = body;
    const reasoned = because(ctx, note);
    if (kind === 'received')
      await StockEntry.create(
        {
          labId: ctx.actor.labId,
          sampleId: sample.id,
          kind,
          massG,
          note,
          studyId: null,
          runId: null,
          byId: ctx.actor.id,
        },
        reasoned,
      );
    else await takeStock({ sampleId: sample.id, kind, massG, note }, reasoned);
    return presentDetail(sample, ctx);
  },
});
