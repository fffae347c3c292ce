import { useId, type ComponentProps } from 'react';
import { classes } from '@/lib/classes';
import { fieldAria, FieldFrame, inputBorder, type FieldTexts } from './FieldFrame';

type TextAreaProps = ComponentProps<'textarea'> & FieldTexts;

/** A few sentences: a question, a reason. */
export function TextArea({ label, hint, error, caution, className, ...input }: TextAreaProps) {
  const ownId = useId();
  const id = input.id ?? ownId;
  const texts = { label, hint, error, caution };
  return (
    <FieldFrame id={id} {...texts} className={className}>
      <textarea
        rows={3}
        {...input}
        {...fieldAria(id, texts)}
        className={classes(
          'min-w-0 rounded bg-surface px-3 py-2 disabled:text-ink-3',
          inputBorder(error, caution),
        )}
      />
    </FieldFrame>
  );
}
