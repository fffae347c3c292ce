import { Router } from 'express';
import { mayReadStudies } from '@shared/policies/study';
import { auditEventJsonSchema } from '@shared/schemas/history';
import { pathIdSchema } from '@shared/schemas/identity';
import { Op } from 'sequelize';
import { z } from 'zod';
import { authorize } from '../authorize';
import { endpoint } from '../endpoint';
import { AuditEvent } from '../models/AuditEvent';
import { presentAuditEvent } from '../presenters/history';
import { loadStudy } from '../services/loadStudy';

export const historyRouter = Router();

endpoint(historyRouter, {
  method: 'get',
  path: '/studies/:studyId/history',
  summary: 'Who did what to a study and its records, newest first; `before` pages back',
  access: 'signedIn',
  params: z.strictObject({ studyId: pathIdSchema }),
  query: z.strictObject({ before: pathIdSchema.optional() }),
  answer: z.array(auditEventJsonSchema),
  async handle({ ctx, params, query }) {
    authorize(mayReadStudies, ctx.actor, undefined);
    const { study } = await loadStudy(params.studyId, ctx);
    const events = await AuditEvent.findAll({
      where: {
        labId: ctx.actor.labId,
        studyId: study.id,
        ...(query.before === undefined ? {} : { id: { [Op.lt]: query.before } }),
      },
      order: [['id', 'DESC']],
      limit: 100,
      transaction: ctx.transaction,
    });
    return events.map(presentAuditEvent);
  },
});
