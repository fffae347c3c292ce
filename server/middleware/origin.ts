import type { RequestHandler } from 'express';
import { forbidden } from '../errors';
import { services } from '../runtime';

/**
 * The refresh cookie goes along with any request to this address, so a route that reads it takes only
 * requests that this page made: the Origin must be the one that was called.
 */
export const sameOrigin: RequestHandler = (request, _response, next) => {
  const origin = request.get('origin');
  const site = request.get('sec-fetch-site');
  const called = `${request.protocol}://${request.get('host') ?? ''}`;
  const isOurs =
    origin === undefined || origin === called || origin === services().config.publicUrl;
  if (!isOurs || (site !== undefined && site !== 'same-origin' && site !== 'none'))
    throw forbidden('This request came from another site.');
  next();
};
