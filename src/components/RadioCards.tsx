import { useId, type ReactNode } from 'react';
import { classes } from '@/lib/classes';
import { messageOf, type FieldMessage } from './FieldFrame';

export interface Card<Value extends string> {
  readonly value: Value;
  readonly label: ReactNode;
  readonly note?: ReactNode;
  /** Why it cannot be picked; given instead of the note. */
  readonly refusal?: string | undefined;
}

interface RadioCardsProps<Value extends string> {
  readonly legend: ReactNode;
  readonly options: readonly Card<Value>[];
  readonly value: Value | null;
  readonly onPicked: (value: Value) => void;
  readonly error?: FieldMessage;
  readonly isDisabled?: boolean;
}

/** Two to six choices that need a sentence each. The picked one is ink, never accent. Arrows move. */
export function RadioCards<Value extends string>({
  legend,
  options,
  value,
  onPicked,
  error,
  isDisabled = false,
}: RadioCardsProps<Value>) {
  const name = useId();
  return (
    <fieldset
      disabled={isDisabled}
      aria-describedby={messageOf(error) ? `${name}-error` : undefined}
    >
      <legend className="mb-1 text-2 text-ink-2">{legend}</legend>
      <div className="grid gap-2 sm:auto-cols-fr sm:grid-flow-col">
        {options.map((option) => (
          <label
            key={option.value}
            className={classes(
              'grid min-h-11 cursor-pointer grid-cols-mark content-start gap-x-2 rounded border border-line-strong bg-surface px-3 py-2',
              'focus-within:outline-2 focus-within:outline-offset-2 focus-within:outline-focus',
              'has-checked:border-ink has-checked:ring-1 has-checked:ring-ink has-disabled:cursor-not-allowed has-disabled:bg-sunk has-disabled:text-ink-3',
            )}
          >
            <input
              type="radio"
              name={name}
              value={option.value}
              checked={option.value === value}
              disabled={option.refusal !== undefined}
              onChange={() => onPicked(option.value)}
              className="mt-1 size-3 appearance-none border-frame border-line-strong bg-surface outline-0 checked:border-ink checked:bg-ink"
            />
            <span>
              <span className="block font-mark">{option.label}</span>
              {(option.refusal ?? option.note) && (
                <span className="block text-2 text-ink-3">{option.refusal ?? option.note}</span>
              )}
            </span>
          </label>
        ))}
      </div>
      {messageOf(error) && (
        <p id={`${name}-error`} className="mt-1 text-1 text-stop">
          {messageOf(error)}
        </p>
      )}
    </fieldset>
  );
}
