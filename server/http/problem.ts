import { PROBLEMS, type FieldError, type Problem, type ProblemCode } from '@shared/problems';
import type { ErrorRequestHandler, RequestHandler, Response } from 'express';
import { DatabaseUnavailable, isUnavailable } from '../db/faults';
import { depsOf } from './deps';

/** Whether a command's code is one the API may answer with. */
export const isProblemCode = (code: string): code is ProblemCode => Object.hasOwn(PROBLEMS, code);

export type ProblemExtras = { detail?: string; errors?: readonly FieldError[]; data?: unknown };

/** Answers with a problem document (RFC 9457) and writes the one log line of it. */
export function sendProblem(response: Response, code: ProblemCode, extras: ProblemExtras = {}): void {
  const { status, title } = PROBLEMS[code];
  const { req: request } = response;
  const id = response.locals.requestId as string | undefined;
  const problem: Problem = {
    type: `/problems/${code}`,
    title,
    status,
    detail: extras.detail ?? '',
    ...(id === undefined ? {} : { instance: `/requests/${id}` }),
    ...(extras.errors === undefined ? {} : { errors: [...extras.errors] }),
    ...(extras.data === undefined ? {} : { data: extras.data }),
  };
  const level = status >= 500 ? 'error' : 'info';
  depsOf(request).log[level]({ requestId: id, code, status }, 'problem');
  response.status(status).type('application/problem+json').send(JSON.stringify(problem));
}

/** An answer for every path of the API that no route took. */
export const noSuchRoute: RequestHandler = (_request, response) => {
  sendProblem(response, 'not-found', { detail: 'There is nothing at this address.' });
};

/** body-parser says what was wrong by `type`; everything else without one is ours. */
const BODY_FAULTS: Readonly<Record<string, string>> = {
  'entity.parse.failed': 'The request is not valid JSON, or holds characters that cannot be stored.',
  'entity.too.large': 'The request is larger than this program takes.',
  'encoding.unsupported': 'The request is in an encoding this program does not read.',
  'charset.unsupported': 'The request is in a character set this program does not read.',
  'request.size.invalid': 'The request was cut off.',
  'request.aborted': 'The request was cut off.',
};

/** The one place where a thrown error becomes an answer. */
export const problemHandler: ErrorRequestHandler = (error: unknown, request, response, next) => {
  if (response.headersSent) return next(error);
  const fault = bodyFault(error);
  if (fault !== undefined) return sendProblem(response, 'bad-input', { detail: fault });
  if (error instanceof DatabaseUnavailable || isUnavailable(error)) {
    return sendProblem(response, 'database-unavailable', {
      detail: 'The database cannot be reached at the moment.',
    });
  }
  if (error instanceof URIError || isNoSuchFile(error)) {
    return sendProblem(response, 'not-found', { detail: 'There is nothing at this address.' });
  }
  depsOf(request).log.error({ requestId: response.locals.requestId as unknown, err: error }, 'unexpected');
  return sendProblem(response, 'unexpected', { detail: 'It was written down; nothing was recorded.' });
};

function bodyFault(error: unknown): string | undefined {
  if (typeof error !== 'object' || error === null || !('type' in error)) return undefined;
  return BODY_FAULTS[String(error.type)];
}

/** The file server tells by status: a path it has no file for, or will not look at. */
const isNoSuchFile = (error: unknown): boolean =>
  error instanceof Error && 'status' in error && [400, 403, 404].includes(Number(error.status));
