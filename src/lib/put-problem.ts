import type { FieldValues, Path, UseFormSetError } from 'react-hook-form';
import { ProblemError } from './server-answer';

/**
 * Puts a problem document's field errors beside their fields; returns the words that belong to no field, or null.
 */
export function putProblem<Form extends FieldValues>(
  error: unknown,
  setError: UseFormSetError<Form>,
  fields: readonly string[],
): string | null {
  if (!(error instanceof ProblemError))
    return error instanceof Error ? error.message : 'Something went wrong.';
  const { errors = [], detail, title } = error.problem;
  const known = errors.filter(({ pointer }) => fields.includes(pointer.split('/')[1] ?? ''));
  known.forEach(({ pointer, detail: message }, index) =>
    setError(pointer.split('/')[1] as Path<Form>, { type: 'server', message }, { shouldFocus: index === 0 }),
  );
  return known.length > 0 && known.length === errors.length ? null : detail || title;
}
