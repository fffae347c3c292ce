import { useId, type ComponentProps } from 'react';
import { classes } from '@/lib/classes';
import { fieldAria, FieldFrame, inputBorder, type FieldTexts } from './FieldFrame';

export interface Option<Value extends string = string> {
  readonly value: Value;
  readonly label: string;
  readonly isDisabled?: boolean;
}

interface SelectFieldProps extends ComponentProps<'select'>, FieldTexts {
  readonly options: readonly Option[];
  /** The first, empty choice; without it the first option is taken. */
  readonly placeholder?: string;
}

/** A choice from a list too long for RadioCards. The platform's own list, so it works with gloves and readers. */
export function SelectField({
  label,
  hint,
  error,
  caution,
  options,
  placeholder,
  className,
  ...input
}: SelectFieldProps) {
  const ownId = useId();
  const id = input.id ?? ownId;
  const texts = { label, hint, error, caution };
  return (
    <FieldFrame id={id} {...texts} className={className}>
      <div className="relative grid">
        <select
          {...input}
          {...fieldAria(id, texts)}
          className={classes(
            'h-11 min-w-0 appearance-none rounded bg-surface pr-9 pl-3 disabled:text-ink-3 sm:h-9',
            inputBorder(error, caution),
          )}
        >
          {placeholder !== undefined && <option value="">{placeholder}</option>}
          {options.map(({ value, label: text, isDisabled }) => (
            <option key={value} value={value} disabled={isDisabled}>
              {text}
            </option>
          ))}
        </select>
        <svg
          viewBox="0 0 12 12"
          aria-hidden="true"
          className="pointer-events-none absolute right-3 size-3 self-center fill-none stroke-ink-2"
        >
          <path d="M2 4L6 8.5L10 4" strokeWidth={1.4} />
        </svg>
      </div>
    </FieldFrame>
  );
}
