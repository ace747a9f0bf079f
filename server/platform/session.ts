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

/** Signs in under a new session id, so that an id planted before is worth nothing. */
export async function renewSession(
  request: Request,
  content: { accountId: string; orgId: string },
): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    request.session.regenerate((error: unknown) => (error ? reject(error) : resolve()));
  });
  Object.assign(request.session, content);
  await saveSession(request);
}

export async function saveSession(request: Request): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    request.session.save((error: unknown) => (error ? reject(error) : resolve()));
  });
}

export async function endSession(request: Request): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    request.session.destroy((error: unknown) => (error ? reject(error) : resolve()));
  });
}
