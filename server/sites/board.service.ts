import { and, eq, isNull } from 'drizzle-orm';
import type { BoardPart } from '#shared/sites/sites.api.ts';
import { latestSignOns, standingOf, statementsInForce } from '../signons/standing.service.ts';
import type { Db } from '../platform/db.ts';
import { people } from '../people/people.table.ts';
import { statements } from '../statements/statements.table.ts';
import { attendances, talks } from '../talks/talks.table.ts';
import { getSite, todayAt } from './sites.service.ts';
import { crewMembers } from './sites.table.ts';

/** What stands between a site's crew and the edge right now: sign-on, today's talk, drafts that wait. */
export async function boardOf(db: Db, orgId: string, siteId: string, now = new Date()) {
  const site = await getSite(db, orgId, siteId);
  const crew = await db
    .select({ personId: crewMembers.personId })
    .from(crewMembers)
    .innerJoin(
      people,
      and(
        eq(people.orgId, crewMembers.orgId),
        eq(people.id, crewMembers.personId),
        isNull(people.archivedAt),
      ),
    )
    .where(and(eq(crewMembers.orgId, orgId), eq(crewMembers.siteId, siteId)));
  const parts = [
    ...(await signOnParts(
      db,
      orgId,
      siteId,
      crew.map(({ personId }) => personId),
    )),
    ...(await talkParts(db, orgId, siteId, todayAt(site, now))),
    ...(await draftParts(db, orgId, siteId)),
  ];
  return { siteId, site: site.name, at: now.toISOString(), parts };
}

async function signOnParts(db: Db, orgId: string, siteId: string, crew: string[]): Promise<BoardPart[]> {
  const inForce = await statementsInForce(db, orgId, { siteId });
  if (inForce.length === 0) {
    return [
      { key: 'signOn', words: 'no statement in force', well: false, link: `/statements?siteId=${siteId}` },
    ];
  }
  if (crew.length === 0)
    return [{ key: 'signOn', words: 'nobody on the crew yet', well: false, link: `/sites/${siteId}` }];
  const signed = await latestSignOns(db, orgId, { siteId });
  return inForce.map((statement) => {
    const standings = crew.map((personId) => standingOf(statement, signed, personId));
    const current = standings.filter((standing) => standing === 'current').length;
    const well = current === crew.length;
    // The register shows one standing at a time: those who never signed first, then those who signed an older revision.
    const behind = standings.includes('none') ? 'none' : 'older';
    const name = inForce.length > 1 ? `${statement.title}: ` : '';
    return {
      key: 'signOn',
      words: `${name}${current} of ${crew.length} signed on, rev ${statement.current}`,
      well,
      link: `/register?siteId=${siteId}&statementId=${statement.statementId}${well ? '' : `&status=${behind}`}`,
    };
  });
}

async function talkParts(db: Db, orgId: string, siteId: string, today: string): Promise<BoardPart[]> {
  const rows = await db
    .select({ id: talks.id, time: talks.time, state: talks.state })
    .from(talks)
    .where(and(eq(talks.orgId, orgId), eq(talks.siteId, siteId), eq(talks.date, today)))
    .orderBy(talks.time);
  if (rows.length === 0)
    return [{ key: 'talk', words: 'no talk today', well: true, link: `/talks?siteId=${siteId}` }];
  return Promise.all(
    rows.map(async ({ id, time, state }): Promise<BoardPart> => {
      const attended = await db.$count(
        attendances,
        and(eq(attendances.orgId, orgId), eq(attendances.talkId, id)),
      );
      const words = state === 'closed' ? `talk ${time} held, ${attended} there` : `talk ${time} not closed`;
      return { key: 'talk', words, well: state === 'closed', link: `/talks/${id}` };
    }),
  );
}

async function draftParts(db: Db, orgId: string, siteId: string): Promise<BoardPart[]> {
  const waiting = await db.$count(
    statements,
    and(eq(statements.orgId, orgId), eq(statements.siteId, siteId), eq(statements.state, 'submitted')),
  );
  if (waiting === 0) return [];
  const words =
    waiting === 1 ? '1 draft waits for the safety officer' : `${waiting} drafts wait for the safety officer`;
  return [{ key: 'draft', words, well: true, link: `/statements?siteId=${siteId}&state=submitted` }];
}
