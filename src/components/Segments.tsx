import { useId } from 'react';
import type { Option } from './SelectField';

interface SegmentsProps<Value extends string> {
  /** What is chosen here, for readers. */
  readonly label: string;
  readonly options: readonly Option<Value>[];
  readonly value: Value;
  readonly onPicked: (value: Value) => void;
}

/** A switch between two to five views of one thing. Radios underneath: arrows move, one is always on. */
export function Segments<Value extends string>({
  label,
  options,
  value,
  onPicked,
}: SegmentsProps<Value>) {
  const name = useId();
  return (
    <div
      role="radiogroup"
      aria-label={label}
      className="inline-flex rounded border border-line-strong bg-surface"
    >
      {options.map((option) => (
        <label
          key={option.value}
          className="relative grid h-9 cursor-pointer place-items-center border-l border-line px-3 text-2 whitespace-nowrap first:border-l-0 has-checked:bg-ink has-checked:font-mark has-checked:text-surface has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-focus has-disabled:cursor-not-allowed has-disabled:text-ink-3 sm:h-7"
        >
          <input
            type="radio"
            name={name}
            value={option.value}
            checked={option.value === value}
            disabled={option.isDisabled}
            onChange={() => onPicked(option.value)}
            className="absolute inset-0 cursor-pointer appearance-none outline-0"
          />
          {option.label}
        </label>
      ))}
    </div>
  );
}
