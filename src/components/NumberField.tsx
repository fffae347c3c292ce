import { readNumber } from '@shared/text/readNumber';
import { useState } from 'react';
import { useController, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { formatPlain } from '@/lib/format';
import { Field, type FieldFrame } from './Field';

interface NumberFieldProps<Form extends FieldValues> extends Omit<FieldFrame, 'error'> {
  readonly control: Control<Form>;
  readonly name: FieldPath<Form>;
  readonly disabled?: boolean;
}

/**
 * A number as people type it: decimal comma or point, thin spaces, a unit behind it. What was read
 * otherwise than typed is said below; what cannot be read stays as it is, with a sentence.
 */
export function NumberField<Form extends FieldValues>({
  control,
  name,
  unit = '',
  hint,
  disabled = false,
  ...frame
}: NumberFieldProps<Form>) {
  const {
    field: { ref, name: fieldName, value, onChange: onValue, onBlur },
    fieldState,
  } = useController({ control, name });
  const [text, setText] = useState(() =>
    typeof value === 'number' && Number.isFinite(value)
      ? formatPlain(value).replace('\u2212', '-')
      : '',
  );
  const [hasLeft, setHasLeft] = useState(false);
  const reading = readNumber(text, unit);
  const onChange = (typed: string) => {
    setText(typed);
    const now = readNumber(typed, unit);
    onValue(now.kind === 'number' ? now.value : now.kind === 'empty' ? null : NaN);
  };
  const own = reading.kind === 'problem' && hasLeft ? reading.message : undefined;
  const error = own ?? fieldState.error?.message;
  const note = reading.kind === 'number' ? reading.note : null;
  return (
    <Field
      {...frame}
      unit={unit}
      hint={note ?? hint}
      error={error}
      inputMode="decimal"
      name={fieldName}
      ref={ref}
      value={text}
      disabled={disabled}
      onChange={(event) => onChange(event.target.value)}
      onBlur={() => {
        setHasLeft(true);
        onBlur();
      }}
    />
  );
}
