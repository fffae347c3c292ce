import { Slot } from 'radix-ui';
import type { ComponentProps } from 'react';
import { classes } from '@/lib/classes';

const VARIANTS = {
  primary:
    'border border-accent bg-accent text-on-accent hover:border-accent-deep hover:bg-accent-deep ' +
    'disabled:border-dashed disabled:bg-transparent disabled:text-accent ' +
    'aria-disabled:border-dashed aria-disabled:bg-transparent aria-disabled:text-accent',
  secondary:
    'border border-line-strong bg-surface hover:bg-sunk ' +
    'disabled:border-dashed disabled:bg-transparent disabled:text-ink-3',
  stop:
    'border border-stop bg-surface text-stop hover:bg-stop-wash ' +
    'disabled:border-dashed disabled:bg-transparent',
  quiet: 'underlined text-ink-2 hover:text-ink disabled:no-underline disabled:text-ink-3',
} as const;

const SIZES = {
  small: 'h-11 px-3 text-2 sm:h-7',
  target: 'h-11 px-4 text-3 sm:h-9',
  bench: 'h-16 px-6 text-4',
  benchPrimary: 'h-24 w-full px-6 text-5',
} as const;

/** A quiet button stands in a line of text: no box, but its target on a phone. */
const QUIET_SIZES = {
  small: 'text-2',
  target: 'min-h-9 px-1 text-3',
  bench: 'h-16 px-4 text-4',
  benchPrimary: 'h-24 px-6 text-5',
} as const;

interface ButtonProps extends ComponentProps<'button'> {
  readonly variant?: keyof typeof VARIANTS;
  readonly size?: keyof typeof SIZES;
  /** Gives the look to its only child instead, a link for instance. */
  readonly asChild?: boolean;
}

/** One primary a screen: the next thing to do. What cannot be pressed yet says on its face why. */
export function Button({
  variant = 'secondary',
  size = 'target',
  asChild = false,
  className,
  ...rest
}: ButtonProps) {
  const Element = asChild ? Slot.Root : 'button';
  return (
    <Element
      {...(asChild ? {} : { type: 'button' })}
      {...rest}
      className={classes(
        'inline-flex items-center justify-center gap-2 rounded font-mark whitespace-nowrap',
        'transition-colors disabled:cursor-not-allowed aria-disabled:cursor-not-allowed',
        variant === 'quiet' ? QUIET_SIZES[size] : SIZES[size],
        VARIANTS[variant],
        className,
      )}
    />
  );
}
