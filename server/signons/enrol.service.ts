import { randomBytes, timingSafeEqual } from 'node:crypto';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import type { z } from 'zod';
import { sha256Hex } from '#shared/kernel/canonical.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { enrolBody } from '#shared/signons/signons.api.ts';
import { organisations } from '../account/account.table.ts';
import { getPerson, requireEmployer } from '../people/people.service.ts';
import { employers, people } from '../people/people.table.ts';
import type { DeviceActor } from '../platform/actor.ts';
import type { Db } from '../platform/db.ts';
import type { Throttles } from '../platform/throttle.ts';
import { dayCodeFor, isOnCrew, putOnCrew, siteByToken, todayAt } from '../sites/sites.service.ts';
import type { sites } from '../sites/sites.table.ts';
import { collectionNotice } from './declarations.ts';
import { nameBegins } from './names.ts';
import { devices } from './signons.table.ts';

type SiteRow = typeof sites.$inferSelect;

export async function organisationOf(db: Db, orgId: string): Promise<typeof organisations.$inferSelect> {
  const [organisation] = await db.select().from(organisations).where(eq(organisations.id, orgId));
  if (!organisation) throw new Error('The organisation is gone.');
  return organisation;
}

/** What the sign-on page may say to anybody: no names, no statements, unless this phone is known here. */
export async function signPage(db: Db, token: string, device: DeviceActor | null) {
  const site = await siteByToken(db, token);
  const organisation = await organisationOf(db, site.orgId);
  const known = device?.orgId === site.orgId ? await getPerson(db, site.orgId, device.personId) : null;
  return {
    site: site.name,
    organisation: organisation.name,
    recognised: known ? { personId: known.id, name: known.name, employer: known.employer } : null,
    dayCodeNeeded: !known || !(await isOnCrew(db, site.orgId, site.id, known.id)),
    notice: collectionNotice(organisation.profileId, {
      organisation: organisation.name,
      contact: organisation.contact,
    }),
    invented: organisation.invented,
  };
}

/**
 * Lets somebody with today's code through, and counts the tries of everybody else. Compared in constant time. Call it outside a
 * transaction: the throttle has a connection of its own.
 */
export async function requireDayCode(
  db: Db,
  throttles: Throttles,
  { site, code, address }: { site: SiteRow; code: string; address: string },
): Promise<void> {
  // The address first: one that is held up already must not use up the whole site's tries.
  await throttles.spend('dayCode', `${site.id}:${address}`);
  await throttles.spend('dayCodeSite', site.id);
  const right = await dayCodeFor(db, site.orgId, site.id, todayAt(site));
  if (!timingSafeEqual(Buffer.from(right), Buffer.from(code)))
    throw new Refusal(
      'invalid',
      'This is not today’s code. It stands on the supervisor’s screen and on the site board.',
      {
        fields: { dayCode: 'This is not today’s code.' },
      },
    );
  await throttles.forgive('dayCode', `${site.id}:${address}`);
  await throttles.giveBack('dayCodeSite', site.id);
}

/** People whose names begin as written, word by word; at most five, and only after the day code. */
export async function findPeople(db: Db, orgId: string, written: string) {
  const rows = await db
    .select({ id: people.id, name: people.name, employer: employers.name })
    .from(people)
    .innerJoin(employers, and(eq(employers.orgId, people.orgId), eq(employers.id, people.employerId)))
    .where(and(eq(people.orgId, orgId), isNull(people.archivedAt)))
    .orderBy(asc(people.name));
  const found = rows.filter(({ name }) => nameBegins(name, written));
  const choices = await db
    .select({ id: employers.id, name: employers.name })
    .from(employers)
    .where(eq(employers.orgId, orgId))
    .orderBy(asc(employers.name));
  return { people: found.slice(0, 5), employers: choices };
}

type Enrolment = z.output<typeof enrolBody>;

/** Ties a phone to a person and puts the person on the crew. Returns the secret for the cookie; only its hash is kept. */
export async function enrolDevice(
  db: Db,
  site: SiteRow,
  { deviceId, noticeVersion, person }: Enrolment,
  userAgent: string,
): Promise<{ personId: string; name: string; secret: string }> {
  const organisation = await organisationOf(db, site.orgId);
  const notice = collectionNotice(organisation.profileId, {
    organisation: organisation.name,
    contact: organisation.contact,
  });
  if (notice.version !== noticeVersion)
    throw new Refusal('invalid', 'The notice on what is kept has changed. Read it again.', {
      fields: { noticeVersion: 'Read the notice first.' },
    });
  const personId = 'existing' in person ? person.existing : await addSelf(db, site.orgId, person.new);
  const known = await getPerson(db, site.orgId, personId);
  if (known.archivedAt)
    throw new Refusal('conflict', 'This name was taken off the lists. Ask the supervisor.');
  await putOnCrew(db, site.orgId, site.id, personId);
  const secret = randomBytes(32).toString('base64url');
  const secretHash = sha256Hex(secret);
  const [kept] = await db
    .insert(devices)
    .values({ orgId: site.orgId, id: deviceId, personId, secretHash, userAgent, noticeVersion })
    .onConflictDoUpdate({
      target: devices.id,
      // A resend gets a fresh secret; a phone that was revoked, or that is somebody else's, is not taken over.
      set: { secretHash, lastSeenAt: new Date() },
      setWhere: sql`${devices.orgId} = ${site.orgId} and ${devices.personId} = ${personId} and ${devices.revokedAt} is null`,
    })
    .returning({ id: devices.id });
  if (!kept) throw new Refusal('conflict', 'This phone is tied to somebody else. Choose “Not me” first.');
  return { personId, name: known.name, secret };
}

async function addSelf(
  db: Db,
  orgId: string,
  { id, ...person }: Extract<Enrolment['person'], { new: unknown }>['new'],
): Promise<string> {
  await requireEmployer(db, orgId, person.employerId);
  await db
    .insert(people)
    .values({ orgId, id, ...person, enrolledSelf: true })
    .onConflictDoNothing();
  return id;
}

export async function forgetDevice(db: Db, { orgId, deviceId }: DeviceActor): Promise<void> {
  await db
    .update(devices)
    .set({ revokedAt: new Date() })
    .where(and(eq(devices.orgId, orgId), eq(devices.id, deviceId)));
}
