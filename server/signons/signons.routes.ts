import { eq, and } from 'drizzle-orm';
import { Refusal } from '#shared/kernel/refusal.ts';
import { mayDo } from '#shared/kernel/roles.ts';
import * as api from '#shared/signons/signons.api.ts';
import { deviceCookie, type DeviceActor, type UserActor } from '../platform/actor.ts';
import type { Db } from '../platform/db.ts';
import type { Feature } from '../platform/features.ts';
import { mount } from '../platform/mount.ts';
import { getSite, isOnCrew, siteByToken } from '../sites/sites.service.ts';
import { crewMembers } from '../sites/sites.table.ts';
import * as enrolment from './enrol.service.ts';
import { readingOf, toSignAt } from './reading.service.ts';
import { attend, signOn, type Signing } from './signons.service.ts';

const year = 365 * 24 * 60 * 60 * 1000;

export const signOnRoutes: Feature = (router, platform) => {
  /* A worker's own phone */
  mount(router, platform, api.getSignPage, async ({ db, params, device }) =>
    enrolment.signPage(db, params.token, await device()),
  );

  // The throttles come before any transaction.
  mount(
    router,
    platform,
    api.findPerson,
    async ({ db, params, body, request }) => {
      const site = await siteByToken(db, params.token);
      await enrolment.requireDayCode(db, platform.throttles, {
        site,
        code: body.dayCode,
        address: request.ip ?? '',
      });
      return enrolment.findPeople(db, site.orgId, body.name);
    },
    { transaction: false },
  );

  mount(
    router,
    platform,
    api.enrol,
    async ({ db, params, body, request, response }) => {
      const site = await siteByToken(db, params.token);
      await enrolment.requireDayCode(db, platform.throttles, {
        site,
        code: body.dayCode,
        address: request.ip ?? '',
      });
      const { secret, ...person } = await db.transaction((tx) =>
        enrolment.enrolDevice(tx, site, body, request.headers['user-agent'] ?? ''),
      );
      response.cookie(deviceCookie, `${body.deviceId}.${secret}`, {
        httpOnly: true,
        sameSite: 'lax',
        secure: request.secure,
        maxAge: 2 * year,
      });
      return person;
    },
    { transaction: false },
  );

  mount(router, platform, api.forgetDevice, async ({ db, actor, response }) => {
    await enrolment.forgetDevice(db, actor);
    response.clearCookie(deviceCookie);
    return { done: true as const };
  });

  mount(router, platform, api.getOwnToSign, async ({ db, actor, params }) => {
    const siteId = await siteOfDevice(db, actor, params.token);
    return toSignAt(db, actor.orgId, siteId, actor.personId);
  });
  mount(router, platform, api.getOwnReading, async ({ db, actor, params }) => {
    const siteId = await siteOfDevice(db, actor, params.token);
    return readingOf(db, actor.orgId, params.revisionId, { siteId });
  });
  mount(router, platform, api.signOn, async ({ db, actor, params, body, request }) => {
    const siteId = await siteOfDevice(db, actor, params.token);
    return signOn(db, byDevice(actor, siteId, request.headers['user-agent']), params.id, body);
  });
  mount(router, platform, api.attend, async ({ db, actor, params, body, request }) => {
    const siteId = await siteOfDevice(db, actor, params.token);
    return attend(db, byDevice(actor, siteId, request.headers['user-agent']), params.id, body);
  });

  /* A signed-in person's own, and a device handed round */
  mount(router, platform, api.getMyToSign, async ({ db, actor }) => {
    const { personId, orgId } = actor;
    if (!personId) return { sites: [] };
    const rows = await db
      .select({ siteId: crewMembers.siteId })
      .from(crewMembers)
      .where(and(eq(crewMembers.orgId, orgId), eq(crewMembers.personId, personId)));
    const sites = [];
    for (const { siteId } of rows) {
      const site = await getSite(db, orgId, siteId);
      if (!site.archivedAt) sites.push(await toSignAt(db, orgId, siteId, personId));
    }
    return { sites };
  });
  mount(router, platform, api.getToSign, ({ db, actor, params }) => {
    requireMayTake(actor, params.personId);
    return toSignAt(db, actor.orgId, params.id, params.personId);
  });
  mount(router, platform, api.getReading, ({ db, actor, params }) => readingOf(db, actor.orgId, params.id));
  mount(router, platform, api.signOnFor, async ({ db, actor, params, body, request }) => {
    await requireSite(db, actor, params);
    return signOn(db, byUser(actor, params, request.headers['user-agent']), params.signOnId, body);
  });
  mount(router, platform, api.attendFor, async ({ db, actor, params, body, request }) => {
    await requireSite(db, actor, params);
    return attend(db, byUser(actor, params, request.headers['user-agent']), params.attendanceId, body);
  });
};

/** The site of a sign-on address, for a phone that has been let in there. */
async function siteOfDevice(db: Db, { orgId, personId }: DeviceActor, token: string): Promise<string> {
  const site = await siteByToken(db, token);
  if (site.orgId !== orgId) throw new Refusal('missing', 'This phone is not known here.');
  if (!(await isOnCrew(db, orgId, site.id, personId)))
    throw new Refusal('signedOut', 'You are not on this site’s crew yet. Use today’s code.');
  return site.id;
}

const byDevice = ({ orgId, personId, deviceId }: DeviceActor, siteId: string, userAgent = ''): Signing => ({
  orgId,
  siteId,
  personId,
  by: { deviceId },
  userAgent,
});

const byUser = (
  { orgId, accountId, name, personId: own }: UserActor,
  { id, personId }: { id: string; personId: string },
  userAgent = '',
): Signing => ({ orgId, siteId: id, personId, by: { accountId, name, own: own === personId }, userAgent });

/** One's own, or anybody's for who may hand a device round. */
function requireMayTake(actor: UserActor, personId: string): void {
  if (actor.personId === personId || mayDo(actor.role, 'signon.take')) return;
  throw new Refusal('forbidden', 'Only a supervisor or safety officer may hand a device round.');
}

async function requireSite(
  db: Db,
  actor: UserActor,
  { id, personId }: { id: string; personId: string },
): Promise<void> {
  requireMayTake(actor, personId);
  const site = await getSite(db, actor.orgId, id);
  if (site.archivedAt) throw new Refusal('conflict', 'This site is closed.');
}
