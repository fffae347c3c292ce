import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';
import { classes } from '@/lib/classes';

export interface MenuItem {
  readonly key: string;
  readonly label: string;
  readonly note?: string;
  readonly onChosen: () => void;
  readonly isDisabled?: boolean;
  /** Takes something away: set in the stop colour, last and apart. */
  readonly isStop?: boolean;
}

interface MenuProps {
  /** One button; it gets the menu's ARIA. */
  readonly trigger: ReactNode;
  /** Stands above the items: whose menu this is. */
  readonly heading?: ReactNode;
  readonly items: readonly MenuItem[];
}

/** Actions that are not the next one. Not modal: the page behind stays as it is. */
export function Menu({ trigger, heading, items }: MenuProps) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger asChild>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="end"
          sideOffset={6}
          collisionPadding={8}
          className="z-50 min-w-48 rounded bg-surface py-1 shadow-float"
        >
          {heading && (
            <DropdownMenu.Label className="border-b border-line px-3 py-2 text-2 text-ink-3">
              {heading}
            </DropdownMenu.Label>
          )}
          {items.map(({ key, label, note, onChosen, isDisabled, isStop }) => (
            <DropdownMenu.Item
              key={key}
              disabled={isDisabled === true}
              onSelect={onChosen}
              className={classes(
                'grid min-h-11 cursor-pointer content-center px-3 py-1 outline-0 data-highlighted:bg-sunk sm:min-h-9',
                'data-disabled:cursor-not-allowed data-disabled:text-ink-3',
                isStop && 'border-t border-line text-stop',
              )}
            >
              {label}
              {note && <span className="text-1 text-ink-3">{note}</span>}
            </DropdownMenu.Item>
          ))}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
