import { randomUUID } from 'node:crypto';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import express, { type Express, Router } from 'express';
import helmet from 'helmet';
import { pinoHttp } from 'pino-http';
import { Refusal } from '#shared/kernel/refusal.ts';
import { errorHandler } from './errors.ts';
import { features } from './features.ts';
import type { Platform } from './platform.ts';
import { platformRoutes } from './platform.routes.ts';

/** The whole HTTP side. `pages` is the folder of built pages; null leaves pages to the development server. */
export function createApp(platform: Platform, { pages }: { pages: string | null }): Express {
  const app = express();
  app.set('trust proxy', platform.config.trustProxy);
  app.disable('x-powered-by');
  app.use(requestLog(platform));
  app.use(securityHeaders(platform));
  const api = Router();
  for (const feature of [platformRoutes, ...features]) feature(api, platform);
  app.use(api);
  app.all('/api/{*rest}', () => {
    throw new Refusal('missing', 'There is nothing at this address.');
  });
  if (pages) servePages(app, pages);
  app.use(errorHandler(platform));
  return app;
}

function requestLog({ log }: Platform) {
  return pinoHttp({
    logger: log,
    genReqId: (_request, response) => {
      const id = randomUUID();
      response.setHeader('X-Request-Id', id);
      return id;
    },
    redact: ['req.headers.cookie', 'req.headers.authorization', 'res.headers["set-cookie"]'],
    customLogLevel: (_request, response, error) => (error || response.statusCode >= 500 ? 'error' : 'info'),
    autoLogging: { ignore: (request) => !request.url?.startsWith('/api/') || request.url === '/api/health' },
  });
}

function securityHeaders({ config }: Platform) {
  const development = { contentSecurityPolicy: false as const };
  const production = {
    contentSecurityPolicy: {
      directives: {
        'default-src': ["'self'"],
        'img-src': ["'self'", 'data:', 'blob:'],
        // Editor and toasts set styles on elements.
        'style-src': ["'self'", "'unsafe-inline'"],
        'font-src': ["'self'", 'data:'],
        'upgrade-insecure-requests': null,
      },
    },
    // The server may stand behind plain http on a local network; https is the proxy's to promise.
    strictTransportSecurity: false as const,
  };
  return helmet(config.production ? production : development);
}

function servePages(app: Express, pages: string): void {
  app.use(
    '/assets',
    express.static(join(pages, 'assets'), { immutable: true, maxAge: '1y', fallthrough: false }),
  );
  app.use(express.static(pages, { index: false, maxAge: 0 }));
  const page = (file: string) => (_request: express.Request, response: express.Response) => {
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile(join(pages, file));
  };
  if (existsSync(join(pages, 'sign/index.html'))) app.get('/s/{*rest}', page('sign/index.html'));
  app.get('/{*rest}', page('index.html'));
}
