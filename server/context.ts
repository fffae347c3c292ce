import { randomUUID } from 'node:crypto';
import type { Actor } from '@shared/policies/actor';
import type { Transaction } from 'sequelize';

/** A signed-in person, with the name to print on records. */
export interface SignedInActor extends Actor {
  readonly name: string;
  readonly sessionId: number;
}

/**
 * What every model call of one request carries: the transaction, who acts, and why when a reason was
 * asked for. It is the last argument of every service.
 */
export interface Context {
  readonly transaction: Transaction;
  readonly actor: SignedInActor;
  readonly requestId: string;
  readonly why?: string;
}

/** The application itself: it makes the first people of a lab, and is nobody. */
export const SYSTEM_ID = 0;

/** The context of what the application does by itself, like loading the demo lab. */
export function systemContext(labId: number, transaction: Transaction): Context {
  const actor = {
    id: SYSTEM_ID,
    labId,
    name: 'Cragline',
    roles: [],
    customerId: null,
    sessionId: 0,
  };
  return { transaction, actor, requestId: randomUUID() };
}

/** The context of a person outside a request. */
export function contextOfPerson(
  person: Pick<SignedInActor, 'id' | 'labId' | 'name' | 'roles' | 'customerId'>,
  transaction: Transaction,
): Context {
  const { id, labId, name, roles, customerId } = person;
  const actor = { id, labId, name, roles, customerId, sessionId: 0 };
  return { transaction, actor, requestId: randomUUID() };
}

export const because = (ctx: Context, why: string | undefined): Context =>
  why ? { ...ctx, why } : ctx;
