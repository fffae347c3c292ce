import type { ReactNode } from 'react';
import { classes } from '@/lib/classes';
import { formatInterval, formatNumber } from '@/lib/format';
import type { Interval } from './IntervalBar';

const SIZES = { table: 'text-4', panel: 'text-5' } as const;

interface NumberWithIntervalProps {
  readonly value: number | null;
  readonly unit?: string;
  readonly digits?: number;
  readonly interval?: Interval | null;
  /** Stands where the interval would: “computed” for what is exact. */
  readonly instead?: string;
  readonly mark?: ReactNode;
  readonly size?: keyof typeof SIZES;
}

/** No prediction stands alone: the figure, whispering unit, and “80.1 to 89.0” below. */
export function NumberWithInterval({
  value,
  unit = '',
  digits,
  interval,
  instead,
  mark,
  size = 'panel',
}: NumberWithIntervalProps) {
  return (
    <span className="inline-block whitespace-nowrap">
      <span className={classes('font-mark', SIZES[size])}>
        {formatNumber(value, digits)}
        {unit && value !== null && (
          <span className="text-3 font-body text-ink-3">&#x202F;{unit}</span>
        )}
        {mark && <span className="ml-1 inline-block align-middle">{mark}</span>}
      </span>
      <span className="block text-2 text-ink-3">
        {interval ? formatInterval(interval.low, interval.high, digits) : instead}
      </span>
    </span>
  );
}
