import { workDateOf } from '#shared/kernel/work-date.ts';
import type { UserActor } from '../platform/actor.ts';
import type { Scenario } from './scenario.ts';

/** What the scenario's keys became. */
export type Seeded = {
  orgId: string;
  scenario: Scenario;
  sites: Map<string, string>;
  people: Map<string, string>;
  supervisor: UserActor;
  safetyOfficer: UserActor;
  now: Date;
};

/** A scenario's key that must lead somewhere. */
export function known<T>(map: Map<string, T>, key: string): T {
  const value = map.get(key);
  if (value === undefined) throw new Error(`The demo scenario names "${key}", which it does not define.`);
  return value;
}

export const daysBefore = (now: Date, days: number): Date =>
  new Date(now.getTime() - days * 24 * 60 * 60 * 1000);
export const dayOf = (at: Date, zone: string): string => workDateOf(at, zone);
