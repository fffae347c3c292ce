import type { ReactNode } from 'react';
import { classes } from '@/lib/classes';

type Tone = 'quiet' | 'caution' | 'stop';

function Mark({ tone }: { readonly tone: Tone }) {
  if (tone === 'caution')
    return (
      <svg width="18" height="18" viewBox="0 0 18 18" aria-hidden="true">
        <path d="M9 2L17 16H1Z" fill="var(--caution-mark)" stroke="var(--ink)" strokeWidth="1.2" />
        <path d="M9 7V11M9 12.6V14.2" stroke="var(--surface)" strokeWidth="1.6" />
      </svg>
    );
  if (tone === 'stop')
    return (
      <svg width="18" height="18" viewBox="0 0 18 18" aria-hidden="true">
        <path d="M6 1H12L17 6V12L12 17H6L1 12V6Z" fill="var(--stop)" />
        <path d="M5 9H13" stroke="var(--surface)" strokeWidth="2.2" />
      </svg>
    );
  return (
    <svg width="18" height="18" viewBox="0 0 18 18" aria-hidden="true">
      <rect
        x="2"
        y="2"
        width="14"
        height="14"
        fill="none"
        stroke="var(--ink-2)"
        strokeWidth="1.3"
      />
      <path d="M9 8V13M9 5V6.6" stroke="var(--ink-2)" strokeWidth="1.6" />
    </svg>
  );
}

interface NoticeProps {
  readonly tone?: Tone;
  /** The claim, in bold; the way out follows. */
  readonly claim?: string;
  readonly children?: ReactNode;
  readonly className?: string;
}

/** For what must be read: it stays until its cause is gone. */
export function Notice({ tone = 'quiet', claim, children, className }: NoticeProps) {
  return (
    <div
      className={classes('note', tone !== 'quiet' && tone, className)}
      role={tone === 'stop' ? 'alert' : 'status'}
    >
      <Mark tone={tone} />
      <div>
        {claim !== undefined && <b>{claim} </b>}
        {children}
      </div>
    </div>
  );
}
