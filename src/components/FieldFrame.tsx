import type { ReactNode } from 'react';
import { classes } from '@/lib/classes';

/** A sentence, or react-hook-form's error that carries one. */
export type FieldMessage = string | { readonly message?: string | undefined } | null | undefined;

export interface FieldTexts {
  readonly label: ReactNode;
  readonly hint?: ReactNode;
  /** What is wrong, where, and what to do; the typed text stays. */
  readonly error?: FieldMessage;
  /** Worth a second look; saving is allowed. */
  readonly caution?: FieldMessage;
}

export const messageOf = (message: FieldMessage): string | undefined =>
  (typeof message === 'string' ? message : message?.message) || undefined;

export const fieldIds = (id: string) => ({
  hint: `${id}-hint`,
  error: `${id}-error`,
  caution: `${id}-caution`,
});

/** The ARIA links of an input inside a FieldFrame. */
export function fieldAria(id: string, { hint, error, caution }: Omit<FieldTexts, 'label'>) {
  const ids = fieldIds(id);
  const described = [
    messageOf(error) && ids.error,
    messageOf(caution) && ids.caution,
    hint && ids.hint,
  ].filter(Boolean);
  return {
    id,
    'aria-invalid': messageOf(error) ? (true as const) : undefined,
    'aria-describedby': described.length > 0 ? described.join(' ') : undefined,
  };
}

/** The border of an input says what its message says. */
export function inputBorder(error: FieldMessage, caution: FieldMessage): string {
  if (messageOf(error)) return 'border-2 border-stop';
  if (messageOf(caution)) return 'border-2 border-caution-mark';
  return 'border border-line-strong';
}

interface FieldFrameProps extends FieldTexts {
  readonly id: string;
  readonly children: ReactNode;
  readonly className?: string | undefined;
}

/** Label above, messages and hint below. Error and caution never replace the hint. */
export function FieldFrame(props: FieldFrameProps) {
  const { id, label, hint, error, caution, children, className } = props;
  const ids = fieldIds(id);
  return (
    <div className={classes('grid min-w-0 grid-cols-1 content-start gap-1', className)}>
      <label htmlFor={id} className="text-2 text-ink-2">
        {label}
      </label>
      {children}
      {messageOf(error) && (
        <p id={ids.error} className="text-1 text-stop">
          {messageOf(error)}
        </p>
      )}
      {messageOf(caution) && (
        <p id={ids.caution} className="text-1 text-caution">
          {messageOf(caution)}
        </p>
      )}
      {hint && (
        <p id={ids.hint} className="text-1 text-ink-3">
          {hint}
        </p>
      )}
    </div>
  );
}
