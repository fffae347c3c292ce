import { useId, type ComponentProps, type ReactNode } from 'react';
import { classes } from '@/lib/classes';
import { fieldAria, fieldIds, messageOf, type FieldMessage } from './FieldFrame';

const SIZES = {
  target: { row: 'grid-cols-mark min-h-9 gap-2 text-3', box: 'size-4.5' },
  bench: {
    row: 'grid-cols-mark-bench min-h-16 gap-3 border border-line bg-surface px-4 py-2 text-4',
    box: 'size-7',
  },
} as const;

interface CheckboxProps extends Omit<ComponentProps<'input'>, 'size' | 'type'> {
  readonly label: ReactNode;
  readonly note?: ReactNode;
  readonly error?: FieldMessage;
  readonly size?: keyof typeof SIZES;
}

/** A yes or no. At the bench the whole row is the target. */
export function Checkbox({
  label,
  note,
  error,
  size = 'target',
  className,
  ...input
}: CheckboxProps) {
  const ownId = useId();
  const id = input.id ?? ownId;
  return (
    <div className={className}>
      <label
        htmlFor={id}
        className={classes(
          'grid cursor-pointer items-center has-disabled:cursor-not-allowed has-disabled:text-ink-3',
          SIZES[size].row,
        )}
      >
        <span className={classes('relative grid', SIZES[size].box)}>
          <input
            {...input}
            {...fieldAria(id, { hint: note, error })}
            type="checkbox"
            className="peer col-start-1 row-start-1 size-full appearance-none border-2 border-line-strong bg-surface checked:border-ink checked:bg-ink aria-invalid:border-stop"
          />
          <svg
            viewBox="0 0 18 18"
            aria-hidden="true"
            className="pointer-events-none invisible col-start-1 row-start-1 size-full fill-none stroke-surface p-0.5 peer-checked:visible"
          >
            <path d="M3 9.5L7.5 14L15.5 4" strokeWidth={2.6} />
          </svg>
        </span>
        <span>
          {label}
          {note && (
            <span id={fieldIds(id).hint} className="block text-2 text-ink-3">
              {note}
            </span>
          )}
        </span>
      </label>
      {messageOf(error) && (
        <p id={fieldIds(id).error} className="text-1 text-stop">
          {messageOf(error)}
        </p>
      )}
    </div>
  );
}
