import type { ReactNode } from 'react';
import { StageLine, type StageStop } from './StageLine';

interface PageHeaderProps {
  readonly title: ReactNode;
  /** One line: code, feed, rig. */
  readonly facts?: ReactNode;
  readonly stages?: readonly StageStop[];
  /** The one primary button of the page. */
  readonly action?: ReactNode;
}

/** Stands first inside main. What this page is about, how far the study has come, and the next action. */
export function PageHeader({ title, facts, stages, action }: PageHeaderProps) {
  return (
    <div className="border-b border-line bg-paper px-4 py-3 sm:px-6 lg:px-8">
      <div className="grid min-h-12 items-center gap-x-8 gap-y-3 sm:grid-cols-main-action lg:grid-cols-page-header">
        <div className="min-w-0 sm:col-start-1 sm:row-start-1">
          <h1 className="text-5 font-mark">{title}</h1>
          {facts && <p className="text-2 text-balance text-ink-3 lg:truncate">{facts}</p>}
        </div>
        {stages && (
          <div className="min-w-0 sm:col-span-2 sm:row-start-2 lg:col-span-1 lg:col-start-2 lg:row-start-1">
            <StageLine stages={stages} />
          </div>
        )}
        {action && (
          <div className="grid sm:col-start-2 sm:row-start-1 sm:block lg:col-start-3">{action}</div>
        )}
      </div>
    </div>
  );
}
