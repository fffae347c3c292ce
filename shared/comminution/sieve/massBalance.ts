import { differenceOf } from '../decimal';

export interface BalanceLimits {
  /** Per cent; a loss or a gain above it is told. */
  readonly warn: number;
  /** Per cent; a loss or a gain above it asks for a repeat. */
  readonly repeat: number;
}

export interface Balance {
  readonly lossG: number;
  readonly lossPercent: number;
  readonly verdict: 'holds' | 'warn' | 'repeat';
}

/** Exactly the limit still holds (“more than 0.3 %” fails): room for the rounding of a division. */
const SLACK = 1e-9;

/**
 * What was lost between two weighings, and what that means. A gain counts like a loss: it is damp, tare
 * or a wrong row.
 *
 * @param beforeG g, above 0. @param afterG g.
 * @see ASTM C136/C136M §8.7 (0.3 % for acceptance); EN 933-1 (1 %).
 */
export function massBalance(beforeG: number, afterG: number, limits: BalanceLimits): Balance {
  const lossG = differenceOf(beforeG, afterG);
  const lossPercent = (100 * lossG) / beforeG;
  const exceeds = (limit: number) => Math.abs(lossPercent) > limit * (1 + SLACK);
  const verdict = exceeds(limits.repeat) ? 'repeat' : exceeds(limits.warn) ? 'warn' : 'holds';
  return { lossG, lossPercent, verdict };
}
