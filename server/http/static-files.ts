import express, { type Express, type RequestHandler } from 'express';
import { join } from 'node:path';

/** The built client: hashed files for a year, the page itself never, and the page for every address of the client. */
export function serveClient(app: Express, folder: string): void {
  const page = join(folder, 'index.html');
  const sendPage: RequestHandler = (_request, response, next) => {
    response.set('Cache-Control', 'no-cache');
    response.sendFile(page, (error) => {
      if (error) next(error);
    });
  };
  const files = { index: false, redirect: false } as const;
  app.use(
    '/assets',
    express.static(join(folder, 'assets'), { ...files, immutable: true, maxAge: '365d', fallthrough: false }),
  );
  app.use(express.static(folder, { ...files, maxAge: 0, dotfiles: 'ignore' }));
  app.get('/{*splat}', sendPage);
}
