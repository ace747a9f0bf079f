import { randomBytes } from 'node:crypto';
import type { NextFunction, Request, Response } from 'express';
import { ZodError } from 'zod';
import { type Problem, Refusal, refusalStatus } from '#shared/kernel/refusal.ts';
import type { Platform } from './platform.ts';

/** The last middleware: a Refusal in its own words; anything else is a bug, logged with a reference and shown as that. */
export function errorHandler({ log }: Pick<Platform, 'log'>) {
  return (error: unknown, request: Request, response: Response, next: NextFunction): void => {
    if (response.headersSent) return next(error);
    // A refused upload is still on its way: read it to its end, or the sender never sees the answer.
    request.resume();
    const refusal = refusalOf(error);
    if (!refusal) {
      const reference = randomBytes(4).toString('hex');
      log.error({ err: error, reference, method: request.method, url: request.originalUrl }, 'Bug');
      return sendProblem(response, {
        type: 'about:blank',
        title: 'Something went wrong',
        status: 500,
        detail: `Something went wrong on our side. Quote ${reference}.`,
        code: 'bug',
        reference,
      });
    }
    const wait = refusal.extra.retryAfterSeconds;
    if (typeof wait === 'number') response.setHeader('Retry-After', wait);
    sendProblem(response, problemOf(refusal));
  };
}

const titles: Partial<Record<Refusal['code'], string>> = {
  invalid: 'This does not fit',
  signedOut: 'Sign in to go on',
  forbidden: 'Not allowed',
  missing: 'Not found',
  conflict: 'Out of step',
  tooLarge: 'Too large',
  tooMany: 'Too many tries',
  unavailable: 'Not available here',
};

function problemOf({ code, message, fields, extra }: Refusal): Problem {
  return {
    type: 'about:blank',
    title: titles[code] ?? 'Refused',
    status: refusalStatus[code],
    detail: message,
    code,
    ...(Object.keys(fields).length > 0 ? { fields } : {}),
    ...(Object.keys(extra).length > 0 ? { extra } : {}),
  };
}

function sendProblem(response: Response, problem: Problem): void {
  response.status(problem.status).type('application/problem+json').send(JSON.stringify(problem));
}

function refusalOf(error: unknown): Refusal | null {
  if (error instanceof Refusal) return error;
  if (error instanceof ZodError) {
    const fields = Object.fromEntries(error.issues.map((issue) => [issue.path.join('.'), issue.message]));
    const first = error.issues[0]?.message ?? 'Something is missing.';
    return new Refusal(
      'invalid',
      error.issues.length > 1 ? `${first} (and ${error.issues.length - 1} more)` : first,
      { fields },
    );
  }
  const parser = error as { type?: string; limit?: number };
  if (parser.type === 'entity.too.large') {
    const limit = parser.limit ?? 0;
    const words =
      limit >= 1024 * 1024 ? `${Math.round(limit / 1024 / 1024)} MB` : `${Math.round(limit / 1024)} kB`;
    return new Refusal(
      'tooLarge',
      `This is larger than ${words}, the most that can be sent here. Nothing was saved.`,
    );
  }
  if (parser.type === 'entity.parse.failed')
    return new Refusal('invalid', 'This is not JSON that can be read.');
  if (
    parser.type?.startsWith('request.') ||
    parser.type === 'encoding.unsupported' ||
    parser.type === 'charset.unsupported'
  )
    return new Refusal('invalid', 'The request could not be read.');
  return null;
}
