import { canonicalJson, hashOf, sha256Hex } from '../kernel/canonical.ts';

/** One entry of an organisation's ledger. The payload stands apart: the chain holds only the commitment to it. */
export type LedgerEntry = {
  sequence: number;
  /** ISO 8601, UTC, milliseconds. */
  at: string;
  kind: string;
  actor: string;
  subject: string;
  /** SHA-256 of salt followed by the payload's canonical JSON. */
  commitment: string;
  previous: string;
  hash: string;
};

/** What the first entry names as its previous hash. */
export const genesisHash = '0'.repeat(64);

/** The commitment to a payload: without salt and payload it tells nothing, with them it can't be met by another payload. */
export function commitmentOf(salt: string, payload: unknown): string {
  return sha256Hex(salt + canonicalJson(payload));
}

/** The hash that the next entry must name. */
export function entryHash({ hash: _hash, ...entry }: Omit<LedgerEntry, 'hash'> & { hash?: string }): string {
  return hashOf(entry);
}

/** The entry that comes after `previous` (null for the first). */
export function nextEntry(
  previous: Pick<LedgerEntry, 'sequence' | 'hash'> | null,
  entry: Pick<LedgerEntry, 'at' | 'kind' | 'actor' | 'subject' | 'commitment'>,
): LedgerEntry {
  const linked = {
    ...entry,
    sequence: (previous?.sequence ?? 0) + 1,
    previous: previous?.hash ?? genesisHash,
  };
  return { ...linked, hash: entryHash(linked) };
}

export type LedgerFault = { sequence: number; message: string };

/** Feeds on entries in order and tells what does not hold: a gap, a broken link, an altered entry, a payload that was swapped. */
export function chainVerifier() {
  let expected = 1;
  let previous = genesisHash;
  return {
    /** Faults of one entry; the payload is checked where it is still there. */
    check(entry: LedgerEntry, opened: { salt: string; payload: unknown } | null): LedgerFault[] {
      const faults: LedgerFault[] = [];
      const fault = (message: string) => faults.push({ sequence: entry.sequence, message });
      if (entry.sequence !== expected)
        fault(`Entry ${expected} is missing: entry ${entry.sequence} stands in its place.`);
      if (entry.previous !== previous)
        fault(`Entry ${entry.sequence} does not follow from the entry before it.`);
      if (entryHash(entry) !== entry.hash) fault(`Entry ${entry.sequence} was altered.`);
      if (opened && commitmentOf(opened.salt, opened.payload) !== entry.commitment)
        fault(`The record kept with entry ${entry.sequence} is not the one that was entered.`);
      expected = entry.sequence + 1;
      previous = entry.hash;
      return faults;
    },
    /** The last sequence and hash seen, to be held against the head. */
    head: () => ({ sequence: expected - 1, hash: previous }),
  };
}
