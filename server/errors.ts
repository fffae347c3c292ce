import type { Issue } from '@shared/schemas/error';

/** A refusal that the caller can act on. `code` is stable, `message` is for people. */
export class HttpError extends Error {
  override readonly name = 'HttpError';

  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
    readonly extra: { issues?: Issue[]; current?: unknown; retryAfterS?: number } = {},
  ) {
    super(message);
  }
}

export const unauthenticated = (message = 'Sign in to go on.') =>
  new HttpError(401, 'signed-out', message);

export const forbidden = (message: string) => new HttpError(403, 'forbidden', message);

/** Also for what the actor may not know of. */
export const notFound = (noun: string) =>
  new HttpError(404, 'not-found', `There is no such ${noun}.`);

export const conflict = (code: string, message: string) => new HttpError(409, code, message);

/** Somebody saved this record since it was read; `current` is what it is now. */
export const stale = (current: unknown) =>
  new HttpError(
    409,
    'stale',
    'Somebody changed this since you opened it. Both versions are kept: compare, then save again.',
    { current },
  );

/** Well-formed, but it cannot be done; names the field when there is one. */
export const impossible = (code: string, message: string, path?: string) =>
  new HttpError(422, code, message, path === undefined ? {} : { issues: [{ path, message }] });

export const invalid = (path: string, message: string) =>
  new HttpError(400, 'invalid', message, { issues: [{ path, message }] });
