import { and, desc, eq } from 'drizzle-orm';
import type { z } from 'zod';
import { canonicalJson, sha256Hex } from '#shared/kernel/canonical.ts';
import { newId } from '#shared/kernel/ids.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import { crewCardsOf, wordsOnCards } from '#shared/signons/cards.ts';
import { upgradeDocument } from '#shared/statements/document/document.ts';
import { outlineOf } from '#shared/statements/document/outline.ts';
import type { Frozen } from '#shared/statements/frozen.ts';
import { blocks as blocksIssue, gapsBeforeIssue } from '#shared/statements/readiness.ts';
import type { issueBody, Statement } from '#shared/statements/statements.api.ts';
import { accounts, organisations } from '../account/account.table.ts';
import { appendToLedger } from '../ledger/ledger.service.ts';
import { revisionRecord } from '../ledger/records.ts';
import { profileOf } from '../library/templates.ts';
import type { UserActor } from '../platform/actor.ts';
import type { Db } from '../platform/db.ts';
import { getSite } from '../sites/sites.service.ts';
import { changeState, requireFresh, requireState } from './draft.service.ts';
import { lockStatement, type StatementRecord } from './read.service.ts';
import { revisions } from './statements.table.ts';

/** Freezes a submitted draft as the next revision and enters it in the ledger, in one transaction. */
export async function issueStatement(
  db: Db,
  actor: UserActor,
  id: string,
  { lockVersion, material, changeNote }: z.output<typeof issueBody>,
  now = new Date(),
): Promise<Statement> {
  const statement = await lockStatement(db, actor.orgId, id);
  requireState(statement, ['submitted'], 'Only a submitted draft can be issued.');
  requireFresh(statement, lockVersion);
  if (statement.submittedBy === actor.accountId)
    throw new Refusal(
      'forbidden',
      'You submitted this draft yourself. A second pair of eyes has to issue it.',
    );
  const last = await lastNumber(db, statement);
  const frozen = await freeze(db, actor, statement, {
    revision: last + 1,
    // Everybody signs the first revision, whatever was ticked.
    material: last === 0 || material,
    changeNote,
    issuedAt: now,
  });
  requireReady(frozen);
  const canonical = canonicalJson(frozen);
  const [revision] = await db
    .insert(revisions)
    .values({
      orgId: actor.orgId,
      id: newId(),
      statementId: id,
      siteId: statement.siteId,
      number: frozen.revision,
      title: frozen.title,
      canonical,
      hash: sha256Hex(canonical),
      material: frozen.material,
      changeNote,
      issuedBy: actor.accountId,
      issuedByName: actor.name,
      issuedAt: now,
      wordsOnCards: wordsOnCards(crewCardsOf(frozen)),
      reviewDate: frozen.outline.particulars.reviewDate,
    })
    .returning();
  if (!revision) throw new Error('The revision was not kept.');
  await appendToLedger(db, actor.orgId, {
    kind: 'statement.issued',
    actor: `account:${actor.accountId}`,
    subject: `revision:${revision.id}`,
    payload: revisionRecord(revision),
    at: now,
  });
  return changeState(db, statement, { state: 'issued', currentRevision: frozen.revision });
}

async function lastNumber(db: Db, { orgId, id }: StatementRecord): Promise<number> {
  const [last] = await db
    .select({ number: revisions.number })
    .from(revisions)
    .where(and(eq(revisions.orgId, orgId), eq(revisions.statementId, id)))
    .orderBy(desc(revisions.number))
    .limit(1);
  return last?.number ?? 0;
}

type Freezing = { revision: number; material: boolean; changeNote: string; issuedAt: Date };

/** Everything that a revision says, as it stands now. Also what a draft would say, for the print marked as not for use. */
export async function freeze(
  db: Db,
  actor: Pick<UserActor, 'orgId' | 'name'>,
  statement: StatementRecord,
  { revision, material, changeNote, issuedAt }: Freezing,
): Promise<Frozen> {
  const site = await getSite(db, actor.orgId, statement.siteId);
  const [organisation] = await db.select().from(organisations).where(eq(organisations.id, actor.orgId));
  if (!organisation) throw new Error('The organisation is gone.');
  const [writer] = await db
    .select({ name: accounts.name })
    .from(accounts)
    .where(eq(accounts.id, statement.submittedBy ?? statement.updatedBy));
  const document = upgradeDocument(statement.document, statement.documentFormat);
  return {
    format: 1,
    statementId: statement.id,
    revision,
    organisation: organisation.name,
    site: {
      id: site.id,
      name: site.name,
      address: site.address,
      timeZone: site.timeZone,
      principalContractor: site.principalContractor,
      emergency: site.emergency,
    },
    title: statement.title,
    profile: profileOf(organisation.profileId),
    matrix: organisation.matrix,
    documentFormat: 1,
    document,
    outline: outlineOf(document),
    preparedBy: writer?.name ?? '',
    issuedBy: actor.name,
    issuedAt: issuedAt.toISOString(),
    material,
    changeNote,
    invented: organisation.invented,
  };
}

function requireReady(frozen: Frozen): void {
  const gaps = gapsBeforeIssue(frozen.outline, frozen).filter(blocksIssue);
  if (gaps.length === 0) return;
  throw new Refusal(
    'conflict',
    `${gaps.length} ${gaps.length === 1 ? 'gap keeps' : 'gaps keep'} this draft from being issued: ${gaps[0]?.words ?? ''}`,
    {
      fields: Object.fromEntries(gaps.map(({ rule, words }, index) => [`gaps.${index}.${rule}`, words])),
      extra: { gaps },
    },
  );
}

/** Takes a statement out of force for good. */
export async function withdrawStatement(
  db: Db,
  actor: UserActor,
  id: string,
  { lockVersion, reason }: { lockVersion: number; reason: string },
  now = new Date(),
): Promise<Statement> {
  const statement = await lockStatement(db, actor.orgId, id);
  if (statement.currentRevision === null)
    throw new Refusal('conflict', 'Only a statement in force can be withdrawn.');
  requireFresh(statement, lockVersion);
  await appendToLedger(db, actor.orgId, {
    kind: 'statement.withdrawn',
    actor: `account:${actor.accountId}`,
    subject: `statement:${id}`,
    payload: { record: 'withdrawal', statementId: id, revision: statement.currentRevision, reason },
    at: now,
  });
  return changeState(db, statement, { state: 'withdrawn', currentRevision: null, withdrawnAt: now });
}
