import type { Databases } from './databases';
import { DATABASE } from './databases';

export type ServerPlace = {
  nodeEnv: 'production' | 'development' | 'test';
  port: number;
  publicUrl?: string;
};

/** Names a private set-up decides itself: nothing of the caller's environment may reach it. */
const OWN = [
  'DATABASE_URL',
  'DATABASE_OWNER_URL',
  'SMTP_URL',
  'MAIL_FROM',
  'PUBLIC_URL',
  'BRIMLINE_MAILBOX',
] as const;

function inherited(): NodeJS.ProcessEnv {
  const env = { ...process.env };
  for (const name of OWN) delete env[name];
  return env;
}

/**
 * Environment of a server on a private cluster: loopback only, with the SMTP fake and its mailbox page
 * inside the server process.
 */
export function privateSettings(
  databases: Databases,
  place: ServerPlace,
  database = DATABASE,
): NodeJS.ProcessEnv {
  return {
    ...inherited(),
    NODE_ENV: place.nodeEnv,
    HOST: '127.0.0.1',
    PORT: String(place.port),
    PUBLIC_URL: place.publicUrl ?? `http://127.0.0.1:${place.port}`,
    DATABASE_URL: databases.appUrl(database),
    DATABASE_OWNER_URL: databases.ownerUrl(database),
    MAIL_FROM: 'Brimline <brimline@saltmarsh.example>',
    BRIMLINE_MAILBOX: '1',
    LOG_LEVEL: process.env.LOG_LEVEL ?? (place.nodeEnv === 'test' ? 'error' : 'warn'),
  };
}

/** Environment of a server on the caller's own services: theirs, without what only a private set-up may have. */
export function realSettings(env: NodeJS.ProcessEnv, port: number): NodeJS.ProcessEnv {
  const { BRIMLINE_MAILBOX: _never, ...rest } = env;
  return { NODE_ENV: 'production', HOST: '127.0.0.1', ...rest, PORT: String(port) };
}
