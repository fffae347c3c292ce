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

export const because = (ctx: Context, why: string | undefined): Context =>
  why ? { ...ctx, why } : ctx;
