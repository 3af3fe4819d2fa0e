import { z } from 'zod';
import { ProblemError } from '@/lib/server-answer';

/** What a senior is asked about: a limit of the page, or one that only the server could see. */
export type SeniorMatter = { code: string; title: string; text: string };

const dataSchema = z.object({
  limits: z.array(z.object({ code: z.string(), title: z.string(), text: z.string() })),
});

/** The limits that a refusal to sign names; empty where it names none. */
export function mattersOf(error: unknown): SeniorMatter[] {
  if (!(error instanceof ProblemError) || error.code !== 'exception-needed') return [];
  const data = dataSchema.safeParse(error.problem.data);
  return data.success ? data.data.limits : [];
}
