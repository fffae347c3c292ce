import { useId, type ReactNode } from 'react';
import { classes } from '@/lib/classes';

interface PanelProps {
  readonly name: ReactNode;
  /** One quiet fact beside the name. */
  readonly fact?: ReactNode;
  /** At most one group of controls. */
  readonly control?: ReactNode;
  /** At most one underlined link. */
  readonly link?: ReactNode;
  readonly children?: ReactNode;
  /** Its content reaches the edges: tables, notices, charts with their own inset. */
  readonly isFlush?: boolean;
  readonly className?: string;
}

/** A part of a page with a name. Panels do not nest. */
export function Panel({
  name,
  fact,
  control,
  link,
  children,
  isFlush = false,
  className,
}: PanelProps) {
  const id = useId();
  return (
    <section
      aria-labelledby={id}
      className={classes('min-w-0 rounded border border-line bg-surface', className)}
    >
      <header className="flex min-h-10 flex-wrap items-center gap-x-3 gap-y-2 border-b border-line px-4 py-1">
        <h2 id={id} className="font-head whitespace-nowrap">
          {name}
        </h2>
        {control}
        {fact && <div className="min-w-0 text-2 text-ink-3">{fact}</div>}
        {link && <div className="ml-auto text-2">{link}</div>}
      </header>
      <div className={isFlush ? undefined : 'p-4'}>{children}</div>
    </section>
  );
}
