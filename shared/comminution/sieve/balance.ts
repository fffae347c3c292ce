export interface Balance {
  readonly lossG: number;
  readonly lossPercent: number;
  readonly verdict: 'holds' | 'warn' | 'repeat';
}

/** Masses are read to 0.01 g or so: a limit met to the last digit holds. */
const SLACK_PERCENT = 1e-9;

/**
 * A mass balance: what went in against what came out. A gain counts like a loss: damp product, a tare, a
 * wrong row.
 *
 * @param inG, outG masses in g, `inG` above 0.
 * @param warn, repeat limits in percent of `inG`.
 */
export function balanceOf(
  inG: number,
  outG: number,
  limits: { readonly warn: number; readonly repeat: number },
): Balance {
  const lossG = inG - outG;
  const lossPercent = (100 * lossG) / inG;
  const size = Math.abs(lossPercent) - SLACK_PERCENT;
  const verdict = size > limits.repeat ? 'repeat' : size > limits.warn ? 'warn' : 'holds';
  return { lossG, lossPercent, verdict };
}
