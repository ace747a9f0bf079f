import type { Router } from 'express';
import { accountRoutes } from '../account/account.routes.ts';
import { auditRoutes } from '../audit/audit.routes.ts';
import { libraryRoutes } from '../library/library.routes.ts';
import { peopleRoutes } from '../people/people.routes.ts';
import { registerRoutes } from '../signons/register.routes.ts';
import { signOnRoutes } from '../signons/signons.routes.ts';
import { siteRoutes } from '../sites/sites.routes.ts';
import { statementRoutes } from '../statements/statements.routes.ts';
import { talkRoutes } from '../talks/talks.routes.ts';
import type { Platform } from './platform.ts';

/** Puts a feature's endpoints on the router. */
export type Feature = (router: Router, platform: Platform) => void;

/** Every feature of the server; each `server/<feature>/<feature>.routes.ts` exports one. */
export const features: Feature[] = [
  accountRoutes,
  auditRoutes,
  libraryRoutes,
  peopleRoutes,
  registerRoutes,
  signOnRoutes,
  siteRoutes,
  statementRoutes,
  talkRoutes,
];
