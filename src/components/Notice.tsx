import type { ReactNode } from 'react';
import { classes } from '@/lib/classes';
import { NoticeIcon, type NoticeTone } from './NoticeIcon';

const TONES: Record<NoticeTone, string> = {
  quiet: 'border-line-strong bg-sunk',
  caution: 'border-caution-mark bg-caution-wash',
  voltage: 'border-caution-mark bg-caution-wash',
  stop: 'border-stop bg-stop-wash',
};

interface NoticeProps {
  readonly tone?: NoticeTone;
  /** What is so, in bold. */
  readonly claim?: ReactNode;
  /** Why, and the way out. */
  readonly children?: ReactNode;
  readonly action?: ReactNode;
  /** Read out when it appears: for the answer to something just done. */
  readonly isLive?: boolean;
  readonly className?: string;
}

/** For what must be read. It stays where it is until its cause is gone. */
export function Notice({
  tone = 'quiet',
  claim,
  children,
  action,
  isLive = false,
  className,
}: NoticeProps) {
  return (
    <div
      role={isLive ? 'alert' : 'note'}
      className={classes(
        'grid grid-cols-mark gap-2 border-l-3 px-4 py-3 text-2',
        TONES[tone],
        className,
      )}
    >
      <NoticeIcon tone={tone} />
      <div>
        {claim && <strong className="font-head">{claim} </strong>}
        {children}
        {action && <div className="mt-2 flex flex-wrap gap-2">{action}</div>}
      </div>
    </div>
  );
}
