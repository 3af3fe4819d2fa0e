import type { FieldError } from '@shared/problems';
import type { z } from 'zod';

export type Reading<Value> = { ok: true; value: Value } | { ok: false; errors: FieldError[] };

const pointerTo = (path: readonly PropertyKey[]): string =>
  path.map((part) => `/${String(part).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');

/** Reads one part of a request by its schema; each fault points at its field (RFC 6901). */
export function readPart<Schema extends z.ZodType>(schema: Schema, part: unknown): Reading<z.output<Schema>> {
  const read = schema.safeParse(part);
  if (read.success) return { ok: true, value: read.data };
  const errors = read.error.issues.map(({ path, message }) => ({
    pointer: pointerTo(path),
    detail: message,
  }));
  return { ok: false, errors };
}
