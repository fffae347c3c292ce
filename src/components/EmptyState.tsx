import type { ReactNode } from 'react';

interface StateProps {
  readonly title: string;
  readonly children?: ReactNode;
  /** The next thing to do from here. */
  readonly action?: ReactNode;
}

/** Nothing here yet: a dashed station, what is missing, the next action. */
export function EmptyState({ title, children, action }: StateProps) {
  return (
    <div className="grid justify-items-start gap-2 p-4">
      <svg width={120} height={40} aria-hidden="true">
        <path d="M0 32H120" strokeDasharray="4 4" className="stroke-line-strong" />
        <rect
          x={4}
          y={27.5}
          width={9}
          height={9}
          strokeWidth={1.5}
          className="fill-paper stroke-line-strong"
        />
      </svg>
      <h3 className="text-5">{title}</h3>
      {children && <div className="max-w-measure">{children}</div>}
      {action}
    </div>
  );
}

/** The line is broken here: who may, and a way back. */
export function ForbiddenState({ title, children, action }: StateProps) {
  return (
    <div className="grid justify-items-start gap-2 p-4">
      <svg width={120} height={40} aria-hidden="true">
        <path
          d="M0 32H46M74 32H120M46 18V40M74 18V40"
          strokeWidth={2}
          className="fill-none stroke-ink-2"
        />
      </svg>
      <h3 className="text-5">{title}</h3>
      {children && <div className="max-w-measure">{children}</div>}
      {action}
    </div>
  );
}
