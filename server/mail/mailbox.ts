import { Router, type Request, type RequestHandler } from 'express';
import type { CaughtMail, SmtpFake } from './smtp-fake';

const escape = (text: string): string => text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);

/** Addresses in a letter become links; nothing else of it is treated as markup. */
const linked = (text: string): string =>
  escape(text).replace(/https?:\/\/[^\s&]+/g, (url) => `<a href="${url}">${url}</a>`);

const STYLE = `body{font:16px/24px system-ui,sans-serif;max-width:60rem;margin:2rem auto;padding:0 1rem;background:#F6F3EC;color:#16262B}
h1{font-size:1.6rem}table{border-collapse:collapse;width:100%}th,td{text-align:left;padding:.5rem .75rem .5rem 0;border-bottom:1px solid #D8D1C2;vertical-align:top}
pre{white-space:pre-wrap;font:inherit;border-top:1px solid #16262B;padding-top:1rem}a{color:#0E5A62}`;

const page = (title: string, body: string): string =>
  `<!doctype html><html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><title>${escape(title)}</title><link rel="stylesheet" href="/mailbox/style.css"></head><body><main><h1>${escape(title)}</h1>${body}</main></body></html>`;

const listPage = (messages: readonly CaughtMail[]): string =>
  page(
    'Mailbox of the mail fake',
    `<p>Every mail this program sent since it started. This page exists only where the program runs its own mail fake.</p>${
      messages.length === 0
        ? '<p><b>No mail yet.</b></p>'
        : `<table><thead><tr><th>To</th><th>Subject</th><th>At</th></tr></thead><tbody>${messages
            .map(
              (mail) =>
                `<tr><td>${escape(mail.to)}</td><td><a href="/mailbox/${mail.id}">${escape(mail.subject)}</a></td><td>${new Date(mail.at).toISOString().slice(11, 19)} UTC</td></tr>`,
            )
            .join('')}</tbody></table>`
    }`,
  );

const mailPage = (mail: CaughtMail): string =>
  page(
    mail.subject,
    `<p>To ${escape(mail.to)}, from ${escape(mail.from)}</p><pre>${linked(mail.text)}</pre><p><a href="/mailbox">All mail</a></p>`,
  );

const isLoopback = (request: Request): boolean =>
  /^(::1|::ffff:127\.|127\.)/.test(request.socket.remoteAddress ?? '');

const loopbackOnly: RequestHandler = (request, response, next) => {
  if (isLoopback(request)) next();
  else response.status(404).type('text/plain').send('Not found');
};

/** Pages to read what the fake caught; mounted only beside a running fake. */
export function mailboxRouter(fake: SmtpFake): Router {
  const router = Router();
  router.use(loopbackOnly);
  router.get('/style.css', (_request, response) => {
    response.type('text/css').send(STYLE);
  });
  router.get('/', (_request, response) => {
    response.type('html').send(listPage(fake.messages()));
  });
  router.get('/messages.json', (_request, response) => {
    response.json({ messages: fake.messages() });
  });
  router.get('/:id', (request, response) => {
    const mail = fake.messages().find(({ id }) => id === request.params.id);
    if (mail) response.type('html').send(mailPage(mail));
    else
      response.status(404).type('html').send(page('No such mail', '<p><a href="/mailbox">All mail</a></p>'));
  });
  return router;
}
