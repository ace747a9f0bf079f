import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Express, Request, Response } from 'express';
import type { RunningServer } from './server.ts';

/** Vite inside the server, for developers: pages straight from the sources, with hot reload. */
export async function servePagesInDevelopment(
  { server }: RunningServer,
  root: string,
): Promise<{ close: () => Promise<void> }> {
  const { createServer } = await import('vite');
  const vite = await createServer({
    root,
    server: { middlewareMode: true, ws: { server } },
    appType: 'custom',
  });
  const app = server.listeners('request')[0] as Express;
  app.use(vite.middlewares);
  app.get('/{*rest}', (request: Request, response: Response) => {
    const file = request.path.startsWith('/s/') ? 'sign/index.html' : 'index.html';
    void (async () => {
      const html = await readFile(join(root, file), 'utf8');
      response.type('html').send(await vite.transformIndexHtml(request.originalUrl, html));
    })();
  });
  return { close: () => vite.close() };
}
