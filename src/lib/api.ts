import { errorJsonSchema, type Issue } from '@shared/schemas/error';
import { sessionJsonSchema, type UserJson } from '@shared/schemas/account';
import type { z } from 'zod';

/** A refusal of the server, or a network that is away (`status` 0). `message` is a sentence for people. */
export class ApiError extends Error {
  override readonly name = 'ApiError';

  readonly issues: readonly Issue[];
  /** With `stale`: the record as it stands now. */
  readonly current: unknown;

  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
    extra: { issues?: readonly Issue[] | undefined; current?: unknown } = {},
  ) {
    super(message);
    this.issues = extra.issues ?? [];
    this.current = extra.current;
  }
}

const TIMEOUT_MS = 30_000;
const AWAY = 'The server does not answer. What you typed is kept; try again in a moment.';

let accessToken: string | null = null;
let onSignedOut: () => void = () => undefined;

/** The access token lives here and nowhere else: not in storage, gone with the page. */
export function keepAccessToken(token: string | null): void {
  accessToken = token;
}

/** Called once a request finds that the session is over. */
export function whenSignedOut(callback: () => void): void {
  onSignedOut = callback;
}

async function send(method: string, path: string, init: RequestInit): Promise<Response> {
  const headers = new Headers(init.headers);
  headers.set('Accept', 'application/json');
  if (accessToken !== null) headers.set('Authorization', `Bearer ${accessToken}`);
  try {
    return await fetch(`/api${path}`, {
      ...init,
      method,
      headers,
      credentials: 'same-origin',
      signal: AbortSignal.any([
        AbortSignal.timeout(TIMEOUT_MS),
        ...(init.signal ? [init.signal] : []),
      ]),
    });
  } catch (error) {
    if (init.signal?.aborted) throw error;
    throw new ApiError(0, 'away', AWAY);
  }
}

async function errorOf(response: Response): Promise<ApiError> {
  const body: unknown = await response.json().catch(() => null);
  const parsed = errorJsonSchema.safeParse(body);
  if (!parsed.success)
    return new ApiError(
      response.status,
      'unreadable',
      'The server gave an answer that makes no sense here. Load the page again.',
    );
  const { code, message, issues, current } = parsed.data.error;
  return new ApiError(response.status, code, message, { issues, current });
}

let refreshing: Promise<UserJson | null> | null = null;

async function askForSession(): Promise<UserJson | null> {
  const response = await send('POST', '/auth/refresh', {
    headers: { 'Content-Type': 'application/json' },
    body: '{}',
  });
  if (response.status === 401) {
    keepAccessToken(null);
    return null;
  }
  if (!response.ok) throw await errorOf(response);
  const session = sessionJsonSchema.parse(await response.json());
  keepAccessToken(session.accessToken);
  return session.user;
}

/** Exchanges the refresh cookie for an access token; one exchange at a time. Null: signed out. */
export function refreshSession(): Promise<UserJson | null> {
  refreshing ??= askForSession().finally(() => {
    refreshing = null;
  });
  return refreshing;
}

async function sendSignedIn(method: string, path: string, init: RequestInit): Promise<Response> {
  const response = await send(method, path, init);
  if (response.status !== 401 || path.startsWith('/auth/')) return response;
  if ((await refreshSession()) === null) {
    onSignedOut();
    return response;
  }
  return send(method, path, init);
}

async function ask<S extends z.ZodType>(
  method: string,
  path: string,
  schema: S,
  init: RequestInit,
): Promise<z.output<S>> {
  const response = await sendSignedIn(method, path, init);
  if (!response.ok) throw await errorOf(response);
  return schema.parse(await response.json());
}

const json = (body: unknown, headers: Record<string, string> = {}): RequestInit => ({
  headers: { 'Content-Type': 'application/json', ...headers },
  body: JSON.stringify(body),
});

/** A key for one thing to be made: a repeated request with it makes nothing twice. */
export function newKey(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('');
}

/** Typed requests: the answer is parsed by the schema that the server filled. */
export const api = {
  get: <S extends z.ZodType>(path: string, schema: S, signal?: AbortSignal) =>
    ask('GET', path, schema, signal ? { signal } : {}),
  put: <S extends z.ZodType>(path: string, body: unknown, schema: S) =>
    ask('PUT', path, schema, json(body)),
  post: <S extends z.ZodType>(path: string, body: unknown, schema: S) =>
    ask('POST', path, schema, json(body)),
  /** For what must be made once: the same `key` again gets the first answer. */
  create: <S extends z.ZodType>(path: string, body: unknown, schema: S, key: string) =>
    ask('POST', path, schema, json(body, { 'Idempotency-Key': key })),
};
