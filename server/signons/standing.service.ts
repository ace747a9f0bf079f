import { and, asc, desc, eq, isNotNull, isNull } from 'drizzle-orm';
import { countsAsCurrent, type RevisionMark } from '#shared/statements/standing.ts';
import type { Db } from '../platform/db.ts';
import { sites } from '../sites/sites.table.ts';
import { revisions, statements } from '../statements/statements.table.ts';
import { signOns } from './signons.table.ts';

/** A statement with a revision in force, and what is needed to judge signatures under it. */
export type InForce = {
  statementId: string;
  siteId: string;
  site: string;
  timeZone: string;
  title: string;
  current: number;
  revisionId: string;
  issuedAt: Date;
  changeNote: string;
  wordsOnCards: number;
  reviewDate: string | null;
  revisions: RevisionMark[];
};

type Scope = { siteId?: string | undefined; statementId?: string | undefined };

export async function statementsInForce(
  db: Db,
  orgId: string,
  { siteId, statementId }: Scope = {},
): Promise<InForce[]> {
  const rows = await db
    .select({ statement: statements, site: sites.name, timeZone: sites.timeZone })
    .from(statements)
    .innerJoin(sites, and(eq(sites.orgId, statements.orgId), eq(sites.id, statements.siteId)))
    .where(
      and(
        eq(statements.orgId, orgId),
        isNotNull(statements.currentRevision),
        isNull(sites.archivedAt),
        siteId ? eq(statements.siteId, siteId) : undefined,
        statementId ? eq(statements.id, statementId) : undefined,
      ),
    )
    .orderBy(asc(sites.name), asc(statements.title));
  const marks = await db
    .select({
      id: revisions.id,
      statementId: revisions.statementId,
      number: revisions.number,
      title: revisions.title,
      material: revisions.material,
      issuedAt: revisions.issuedAt,
      changeNote: revisions.changeNote,
      wordsOnCards: revisions.wordsOnCards,
      reviewDate: revisions.reviewDate,
    })
    .from(revisions)
    .where(and(eq(revisions.orgId, orgId), statementId ? eq(revisions.statementId, statementId) : undefined));
  return rows.flatMap(({ statement, site, timeZone }) => {
    const own = marks.filter((mark) => mark.statementId === statement.id);
    const current = own.find(({ number }) => number === statement.currentRevision);
    if (!current) return [];
    return [
      {
        statementId: statement.id,
        siteId: statement.siteId,
        site,
        timeZone,
        // The draft's title may have moved on; people sign the one that was issued.
        title: current.title,
        current: current.number,
        revisionId: current.id,
        issuedAt: current.issuedAt,
        changeNote: current.changeNote,
        wordsOnCards: current.wordsOnCards,
        reviewDate: current.reviewDate,
        revisions: own,
      },
    ];
  });
}

export type LatestSignOn = Pick<
  typeof signOns.$inferSelect,
  | 'id'
  | 'siteId'
  | 'statementId'
  | 'revisionNumber'
  | 'personId'
  | 'personName'
  | 'employerName'
  | 'trade'
  | 'signedAt'
  | 'receivedAt'
  | 'method'
  | 'handedRoundByName'
  | 'readingMs'
>;

/** Each person's sign-on under the highest revision of each statement; the earliest of several under the same one. */
export async function latestSignOns(
  db: Db,
  orgId: string,
  { siteId, statementId }: Scope = {},
): Promise<LatestSignOn[]> {
  return db
    .selectDistinctOn([signOns.statementId, signOns.personId], {
      id: signOns.id,
      siteId: signOns.siteId,
      statementId: signOns.statementId,
      revisionNumber: signOns.revisionNumber,
      personId: signOns.personId,
      personName: signOns.personName,
      employerName: signOns.employerName,
      trade: signOns.trade,
      signedAt: signOns.signedAt,
      receivedAt: signOns.receivedAt,
      method: signOns.method,
      handedRoundByName: signOns.handedRoundByName,
      readingMs: signOns.readingMs,
    })
    .from(signOns)
    .where(
      and(
        eq(signOns.orgId, orgId),
        siteId ? eq(signOns.siteId, siteId) : undefined,
        statementId ? eq(signOns.statementId, statementId) : undefined,
      ),
    )
    .orderBy(signOns.statementId, signOns.personId, desc(signOns.revisionNumber), asc(signOns.receivedAt));
}

/** How a person stands to a statement in force. */
export function standingOf(
  statement: Pick<InForce, 'statementId' | 'current' | 'revisions'>,
  signed: LatestSignOn[],
  personId: string,
): 'current' | 'older' | 'none' {
  const own = signed.find(
    (signOn) => signOn.statementId === statement.statementId && signOn.personId === personId,
  );
  if (!own) return 'none';
  return countsAsCurrent(own.revisionNumber, statement.revisions, statement.current) ? 'current' : 'older';
}
