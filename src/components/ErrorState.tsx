import type { ReactNode } from 'react';
import { Button } from './Button';
import { Notice } from './Notice';

interface ErrorStateProps {
  /** What did not work: “Run 16 was not saved.” */
  readonly claim: string;
  /** Why, what is kept, and what to do. */
  readonly children?: ReactNode;
  readonly onRetry?: (() => void) | undefined;
}

/** In place of what failed, or beside its button. Nothing that was typed is lost. */
export function ErrorState({ claim, children, onRetry }: ErrorStateProps) {
  return (
    <Notice
      tone="stop"
      isLive
      claim={claim}
      action={
        onRetry && (
          <Button size="small" onClick={onRetry}>
            Try again
          </Button>
        )
      }
    >
      {children}
    </Notice>
  );
}
