import { randomInt } from 'node:crypto';
import { and, asc, eq, isNotNull, isNull, sql } from 'drizzle-orm';
import { signToken } from './token.ts';
import type { z } from 'zod';
import { Refusal } from '#shared/kernel/refusal.ts';
import { workDateOf } from '#shared/kernel/work-date.ts';
import type { Site, siteBody } from '#shared/sites/sites.api.ts';
import { getPerson } from '../people/people.service.ts';
import type { Db } from '../platform/db.ts';
import { crewMembers, dayCodes, sites } from './sites.table.ts';

type SiteRow = typeof sites.$inferSelect;

const crewCount = sql<number>`(select count(*)::int from crew_members c where c.org_id = ${sites.orgId} and c.site_id = ${sites.id})`;

const presentSite = ({ site, crew }: { site: SiteRow; crew: number }): Site => ({
  id: site.id,
  name: site.name,
  address: site.address,
  timeZone: site.timeZone,
  principalContractor: site.principalContractor,
  emergency: site.emergency,
  signToken: site.signToken,
  crew,
  archivedAt: site.archivedAt?.toISOString() ?? null,
});

export async function listSites(
  db: Db,
  orgId: string,
  { archived }: { archived: 'yes' | 'no' },
): Promise<Site[]> {
  const rows = await db
    .select({ site: sites, crew: crewCount })
    .from(sites)
    .where(
      and(
        eq(sites.orgId, orgId),
        archived === 'yes' ? isNotNull(sites.archivedAt) : isNull(sites.archivedAt),
      ),
    )
    .orderBy(asc(sites.name));
  return rows.map(presentSite);
}

export async function getSite(db: Db, orgId: string, id: string): Promise<Site> {
  const [row] = await db
    .select({ site: sites, crew: crewCount })
    .from(sites)
    .where(and(eq(sites.orgId, orgId), eq(sites.id, id)));
  if (!row) throw new Refusal('missing', 'This site is not there.');
  return presentSite(row);
}

/** A site by the secret part of its sign-on address, which also tells the organisation. */
export async function siteByToken(db: Db, token: string): Promise<SiteRow> {
  const [site] = await db.select().from(sites).where(eq(sites.signToken, token));
  if (!site || site.archivedAt)
    throw new Refusal(
      'missing',
      'There is no open site at this address. Ask the supervisor for the code on the site board.',
    );
  return site;
}

/** Creates or changes a site; its sign-on address is made once and stays. */
export async function saveSite(
  db: Db,
  orgId: string,
  id: string,
  body: z.output<typeof siteBody>,
): Promise<Site> {
  await db
    .insert(sites)
    .values({ orgId, id, ...body, signToken: signToken() })
    .onConflictDoUpdate({ target: [sites.orgId, sites.id], set: body });
  return getSite(db, orgId, id);
}

export async function archiveSite(db: Db, orgId: string, id: string, archived: boolean): Promise<Site> {
  const site = await getSite(db, orgId, id);
  if (archived === (site.archivedAt !== null)) return site;
  await db
    .update(sites)
    .set({ archivedAt: archived ? new Date() : null })
    .where(and(eq(sites.orgId, orgId), eq(sites.id, id)));
  return getSite(db, orgId, id);
}

export async function setCrewMember(
  db: Db,
  orgId: string,
  { siteId, personId, onCrew }: { siteId: string; personId: string; onCrew: boolean },
): Promise<Site> {
  await getSite(db, orgId, siteId);
  const person = await getPerson(db, orgId, personId);
  if (onCrew && person.archivedAt)
    throw new Refusal('conflict', `${person.name} was taken off the lists. Bring them back first.`);
  if (onCrew) await putOnCrew(db, orgId, siteId, personId);
  else
    await db
      .delete(crewMembers)
      .where(
        and(eq(crewMembers.orgId, orgId), eq(crewMembers.siteId, siteId), eq(crewMembers.personId, personId)),
      );
  return getSite(db, orgId, siteId);
}

export async function putOnCrew(db: Db, orgId: string, siteId: string, personId: string): Promise<void> {
  await db.insert(crewMembers).values({ orgId, siteId, personId }).onConflictDoNothing();
}

export async function isOnCrew(db: Db, orgId: string, siteId: string, personId: string): Promise<boolean> {
  const rows = await db
    .select({ personId: crewMembers.personId })
    .from(crewMembers)
    .where(
      and(eq(crewMembers.orgId, orgId), eq(crewMembers.siteId, siteId), eq(crewMembers.personId, personId)),
    );
  return rows.length > 0;
}

/** A site's code for a day of its own calendar, made when it is first asked for. */
export async function dayCodeFor(db: Db, orgId: string, siteId: string, day: string): Promise<string> {
  const code = String(randomInt(0, 10_000)).padStart(4, '0');
  await db.insert(dayCodes).values({ orgId, siteId, day, code }).onConflictDoNothing();
  const [row] = await db
    .select({ code: dayCodes.code })
    .from(dayCodes)
    .where(and(eq(dayCodes.orgId, orgId), eq(dayCodes.siteId, siteId), eq(dayCodes.day, day)));
  return row?.code ?? code;
}

export const todayAt = ({ timeZone }: { timeZone: string }, now = new Date()): string =>
  workDateOf(now, timeZone);
