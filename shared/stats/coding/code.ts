import type { NumericFactor } from './factor';

/** Centre and half-range on the analysed axis: u itself, or ln u for a log factor. */
function axis(factor: NumericFactor): { mid: number; half: number } {
  const log = factor.scale === 'log';
  const low = log ? Math.log(factor.low) : factor.low;
  const high = log ? Math.log(factor.high) : factor.high;
  return { mid: (low + high) / 2, half: (high - low) / 2 };
}

/**
 * Coded value of a setting: −1 at `low`, +1 at `high`, linear in u, or in ln u for `scale: 'log'`.
 *
 * @param value setting in the factor's unit; above 0 for a log factor.
 * @returns dimensionless coded value; beyond ±1 outside `low`…`high`.
 * @see Myers, Montgomery & Anderson-Cook (2016), Response Surface Methodology, 4th ed., §2.2.
 */
export function toCoded(factor: NumericFactor, value: number): number {
  const { mid, half } = axis(factor);
  return ((factor.scale === 'log' ? Math.log(value) : value) - mid) / half;
}

/** The setting, in the factor's unit, at a coded value. Inverse of `toCoded`. */
export function fromCoded(factor: NumericFactor, coded: number): number {
  const { mid, half } = axis(factor);
  const value = mid + coded * half;
  return factor.scale === 'log' ? Math.exp(value) : value;
}
