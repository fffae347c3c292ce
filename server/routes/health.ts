import { Router } from 'express';
import { z } from 'zod';
import { endpoint } from '../endpoint';
import { HttpError } from '../errors';
import { services } from '../runtime';
import { VERSION } from '../version';

export const healthRouter = Router();

endpoint(healthRouter, {
  method: 'get',
  path: '/health',
  summary: 'Whether application and database answer',
  access: 'public',
  answer: z.object({ status: z.literal('ok'), database: z.literal('ok'), version: z.string() }),
  async handle() {
    try {
      await services().sequelize.query('SELECT 1');
    } catch {
      throw new HttpError(
        503,
        'database-away',
        'The application runs, but the database does not answer.',
        {
          retryAfterS: 2,
        },
      );
    }
    return { status: 'ok' as const, database: 'ok' as const, version: VERSION };
  },
});
