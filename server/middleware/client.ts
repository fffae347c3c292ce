import { randomBytes } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import express, { Router, type RequestHandler } from 'express';

/** Only the page itself holds style elements made at run time (dialogs lock scrolling with one). */
const NONCE_MARK = '__NONCE__';

export const makeNonce: RequestHandler = (_request, response, next) => {
  response.locals['nonce'] = randomBytes(16).toString('base64');
  next();
};

/** The built client: hashed files for a year, the page itself fresh each time, for every path. */
export function serveClient(folder: string): Router {
  const router = Router();
  const page = fs.readFileSync(path.join(folder, 'index.html'), 'utf8');
  router.use(
    '/assets',
    express.static(path.join(folder, 'assets'), { immutable: true, maxAge: '1y', index: false }),
  );
  router.use(express.static(folder, { index: false, maxAge: '1h' }));
  router.get('/{*path}', (request, response, next) => {
    if (path.extname(request.path) !== '') {
      next();
      return;
    }
    response.set('Cache-Control', 'no-store').type('html');
    response.send(page.replaceAll(NONCE_MARK, String(response.locals['nonce'])));
  });
  router.use((_request, response) => {
    response.status(404).type('text').send('There is no such file.');
  });
  return router;
}
