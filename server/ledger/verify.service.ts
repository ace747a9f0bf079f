import { and, asc, eq, gt, isNotNull } from 'drizzle-orm';
import { chainVerifier, genesisHash, type LedgerFault } from '#shared/ledger/chain.ts';
import { organisations } from '../account/account.table.ts';
import type { Db } from '../platform/db.ts';
import { signOns } from '../signons/signons.table.ts';
import { revisions } from '../statements/statements.table.ts';
import { attendances, talks } from '../talks/talks.table.ts';
import { sha256Hex } from '#shared/kernel/canonical.ts';
import { ledgerEntries, ledgerHeads } from './ledger.table.ts';
import { attendanceRecord, revisionRecord, signOnRecord, talkRecord } from './records.ts';

export type LedgerReport = {
  orgId: string;
  organisation: string;
  entries: number;
  head: string;
  faults: LedgerFault[];
};

/** Holds every organisation's ledger against itself and against the records; says which is altered, missing or inserted. */
export async function verifyLedgers(db: Db): Promise<LedgerReport[]> {
  const all = await db
    .select({ id: organisations.id, name: organisations.name })
    .from(organisations)
    .orderBy(asc(organisations.name));
  const reports: LedgerReport[] = [];
  for (const { id, name } of all) reports.push(await verifyLedger(db, id, name));
  return reports;
}

const batch = 1000;

async function verifyLedger(db: Db, orgId: string, organisation: string): Promise<LedgerReport> {
  const faults: LedgerFault[] = [];
  const verifier = chainVerifier();
  /** What the ledger says of each record: subject → the row hash entered. */
  const entered = new Map<string, { sequence: number; row: string }>();
  let after = 0;
  for (;;) {
    const entries = await db
      .select()
      .from(ledgerEntries)
      .where(and(eq(ledgerEntries.orgId, orgId), gt(ledgerEntries.sequence, after)))
      .orderBy(asc(ledgerEntries.sequence))
      .limit(batch);
    for (const { orgId: _org, writtenAt: _written, salt, payload, ...entry } of entries) {
      const opened = JSON.parse(payload) as { row?: string };
      faults.push(...verifier.check(entry, { salt, payload: opened }));
      if (opened.row) entered.set(entry.subject, { sequence: entry.sequence, row: opened.row });
    }
    after = entries.at(-1)?.sequence ?? after;
    if (entries.length < batch) break;
  }
  const [head] = await db.select().from(ledgerHeads).where(eq(ledgerHeads.orgId, orgId));
  const last = verifier.head();
  if ((head?.sequence ?? 0) !== last.sequence || (head?.hash ?? genesisHash) !== last.hash)
    faults.push({
      sequence: last.sequence,
      message: `The head says ${head?.sequence ?? 0} entries; the chain ends at ${last.sequence}: entries are missing at its end.`,
    });
  faults.push(...(await recordFaults(db, orgId, entered)));
  return { orgId, organisation, entries: last.sequence, head: last.hash, faults };
}

/** Every record has its entry and hashes to what was entered; every entry still has its record. */
async function recordFaults(
  db: Db,
  orgId: string,
  entered: Map<string, { sequence: number; row: string }>,
): Promise<LedgerFault[]> {
  const faults: LedgerFault[] = [];
  const left = new Map(entered);
  const check = (subject: string, name: string, row: string) => {
    const entry = left.get(subject);
    left.delete(subject);
    if (!entry)
      faults.push({ sequence: 0, message: `${name} has no entry in the ledger: it was inserted beside it.` });
    else if (entry.row !== row)
      faults.push({
        sequence: entry.sequence,
        message: `${name} was altered after entry ${entry.sequence}.`,
      });
  };
  for (const row of await db.select().from(revisions).where(eq(revisions.orgId, orgId))) {
    if (sha256Hex(row.canonical) !== row.hash)
      faults.push({
        sequence: 0,
        message: `Revision ${row.number} of “${row.title}” (${row.id}) does not match its own hash.`,
      });
    check(
      `revision:${row.id}`,
      `Revision ${row.number} of “${row.title}” (${row.id})`,
      revisionRecord(row).row,
    );
  }
  for (const row of await db.select().from(signOns).where(eq(signOns.orgId, orgId)))
    check(`signOn:${row.id}`, `The sign-on of ${row.personName} (${row.id})`, signOnRecord(row).row);
  for (const row of await db.select().from(attendances).where(eq(attendances.orgId, orgId)))
    check(
      `attendance:${row.id}`,
      `The attendance of ${row.personName} (${row.id})`,
      attendanceRecord(row).row,
    );
  for (const row of await db
    .select()
    .from(talks)
    .where(and(eq(talks.orgId, orgId), isNotNull(talks.closedAt))))
    check(`talk:${row.id}`, `The talk “${row.topic}” (${row.id})`, talkRecord(row).row);
  for (const [subject, { sequence }] of left)
    faults.push({ sequence, message: `The record of entry ${sequence} (${subject}) is missing.` });
  return faults;
}
