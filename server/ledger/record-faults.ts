import { and, asc, eq, gt, isNotNull, max, or } from 'drizzle-orm';
import type { PgColumn } from 'drizzle-orm/pg-core';
import { sha256Hex } from '#shared/kernel/canonical.ts';
import type { LedgerFault } from '#shared/ledger/chain.ts';
import type { Db } from '../platform/db.ts';
import { signOns } from '../signons/signons.table.ts';
import { revisions, statements } from '../statements/statements.table.ts';
import { attendances, talks } from '../talks/talks.table.ts';
import { attendanceRecord, revisionRecord, signOnRecord, talkRecord } from './records.ts';

/** What the ledger says of a record: the entry's place and the row hash entered. */
export type Entered = { sequence: number; row: string };

type Found = {
  subject: string;
  name: string;
  row: string;
  /** Where the row itself says that it was entered; records without such a pointer leave it out. */
  pointer?: number | null;
  fault?: string;
};

/** Every record has its entry and hashes to what was entered; every entry still has its record. */
export async function recordFaults(
  db: Db,
  orgId: string,
  entered: Map<string, Entered>,
): Promise<LedgerFault[]> {
  const faults: LedgerFault[] = [];
  const left = new Map(entered);
  for await (const found of recordsOf(db, orgId)) {
    const entry = left.get(found.subject);
    left.delete(found.subject);
    const message = found.fault ?? faultOf(found, entry);
    if (message) faults.push({ sequence: entry?.sequence ?? 0, message });
  }
  for (const [subject, { sequence }] of left)
    faults.push({ sequence, message: `The record of entry ${sequence} (${subject}) is missing.` });
  return faults;
}

function faultOf({ name, row, pointer }: Found, entry: Entered | undefined): string | null {
  if (!entry) return `${name} has no entry in the ledger: it was inserted beside it.`;
  if (entry.row !== row) return `${name} was altered after entry ${entry.sequence}.`;
  if (pointer !== undefined && pointer !== entry.sequence)
    return `${name} points to entry ${pointer ?? 'none'}; it was entered by entry ${entry.sequence}.`;
  return null;
}

async function* recordsOf(db: Db, orgId: string): AsyncGenerator<Found> {
  const after = (table: { orgId: PgColumn; id: PgColumn }, id: string | null) =>
    and(eq(table.orgId, orgId), id === null ? undefined : gt(table.id, id));
  const allRevisions = (id: string | null, limit: number) =>
    db.select().from(revisions).where(after(revisions, id)).orderBy(asc(revisions.id)).limit(limit);
  const allSignOns = (id: string | null, limit: number) =>
    db.select().from(signOns).where(after(signOns, id)).orderBy(asc(signOns.id)).limit(limit);
  const allAttendances = (id: string | null, limit: number) =>
    db.select().from(attendances).where(after(attendances, id)).orderBy(asc(attendances.id)).limit(limit);
  const closed = or(eq(talks.state, 'closed'), isNotNull(talks.closedAt));
  const closedTalks = (id: string | null, limit: number) =>
    db
      .select()
      .from(talks)
      .where(and(after(talks, id), closed))
      .orderBy(asc(talks.id))
      .limit(limit);

  for await (const row of inBatches(allRevisions, 50)) {
    const name = `Revision ${row.number} of “${row.title}” (${row.id})`;
    const bent = sha256Hex(row.canonical) !== row.hash;
    yield {
      subject: `revision:${row.id}`,
      name,
      row: revisionRecord(row).row,
      ...(bent ? { fault: `${name} does not match its own hash.` } : {}),
    };
  }
  for await (const row of inBatches(allSignOns, 500))
    yield {
      subject: `signOn:${row.id}`,
      name: `The sign-on of ${row.personName} (${row.id})`,
      row: signOnRecord(row).row,
      pointer: row.ledgerSequence,
    };
  for await (const row of inBatches(allAttendances, 500))
    yield {
      subject: `attendance:${row.id}`,
      name: `The attendance of ${row.personName} (${row.id})`,
      row: attendanceRecord(row).row,
      pointer: row.ledgerSequence,
    };
  for await (const row of inBatches(closedTalks, 100))
    yield {
      subject: `talk:${row.id}`,
      name: `The talk “${row.topic}” (${row.id})`,
      row: talkRecord(row).row,
      pointer: row.ledgerSequence,
    };
}

/** Rows in the order of their ids, a batch in memory at a time. */
async function* inBatches<Row extends { id: string }>(
  read: (after: string | null, limit: number) => PromiseLike<Row[]>,
  size: number,
): AsyncGenerator<Row> {
  let after: string | null = null;
  for (;;) {
    const rows: Row[] = await read(after, size);
    yield* rows;
    const last = rows.at(-1);
    if (!last || rows.length < size) return;
    after = last.id;
  }
}

/** The revision in force is the last one issued, and none where the ledger holds a withdrawal. */
export async function standingFaults(
  db: Db,
  orgId: string,
  withdrawn: Map<string, number>,
): Promise<LedgerFault[]> {
  const rows = await db
    .select({
      id: statements.id,
      title: statements.title,
      state: statements.state,
      current: statements.currentRevision,
      last: max(revisions.number),
    })
    .from(statements)
    .leftJoin(revisions, and(eq(revisions.orgId, statements.orgId), eq(revisions.statementId, statements.id)))
    .where(eq(statements.orgId, orgId))
    .groupBy(statements.orgId, statements.id)
    .orderBy(asc(statements.id));
  return rows.flatMap(({ id, title, state, current, last }) => {
    const sequence = withdrawn.get(id);
    const name = `“${title}” (${id})`;
    const fault = (message: string) => [{ sequence: sequence ?? 0, message }];
    if (sequence !== undefined && (state !== 'withdrawn' || current !== null))
      return fault(`${name} was withdrawn by entry ${sequence}, and stands as in force again.`);
    if (sequence === undefined && state === 'withdrawn')
      return fault(`${name} stands as withdrawn, and the ledger holds no withdrawal.`);
    if (sequence === undefined && current !== last)
      return fault(
        `${name} has ${current === null ? 'no revision' : `revision ${current}`} in force; the last one issued is ${last ?? 'none'}.`,
      );
    return [];
  });
}
