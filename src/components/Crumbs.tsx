import { Link } from 'react-router-dom';

export interface Crumb {
  readonly label: string;
  /** The last one, where I am, has none. */
  readonly to?: string;
}

/** The way here from the list of studies. On a phone the page's title says it. */
export function Crumbs({ crumbs }: { crumbs: readonly Crumb[] }) {
  return (
    <nav aria-label="Where you are" className="hidden min-w-0 sm:block">
      <ol className="flex gap-2 truncate whitespace-nowrap text-ink-3">
        {crumbs.map(({ label, to }, index) => (
          <li key={label} className="flex gap-2 truncate">
            {index > 0 && <span aria-hidden="true">/</span>}
            {to === undefined ? (
              <span aria-current="page" className="truncate font-mark text-ink">
                {label}
              </span>
            ) : (
              <Link to={to} className="hover:text-ink hover:underline">
                {label}
              </Link>
            )}
          </li>
        ))}
      </ol>
    </nav>
  );
}
