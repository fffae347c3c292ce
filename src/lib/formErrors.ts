import type { FieldPath, FieldValues, UseFormSetError } from 'react-hook-form';
import { ApiError } from './api';

/**
 * Puts the server's issues back at the fields that they name; what names none stands at the form's root.
 *
 * @param prefix the part of the server's path that this form does not have, like `brief.`.
 */
export function showIssues<T extends FieldValues>(
  error: unknown,
  setError: UseFormSetError<T>,
  prefix = '',
): void {
  if (!(error instanceof ApiError)) {
    setError('root', { message: 'Something went wrong in this page. What you typed is kept.' });
    return;
  }
  const atFields = error.issues.filter(({ path }) => path !== '');
  for (const { path, message } of atFields) {
    const name = path.startsWith(prefix) ? path.slice(prefix.length) : path;
    // the server names fields of the schema that this form was made from
    setError(name as FieldPath<T>, { type: 'server', message }, { shouldFocus: true });
  }
  setError('root', { type: 'server', message: error.message });
}
