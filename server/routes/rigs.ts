import { Router } from 'express';
import { pathIdSchema } from '@shared/schemas/identity';
import { rigPolicy, sieveStackPolicy } from '@shared/policies/lab';
import {
  envelopeRevisionSchema,
  rigInputSchema,
  rigJsonSchema,
  sieveStackInputSchema,
  sieveStackJsonSchema,
} from '@shared/schemas/rig';
import { z } from 'zod';
import { authorize } from '../authorize';
import { because } from '../context';
import { endpoint } from '../endpoint';
import { stale } from '../errors';
import { Rig } from '../models/Rig';
import { RigEnvelope } from '../models/RigEnvelope';
import { SieveStack } from '../models/SieveStack';
import { presentRig, presentSieveStack } from '../presenters/lab';
import { newestEnvelope, newestEnvelopes } from '../services/newestEnvelope';

export const rigsRouter = Router();

endpoint(rigsRouter, {
  method: 'get',
  path: '/rigs',
  summary: 'The rigs of the lab with their newest envelopes',
  access: 'signedIn',
  answer: z.array(rigJsonSchema),
  async handle({ ctx }) {
    authorize(rigPolicy.read, ctx.actor, undefined);
    return (await newestEnvelopes(ctx)).map(presentRig);
  },
});

endpoint(rigsRouter, {
  method: 'post',
  path: '/rigs',
  summary: 'Register a rig',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  body: rigInputSchema,
  answer: rigJsonSchema,
  async handle({ ctx, body }) {
    authorize(rigPolicy.revise, ctx.actor, undefined);
    const { labId } = ctx.actor;
    const rig = await Rig.create({ labId, name: body.name }, ctx);
    await RigEnvelope.create({ labId, rigId: rig.id, revision: 1, envelope: body.envelope }, ctx);
    return presentRig(await newestEnvelope(rig.id, ctx));
  },
});

endpoint(rigsRouter, {
  method: 'post',
  path: '/rigs/:rigId/envelopes',
  summary: 'Revise a rig’s envelope, with a reason; studies keep the revision they were planned on',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  params: z.strictObject({ rigId: pathIdSchema }),
  body: envelopeRevisionSchema,
  answer: rigJsonSchema,
  async handle({ ctx, params, body }) {
    authorize(rigPolicy.revise, ctx.actor, undefined);
    const newest = await newestEnvelope(params.rigId, ctx);
    if (newest.revision !== body.revision) throw stale(presentRig(newest));
    await RigEnvelope.create(
      {
        labId: ctx.actor.labId,
        rigId: params.rigId,
        revision: newest.revision + 1,
        envelope: body.envelope,
      },
      because(ctx, body.why),
    );
    return presentRig(await newestEnvelope(params.rigId, ctx));
  },
});

endpoint(rigsRouter, {
  method: 'get',
  path: '/sieve-stacks',
  summary: 'The sieve stacks of the lab',
  access: 'signedIn',
  answer: z.array(sieveStackJsonSchema),
  async handle({ ctx }) {
    authorize(sieveStackPolicy.read, ctx.actor, undefined);
    const stacks = await SieveStack.findAll({
      where: { labId: ctx.actor.labId },
      order: [['name', 'ASC']],
      transaction: ctx.transaction,
    });
    return stacks.map(presentSieveStack);
  },
});

endpoint(rigsRouter, {
  method: 'post',
  path: '/sieve-stacks',
  summary: 'Register a sieve stack',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  body: sieveStackInputSchema,
  answer: sieveStackJsonSchema,
  async handle({ ctx, body }) {
    authorize(sieveStackPolicy.register, ctx.actor, undefined);
    return presentSieveStack(await SieveStack.create({ ...body, labId: ctx.actor.labId }, ctx));
  },
});
