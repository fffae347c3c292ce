import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { HttpError } from '../errors';
import { services } from '../runtime';

const MAX_DEPTH = 32;
const FORBIDDEN_KEY = /"(?:__proto__|constructor|prototype)"\s*:/;

const unreadable = (message: string) => new HttpError(400, 'unreadable', message);

/**
 * Looks at the raw JSON before it is parsed: nesting that would exhaust the stack, and keys that would
 * reach into the prototype of an object.
 */
export function checkRawJson(raw: Buffer): void {
  let depth = 0;
  let isInString = false;
  for (let i = 0; i < raw.length; i++) {
    const byte = raw[i];
    if (isInString) {
      if (byte === 0x5c) i++;
      else if (byte === 0x22) isInString = false;
    } else if (byte === 0x22) isInString = true;
    else if (byte === 0x7b || byte === 0x5b) {
      depth++;
      if (depth > MAX_DEPTH)
        throw unreadable(`The JSON is nested more than ${MAX_DEPTH} levels deep.`);
    } else if (byte === 0x7d || byte === 0x5d) depth--;
  }
  if (FORBIDDEN_KEY.test(raw.toString('latin1')))
    throw unreadable('A field cannot be called __proto__, constructor or prototype.');
}

const whoAsks = (request: Request) =>
  request.actor ? `person ${request.actor.id}` : ipKeyGenerator(request.ip ?? '');

/** So many requests a minute for one person (or one address, before sign-in); beyond it 429. */
export function perMinute(
  read: (config: ReturnType<typeof services>['config']) => number,
): RequestHandler {
  return rateLimit({
    windowMs: 60_000,
    limit: () => read(services().config),
    keyGenerator: whoAsks,
    standardHeaders: 'draft-7',
    legacyHeaders: false,
    handler: (_request, _response, next) => {
      next(
        new HttpError(
          429,
          'too-many',
          'Too many requests in one minute. Wait a moment, then go on.',
          { retryAfterS: 60 },
        ),
      );
    },
  });
}

/** Refuses after so many failed tries in five minutes; what counts as one account is the caller’s. */
function tries(keyOf: (request: Request) => string): RequestHandler {
  return rateLimit({
    windowMs: 5 * 60_000,
    limit: () => services().config.signInTries,
    skipSuccessfulRequests: true,
    keyGenerator: keyOf,
    standardHeaders: false,
    legacyHeaders: false,
    handler: (_request, _response, next) => {
      next(
        new HttpError(429, 'too-many', 'Too many tries. Wait five minutes, then try again.', {
          retryAfterS: 300,
        }),
      );
    },
  });
}

/** Wrong passwords for one account from one address. */
export function signInTries(): RequestHandler {
  return tries((request) => {
    const { email } = (request.body ?? {}) as { email?: unknown };
    return `${ipKeyGenerator(request.ip ?? '')} ${typeof email === 'string' ? email.trim().toLowerCase().slice(0, 254) : ''}`;
  });
}

/** Failed signatures of one person. */
export function signatureTries(): RequestHandler {
  return tries((request) => `signature ${whoAsks(request)}`);
}
