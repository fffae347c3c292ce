import type { ReactNode } from 'react';

interface SortButtonProps {
  readonly order: 'ascending' | 'descending' | null;
  readonly onPressed: () => void;
  readonly children: ReactNode;
}

/** A table head that sorts. The triangle shows the order in force; hollow means not sorted by this. */
export function SortButton({ order, onPressed, children }: SortButtonProps) {
  return (
    <button
      type="button"
      onClick={onPressed}
      className="inline-flex items-baseline gap-1 hover:text-ink"
    >
      <span>{children}</span>
      <svg
        viewBox="0 0 8 8"
        aria-hidden="true"
        className={order ? 'size-2 fill-ink stroke-ink' : 'size-2 fill-none stroke-line-strong'}
      >
        <path d={order === 'descending' ? 'M1 2H7L4 7Z' : 'M1 6H7L4 1Z'} />
      </svg>
    </button>
  );
}
