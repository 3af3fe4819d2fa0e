import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import type { AddressInfo } from 'node:net';

export type CaughtMail = {
  id: string;
  at: number;
  to: string;
  from: string;
  subject: string;
  text: string;
  messageId: string;
};

export type SmtpFake = {
  smtpUrl: string;
  /** Newest first, at most the last 500. */
  messages: () => readonly CaughtMail[];
  stop: () => Promise<void>;
};

const KEEP = 500;

/**
 * A real SMTP server on loopback that keeps what it is given. It exists only where the program itself started it
 * (demo, development, tests); an installation has its own mail server.
 */
export async function startSmtpFake(port = 0): Promise<SmtpFake> {
  const kept: CaughtMail[] = [];
  let count = 0;
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    disableReverseLookup: true,
    logger: false,
    onData(stream, session, done) {
      simpleParser(stream).then((mail) => {
        count += 1;
        kept.unshift({
          id: String(count),
          at: Date.now(),
          to: session.envelope.rcptTo.map(({ address }) => address).join(', '),
          from: mail.from?.text ?? '',
          subject: mail.subject ?? '',
          text: mail.text ?? '',
          messageId: mail.messageId ?? '',
        });
        kept.length = Math.min(kept.length, KEEP);
        done();
      }, done);
    },
  });
  server.on('error', () => undefined);
  await new Promise<void>((resolve, reject) => {
    server.server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve());
  });
  const { port: used } = server.server.address() as AddressInfo;
  return {
    smtpUrl: `smtp://127.0.0.1:${used}`,
    messages: () => kept,
    stop: () => new Promise((resolve) => server.close(() => resolve())),
  };
}
