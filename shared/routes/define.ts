import { z } from 'zod';

/**
 * Who may knock: `public` needs no session; `session` any signed-in account; `clinical` a clinical role;
 * `locked` also works while the session is locked.
 */
export type Access = 'public' | 'session' | 'clinical' | 'locked';

export type RouteDefinition = {
  method: 'GET' | 'POST' | 'PUT';
  path: string;
  access: Access;
  /** What the route may hold of an unsigned version: nothing at all, or it obeys coverage. Tests read it. */
  figures: 'never' | 'by-coverage';
  params?: z.ZodObject;
  query?: z.ZodObject;
  body?: z.ZodType;
  response: z.ZodType;
};

export const get = <const R extends Omit<RouteDefinition, 'method'>>(route: R): R & { method: 'GET' } => ({
  method: 'GET',
  ...route,
});
export const post = <const R extends Omit<RouteDefinition, 'method'>>(route: R): R & { method: 'POST' } => ({
  method: 'POST',
  ...route,
});
export const put = <const R extends Omit<RouteDefinition, 'method'>>(route: R): R & { method: 'PUT' } => ({
  method: 'PUT',
  ...route,
});

export const id = z.uuid();
/** The lock counter of an editable row, as the database can hold it. */
export const rev = z.int32().min(0);
export const idParams = z.object({ id });
/** RFC 3339 with milliseconds and Z. */
export const at = z.string();
/** A decimal on the wire is text, in and out. */
export const decimalText = z.string().regex(/^-?\d+(\.\d+)?$/);
/** A decimal as a person typed it; the field's own rule reads it. */
export const typed = z.string().max(40);
export const words = z.string().trim().max(2000);
export const reason = z.string().trim().min(3, 'Say why, in a few words.').max(2000);
export const password = z.string().min(1, 'Type your password.').max(200);
/** Local date and time as a form field gives it, in the hospital's zone. */
export const localDateTime = z.string().regex(/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}$/, 'Give a date and a time.');
export const civilDate = z.string().regex(/^\d{4}-\d{2}-\d{2}$/, 'Give a date.');
export const done = z.object({ ok: z.literal(true) });
