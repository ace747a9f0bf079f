import connectPgSimple from 'connect-pg-simple';
import type { Request, RequestHandler } from 'express';
import session from 'express-session';
import type { Pool } from 'pg';
import type { Config } from './config.ts';

const hours = 60 * 60 * 1000;

/** Sessions kept in the database; the cookie says nothing but the session's id. */
export function createSessions(pool: Pool, { sessionSecret }: Config): RequestHandler {
  const PgStore = connectPgSimple(session);
  return session({
    name: 'tb_session',
    secret: sessionSecret,
    store: new PgStore({
      pool,
      tableName: 'http_sessions',
      createTableIfMissing: false,
      pruneSessionInterval: false,
    }),
    resave: false,
    saveUninitialized: false,
    rolling: true,
    // `auto`: secure wherever the request came by https, straight or through a trusted proxy.
    cookie: { httpOnly: true, sameSite: 'lax', secure: 'auto', maxAge: 12 * hours },
  });
}

/** A method of the session that calls back, as a promise. */
function done(start: (callback: (error: unknown) => void) => void): Promise<void> {
  return new Promise((resolve, reject) => {
    start((error) =>
      error
        ? reject(
            error instanceof Error ? error : new Error('The session could not be kept.', { cause: error }),
          )
        : resolve(),
    );
  });
}

/** Signs in under a new session id, so that an id planted before is worth nothing. */
export async function renewSession(
  request: Request,
  content: { accountId: string; orgId: string },
): Promise<void> {
  await done((callback) => request.session.regenerate(callback));
  Object.assign(request.session, content);
  await saveSession(request);
}

export const saveSession = (request: Request): Promise<void> =>
  done((callback) => request.session.save(callback));

export const endSession = (request: Request): Promise<void> =>
  done((callback) => request.session.destroy(callback));
