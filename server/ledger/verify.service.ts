import { and, asc, eq, gt } from 'drizzle-orm';
import { chainVerifier, genesisHash, type LedgerFault } from '#shared/ledger/chain.ts';
import { organisations } from '../account/account.table.ts';
import type { Db } from '../platform/db.ts';
import { ledgerEntries, ledgerHeads } from './ledger.table.ts';
import { type Entered, recordFaults, standingFaults } from './record-faults.ts';

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

async function verifyLedger(db: Db, orgId: string, organisation: string): Promise<LedgerReport> {
  const { faults, head, entered, withdrawn } = await readChain(db, orgId);
  return {
    orgId,
    organisation,
    entries: head.sequence,
    head: head.hash,
    faults: [
      ...faults,
      ...(await recordFaults(db, orgId, entered)),
      ...(await standingFaults(db, orgId, withdrawn)),
    ],
  };
}

const batch = 1000;

/** Walks the chain from its first entry to its head and gathers what it says of the records. */
async function readChain(db: Db, orgId: string) {
  const faults: LedgerFault[] = [];
  const verifier = chainVerifier();
  const entered = new Map<string, Entered>();
  /** Statement → the entry of its withdrawal. */
  const withdrawn = new Map<string, number>();
  let after = 0;
  for (;;) {
    const entries = await db
      .select()
      .from(ledgerEntries)
      .where(and(eq(ledgerEntries.orgId, orgId), gt(ledgerEntries.sequence, after)))
      .orderBy(asc(ledgerEntries.sequence))
      .limit(batch);
    for (const { orgId: _org, writtenAt: _written, salt, payload: text, ...entry } of entries) {
      const payload = payloadOf(text);
      const { sequence, subject } = entry;
      faults.push(...verifier.check(entry, { salt, payload }));
      if (entry.kind === 'statement.withdrawn') withdrawn.set(subject.replace('statement:', ''), sequence);
      const row = rowOf(payload);
      if (row === null) continue;
      // A record is entered once. Whoever bends one can't make it good by entering it anew.
      const earlier = entered.get(subject);
      if (earlier)
        faults.push({
          sequence,
          message: `Entry ${sequence} enters ${subject} again, which entry ${earlier.sequence} entered.`,
        });
      else entered.set(subject, { sequence, row });
    }
    after = entries.at(-1)?.sequence ?? after;
    if (entries.length < batch) break;
  }
  faults.push(...(await headFaults(db, orgId, verifier.head())));
  return { faults, head: verifier.head(), entered, withdrawn };
}

/** A payload that can't be read stands as its bare text, which meets no commitment. */
function payloadOf(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return text;
  }
}

function rowOf(payload: unknown): string | null {
  if (typeof payload !== 'object' || payload === null || !('row' in payload)) return null;
  return typeof payload.row === 'string' ? payload.row : null;
}

async function headFaults(
  db: Db,
  orgId: string,
  last: { sequence: number; hash: string },
): Promise<LedgerFault[]> {
  const [head] = await db.select().from(ledgerHeads).where(eq(ledgerHeads.orgId, orgId));
  const said = head?.sequence ?? 0;
  if (said === last.sequence && (head?.hash ?? genesisHash) === last.hash) return [];
  const what = said > last.sequence ? 'entries are missing at its end' : 'entries were added past its head';
  return [
    {
      sequence: last.sequence,
      message:
        said === last.sequence
          ? `The head does not hold the hash of entry ${said}: the chain was written anew.`
          : `The head says ${said} entries; the chain ends at ${last.sequence}: ${what}.`,
    },
  ];
}
