import { Router } from 'express';
import { customerInputSchema, customerJsonSchema } from '@shared/schemas/account';
import { customerPolicy } from '@shared/policies/lab';
import { customerSampleSchema } from '@shared/schemas/sample';
import { z } from 'zod';
import { authorize } from '../authorize';
import { endpoint } from '../endpoint';
import { Customer } from '../models/Customer';
import { presentCustomer } from '../presenters/account';
import { samplesOfCustomer } from '../services/samplesOfCustomer';

export const customersRouter = Router();

endpoint(customersRouter, {
  method: 'get',
  path: '/customers',
  summary: 'The customers of the lab',
  access: 'signedIn',
  answer: z.array(customerJsonSchema),
  async handle({ ctx }) {
    authorize(customerPolicy.read, ctx.actor, undefined);
    const customers = await Customer.findAll({
      where: { labId: ctx.actor.labId },
      order: [['name', 'ASC']],
      transaction: ctx.transaction,
    });
    return customers.map(presentCustomer);
  },
});

endpoint(customersRouter, {
  method: 'post',
  path: '/customers',
  summary: 'Register a customer',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  body: customerInputSchema,
  answer: customerJsonSchema,
  async handle({ ctx, body }) {
    authorize(customerPolicy.register, ctx.actor, undefined);
    return presentCustomer(await Customer.create({ ...body, labId: ctx.actor.labId }, ctx));
  },
});

endpoint(customersRouter, {
  method: 'get',
  path: '/my-samples',
  summary: 'A customer’s own samples and how far they are',
  access: 'signedIn',
  answer: z.array(customerSampleSchema),
  async handle({ ctx }) {
    authorize(customerPolicy.readOwnSamples, ctx.actor, undefined);
    return samplesOfCustomer(ctx);
  },
});
