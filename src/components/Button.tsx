import type { ButtonHTMLAttributes, ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { classes } from '@/lib/classes';

const LOOK = { primary: 'go', secondary: '', quiet: 'quiet', stop: 'stop' } as const;

interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  /** `primary` is the one thing to do next: one a screen. */
  readonly look?: keyof typeof LOOK;
  readonly size?: 'desk' | 'bench';
  readonly isBusy?: boolean;
}

export function Button({
  look = 'secondary',
  size = 'desk',
  isBusy = false,
  className,
  children,
  ...rest
}: ButtonProps) {
  return (
    <button
      type="button"
      {...rest}
      disabled={rest.disabled === true || isBusy}
      aria-busy={isBusy}
      className={classes('btn', LOOK[look], size === 'bench' && 'bench', className)}
    >
      {isBusy ? 'Working …' : children}
    </button>
  );
}

interface LinkButtonProps {
  readonly to: string;
  readonly look?: keyof typeof LOOK;
  readonly size?: 'desk' | 'bench';
  readonly children: ReactNode;
}

/** A way to another page that looks like a button. */
export function LinkButton({ to, look = 'secondary', size = 'desk', children }: LinkButtonProps) {
  return (
    <Link to={to} className={classes('btn', LOOK[look], size === 'bench' && 'bench')}>
      {children}
    </Link>
  );
}
