import type { RequestHandler } from 'express';
import type { Logger } from 'pino';
import type { EndpointSpec } from '#shared/kernel/endpoint.ts';
import type { PrintService } from '../print/browser.ts';
import type { Config } from './config.ts';
import type { Database } from './db.ts';
import type { Throttles } from './throttle.ts';

/** What every feature's routes are given. */
export type Platform = {
  config: Config;
  /** Address that QR codes and mails carry. */
  publicUrl: () => string;
  database: Database;
  throttles: Throttles;
  print: PrintService;
  log: Logger;
  session: RequestHandler;
  /** Sends queued mail; called after a commit that wrote some. */
  deliverMail: () => void;
  version: string;
  /** Every endpoint that was mounted, for the OpenAPI document. */
  endpoints: EndpointSpec[];
};
