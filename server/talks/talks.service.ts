import { and, asc, count, desc, eq, gte, ilike, inArray, isNull, lte, sql } from 'drizzle-orm';
import type { z } from 'zod';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { Talk, TalkBody, talkQuery, TalkRow } from '#shared/talks/talks.api.ts';
import { employers, people } from '../people/people.table.ts';
import type { UserActor } from '../platform/actor.ts';
import { csvOf } from '../platform/csv.ts';
import type { Db } from '../platform/db.ts';
import { getSite } from '../sites/sites.service.ts';
import { crewMembers, sites } from '../sites/sites.table.ts';
import { attendances, talks } from './talks.table.ts';

export type TalkRecord = typeof talks.$inferSelect;
const at = (orgId: string, id: string) => and(eq(talks.orgId, orgId), eq(talks.id, id));

/** Model WHS Act s 48: without matters raised and an outcome a talk was a briefing, not consultation. */
export const isConsultation = ({
  mattersRaised,
  outcome,
}: Pick<TalkRecord, 'mattersRaised' | 'outcome'>): boolean =>
  mattersRaised.trim() !== '' && outcome.trim() !== '';

export async function listTalks(
  db: Db,
  orgId: string,
  query: z.output<typeof talkQuery>,
): Promise<TalkRow[]> {
  const attendedBy = query.personId
    ? inArray(
        talks.id,
        db
          .select({ id: attendances.talkId })
          .from(attendances)
          .where(and(eq(attendances.orgId, orgId), eq(attendances.personId, query.personId))),
      )
    : undefined;
  const rows = await db
    .select({
      talk: talks,
      site: sites.name,
      timeZone: sites.timeZone,
      attended: sql<number>`(select count(*)::int from attendances a where a.org_id = ${talks.orgId} and a.talk_id = ${talks.id})`,
      crew: sql<number>`(select count(*)::int from crew_members c where c.org_id = ${talks.orgId} and c.site_id = ${talks.siteId})`,
    })
    .from(talks)
    .innerJoin(sites, and(eq(sites.orgId, talks.orgId), eq(sites.id, talks.siteId)))
    .where(
      and(
        eq(talks.orgId, orgId),
        query.siteId ? eq(talks.siteId, query.siteId) : undefined,
        query.state ? eq(talks.state, query.state) : undefined,
        query.from ? gte(talks.date, query.from) : undefined,
        query.to ? lte(talks.date, query.to) : undefined,
        query.search ? ilike(talks.topic, `%${query.search.replace(/[\\%_]/g, '\\$&')}%`) : undefined,
        attendedBy,
      ),
    )
    .orderBy(desc(talks.date), desc(talks.time));
  return rows.map(({ talk, site, timeZone, attended, crew }) => ({
    id: talk.id,
    siteId: talk.siteId,
    site,
    timeZone,
    topic: talk.topic,
    presenter: talk.presenter,
    date: talk.date,
    time: talk.time,
    state: talk.state,
    attended,
    crew: talk.expected?.length ?? crew,
    consultation: isConsultation(talk),
    openActions: talk.actions.length,
  }));
}

export async function talksCsv(db: Db, orgId: string, query: z.output<typeof talkQuery>): Promise<string> {
  const rows = await listTalks(db, orgId, query);
  return csvOf(
    [
      'Date',
      'Time',
      'Time zone',
      'Site',
      'Topic',
      'Presenter',
      'State',
      'Attended',
      'Crew',
      'Consultation',
      'Actions',
    ],
    rows.map((talk) => [
      talk.date,
      talk.time,
      talk.timeZone,
      talk.site,
      talk.topic,
      talk.presenter,
      talk.state,
      talk.attended,
      talk.crew,
      talk.consultation ? 'yes' : 'briefing only',
      talk.openActions,
    ]),
  );
}

export type Expected = { personId: string; name: string; employer: string };

/** Who is expected at a talk: the site's crew now. */
export async function crewOf(db: Db, orgId: string, siteId: string): Promise<Expected[]> {
  return db
    .select({ personId: people.id, name: people.name, employer: employers.name })
    .from(crewMembers)
    .innerJoin(
      people,
      and(
        eq(people.orgId, crewMembers.orgId),
        eq(people.id, crewMembers.personId),
        isNull(people.archivedAt),
      ),
    )
    .innerJoin(employers, and(eq(employers.orgId, people.orgId), eq(employers.id, people.employerId)))
    .where(and(eq(crewMembers.orgId, orgId), eq(crewMembers.siteId, siteId)))
    .orderBy(asc(people.name));
}

export async function getTalk(db: Db, orgId: string, id: string): Promise<Talk> {
  const [talk] = await db.select().from(talks).where(at(orgId, id));
  if (!talk) throw new Refusal('missing', 'This talk is not there.');
  const site = await getSite(db, orgId, talk.siteId);
  const signed = await attendanceOf(db, orgId, id);
  const expected = talk.expected ?? (await crewOf(db, orgId, talk.siteId));
  return {
    id,
    siteId: talk.siteId,
    topic: talk.topic,
    presenter: talk.presenter,
    date: talk.date,
    time: talk.time,
    minutes: talk.minutes,
    place: talk.place,
    points: talk.points,
    mattersRaised: talk.mattersRaised,
    outcome: talk.outcome,
    representativePresent: talk.representativePresent,
    actions: talk.actions,
    site: site.name,
    timeZone: site.timeZone,
    state: talk.state,
    lockVersion: talk.lockVersion,
    consultation: isConsultation(talk),
    attendance: signed.map((row) => ({
      id: row.id,
      personId: row.personId,
      name: row.personName,
      employer: row.employerName,
      signedAt: row.signedAt.toISOString(),
      method: row.method,
      svg: row.svg,
      typedName: row.typedName,
      witness: row.witness,
      handedRoundBy: row.handedRoundByName,
    })),
    missing: expected.filter(({ personId }) => !signed.some((row) => row.personId === personId)),
    closedAt: talk.closedAt?.toISOString() ?? null,
    closedBy: talk.closedByName,
    hash: talk.hash,
    ledgerSequence: talk.ledgerSequence,
  };
}

export async function attendanceOf(db: Db, orgId: string, talkId: string) {
  return db
    .select()
    .from(attendances)
    .where(and(eq(attendances.orgId, orgId), eq(attendances.talkId, talkId)))
    .orderBy(asc(attendances.receivedAt));
}

/** Creates a talk (lock version 0) or changes an open one. A resent creation finds its talk and changes nothing. */
export async function saveTalk(
  db: Db,
  actor: UserActor,
  id: string,
  { lockVersion, ...body }: TalkBody & { lockVersion: number },
): Promise<Talk> {
  const site = await getSite(db, actor.orgId, body.siteId);
  if (lockVersion === 0) {
    if (site.archivedAt) throw new Refusal('conflict', 'This site is closed.');
    await db
      .insert(talks)
      .values({ orgId: actor.orgId, id, ...body, createdBy: actor.accountId })
      .onConflictDoNothing();
    return getTalk(db, actor.orgId, id);
  }
  const talk = await lockOpenTalk(db, actor.orgId, id, lockVersion);
  if (talk.siteId !== body.siteId && (await countAttendance(db, actor.orgId, id)) > 0)
    throw new Refusal('conflict', 'People have signed this talk at its site; it can’t move to another.');
  await db
    .update(talks)
    .set({ ...body, lockVersion: lockVersion + 1 })
    .where(at(actor.orgId, id));
  return getTalk(db, actor.orgId, id);
}

/** The talk's row, locked; refuses a closed one, and one that was saved by somebody else meanwhile. */
export async function lockOpenTalk(
  db: Db,
  orgId: string,
  id: string,
  lockVersion: number,
): Promise<TalkRecord> {
  const [talk] = await db.select().from(talks).where(at(orgId, id)).for('update');
  if (!talk) throw new Refusal('missing', 'This talk is not there.');
  if (talk.state === 'closed')
    throw new Refusal('conflict', 'This talk is closed. A closed talk is never changed.');
  if (talk.lockVersion !== lockVersion)
    throw new Refusal(
      'conflict',
      'Somebody saved this talk meanwhile. What you wrote is still here: look at theirs, then save again.',
      {
        extra: { talk: await getTalk(db, orgId, id) },
      },
    );
  return talk;
}

async function countAttendance(db: Db, orgId: string, talkId: string): Promise<number> {
  const [row] = await db
    .select({ count: count() })
    .from(attendances)
    .where(and(eq(attendances.orgId, orgId), eq(attendances.talkId, talkId)));
  return row?.count ?? 0;
}

export async function discardTalk(db: Db, actor: UserActor, id: string): Promise<void> {
  const [talk] = await db.select().from(talks).where(at(actor.orgId, id)).for('update');
  if (!talk) throw new Refusal('missing', 'This talk is not there.');
  if (talk.state === 'closed') throw new Refusal('conflict', 'A closed talk stays on record.');
  if ((await countAttendance(db, actor.orgId, id)) > 0)
    throw new Refusal('conflict', 'People have signed this talk. Close it instead.');
  await db.delete(talks).where(at(actor.orgId, id));
}
