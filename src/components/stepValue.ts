import type { DialRange } from './DialScale';

/** How many decimals a step has: 0.5 → 1. */
export function digitsOf(step: number): number {
  return String(step).split('.')[1]?.length ?? 0;
}

/**
 * The value so many settable steps on, kept inside what the range allows. A value between two steps
 * goes to the next one in the direction asked for.
 */
export function nudged(value: number, steps: number, range: DialRange): number {
  const { min, max, step, allowedLow = min, allowedHigh = max } = range;
  const position = (value - min) / step;
  const nearest = Math.round(position);
  const isOnStep = Math.abs(position - nearest) < 1e-6;
  const from = isOnStep ? nearest : steps > 0 ? Math.floor(position) : Math.ceil(position);
  const lowest = Math.ceil((allowedLow - min) / step - 1e-6);
  const highest = Math.floor((allowedHigh - min) / step + 1e-6);
  const index = Math.max(lowest, Math.min(highest, from + steps));
  // the sum min + index·step carries binary noise that no dial shows
  return Number((min + index * step).toFixed(Math.max(digitsOf(step), digitsOf(min)) + 2));
}

const OFFSETS: Readonly<Record<string, number>> = {
  ArrowUp: 1,
  ArrowRight: 1,
  ArrowDown: -1,
  ArrowLeft: -1,
  PageUp: 5,
  PageDown: -5,
  Home: -Infinity,
  End: Infinity,
};

/** The steps that a key of a spin button asks for, or null for another key. */
export function offsetOf(key: string): number | null {
  return OFFSETS[key] ?? null;
}
