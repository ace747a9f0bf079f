import type { NextFunction, Request, Response } from 'express';
import { Refusal } from '#shared/kernel/refusal.ts';

/** Header that our own pages set on every request that changes something; another site's form can't. */
export const ownHeader = 'x-toeboard';

/** Lets a changing request through only from our own pages (Fetch Metadata, Origin, and a header that a form can't set). */
export function refuseCrossSite(request: Request, _response: Response, next: NextFunction): void {
  if (request.method === 'GET' || request.method === 'HEAD') return next();
  const fetchSite = request.headers['sec-fetch-site'];
  const origin = request.headers.origin;
  const foreign =
    (fetchSite !== undefined && fetchSite !== 'same-origin' && fetchSite !== 'none') ||
    (origin !== undefined && URL.canParse(origin) && new URL(origin).host !== request.headers.host) ||
    request.headers[ownHeader] === undefined;
  next(foreign ? new Refusal('forbidden', 'This request did not come from a page of Toeboard.') : undefined);
}
