import { Tooltip as Radix } from 'radix-ui';
import type { ReactNode } from 'react';

interface TooltipProps {
  /** One control, or text made focusable by the caller. */
  readonly children: ReactNode;
  readonly text: ReactNode;
}

/** A word of help on hover and focus. Nothing that must be read, nothing at the bench. */
export function Tooltip({ children, text }: TooltipProps) {
  return (
    <Radix.Provider delayDuration={400}>
      <Radix.Root>
        <Radix.Trigger asChild>{children}</Radix.Trigger>
        <Radix.Portal>
          <Radix.Content
            sideOffset={6}
            collisionPadding={8}
            className="z-50 max-w-80 rounded bg-surface px-3 py-2 text-2 shadow-float"
          >
            {text}
          </Radix.Content>
        </Radix.Portal>
      </Radix.Root>
    </Radix.Provider>
  );
}
