import { hashOf } from '#shared/kernel/canonical.ts';
import type { signOns } from '../signons/signons.table.ts';
import type { revisions } from '../statements/statements.table.ts';
import type { attendances, talks } from '../talks/talks.table.ts';

type Row<T extends { $inferSelect: unknown }> = T['$inferSelect'];
type BeforeLedger<T extends { $inferSelect: { ledgerSequence: unknown } }> = Omit<Row<T>, 'ledgerSequence'>;

/**
 * The hash of a whole row as it stands in the database, the pointer to the ledger left out. It goes into the ledger's payload, so that
 * any later change of any column is found.
 */
export function rowHash(row: Record<string, unknown>): string {
  const plain = Object.fromEntries(
    Object.entries(row)
      .filter(([name]) => name !== 'ledgerSequence')
      .map(([name, value]) => [name, value instanceof Date ? value.toISOString() : value]),
  );
  return hashOf(plain);
}

/** What the ledger keeps of each kind of record: what it was about, and the hash of the row. */
export const revisionRecord = (row: Row<typeof revisions>) => ({
  record: 'revision',
  id: row.id,
  statementId: row.statementId,
  number: row.number,
  hash: row.hash,
  row: rowHash(row),
});

export const signOnRecord = (row: BeforeLedger<typeof signOns>) => ({
  record: 'signOn',
  id: row.id,
  personId: row.personId,
  revisionId: row.revisionId,
  revisionHash: row.revisionHash,
  row: rowHash(row),
});

export const attendanceRecord = (row: BeforeLedger<typeof attendances>) => ({
  record: 'attendance',
  id: row.id,
  personId: row.personId,
  talkId: row.talkId,
  row: rowHash(row),
});

export const talkRecord = (row: BeforeLedger<typeof talks>) => ({
  record: 'talk',
  id: row.id,
  siteId: row.siteId,
  hash: row.hash,
  row: rowHash(row),
});
