import { Dialog as Layer } from 'radix-ui';
import { useRef, type ReactNode } from 'react';
import { Button } from './Button';

interface DialogProps {
  readonly title: string;
  /** What will happen, in a sentence. */
  readonly description?: ReactNode;
  readonly isOpen: boolean;
  readonly onClosed: () => void;
  readonly children?: ReactNode;
  /** The answer; “Cancel” stands before it by itself. */
  readonly action: ReactNode;
}

/** A question that must be answered before going on. Esc and Cancel close it, and only it. */
export function Dialog(props: DialogProps) {
  const { title, description, isOpen, onClosed, children, action } = props;
  const opener = useRef<Element | null>(null);
  return (
    <Layer.Root open={isOpen} onOpenChange={(open) => !open && onClosed()}>
      <Layer.Portal>
        <Layer.Overlay className="fixed inset-0 z-40 bg-shade" />
        <Layer.Content
          onOpenAutoFocus={() => {
            opener.current = document.activeElement;
          }}
          onCloseAutoFocus={(event) => {
            // the layer knows no trigger of its own: the focus goes back to whatever opened it
            event.preventDefault();
            if (opener.current instanceof HTMLElement) opener.current.focus();
          }}
          {...(description ? {} : { 'aria-describedby': undefined })}
          className="fixed inset-x-4 top-16 z-50 mx-auto grid max-h-dialog max-w-140 gap-4 overflow-y-auto rounded bg-surface p-6 shadow-float"
        >
          <Layer.Title className="text-5 font-mark">{title}</Layer.Title>
          {description && (
            <Layer.Description className="text-4 text-ink-2">{description}</Layer.Description>
          )}
          {children}
          <div className="flex flex-wrap justify-end gap-2">
            <Layer.Close asChild>
              <Button>Cancel</Button>
            </Layer.Close>
            {action}
          </div>
        </Layer.Content>
      </Layer.Portal>
    </Layer.Root>
  );
}
