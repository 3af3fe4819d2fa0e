import { ProblemError, UnreachableError } from '@/lib/server-answer';

/** What a person is told when an act fails: the server's own words, or what is known of a silence. */
export function problemWords(error: unknown): string {
  if (error instanceof ProblemError) {
    const fields = error.problem.errors?.map(({ detail }) => detail) ?? [];
    return [
      error.problem.detail || error.problem.title,
      ...fields.filter((text) => text !== error.problem.detail),
    ].join(' ');
  }
  if (error instanceof UnreachableError) {
    return 'The server did not answer, so it is not known whether this was recorded. Try again: it is recorded once at most.';
  }
  return 'Something went wrong on this page. Load it again.';
}
