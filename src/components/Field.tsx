import { useId, type ComponentProps } from 'react';
import { classes } from '@/lib/classes';
import { fieldAria, FieldFrame, inputBorder, type FieldTexts } from './FieldFrame';

const SIZES = {
  target: 'h-11 text-3 sm:h-9',
  bench: 'h-16 text-5 font-mono',
} as const;

interface FieldProps extends Omit<ComponentProps<'input'>, 'size'>, FieldTexts {
  /** Stands in its own cell behind the figure. */
  readonly unit?: string | undefined;
  readonly size?: keyof typeof SIZES;
}

/** One input with its label, unit, hint and messages. Takes what react-hook-form's `register` returns. */
export function Field({
  label,
  unit,
  hint,
  error,
  caution,
  size = 'target',
  className,
  ...input
}: FieldProps) {
  const ownId = useId();
  const id = input.id ?? ownId;
  const texts = { label, hint, error, caution };
  return (
    <FieldFrame id={id} {...texts} className={className}>
      <div
        className={classes(
          'flex items-stretch rounded bg-surface',
          'focus-within:outline-2 focus-within:outline-offset-1 focus-within:outline-focus',
          inputBorder(error, caution),
          SIZES[size],
        )}
      >
        <input
          {...input}
          {...fieldAria(id, texts)}
          className="min-w-0 flex-1 bg-transparent px-3 outline-0 disabled:text-ink-3"
        />
        {unit && (
          <span className="grid place-items-center border-l border-line px-3 font-sans text-2 whitespace-nowrap text-ink-3">
            {unit}
          </span>
        )}
      </div>
    </FieldFrame>
  );
}
