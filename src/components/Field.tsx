import {
  useId,
  type InputHTMLAttributes,
  type ReactNode,
  type Ref,
  type SelectHTMLAttributes,
  type TextareaHTMLAttributes,
} from 'react';
import { classes } from '@/lib/classes';

export interface FieldFrame {
  readonly label: string;
  readonly unit?: string | undefined;
  readonly hint?: ReactNode;
  readonly error?: string | undefined;
  /** A caution: saving stays allowed. */
  readonly caution?: string | undefined;
  readonly size?: 'desk' | 'bench';
  readonly className?: string;
  /** A small button inside the frame, behind the value. */
  readonly aside?: ReactNode;
}

interface FrameProps extends FieldFrame {
  readonly control: (aria: {
    id: string;
    'aria-invalid': boolean;
    'aria-describedby': string | undefined;
  }) => ReactNode;
}

interface WordsProps {
  readonly id: string;
  readonly error: string | undefined;
  readonly caution: string | undefined;
}

/** The sentence under a control: what is wrong, or what to be careful about. */
function Words({ id, error, caution }: WordsProps) {
  if (error !== undefined)
    return (
      <p id={id} className="error">
        {error}
      </p>
    );
  return caution === undefined ? null : (
    <p id={id} className="care">
      {caution}
    </p>
  );
}

function frameClass({ size = 'desk', error, caution, className }: FieldFrame): string {
  const tone = error !== undefined ? 'bad' : caution !== undefined ? 'careful' : '';
  return classes('field', size === 'bench' && 'bench', tone, className);
}

/** Owns label, unit, hint and message of a control, and their ARIA links. */
function Frame({ control, ...frame }: FrameProps) {
  const { label, unit = '', hint, error, caution, aside } = frame;
  const id = useId();
  const hasWords = error !== undefined || caution !== undefined;
  const describedBy = classes(hasWords && `${id}-words`, hint !== undefined && `${id}-hint`);
  return (
    <div className={frameClass(frame)}>
      <label htmlFor={id}>{label}</label>
      <div className="in">
        {control({
          id,
          'aria-invalid': error !== undefined,
          'aria-describedby': describedBy || undefined,
        })}
        {unit !== '' && <span className="in-unit">{unit}</span>}
        {aside}
      </div>
      <Words id={`${id}-words`} error={error} caution={caution} />
      {hint !== undefined && (
        <p id={`${id}-hint`} className="hint">
          {hint}
        </p>
      )}
    </div>
  );
}

type InputProps = FieldFrame &
  Omit<InputHTMLAttributes<HTMLInputElement>, 'size' | 'className'> & {
    readonly ref?: Ref<HTMLInputElement>;
  };

/** A field for a line of text or a number. Numbers are text too: decimal commas and units are read. */
export function Field({
  label,
  unit,
  hint,
  error,
  caution,
  size,
  className,
  aside,
  ...input
}: InputProps) {
  return (
    <Frame
      {...{ label, unit, hint, error, caution, aside }}
      {...(size ? { size } : {})}
      {...(className ? { className } : {})}
      control={(aria) => <input type="text" autoComplete="off" {...input} {...aria} />}
    />
  );
}

type SelectProps = FieldFrame &
  Omit<SelectHTMLAttributes<HTMLSelectElement>, 'size' | 'className'> & {
    readonly options: readonly { readonly value: string | number; readonly label: string }[];
  };

export function SelectField({
  label,
  unit,
  hint,
  error,
  caution,
  size,
  className,
  options,
  ...select
}: SelectProps) {
  return (
    <Frame
      {...{ label, unit, hint, error, caution }}
      {...(size ? { size } : {})}
      {...(className ? { className } : {})}
      control={(aria) => (
        <select {...select} {...aria}>
          {options.map(({ value, label: words }) => (
            <option key={value} value={value}>
              {words}
            </option>
          ))}
        </select>
      )}
    />
  );
}

type AreaProps = FieldFrame & Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'className'>;

export function TextArea({ label, hint, error, caution, size, className, ...area }: AreaProps) {
  return (
    <Frame
      {...{ label, hint, error, caution }}
      {...(size ? { size } : {})}
      {...(className ? { className } : {})}
      control={(aria) => <textarea rows={3} {...area} {...aria} />}
    />
  );
}

interface CheckboxProps extends Omit<InputHTMLAttributes<HTMLInputElement>, 'className'> {
  readonly label: ReactNode;
  readonly error?: string | undefined;
}

export function Checkbox({ label, error, ...input }: CheckboxProps) {
  const id = useId();
  return (
    <div>
      <div className="check">
        <input
          id={id}
          type="checkbox"
          {...input}
          aria-invalid={error !== undefined}
          aria-describedby={error === undefined ? undefined : `${id}-error`}
        />
        <label htmlFor={id}>{label}</label>
      </div>
      {error !== undefined && (
        <p id={`${id}-error`} className="text-2 text-stop">
          {error}
        </p>
      )}
    </div>
  );
}
