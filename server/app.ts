import path from 'node:path';
import cookieParser from 'cookie-parser';
import express, { type Express, type RequestHandler } from 'express';
import helmet from 'helmet';
import { notFound } from './errors';
import { makeNonce, serveClient } from './middleware/client';
import { errorHandler } from './middleware/errorHandler';
import { identify, numberRequest } from './middleware/identify';
import { checkRawJson, perMinute } from './middleware/limits';
import { authRouter } from './routes/auth';
import { calcRouter } from './routes/calc';
import { customersRouter } from './routes/customers';
import { descriptionRouter } from './routes/description';
import { fitsRouter } from './routes/fits';
import { healthRouter } from './routes/health';
import { historyRouter } from './routes/history';
import { peopleRouter } from './routes/people';
import { releasesRouter } from './routes/releases';
import { rigsRouter } from './routes/rigs';
import { runsRouter } from './routes/runs';
import { samplesRouter } from './routes/samples';
import { studiesRouter } from './routes/studies';

const JSON_LIMIT = '6mb';

const noStore: RequestHandler = (_request, response, next) => {
  response.set('Cache-Control', 'no-store');
  next();
};

const headers = helmet({
  contentSecurityPolicy: {
    useDefaults: false,
    directives: {
      defaultSrc: ["'none'"],
      scriptSrc: ["'self'"],
      workerSrc: ["'self'"],
      styleSrc: ["'self'", (_request, response) => `'nonce-${nonceOf(response)}'`],
      imgSrc: ["'self'", 'data:', 'blob:'],
      fontSrc: ["'self'"],
      connectSrc: ["'self'"],
      manifestSrc: ["'self'"],
      objectSrc: ["'none'"],
      baseUri: ["'none'"],
      frameAncestors: ["'none'"],
      formAction: ["'self'"],
      // plain http inside a lab must keep working
      upgradeInsecureRequests: null,
    },
  },
  referrerPolicy: { policy: 'no-referrer' },
});

function nonceOf(response: object): string {
  const { locals } = response as { locals?: Record<string, unknown> };
  return typeof locals?.['nonce'] === 'string' ? locals['nonce'] : '';
}

/** Builds the application without listening. Services must be set before the first request. */
export function buildApp(clientFolder: string | null): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('etag', false);
  app.use(numberRequest, makeNonce, headers);
  const api = express.Router();
  api.use(
    noStore,
    express.json({ limit: JSON_LIMIT, strict: true, verify: (_q, _r, raw) => checkRawJson(raw) }),
  );
  api.use(
    cookieParser(),
    identify,
    perMinute((config) => config.requestsPerMinute),
  );
  api.use(healthRouter, descriptionRouter);
  api.use('/auth', authRouter);
  api.use(
    '/calc',
    perMinute((config) => config.calculationsPerMinute),
    calcRouter,
  );
  api.use(peopleRouter, customersRouter, samplesRouter, rigsRouter);
  api.use(studiesRouter, runsRouter, fitsRouter, releasesRouter, historyRouter);
  api.use(() => {
    throw notFound('address');
  });
  app.use('/api', api);
  if (clientFolder !== null) app.use(serveClient(path.resolve(clientFolder)));
  app.use(errorHandler);
  return app;
}
