import { createTransport } from 'nodemailer';
import type { Database } from '../db/client';
import type { Env } from '../env';
import { deliverDue, listHospitals, type Post } from './deliver-due';

type Log = { warn: (fields: object, words: string) => void; error: (fields: object, words: string) => void };
export type WorkerDeps = {
  db: Database;
  env: Pick<Env, 'MAIL_FROM' | 'PUBLIC_URL'>;
  log: Log;
  smtpUrl: string;
};

const SWEEP_MS = 5_000;

const openPost = ({ env, smtpUrl }: WorkerDeps): Post => ({
  // short limits: the outbox row stays locked while we talk
  transporter: createTransport(smtpUrl, {
    connectionTimeout: 5_000,
    greetingTimeout: 5_000,
    socketTimeout: 10_000,
  } as never),
  from: env.MAIL_FROM,
  publicUrl: env.PUBLIC_URL,
});

/**
 * Delivers the outbox: woken by NOTIFY on the channel `outbox` (payload the hospital's id) and every 5 s.
 * Several processes may run it; a row is claimed by one of them. Returns what stops it.
 */
export async function startMailWorker(deps: WorkerDeps): Promise<() => Promise<void>> {
  const post = openPost(deps);
  let isStopped = false;
  let running: Promise<void> = Promise.resolve();

  const deliver = (only?: string): void => {
    running = running.then(async () => {
      if (isStopped) return;
      try {
        const all = await listHospitals(deps.db);
        for (const hospital of only ? all.filter(({ id }) => id === only) : all)
          await deliverDue(deps.db, post, hospital);
      } catch (error) {
        deps.log.warn({ err: error }, 'mail waits: the outbox could not be read');
      }
    });
  };

  const timer = setInterval(() => deliver(), SWEEP_MS);
  const listening = await deps.db.sql
    .listen(
      'outbox',
      (hospitalId) => deliver(hospitalId),
      () => deliver(),
    )
    .catch((error: unknown) => {
      deps.log.warn({ err: error }, 'no wake-up for mail: it is looked for every 5 s');
      return null;
    });

  return async () => {
    isStopped = true;
    clearInterval(timer);
    await listening?.unlisten().catch(() => undefined);
    await running;
    post.transporter.close();
  };
}
