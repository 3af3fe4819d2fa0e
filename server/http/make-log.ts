import { pino, type Logger } from 'pino';

/** What no line may hold, should an object with it ever be logged. */
const SECRETS = ['cookie', 'authorization', 'password', '["set-cookie"]', 'body', 'passwordHash'];
const paths = SECRETS.flatMap((name) => {
  const dotted = name.startsWith('[') ? name : `.${name}`;
  return [name, `*${dotted}`, `*.*${dotted}`];
});

/** The program's log: JSON lines on standard output. */
export const makeLog = (level: string): Logger =>
  pino({
    level,
    base: null,
    redact: { paths, censor: '[withheld]' },
    timestamp: pino.stdTimeFunctions.isoTime,
  });
