import { toCoded } from './code';
import { envelopeOf, type NumericFactor } from './factor';

/** Steps are decimal on a dial (0.1 Hz): rounding to 12 digits removes the binary dust of min + i·step. */
const DIGITS = 12;
/** A limit counts as on a step when it misses it by less than this share of the step. */
const ON_STEP = 1e-9;

const clean = (value: number): number => Number(value.toPrecision(DIGITS));

/** How many settable values lie in the hard envelope; Infinity without a step. */
export function settableCount(factor: NumericFactor): number {
  if (factor.step === undefined) return Infinity;
  const { min, max } = envelopeOf(factor);
  return Math.floor((max - min) / factor.step + ON_STEP) + 1;
}

/** Settable value number i (0 = min), in the factor's unit. */
export function settableValue(factor: NumericFactor, i: number): number {
  return clean(envelopeOf(factor).min + i * (factor.step ?? 0));
}

/**
 * The settable values between two limits (default: the hard envelope), ascending, in the factor's unit.
 * A factor without a step has none to list: the result is empty.
 */
export function settableValues(factor: NumericFactor, from = -Infinity, to = Infinity): number[] {
  const count = settableCount(factor);
  if (!Number.isFinite(count)) return [];
  const slack = ON_STEP * (factor.step ?? 0);
  const values: number[] = [];
  for (let i = 0; i < count; i++) {
    const value = settableValue(factor, i);
    if (value >= from - slack && value <= to + slack) values.push(value);
  }
  return values;
}

/**
 * The settable value nearest in coded units; a tie goes towards the centre of the range. The hard
 * envelope is not enforced: a design outside it must be refused with its points named, not clipped.
 *
 * @param value wished setting in the factor's unit.
 * @returns a settable setting in the factor's unit; `value` itself for a factor without a step.
 */
export function snap(factor: NumericFactor, value: number): number {
  if (factor.step === undefined) return value;
  const { min } = envelopeOf(factor);
  const index = (value - min) / factor.step;
  const below = clean(min + Math.floor(index + ON_STEP) * factor.step);
  const above = clean(min + Math.ceil(index - ON_STEP) * factor.step);
  if (below === above || (factor.scale === 'log' && below <= 0)) return above;
  const coded = toCoded(factor, value);
  const down = coded - toCoded(factor, below);
  const up = toCoded(factor, above) - coded;
  if (Math.abs(down - up) <= 1e-9) return coded > 0 ? below : above;
  return down < up ? below : above;
}

/** Whether a value can be dialled in: inside the hard envelope and on a step. */
export function isSettable(factor: NumericFactor, value: number): boolean {
  const { min, max } = envelopeOf(factor);
  const slack = 1e-9 * Math.max(1, Math.abs(max));
  if (value < min - slack || value > max + slack) return false;
  return Math.abs(snap(factor, value) - value) <= slack;
}
