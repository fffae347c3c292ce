import { useEffect, useState, type ReactNode } from 'react';
import { Button } from './Button';
import { Notice } from './Notice';

interface EmptyStateProps {
  readonly title: string;
  readonly children: ReactNode;
  readonly action?: ReactNode;
}

/** A dashed station: what is missing, and the next action. */
export function EmptyState({ title, children, action }: EmptyStateProps) {
  return (
    <div className="state">
      <h2 className="text-5">{title}</h2>
      <p className="reading">{children}</p>
      {action}
    </div>
  );
}

const QUIET_MS = 400;

interface LoadingStateProps {
  readonly what: string;
  readonly lines?: number;
  readonly onStop?: () => void;
}

/** Still bars in the page’s shape; nothing in the first 400 ms. */
export function LoadingState({ what, lines = 5, onStop }: LoadingStateProps) {
  const [isShown, setIsShown] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setIsShown(true), QUIET_MS);
    return () => clearTimeout(timer);
  }, []);
  if (!isShown) return <div role="status" aria-label={what} className="min-h-16" />;
  return (
    <div role="status" className="grid gap-3 max-w-form">
      <p className="text-ink-3 flex items-center gap-4">
        {what} {onStop && <Button onClick={onStop}>Stop</Button>}
      </p>
      {Array.from({ length: lines }, (_, i) => (
        <div key={i} className="still" style={{ width: `${95 - 13 * (i % 4)}%` }} />
      ))}
    </div>
  );
}

interface ErrorStateProps {
  readonly error: unknown;
  readonly onRetry?: () => void;
}

export function ErrorState({ error, onRetry }: ErrorStateProps) {
  return (
    <div className="grid gap-3 max-w-form justify-items-start">
      <Notice tone="stop" claim="This could not be shown.">
        {error instanceof Error ? error.message : 'Something went wrong.'}
      </Notice>
      {onRetry && <Button onClick={onRetry}>Try again</Button>}
    </div>
  );
}

interface ForbiddenStateProps {
  /** Who may, as the policy says it. */
  readonly why: string;
  readonly action?: ReactNode;
}

/** The broken line: who may, and a way back. */
export function ForbiddenState({ why, action }: ForbiddenStateProps) {
  return (
    <div className="state">
      <svg width="220" height="14" aria-hidden="true">
        <path d="M0 7H90M120 7H220" stroke="var(--line-strong)" strokeDasharray="4 4" />
        <path d="M96 2L104 12M106 2L114 12" stroke="var(--ink)" strokeWidth="1.6" />
      </svg>
      <h2 className="text-5">Not open to you</h2>
      <p className="reading">{why}</p>
      {action}
    </div>
  );
}
