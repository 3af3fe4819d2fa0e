import { noteReachable } from './use-online';

/**
 * The smallest way to ask the server: no schema library, so that the sign-in page stays light.
 * Everything after sign-in goes through `call` in api.ts, which parses answers.
 */
export type ProblemDocument = {
  type: string;
  title: string;
  status: number;
  detail: string;
  errors?: { pointer: string; detail: string }[];
  data?: unknown;
};

/** The server answered, and said no. */
export class ProblemError extends Error {
  readonly problem: ProblemDocument;
  constructor(problem: ProblemDocument) {
    super(problem.detail || problem.title);
    this.name = 'ProblemError';
    this.problem = problem;
  }
  get code(): string {
    return this.problem.type.replace('/problems/', '');
  }
}

/** No answer: the line is down or the server is. What was sent may or may not have arrived. */
export class UnreachableError extends Error {
  constructor() {
    super('The server did not answer.');
    this.name = 'UnreachableError';
  }
}

export type SendOptions = {
  method: 'GET' | 'POST' | 'PUT';
  body?: unknown;
  /** One key per intended act: a retry with the same key gives the first answer again. */
  key?: string;
  /** A poll by the page itself, not a sign of life of the person. */
  background?: boolean;
  signal?: AbortSignal;
};

const headersOf = ({ body, key, background }: SendOptions): Record<string, string> => ({
  accept: 'application/json',
  ...(body === undefined ? {} : { 'content-type': 'application/json' }),
  ...(key ? { 'idempotency-key': key } : {}),
  ...(background ? { 'x-brimline-background': '1' } : {}),
});

const isProblem = (value: unknown): value is ProblemDocument =>
  typeof value === 'object' && value !== null && 'title' in value && 'status' in value;

export async function send(path: string, options: SendOptions): Promise<unknown> {
  let response: Response;
  try {
    response = await fetch(path, {
      method: options.method,
      headers: headersOf(options),
      credentials: 'same-origin',
      ...(options.body === undefined ? {} : { body: JSON.stringify(options.body) }),
      ...(options.signal ? { signal: options.signal } : {}),
    });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    noteReachable(false);
    throw new UnreachableError();
  }
  noteReachable(true);
  const value: unknown = await response.json().catch(() => null);
  if (response.ok) return value;
  if (isProblem(value)) throw new ProblemError(value);
  // a gateway's own page, or a server that is just starting
  throw new UnreachableError();
}

/** A fresh key for one intended act. */
export const newKey = (): string => crypto.randomUUID();
