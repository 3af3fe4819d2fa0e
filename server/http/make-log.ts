import { pino, stdTimeFunctions, type DestinationStream, type Logger } from 'pino';

/** What no line may hold, should an object with it ever be logged. */
const SECRETS = ['cookie', 'authorization', 'password', '["set-cookie"]', 'body', 'passwordHash'];
const paths = SECRETS.flatMap((name) => {
  const dotted = name.startsWith('[') ? name : `.${name}`;
  return [name, `*${dotted}`, `*.*${dotted}`];
});

/** The program's log: JSON lines on standard output, or wherever a test collects them. */
export function makeLog(level: string, to?: DestinationStream): Logger {
  const options = {
    level,
    base: null,
    redact: { paths, censor: '[withheld]' },
    timestamp: stdTimeFunctions.isoTime,
  };
  return to === undefined ? pino(options) : pino(options, to);
}
