import { useState } from 'react';
import { problemCode } from '@/lib/query-client';
import { ProblemError } from '@/lib/server-answer';

/** A password typed again for one act: what was wrong with it, told until it is typed anew. */
export function usePassword() {
  const [value, setValue] = useState('');
  const [error, setError] = useState<string>();
  const type = (next: string) => {
    setValue(next);
    setError(undefined);
  };
  return {
    value,
    type,
    error,
    /** Asks for it when it is empty; true when there is one. */
    isThere: (): boolean => {
      if (value === '') setError('Type your password.');
      return value !== '';
    },
    /** Takes a refusal that is about the password; false when it is about something else. */
    takes: (failure: unknown): boolean => {
      if (problemCode(failure) !== 'password-wrong' || !(failure instanceof ProblemError)) return false;
      setValue('');
      setError(failure.problem.detail || failure.problem.title);
      return true;
    },
    forget: () => setValue(''),
  };
}
