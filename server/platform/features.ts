import type { Router } from 'express';
import { accountRoutes } from '../account/account.routes.ts';
import type { Platform } from './platform.ts';

/** Puts a feature's endpoints on the router. */
export type Feature = (router: Router, platform: Platform) => void;

/** Every feature of the server; each `server/<feature>/<feature>.routes.ts` exports one. */
export const features: Feature[] = [accountRoutes];
