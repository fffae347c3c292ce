import { DropdownMenu } from 'radix-ui';
import type { UserJson } from '@shared/schemas/account';
import { Link, useLocation, useNavigate } from 'react-router-dom';
import { Wordmark } from '@/components/Wordmark';
import { chooseTheme, currentTheme } from '@/lib/theme';
import { useSignOut } from '@/queries/session';

interface Crumb {
  readonly name: string;
  readonly to: string;
}

const NAMES: Readonly<Record<string, string>> = {
  studies: 'Studies',
  samples: 'Samples',
  lab: 'Lab',
  new: 'New',
  brief: 'Brief',
  matrix: 'Matrix',
  bench: 'Bench',
  fit: 'Fit',
  map: 'Map',
  release: 'Release',
  history: 'Trail',
  'my-samples': 'My samples',
};

/** From the address: numbers are left to the page’s own heading. */
function crumbsOf(pathname: string): Crumb[] {
  const parts = pathname.split('/').filter(Boolean);
  return parts.flatMap((part, i): Crumb[] => {
    const to = part === 'studies' && i === 0 ? '/' : `/${parts.slice(0, i + 1).join('/')}`;
    if (/^\d+$/.test(part))
      return parts[i - 1] === 'bench'
        ? []
        : [{ name: parts[i - 1] === 'studies' ? 'Study' : 'Sample', to }];
    const name = NAMES[part];
    return name ? [{ name, to }] : [];
  });
}

const initials = (name: string) =>
  name
    .split(/\s+/)
    .map((word) => word[0] ?? '')
    .join('')
    .slice(0, 2)
    .toUpperCase();

function PersonMenu({ user }: { readonly user: UserJson }) {
  const signOut = useSignOut();
  const navigate = useNavigate();
  const leave = (everywhere: boolean) => {
    signOut.mutate(everywhere, { onSettled: () => void navigate('/sign-in') });
  };
  const other = currentTheme() === 'dark' ? 'light' : 'dark';
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger
        className="person-mark"
        aria-label={`${initials(user.name)}: signed in as ${user.name}`}
      >
        {initials(user.name)}
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content className="menu" align="end" sideOffset={6}>
          <div className="px-4 py-2">
            <b>{user.name}</b>
            <div className="text-2 text-ink-3">{user.roles.join(', ')}</div>
          </div>
          <DropdownMenu.Item onSelect={() => chooseTheme(other)}>
            {other === 'dark' ? 'Dark, for the bench' : 'Light, for the desk'}
          </DropdownMenu.Item>
          <DropdownMenu.Item onSelect={() => leave(false)}>Sign out</DropdownMenu.Item>
          <DropdownMenu.Item onSelect={() => leave(true)}>Sign out everywhere</DropdownMenu.Item>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}

interface AppBarProps {
  readonly user: UserJson;
}

/** Wordmark, where you are, the lab, the person. No navigation at the side. */
export function AppBar({ user }: AppBarProps) {
  const { pathname } = useLocation();
  const crumbs = crumbsOf(pathname);
  const isStaff = !user.roles.includes('customer');
  return (
    <header className="bar">
      <Link to="/" aria-label="Cragline, to the start">
        <Wordmark />
      </Link>
      <nav aria-label="Where you are" className="min-w-0">
        <ol className="crumbs">
          {crumbs.map(({ name, to }, i) => (
            <li key={to} className="flex gap-2">
              {i > 0 && <span aria-hidden="true">/</span>}
              <Link to={to} aria-current={i === crumbs.length - 1 ? 'page' : undefined}>
                {name}
              </Link>
            </li>
          ))}
        </ol>
      </nav>
      <span className="flex-1" />
      {isStaff && (
        <nav aria-label="Places" className="flex gap-4 text-2">
          <Link className="link" to="/">
            Studies
          </Link>
          <Link className="link" to="/samples">
            Samples
          </Link>
          <Link className="link wide-only" to="/lab">
            Lab
          </Link>
        </nav>
      )}
      <span className="wide-only text-ink-2 text-2 whitespace-nowrap">{user.lab.name}</span>
      <PersonMenu user={user} />
    </header>
  );
}
