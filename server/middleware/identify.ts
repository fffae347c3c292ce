import { randomUUID } from 'node:crypto';
import type { RequestHandler } from 'express';
import { Person } from '../models/Person';
import { Session } from '../models/Session';
import { readAccessToken } from '../tokens';

/** A number for each request, in its answer and in the log. */
export const numberRequest: RequestHandler = (request, response, next) => {
  request.requestId = randomUUID();
  response.set('X-Request-Id', request.requestId);
  next();
};

/**
 * Who asks, from the Bearer token. The session and the person are read each time, so signing out, a
 * changed role and an archived person count from the next request on.
 */
export const identify: RequestHandler = async (request, _response, next) => {
  const token = /^Bearer (.+)$/.exec(request.get('authorization') ?? '')?.[1];
  const claims = token ? readAccessToken(token) : null;
  if (claims) {
    const session = await Session.findOne({
      where: { id: claims.sessionId, personId: claims.personId, revokedAt: null },
      include: { model: Person, as: 'person' },
    });
    const person = session?.person;
    if (session && person?.isActive && session.expiresAt.getTime() > Date.now()) {
      const { id, labId, name, roles, customerId } = person;
      request.actor = { id, labId, name, roles, customerId, sessionId: session.id };
    }
  }
  next();
};
