import { integer, pgTable, primaryKey, text, timestamp, uuid } from 'drizzle-orm/pg-core';
import { organisations } from '../account/account.table.ts';

/** The head of each organisation's chain; its row lock orders the appends. */
export const ledgerHeads = pgTable('ledger_heads', {
  orgId: uuid()
    .primaryKey()
    .references(() => organisations.id),
  sequence: integer().notNull(),
  hash: text().notNull(),
});

/** The chain. Insert-only: a trigger refuses update and delete. */
export const ledgerEntries = pgTable(
  'ledger_entries',
  {
    orgId: uuid()
      .notNull()
      .references(() => organisations.id),
    sequence: integer().notNull(),
    /** As hashed: ISO 8601 with milliseconds, UTC. */
    at: text().notNull(),
    kind: text().notNull(),
    actor: text().notNull(),
    subject: text().notNull(),
    commitment: text().notNull(),
    previous: text().notNull(),
    hash: text().notNull(),
    /** Sixteen random bytes in hexadecimal, and the payload as canonical JSON: what the commitment is of. */
    salt: text().notNull(),
    payload: text().notNull(),
    writtenAt: timestamp({ withTimezone: true, mode: 'date' }).notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.orgId, table.sequence] })],
);
