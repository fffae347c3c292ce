import { useId, type ReactNode } from 'react';
import { classes } from '@/lib/classes';

interface PanelProps {
  readonly name: string;
  /** A quiet fact beside the name. */
  readonly fact?: ReactNode;
  /** At most one group of controls, at the right. */
  readonly control?: ReactNode;
  readonly children: ReactNode;
  /** Tables reach from edge to edge. */
  readonly isFlush?: boolean;
  readonly className?: string;
}

export function Panel({ name, fact, control, children, isFlush = false, className }: PanelProps) {
  const id = useId();
  return (
    <section className={classes('panel', className)} aria-labelledby={id}>
      <header>
        <h2 id={id}>{name}</h2>
        {fact !== undefined && <span className="fact">{fact}</span>}
        <span className="flex-1" />
        {control}
      </header>
      <div className={isFlush ? '' : 'body'}>{children}</div>
    </section>
  );
}
