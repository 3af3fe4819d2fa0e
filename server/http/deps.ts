import type { Request } from 'express';
import type { Logger } from 'pino';
import type { Clock } from '../clock';
import type { Database } from '../db/client';
import type { Env } from '../env';

/** What every route works with; made once by the program, or by a test with its own clock. */
export type Deps = { db: Database; clock: Clock; env: Env; log: Logger };

/** The dependencies the application was made with. */
export const depsOf = (request: Request): Deps => request.app.locals.deps as Deps;
