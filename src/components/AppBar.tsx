import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { Crumbs, type Crumb } from './Crumbs';
import { Wordmark } from './Wordmark';

interface AppBarProps {
  readonly home: string;
  readonly crumbs: readonly Crumb[];
  /** The practice tag, when all of this page is practice. */
  readonly tag?: ReactNode;
  readonly lab?: string;
  /** Theme switch and person menu. */
  readonly children?: ReactNode;
}

/** Where I am, whose lab this is, and who I am. There is no navigation at the side. */
export function AppBar({ home, crumbs, tag, lab, children }: AppBarProps) {
  return (
    <header className="flex h-11 items-center gap-3 border-b border-line bg-paper px-4 sm:gap-5 sm:px-6 lg:px-8">
      <Link to={home} className="flex-none">
        <Wordmark />
      </Link>
      <Crumbs crumbs={crumbs} />
      <div className="flex-1" />
      {tag && <div className="hidden md:block">{tag}</div>}
      {lab && <span className="hidden text-2 whitespace-nowrap text-ink-2 md:inline">{lab}</span>}
      {children}
    </header>
  );
}
