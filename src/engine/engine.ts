import * as Comlink from 'comlink';
import { queryOptions } from '@tanstack/react-query';
import type { Engine, Outcome } from './engine.worker';

/** A calculation that cannot be done, in the engine’s own sentence. */
export class CalculationError extends Error {
  override readonly name = 'CalculationError';

  constructor(
    readonly code: string,
    message: string,
    readonly details: Readonly<Record<string, unknown>> = {},
  ) {
    super(message);
  }
}

type Name = keyof Engine;
type Request<N extends Name> = Parameters<Engine[N]>[0];
type Answer<N extends Name> = Extract<ReturnType<Engine[N]>, { ok: true }>['answer'];

interface Running {
  readonly worker: Worker;
  readonly remote: Comlink.Remote<Engine>;
}

/** Workers that wait for work. A cancelled calculation ends its worker: there is no other way to stop it. */
const idle: Running[] = [];
const MAX_IDLE = 2;

function start(): Running {
  const worker = new Worker(new URL('./engine.worker.ts', import.meta.url), { type: 'module' });
  return { worker, remote: Comlink.wrap<Engine>(worker) };
}

function cancelled(signal: AbortSignal): Promise<never> {
  return new Promise((_resolve, reject) => {
    signal.addEventListener('abort', () => {
      reject(new DOMException('The calculation was stopped.', 'AbortError'));
    });
  });
}

/**
 * Runs a calculation in a worker, with the same code as the server.
 *
 * @throws CalculationError with a sentence when it is impossible.
 */
export async function compute<N extends Name>(
  name: N,
  request: Request<N>,
  signal: AbortSignal,
): Promise<Answer<N>> {
  const running = idle.pop() ?? start();
  try {
    // Comlink types a remote call by the union of all calculations; the name picks one
    const call = running.remote[name] as unknown as (
      request: Request<N>,
    ) => Promise<Outcome<Answer<N>>>;
    const outcome = await Promise.race([call(request), cancelled(signal)]);
    if (!outcome.ok) throw new CalculationError(outcome.code, outcome.message, outcome.details);
    return outcome.answer;
  } finally {
    if (signal.aborted || idle.length >= MAX_IDLE) running.worker.terminate();
    else idle.push(running);
  }
}

/** A calculation as a query: the same request is computed once; leaving the page stops it. */
export function calculation<N extends Name>(name: N, request: Request<N> | null) {
  return queryOptions({
    queryKey: ['calculation', name, request],
    queryFn: ({ signal }) => {
      if (request === null) throw new Error('A calculation was asked for without its request.');
      return compute(name, request, signal);
    },
    enabled: request !== null,
    staleTime: Infinity,
    gcTime: 5 * 60_000,
    retry: false,
  });
}
