import { timingSafeEqual } from 'node:crypto';
import { and, eq, isNull } from 'drizzle-orm';
import type { Request } from 'express';
import 'express-session';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { Access } from '#shared/kernel/endpoint.ts';
import { idSchema } from '#shared/kernel/ids.ts';
import type { Role } from '#shared/kernel/roles.ts';
import { sha256Hex } from '#shared/kernel/canonical.ts';
import { accounts, memberships } from '../account/account.table.ts';
import { people } from '../people/people.table.ts';
import { devices } from '../signons/signons.table.ts';
import type { Db } from './db.ts';

/** Somebody signed in, in one organisation. */
export type UserActor = {
  kind: 'user';
  accountId: string;
  orgId: string;
  role: Role;
  personId: string | null;
  name: string;
};
/** A worker's enrolled phone. */
export type DeviceActor = { kind: 'device'; orgId: string; deviceId: string; personId: string; name: string };
export type PublicActor = { kind: 'public' };

export type ActorOf<A extends Access> = A extends 'public'
  ? PublicActor
  : A extends 'device'
    ? DeviceActor
    : UserActor;

declare module 'express-session' {
  interface SessionData {
    accountId: string;
    orgId: string;
  }
}

/** Who is signed in; refuses with `signedOut` where nobody is, or where the membership has been taken away. */
export async function userOf(db: Db, { session }: Pick<Request, 'session'>): Promise<UserActor> {
  const { accountId, orgId } = session;
  if (!accountId || !orgId) throw new Refusal('signedOut', 'Sign in to go on.');
  const [member] = await db
    .select({ role: memberships.role, personId: memberships.personId, name: accounts.name })
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(and(eq(memberships.orgId, orgId), eq(memberships.accountId, accountId)));
  if (!member) throw new Refusal('signedOut', 'This sign-in no longer belongs to the organisation.');
  return { kind: 'user', accountId, orgId, ...member };
}

export const deviceCookie = 'tb_device';

/** The phone behind a request and its person, or null where the phone is not known, was revoked, or its person left. */
export async function deviceOf(db: Db, request: Request): Promise<DeviceActor | null> {
  const [deviceId = '', secret = ''] = cookieOf(request, deviceCookie).split('.');
  if (!idSchema.safeParse(deviceId).success || secret === '') return null;
  const [device] = await db
    .select({
      orgId: devices.orgId,
      personId: devices.personId,
      secretHash: devices.secretHash,
      name: people.name,
    })
    .from(devices)
    .innerJoin(people, and(eq(people.orgId, devices.orgId), eq(people.id, devices.personId)))
    .where(and(eq(devices.id, deviceId), isNull(devices.revokedAt), isNull(people.archivedAt)));
  if (!device || !timingSafeEqual(Buffer.from(sha256Hex(secret)), Buffer.from(device.secretHash)))
    return null;
  return { kind: 'device', orgId: device.orgId, deviceId, personId: device.personId, name: device.name };
}

function cookieOf(request: Request, name: string): string {
  const pair = (request.headers.cookie ?? '').split(/;\s*/).find((part) => part.startsWith(`${name}=`));
  // Ours holds nothing that cookies escape; whatever does is not ours.
  return pair ? pair.slice(name.length + 1) : '';
}
