import { useState, type ComponentProps } from 'react';
import { Field } from './Field';

/** A password that can be shown while it is typed. */
export function PasswordField(props: Omit<ComponentProps<typeof Field>, 'type' | 'aside'>) {
  const [isShown, setIsShown] = useState(false);
  return (
    <Field
      {...props}
      type={isShown ? 'text' : 'password'}
      aside={
        <button
          type="button"
          className="in-button"
          aria-pressed={isShown}
          onClick={() => setIsShown(!isShown)}
        >
          {isShown ? 'Hide' : 'Show'}
          <span className="sr-only"> the password</span>
        </button>
      }
    />
  );
}
