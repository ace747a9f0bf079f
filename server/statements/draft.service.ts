import { and, eq } from 'drizzle-orm';
import type { z } from 'zod';
import { canonicalJson } from '#shared/kernel/canonical.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import { parseDocument } from '#shared/statements/document/document.ts';
import { documentFormat, type NodeJson } from '#shared/statements/document/json.ts';
import { documentFromBlocks, emptyDocument } from '#shared/statements/document/from-block.ts';
import type {
  createStatementBody,
  DraftConflict,
  saveDraftBody,
  Statement,
} from '#shared/statements/statements.api.ts';
import { accounts } from '../account/account.table.ts';
import { newestBlock } from '../library/library.service.ts';
import { starters } from '../library/templates.ts';
import type { UserActor } from '../platform/actor.ts';
import type { Db } from '../platform/db.ts';
import { getSite } from '../sites/sites.service.ts';
import { getStatement, lockStatement, type StatementRecord } from './read.service.ts';
import { statements } from './statements.table.ts';

const at = (orgId: string, id: string) => and(eq(statements.orgId, orgId), eq(statements.id, id));

/** Starts a statement; a resend of the same id finds it and changes nothing. */
export async function createStatement(
  db: Db,
  actor: UserActor,
  id: string,
  { siteId, title, starterId }: z.output<typeof createStatementBody>,
): Promise<Statement> {
  const site = await getSite(db, actor.orgId, siteId);
  if (site.archivedAt) throw new Refusal('conflict', 'This site is closed. Open it again to write for it.');
  await db
    .insert(statements)
    .values({
      orgId: actor.orgId,
      id,
      siteId,
      title,
      state: 'draft',
      documentFormat,
      document: await firstDocument(db, actor.orgId, starterId),
      createdBy: actor.accountId,
      updatedBy: actor.accountId,
    })
    .onConflictDoNothing();
  return getStatement(db, actor.orgId, id);
}

async function firstDocument(db: Db, orgId: string, starterId: string | null): Promise<NodeJson> {
  if (starterId === null) return emptyDocument();
  const starter = starters().find(({ id }) => id === starterId);
  if (!starter)
    throw new Refusal('invalid', 'This starter is not there.', {
      fields: { starterId: 'Choose a starter from the list.' },
    });
  const blocks = [];
  for (const id of starter.blocks) blocks.push(await newestBlock(db, orgId, id));
  return documentFromBlocks(blocks);
}

/**
 * Saves the draft over the version that it was written over. A stale one is refused with the stored draft, so that nothing is lost;
 * unless it is what is stored already: the answer to an earlier send went missing on the way.
 */
export async function saveDraft(
  db: Db,
  actor: UserActor,
  id: string,
  { lockVersion, title, document }: z.output<typeof saveDraftBody>,
): Promise<{ lockVersion: number; updatedAt: string }> {
  const statement = await lockStatement(db, actor.orgId, id);
  if (statement.lockVersion !== lockVersion) {
    if (isStored(statement, { title, document }))
      return { lockVersion: statement.lockVersion, updatedAt: statement.updatedAt.toISOString() };
    throw await staleDraft(db, statement);
  }
  requireState(statement, ['draft'], 'Only a draft can be changed. Take it back, or start a new revision.');
  parseDocument(document);
  const updatedAt = new Date();
  await db
    .update(statements)
    .set({
      title,
      document,
      documentFormat,
      lockVersion: lockVersion + 1,
      updatedAt,
      updatedBy: actor.accountId,
    })
    .where(at(actor.orgId, id));
  return { lockVersion: lockVersion + 1, updatedAt: updatedAt.toISOString() };
}

const isStored = (
  stored: StatementRecord,
  { title, document }: Pick<StatementRecord, 'title' | 'document'>,
): boolean =>
  stored.state === 'draft' &&
  stored.title === title &&
  canonicalJson(stored.document) === canonicalJson(document);

async function staleDraft(db: Db, statement: StatementRecord): Promise<Refusal> {
  const [writer] = await db
    .select({ name: accounts.name })
    .from(accounts)
    .where(eq(accounts.id, statement.updatedBy));
  const extra: DraftConflict = {
    lockVersion: statement.lockVersion,
    title: statement.title,
    document: statement.document,
    updatedAt: statement.updatedAt.toISOString(),
    updatedBy: writer?.name ?? '',
  };
  return new Refusal(
    'conflict',
    `${writer?.name ?? 'Somebody'} saved this draft meanwhile. Nothing of yours was lost: choose how to go on.`,
    { extra },
  );
}

export function requireState(
  statement: StatementRecord,
  states: StatementRecord['state'][],
  words: string,
): void {
  if (!states.includes(statement.state))
    throw new Refusal('conflict', words, { extra: { state: statement.state } });
}

/** Refuses an act on a statement that was changed since the screen read it. Ask for the state first: its words say more. */
export function requireFresh({ lockVersion, state }: StatementRecord, seen: number): void {
  if (lockVersion !== seen)
    throw new Refusal(
      'conflict',
      'This statement was changed since you opened it. Look at it again before you go on.',
      {
        extra: { lockVersion, state },
      },
    );
}

type Change = Partial<typeof statements.$inferInsert>;

export async function changeState(db: Db, statement: StatementRecord, change: Change): Promise<Statement> {
  await db
    .update(statements)
    .set({ ...change, lockVersion: statement.lockVersion + 1 })
    .where(at(statement.orgId, statement.id));
  return getStatement(db, statement.orgId, statement.id);
}

export async function submitDraft(
  db: Db,
  actor: UserActor,
  id: string,
  lockVersion: number,
): Promise<Statement> {
  const statement = await lockStatement(db, actor.orgId, id);
  requireState(statement, ['draft'], 'Only a draft can be submitted.');
  requireFresh(statement, lockVersion);
  return changeState(db, statement, {
    state: 'submitted',
    submittedBy: actor.accountId,
    submittedAt: new Date(),
    returnNote: '',
  });
}

export async function recallDraft(
  db: Db,
  actor: UserActor,
  id: string,
  lockVersion: number,
): Promise<Statement> {
  const statement = await lockStatement(db, actor.orgId, id);
  requireState(statement, ['submitted'], 'Only a submitted draft can be taken back.');
  requireFresh(statement, lockVersion);
  return changeState(db, statement, { state: 'draft', submittedBy: null, submittedAt: null });
}

export async function returnDraft(
  db: Db,
  actor: UserActor,
  id: string,
  { lockVersion, note }: { lockVersion: number; note: string },
): Promise<Statement> {
  const statement = await lockStatement(db, actor.orgId, id);
  requireState(statement, ['submitted'], 'Only a submitted draft can be handed back.');
  requireFresh(statement, lockVersion);
  return changeState(db, statement, {
    state: 'draft',
    returnNote: note,
    submittedBy: null,
    submittedAt: null,
  });
}

/** Opens the draft of the next revision, which begins as the one in force. */
export async function reviseStatement(
  db: Db,
  actor: UserActor,
  id: string,
  lockVersion: number,
): Promise<Statement> {
  const statement = await lockStatement(db, actor.orgId, id);
  requireState(statement, ['issued'], 'A new revision starts from an issued statement.');
  requireFresh(statement, lockVersion);
  return changeState(db, statement, {
    state: 'draft',
    returnNote: '',
    updatedBy: actor.accountId,
    updatedAt: new Date(),
  });
}

/** Throws away a draft that was never issued. */
export async function discardStatement(db: Db, actor: UserActor, id: string): Promise<void> {
  const statement = await lockStatement(db, actor.orgId, id);
  requireState(statement, ['draft', 'submitted'], 'An issued statement can be withdrawn, not thrown away.');
  if (statement.currentRevision !== null)
    throw new Refusal('conflict', 'This statement has been issued. It can be withdrawn, not thrown away.');
  await db.delete(statements).where(at(actor.orgId, id));
}
