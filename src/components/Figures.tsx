import type { ReactNode } from 'react';
import { classes } from '@/lib/classes';

export interface FigureItem {
  readonly label: string;
  readonly value: ReactNode;
  readonly unit?: string;
  readonly note?: ReactNode;
}

const SIZES = { panel: 'text-5', large: 'text-6' } as const;

interface FiguresProps {
  readonly items: readonly FigureItem[];
  readonly size?: keyof typeof SIZES;
  /** Measured values and set-points are set in mono. */
  readonly isMono?: boolean;
}

/** A row of figures with their names above: what something costs, what came out. The unit whispers. */
export function Figures({ items, size = 'panel', isMono = false }: FiguresProps) {
  return (
    <dl className="flex flex-wrap gap-x-8 gap-y-3">
      {items.map(({ label, value, unit, note }) => (
        <div key={label}>
          <dt className="text-1 text-ink-3">{label}</dt>
          <dd className={classes('whitespace-nowrap', SIZES[size], isMono && 'font-mono')}>
            {value}
            {unit && <span className="font-sans text-3 text-ink-3">&#x202F;{unit}</span>}
            {note && <span className="font-sans text-3 text-ink-3">{note}</span>}
          </dd>
        </div>
      ))}
    </dl>
  );
}
