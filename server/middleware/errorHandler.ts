import type { ErrorRequestHandler } from 'express';
import { StatsError } from '@shared/stats/errors';
import type { ErrorJson, Issue } from '@shared/schemas/error';
import { OptimisticLockError, UniqueConstraintError } from 'sequelize';
import { ZodError } from 'zod';
import { HttpError } from '../errors';
import { logger } from '../logger';
import { isDatabaseAway, isLockConflict, isStorageFull } from './databaseErrors';

interface Described {
  readonly status: number;
  readonly error: ErrorJson['error'];
  readonly retryAfterS?: number;
}

const describe = (status: number, code: string, message: string, issues?: Issue[]): Described => ({
  status,
  error: { code, message, ...(issues ? { issues } : {}) },
});

function describeZod(error: ZodError): Described {
  const issues = error.issues.flatMap((issue): Issue[] => {
    const path = issue.path.join('.');
    if (issue.code === 'unrecognized_keys')
      return issue.keys.map((key) => ({
        path: path ? `${path}.${key}` : key,
        message: `There is no field called ‘${key}’ here.`,
      }));
    return [{ path, message: issue.message }];
  });
  const words =
    issues.length === 1 ? (issues[0]?.message ?? '') : `${issues.length} fields need attention.`;
  return describe(400, 'invalid', words, issues);
}

/** body-parser and the router mark their own errors with a status and a type. */
function describeParser(error: unknown): Described | null {
  const { type, status } = error as { type?: unknown; status?: unknown };
  if (type === 'entity.too.large')
    return describe(413, 'too-large', 'The request is larger than this route takes.');
  if (type === 'encoding.unsupported' || type === 'charset.unsupported')
    return describe(415, 'unreadable', 'Send JSON as UTF-8.');
  if (typeof type === 'string' || status === 400)
    return describe(
      400,
      'unreadable',
      'The request could not be read: send one JSON object as UTF-8.',
    );
  return null;
}

function describeDatabase(error: unknown): Described | null {
  if (error instanceof OptimisticLockError)
    return describe(
      409,
      'stale',
      'Somebody changed this since you opened it. Load it again, compare, then save.',
    );
  if (error instanceof UniqueConstraintError)
    return describe(409, 'exists', 'There is already one with this name or number.');
  if (isLockConflict(error))
    return describe(
      409,
      'busy',
      'Somebody is changing the same records. Nothing was saved; try again.',
    );
  if (isStorageFull(error))
    return describe(
      507,
      'storage-full',
      'The storage is full. Nothing was saved: keep this page open and call the administrator.',
    );
  if (isDatabaseAway(error))
    return {
      ...describe(
        503,
        'database-away',
        'The database does not answer. Nothing was saved; try again in a moment.',
      ),
      retryAfterS: 2,
    };
  return null;
}

/** The one place where an error becomes a status and a body. It decides by type, never by message. */
export function describeError(error: unknown): Described {
  if (error instanceof HttpError) {
    const { issues, current, retryAfterS } = error.extra;
    const described = describe(error.status, error.code, error.message, issues);
    return {
      status: described.status,
      error: { ...described.error, ...(current === undefined ? {} : { current }) },
      ...(retryAfterS === undefined ? {} : { retryAfterS }),
    };
  }
  if (error instanceof ZodError) return describeZod(error);
  if (error instanceof StatsError) return describe(422, error.code, error.message);
  return (
    describeDatabase(error) ??
    describeParser(error) ??
    describe(
      500,
      'bug',
      'Something went wrong on our side. Nothing was saved. Tell the administrator the request number.',
    )
  );
}

export const errorHandler: ErrorRequestHandler = (error, request, response, next) => {
  if (response.headersSent) {
    next(error);
    return;
  }
  const { status, error: body, retryAfterS } = describeError(error);
  if (status >= 500)
    logger.error(
      { requestId: request.requestId, path: request.path, error: forLog(error) },
      'request failed',
    );
  if (retryAfterS !== undefined) response.set('Retry-After', String(retryAfterS));
  response
    .status(status)
    .json({ error: { ...body, requestId: request.requestId } } satisfies ErrorJson);
};

/** Statements and their values stay out of the log: they hold what people typed. */
function forLog(error: unknown): object {
  if (!(error instanceof Error)) return { message: String(error) };
  const { errno, code } = ((error as { original?: unknown }).original ?? {}) as {
    errno?: number;
    code?: string;
  };
  return {
    name: error.name,
    errno,
    code,
    message: errno === undefined ? error.message : undefined,
    stack: error.stack,
  };
}
