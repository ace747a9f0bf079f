import { randomBytes } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { canonicalJson } from '#shared/kernel/canonical.ts';
import { commitmentOf, genesisHash, type LedgerEntry, nextEntry } from '#shared/ledger/chain.ts';
import type { Db } from '../platform/db.ts';
import { ledgerEntries, ledgerHeads } from './ledger.table.ts';

export type LedgerKind =
  'statement.issued' | 'statement.withdrawn' | 'signOn' | 'talk.attended' | 'talk.closed';

export type LedgerDraft = {
  kind: LedgerKind;
  /** Who did it: `account:<id>` or `person:<id>`. */
  actor: string;
  /** What it is about: `revision:<id>`, `signOn:<id>`, `talk:<id>` … */
  subject: string;
  /** The record itself, or its hash with what identifies it; anything JSON can say. */
  payload: unknown;
  at: Date;
};

/**
 * Appends to the organisation's chain. Call it inside the transaction that writes the record: the row lock on the head orders
 * the appends, and a rollback takes both back.
 */
export async function appendToLedger(db: Db, orgId: string, draft: LedgerDraft): Promise<LedgerEntry> {
  await db.insert(ledgerHeads).values({ orgId, sequence: 0, hash: genesisHash }).onConflictDoNothing();
  const [head] = await db.select().from(ledgerHeads).where(eq(ledgerHeads.orgId, orgId)).for('update');
  if (!head) throw new Error('The ledger has no head.');
  const salt = randomBytes(16).toString('hex');
  const entry = nextEntry(head.sequence === 0 ? null : head, {
    at: draft.at.toISOString(),
    kind: draft.kind,
    actor: draft.actor,
    subject: draft.subject,
    commitment: commitmentOf(salt, draft.payload),
  });
  await db.insert(ledgerEntries).values({ orgId, ...entry, salt, payload: canonicalJson(draft.payload) });
  await db
    .update(ledgerHeads)
    .set({ sequence: entry.sequence, hash: entry.hash })
    .where(eq(ledgerHeads.orgId, orgId));
  return entry;
}
