import { createHash } from 'node:crypto';
import type { Request, Response, Router } from 'express';
import { Transaction, UniqueConstraintError } from 'sequelize';
import type { z } from 'zod';
import type { Context, SignedInActor } from './context';
import { HttpError, invalid, unauthenticated } from './errors';
import { IdempotencyKey } from './models/IdempotencyKey';
import { isLockConflict } from './middleware/databaseErrors';
import { services } from './runtime';

type Schema = z.ZodType;
type Parsed<S extends Schema | undefined> = S extends Schema ? z.output<S> : undefined;

interface Call<
  P extends Schema | undefined,
  Q extends Schema | undefined,
  B extends Schema | undefined,
> {
  readonly params: Parsed<P>;
  readonly query: Parsed<Q>;
  readonly body: Parsed<B>;
  readonly request: Request;
  readonly response: Response;
}

/** What a route is, in one place: who may ask, what shape goes in and out, and what happens. */
interface Common<
  P extends Schema | undefined,
  Q extends Schema | undefined,
  B extends Schema | undefined,
  A extends Schema,
> {
  readonly method: 'get' | 'post' | 'put' | 'delete';
  readonly path: string;
  readonly summary: string;
  readonly params?: P;
  readonly query?: Q;
  readonly body?: B;
  readonly answer: A;
  readonly status?: 200 | 201 | 202;
}

interface PublicRoute<
  P extends Schema | undefined,
  Q extends Schema | undefined,
  B extends Schema | undefined,
  A extends Schema,
> extends Common<P, Q, B, A> {
  readonly access: 'public';
  readonly handle: (call: Call<P, Q, B>) => Promise<z.input<A>>;
}

/** A calculation: signed in, but no transaction. */
interface CalculationRoute<
  P extends Schema | undefined,
  Q extends Schema | undefined,
  B extends Schema | undefined,
  A extends Schema,
> extends Common<P, Q, B, A> {
  readonly access: 'calculation';
  readonly handle: (call: Call<P, Q, B> & { actor: SignedInActor }) => Promise<z.input<A>>;
}

interface SignedInRoute<
  P extends Schema | undefined,
  Q extends Schema | undefined,
  B extends Schema | undefined,
  A extends Schema,
> extends Common<P, Q, B, A> {
  readonly access: 'signedIn';
  /** A create: asks for an Idempotency-Key, so that a repeated request makes nothing twice. */
  readonly isCreate?: boolean;
  readonly handle: (call: Call<P, Q, B> & { ctx: Context }) => Promise<z.input<A>>;
}

export type Route<
  P extends Schema | undefined,
  Q extends Schema | undefined,
  B extends Schema | undefined,
  A extends Schema,
> = PublicRoute<P, Q, B, A> | CalculationRoute<P, Q, B, A> | SignedInRoute<P, Q, B, A>;

/** Every route of the application, for the description and for the test that walks them all. */
export interface RouteRecord extends Common<
  Schema | undefined,
  Schema | undefined,
  Schema | undefined,
  Schema
> {
  readonly access: Route<undefined, undefined, undefined, Schema>['access'];
  readonly isCreate: boolean;
  /** Where the router is mounted below /api. */
  readonly prefix: string;
}
export const routeTable: RouteRecord[] = [];

const prefixes = new WeakMap<Router, string>();
/** Says where a router will be mounted, before its routes are added. */
export function mountedAt(router: Router, prefix: string): Router {
  prefixes.set(router, prefix);
  return router;
}

const KEY_PATTERN = /^[\w-]{8,100}$/;
const MAX_TRIES = 4;

/** In one transaction; a deadlock or a lock that took too long is tried again, since nothing was kept. */
async function inTransaction<T>(work: (transaction: Transaction) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await services().sequelize.transaction(
        { isolationLevel: Transaction.ISOLATION_LEVELS.READ_COMMITTED },
        work,
      );
    } catch (error) {
      if (attempt >= MAX_TRIES || !isLockConflict(error)) throw error;
      await new Promise((resolve) => setTimeout(resolve, 20 * 2 ** attempt * Math.random()));
    }
  }
}

interface Answer {
  readonly status: number;
  readonly body: unknown;
  readonly isReplayed: boolean;
}

const hashOf = (body: unknown) =>
  createHash('sha256')
    .update(JSON.stringify(body ?? null))
    .digest('hex');

/** What the same person, route and key were answered before; refuses the key with another body. */
async function replay(
  personId: number,
  route: string,
  key: string,
  bodyHash: string,
): Promise<Answer> {
  const before = await IdempotencyKey.findOne({ where: { personId, route, key } });
  if (before === null || before.status === null)
    throw new HttpError(
      409,
      'in-progress',
      'The same request is still being worked on. Try again in a moment.',
    );
  if (before.bodyHash !== bodyHash)
    throw new HttpError(
      422,
      'key-reused',
      'This Idempotency-Key was used for another request. Take a new one.',
    );
  return { status: before.status, body: before.answer, isReplayed: true };
}

async function once(
  ctx: Context,
  request: Request,
  route: string,
  work: () => Promise<Omit<Answer, 'isReplayed'>>,
): Promise<Answer> {
  const key = request.get('idempotency-key') ?? '';
  const bodyHash = hashOf(request.body);
  const { transaction } = ctx;
  const row = await IdempotencyKey.create(
    { personId: ctx.actor.id, route, key, bodyHash, status: null, answer: null },
    { transaction },
  );
  const answer = await work();
  await row.update({ status: answer.status, answer: answer.body }, { transaction });
  return { ...answer, isReplayed: false };
}

/** A second request with the same key waits at the unique index, then gets the first one’s answer. */
function isKeyTaken(error: unknown): boolean {
  return error instanceof UniqueConstraintError && 'one_answer' in error.fields;
}

async function answerSignedIn<
  P extends Schema | undefined,
  Q extends Schema | undefined,
  B extends Schema | undefined,
  A extends Schema,
>(route: SignedInRoute<P, Q, B, A>, call: Call<P, Q, B>, status: number): Promise<Answer> {
  const { request } = call;
  const { actor, requestId } = request;
  if (!actor) throw unauthenticated();
  const run = async (transaction: Transaction): Promise<Answer> => {
    const ctx: Context = { transaction, actor, requestId };
    const work = async () => ({
      status,
      body: route.answer.parse(await route.handle({ ...call, ctx })) as unknown,
    });
    return route.isCreate
      ? once(ctx, request, request.path, work)
      : { ...(await work()), isReplayed: false };
  };
  try {
    return await inTransaction(run);
  } catch (error) {
    if (!isKeyTaken(error)) throw error;
    return replay(
      actor.id,
      request.path,
      request.get('idempotency-key') ?? '',
      hashOf(request.body),
    );
  }
}

function read<S extends Schema | undefined>(schema: S, value: unknown): Parsed<S> {
  // the conditional type cannot be narrowed by the test on the value
  return (schema ? schema.parse(value) : undefined) as Parsed<S>;
}

/**
 * Ties a route's schemas to its handler, in the order that every request takes: signed in → valid →
 * transaction → (in the handler) load → authorise → act → present.
 */
export function endpoint<
  A extends Schema,
  P extends Schema | undefined = undefined,
  Q extends Schema | undefined = undefined,
  B extends Schema | undefined = undefined,
>(router: Router, route: Route<P, Q, B, A>): void {
  const { method, path, status = 200 } = route;
  const isCreate = route.access === 'signedIn' && route.isCreate === true;
  routeTable.push({ ...route, isCreate, prefix: prefixes.get(router) ?? '' });
  router[method](path, async (request, response) => {
    if (route.access !== 'public' && !request.actor) throw unauthenticated();
    if (isCreate && !KEY_PATTERN.test(request.get('idempotency-key') ?? ''))
      throw invalid(
        'Idempotency-Key',
        'Send an Idempotency-Key header (8 to 100 letters, digits, - or _), new for each thing to be made.',
      );
    const call: Call<P, Q, B> = {
      params: read(route.params as P, request.params),
      query: read(route.query as Q, request.query),
      body: read(route.body as B, request.body ?? {}),
      request,
      response,
    };
    if (route.access === 'signedIn') {
      const answer = await answerSignedIn(route, call, status);
      if (answer.isReplayed) response.set('Idempotent-Replayed', 'true');
      response.status(answer.status).json(answer.body);
      return;
    }
    const given =
      route.access === 'public'
        ? await route.handle(call)
        : await route.handle({ ...call, actor: request.actor ?? raise() });
    response.status(status).json(route.answer.parse(given));
  });
}

function raise(): never {
  throw unauthenticated();
}
