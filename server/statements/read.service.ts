import { and, desc, eq, ilike, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { RevisionRow, Statement, StatementRow } from '#shared/statements/statements.api.ts';
import { accounts, organisations } from '../account/account.table.ts';
import { profileOf } from '../library/templates.ts';
import type { Db } from '../platform/db.ts';
import { sites } from '../sites/sites.table.ts';
import { revisions, statements } from './statements.table.ts';

export type StatementRecord = typeof statements.$inferSelect;
export type RevisionRecord = typeof revisions.$inferSelect;

const writer = alias(accounts, 'writer');
const submitter = alias(accounts, 'submitter');

const columns = {
  statement: statements,
  site: sites.name,
  timeZone: sites.timeZone,
  updatedBy: writer.name,
  submittedBy: submitter.name,
  issuedAt: sql<
    string | null
  >`(select max(r.issued_at) from revisions r where r.org_id = ${statements.orgId} and r.statement_id = ${statements.id})`,
};

type Joined = {
  statement: StatementRecord;
  site: string;
  timeZone: string;
  updatedBy: string;
  submittedBy: string | null;
  issuedAt: string | null;
};

function select(db: Db) {
  return db
    .select(columns)
    .from(statements)
    .innerJoin(sites, and(eq(sites.orgId, statements.orgId), eq(sites.id, statements.siteId)))
    .innerJoin(writer, eq(writer.id, statements.updatedBy))
    .leftJoin(submitter, eq(submitter.id, statements.submittedBy))
    .$dynamic();
}

const presentRow = ({ statement, site, timeZone, updatedBy, issuedAt }: Joined): StatementRow => ({
  id: statement.id,
  siteId: statement.siteId,
  site,
  timeZone,
  title: statement.title,
  state: statement.state,
  currentRevision: statement.currentRevision,
  updatedAt: statement.updatedAt.toISOString(),
  updatedBy,
  issuedAt: issuedAt ? new Date(issuedAt).toISOString() : null,
});

export type StatementFilters = {
  siteId?: string | undefined;
  state?: StatementRecord['state'] | undefined;
  search?: string | undefined;
};

export async function listStatements(
  db: Db,
  orgId: string,
  { siteId, state, search }: StatementFilters,
): Promise<StatementRow[]> {
  const rows = await select(db)
    .where(
      and(
        eq(statements.orgId, orgId),
        siteId ? eq(statements.siteId, siteId) : undefined,
        state ? eq(statements.state, state) : undefined,
        search ? ilike(statements.title, `%${search.replace(/[\\%_]/g, '\\$&')}%`) : undefined,
      ),
    )
    .orderBy(desc(statements.updatedAt));
  return rows.map(presentRow);
}

export async function getStatement(db: Db, orgId: string, id: string): Promise<Statement> {
  const [row] = await select(db).where(and(eq(statements.orgId, orgId), eq(statements.id, id)));
  if (!row) throw new Refusal('missing', 'This statement is not there.');
  const [organisation] = await db.select().from(organisations).where(eq(organisations.id, orgId));
  const { statement } = row;
  return {
    ...presentRow(row),
    documentFormat: statement.documentFormat,
    document: statement.document,
    lockVersion: statement.lockVersion,
    profile: profileOf(organisation?.profileId ?? ''),
    returnNote: statement.returnNote,
    submittedBy: row.submittedBy,
    submittedAt: statement.submittedAt?.toISOString() ?? null,
    revisions: await listRevisions(db, orgId, statement),
  };
}

/** Newest first. */
async function listRevisions(db: Db, orgId: string, statement: StatementRecord): Promise<RevisionRow[]> {
  const rows = await db
    .select()
    .from(revisions)
    .where(and(eq(revisions.orgId, orgId), eq(revisions.statementId, statement.id)))
    .orderBy(desc(revisions.number));
  return rows.map((revision) => presentRevision(revision, statement));
}

type Standing = RevisionRow['standing'];

/** Whether a revision is the one in force. */
export function standingOfRevision(
  { number }: Pick<RevisionRecord, 'number'>,
  statement: Pick<StatementRecord, 'state' | 'currentRevision'>,
): Standing {
  if (statement.state === 'withdrawn') return 'withdrawn';
  return number === statement.currentRevision ? 'current' : 'superseded';
}

export function presentRevision(revision: RevisionRecord, statement: StatementRecord): RevisionRow {
  return {
    id: revision.id,
    number: revision.number,
    hash: revision.hash,
    issuedAt: revision.issuedAt.toISOString(),
    issuedBy: revision.issuedByName,
    material: revision.material,
    changeNote: revision.changeNote,
    standing: standingOfRevision(revision, statement),
  };
}

/** The statement's row, locked until the transaction ends. */
export async function lockStatement(db: Db, orgId: string, id: string): Promise<StatementRecord> {
  const [statement] = await db
    .select()
    .from(statements)
    .where(and(eq(statements.orgId, orgId), eq(statements.id, id)))
    .for('update');
  if (!statement) throw new Refusal('missing', 'This statement is not there.');
  return statement;
}

/** A revision by its id, with its statement. */
export async function revisionById(
  db: Db,
  orgId: string,
  id: string,
): Promise<{ revision: RevisionRecord; statement: StatementRecord }> {
  const [row] = await db
    .select({ revision: revisions, statement: statements })
    .from(revisions)
    .innerJoin(
      statements,
      and(eq(statements.orgId, revisions.orgId), eq(statements.id, revisions.statementId)),
    )
    .where(and(eq(revisions.orgId, orgId), eq(revisions.id, id)));
  if (!row) throw new Refusal('missing', 'This revision is not there.');
  return row;
}

export async function revisionByNumber(db: Db, orgId: string, statementId: string, number: number) {
  const [row] = await db
    .select({ id: revisions.id })
    .from(revisions)
    .where(
      and(eq(revisions.orgId, orgId), eq(revisions.statementId, statementId), eq(revisions.number, number)),
    );
  if (!row) throw new Refusal('missing', 'This revision is not there.');
  return revisionById(db, orgId, row.id);
}

/** Answers for a printed copy's hash: the standing, and nothing of the content. */
export async function verifyHash(db: Db, hash: string) {
  const [row, another] = await db
    .select({ revision: revisions, statement: statements })
    .from(revisions)
    .innerJoin(
      statements,
      and(eq(statements.orgId, revisions.orgId), eq(statements.id, revisions.statementId)),
    )
    .where(sql`${revisions.hash} >= ${hash} and ${revisions.hash} < ${`${hash}g`}`)
    .limit(2);
  if (another)
    throw new Refusal('conflict', 'More than one revision begins with these digits. Type more of the hash.');
  if (!row) return { standing: 'unknown' as const, number: null, issuedAt: null };
  return {
    standing: standingOfRevision(row.revision, row.statement),
    number: row.revision.number,
    issuedAt: row.revision.issuedAt.toISOString(),
  };
}
