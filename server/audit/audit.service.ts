import { and, asc, eq, gte, isNull, max } from 'drizzle-orm';
import type { Exception } from '#shared/audit/audit.api.ts';
import { type AuditFacts, earliestMissedTalk, exceptionsOf } from '#shared/audit/exceptions.ts';
import { workDateOf } from '#shared/kernel/work-date.ts';
import { accounts, memberships, organisations } from '../account/account.table.ts';
import { ledgerHeads } from '../ledger/ledger.table.ts';
import type { Db } from '../platform/db.ts';
import { signOns } from '../signons/signons.table.ts';
import { latestSignOns, statementsInForce } from '../signons/standing.service.ts';
import { boardOf } from '../sites/board.service.ts';
import { listSites, todayAt } from '../sites/sites.service.ts';
import { sites } from '../sites/sites.table.ts';
import { listStatements } from '../statements/read.service.ts';
import { crewOf, listTalks } from '../talks/talks.service.ts';
import { attendances, talks } from '../talks/talks.table.ts';

const reviewDays = 30;
const day = 24 * 60 * 60 * 1000;

type Filters = { siteId?: string | undefined; kind?: Exception['kind'] | undefined };

/** Exceptions across all sites, counted before the kind is chosen. */
export async function listExceptions(db: Db, orgId: string, { siteId, kind }: Filters, now = new Date()) {
  const facts = {
    statements: await statementFacts(db, orgId, siteId),
    talks: await talkFacts(db, orgId, siteId, now),
  };
  const all = exceptionsOf(facts, now);
  const counts = { notSigned: 0, signedOlder: 0, readTooFast: 0, talkMissed: 0 };
  for (const exception of all) counts[exception.kind] += 1;
  const [head] = await db.select().from(ledgerHeads).where(eq(ledgerHeads.orgId, orgId));
  return {
    exceptions: all.filter((exception) => !kind || exception.kind === kind),
    counts,
    at: now.toISOString(),
    ledger: { entries: head?.sequence ?? 0, hash: head?.hash ?? '' },
  };
}

async function statementFacts(
  db: Db,
  orgId: string,
  siteId: string | undefined,
): Promise<AuditFacts['statements']> {
  const inForce = await statementsInForce(db, orgId, { siteId });
  const signed = await latestSignOns(db, orgId, { siteId });
  const longest = await longestReadings(db, orgId);
  const facts = [];
  for (const statement of inForce) {
    const crew = await crewOf(db, orgId, statement.siteId);
    facts.push({
      siteId: statement.siteId,
      site: statement.site,
      timeZone: statement.timeZone,
      statementId: statement.statementId,
      title: statement.title,
      current: statement.current,
      wordsOnCards: statement.wordsOnCards,
      revisions: statement.revisions,
      crew: crew.map(({ personId, name, employer }) => ({ personId, person: name, employer })),
      signOns: signed
        .filter(({ statementId }) => statementId === statement.statementId)
        .map(({ id, personId, revisionNumber, signedAt, readingMs }) => ({
          id,
          personId,
          revision: revisionNumber,
          signedAt: signedAt.toISOString(),
          readingMs: longest.get(`${statement.statementId} ${personId} ${revisionNumber}`) ?? readingMs,
        })),
    });
  }
  return facts;
}

/** Whoever read too fast mends it by reading again and signing: the longest reading counts, by statement, person and revision. */
async function longestReadings(db: Db, orgId: string): Promise<Map<string, number>> {
  const { statementId, personId, revisionNumber, readingMs } = signOns;
  const rows = await db
    .select({ statementId, personId, revisionNumber, readingMs: max(readingMs) })
    .from(signOns)
    .where(eq(signOns.orgId, orgId))
    .groupBy(statementId, personId, revisionNumber);
  return new Map(
    rows.map((row) => [`${row.statementId} ${row.personId} ${row.revisionNumber}`, row.readingMs ?? 0]),
  );
}

async function talkFacts(
  db: Db,
  orgId: string,
  siteId: string | undefined,
  now: Date,
): Promise<AuditFacts['talks']> {
  const rows = await db
    .select({ talk: talks, site: sites.name, timeZone: sites.timeZone })
    .from(talks)
    .innerJoin(sites, and(eq(sites.orgId, talks.orgId), eq(sites.id, talks.siteId)))
    .where(
      and(
        eq(talks.orgId, orgId),
        eq(talks.state, 'closed'),
        isNull(sites.archivedAt),
        gte(talks.closedAt, earliestMissedTalk(now)),
        siteId ? eq(talks.siteId, siteId) : undefined,
      ),
    );
  const there = await db
    .select({ talkId: attendances.talkId, personId: attendances.personId })
    .from(attendances)
    .where(eq(attendances.orgId, orgId));
  return rows.map(({ talk, site, timeZone }) => ({
    siteId: talk.siteId,
    site,
    timeZone,
    talkId: talk.id,
    topic: talk.topic,
    date: talk.date,
    closedAt: talk.closedAt?.toISOString() ?? '',
    expected: (talk.expected ?? []).map(({ personId, name, employer }) => ({
      personId,
      person: name,
      employer,
    })),
    attended: there.filter(({ talkId }) => talkId === talk.id).map(({ personId }) => personId),
  }));
}

/** The supervisor's morning. */
export async function todayOf(db: Db, orgId: string, now = new Date()) {
  const open = await listSites(db, orgId, { archived: 'no' });
  const boards = [];
  const today = [];
  for (const site of open) {
    const { parts } = await boardOf(db, orgId, site.id, now);
    boards.push({ id: site.id, name: site.name, parts });
    const date = todayAt(site, now);
    today.push(...(await listTalks(db, orgId, { siteId: site.id, from: date, to: date })));
  }
  const drafts = await listStatements(db, orgId, {});
  return {
    at: now.toISOString(),
    sites: boards,
    drafts: drafts.filter(({ state }) => state === 'draft' || state === 'submitted'),
    talks: today,
  };
}

/** What runs out: reviews due within a month or overdue, invitations not taken up. */
export async function lapsingOf(db: Db, orgId: string, now = new Date()) {
  const [organisation] = await db
    .select({ timeZone: organisations.timeZone })
    .from(organisations)
    .where(eq(organisations.id, orgId));
  const zone = organisation?.timeZone ?? 'UTC';
  const today = workDateOf(now, zone);
  const soon = workDateOf(new Date(now.getTime() + reviewDays * day), zone);
  const inForce = await statementsInForce(db, orgId);
  const invited = await db
    .select({
      accountId: accounts.id,
      name: accounts.name,
      email: accounts.email,
      invitedAt: memberships.invitedAt,
    })
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(and(eq(memberships.orgId, orgId), isNull(memberships.joinedAt)))
    .orderBy(asc(memberships.invitedAt));
  return {
    at: now.toISOString(),
    reviews: inForce
      .flatMap(({ statementId, title, site, reviewDate }) =>
        reviewDate && reviewDate <= soon
          ? [{ statementId, title, site, reviewDate, overdue: reviewDate < today }]
          : [],
      )
      .toSorted((a, b) => a.reviewDate.localeCompare(b.reviewDate)),
    invitations: invited.map(({ invitedAt, ...who }) => ({ ...who, invitedAt: invitedAt.toISOString() })),
  };
}
