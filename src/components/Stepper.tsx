import { useId, type KeyboardEvent } from 'react';
import { formatNumber } from '@/lib/format';
import { classes } from '@/lib/classes';
import { DialScale, type DialRange } from './DialScale';
import { digitsOf, nudged, offsetOf } from './stepValue';

const SIZES = {
  target: { box: 'h-11', button: 'w-10 text-5', figure: 'text-6' },
  bench: { box: 'h-24', button: 'w-24 text-7', figure: 'text-8' },
} as const;

interface StepperProps {
  readonly label: string;
  readonly unit?: string;
  readonly value: number;
  readonly range: DialRange;
  readonly onStepped: (value: number) => void;
  readonly size?: keyof typeof SIZES;
  readonly isDisabled?: boolean;
}

/**
 * A set-point, one settable step at a time, over its dial scale. The figure takes the keys of a spin
 * button: arrows one step, Page keys five, Home and End the ends of what may be set.
 */
export function Stepper({
  label,
  unit = '',
  value,
  range,
  onStepped,
  size = 'target',
  isDisabled = false,
}: StepperProps) {
  const id = useId();
  const digits = digitsOf(range.step);
  const figure = formatNumber(value, digits);
  const step = (steps: number) => {
    const next = nudged(value, steps, range);
    if (!isDisabled && next !== value) onStepped(next);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const steps = offsetOf(event.key);
    if (steps === null) return;
    event.preventDefault();
    step(steps);
  };
  const buttonOf = (steps: 1 | -1) => (
    <button
      type="button"
      aria-label={`${label} one step ${steps > 0 ? 'up' : 'down'}`}
      disabled={isDisabled || nudged(value, steps, range) === value}
      onClick={() => step(steps)}
      className={classes(
        'flex-none text-ink-2 hover:bg-sunk disabled:text-line-strong',
        SIZES[size].button,
      )}
    >
      {steps > 0 ? '+' : '−'}
    </button>
  );
  return (
    <div
      role="group"
      aria-labelledby={id}
      className="grid grid-cols-2 items-center gap-x-3 gap-y-2 md:grid-cols-setting"
    >
      <div>
        <div id={id}>{label}</div>
        <div className="text-1 text-ink-3">step {formatNumber(range.step)}</div>
      </div>
      <div
        className={classes('flex rounded border border-line-strong bg-surface', SIZES[size].box)}
      >
        {buttonOf(-1)}
        <div
          role="spinbutton"
          tabIndex={isDisabled ? -1 : 0}
          aria-label={label}
          aria-valuenow={value}
          aria-valuemin={range.allowedLow ?? range.min}
          aria-valuemax={range.allowedHigh ?? range.max}
          aria-valuetext={`${figure} ${unit}`.trim()}
          onKeyDown={onKeyDown}
          className={classes(
            'flex flex-1 items-baseline justify-center gap-1 self-stretch border-x border-line font-mono leading-none',
            SIZES[size].figure,
          )}
        >
          <span className="self-center">{figure}</span>
          {unit && <span className="self-center text-2 text-ink-3">{unit}</span>}
        </div>
        {buttonOf(1)}
      </div>
      <div className="col-span-2 md:col-span-1">
        <DialScale range={range} value={value} />
      </div>
    </div>
  );
}
