import type { ReactNode } from 'react';
import { classes } from '@/lib/classes';

export interface SignatureCell {
  readonly label: string;
  readonly value: ReactNode;
  /** The moment, below a name. */
  readonly note?: ReactNode;
  /** Nothing signed here yet: set in italics. */
  readonly isWaiting?: boolean;
  /** Seals and set-points. */
  readonly isMono?: boolean;
  readonly isWide?: boolean;
}

interface SignatureBlockProps {
  readonly name: string;
  readonly cells: readonly SignatureCell[];
}

/** An engineer's title block: who fitted, checked, confirmed and released, under which rule and seal. */
export function SignatureBlock({ name, cells }: SignatureBlockProps) {
  return (
    <section aria-label={name} className="border-frame border-ink bg-surface">
      <dl className="-mt-px -ml-px grid grid-cols-2 overflow-hidden sm:grid-cols-3 lg:grid-cols-5">
        {cells.map(({ label, value, note, isWaiting, isMono, isWide }) => (
          <div
            key={label}
            className={classes(
              'min-w-0 border-t border-l border-ink px-3 pt-1.5 pb-2 text-2',
              isWide && 'col-span-2',
            )}
          >
            <dt className="text-label text-ink-3">{label}</dt>
            <dd
              className={classes(
                isWaiting ? 'text-ink-3 italic' : 'font-mark',
                isMono && 'font-mono text-1',
              )}
            >
              {value}
              {note && <span className="block text-1 font-body text-ink-3">{note}</span>}
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
