import express, { type Express, type Request } from 'express';
import postgres, { type Sql } from 'postgres';
import { inPasswordTurn, isPassword } from '../../server/auth/password';
import { hashOfSecret } from '../../server/auth/session-adapter';
import { replay, type Names, type Prepared } from './record-statements';

/** A pool as one would open it by hand; hashes come as text, so that they weigh in JSON what they weigh in ours. */
export const barePool = (url: string): Sql =>
  postgres(url, {
    max: 10,
    onnotice: () => undefined,
    connection: { TimeZone: 'UTC' },
    types: {
      bytea: {
        to: 17,
        from: [17],
        serialize: (bytes: Buffer) => `\\x${bytes.toString('hex')}`,
        parse: (text: string) => text.slice(2),
      },
    },
  });

const bareApp = (): Express => {
  const app = express();
  app.disable('x-powered-by');
  app.disable('etag');
  return app;
};

const sessionHash = (request: Request): string =>
  hashOfSecret((request.headers.cookie ?? '').split('=')[1] ?? '');

/** Reads by the same statements and gives their rows: no schema, no presentation, no permission. */
export function bareRead(sql: Sql, works: readonly Prepared[]): Express {
  return bareApp().get('/api/versions/:id', async (request, response) => {
    const names = { version: request.params.id, session: sessionHash(request) };
    const rows: unknown[] = [];
    for (const work of works) rows.push(...(await replay(sql, work, names)));
    response.json(rows);
  });
}

const isPasswordLook = ({ batches }: Prepared): boolean =>
  batches.some((batch) => batch.some(({ text }) => text.includes('password_hash')));

/** Acts by the same statements in the same transaction and verifies the password the same way. */
export function bareAct(sql: Sql, works: readonly Prepared[], namesOf: (version: string) => Names): Express {
  const app = bareApp().use(express.json());
  return app.post('/api/checks/:id/sign', async (request, response) => {
    const names = {
      ...namesOf(request.params.id),
      session: sessionHash(request),
      key: request.get('idempotency-key') ?? '',
    };
    const { password } = request.body as { password: string };
    const verify = (work: Prepared) =>
      inPasswordTurn(async () => {
        const [rows] = await replay(sql, work, names);
        return isPassword((rows?.[0]?.passwordHash as string | undefined) ?? null, password);
      });
    for (const work of works) {
      if (!isPasswordLook(work)) await replay(sql, work, names);
      else if (!(await verify(work))) return void response.status(403).end();
    }
    response.json({ state: 'signed' });
  });
}
