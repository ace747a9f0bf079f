import { integer, jsonb, pgTable, primaryKey, text, timestamp, uuid } from 'drizzle-orm/pg-core';
import type { Block } from '../../shared/library/block.ts';
import { organisations } from '../account/account.table.ts';

/** Every version of every block in an organisation's library. */
export const blocks = pgTable(
  'blocks',
  {
    orgId: uuid()
      .notNull()
      .references(() => organisations.id),
    id: text().notNull(),
    version: integer().notNull(),
    body: jsonb().$type<Block>().notNull(),
    addedAt: timestamp({ withTimezone: true, mode: 'date' }).notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.orgId, table.id, table.version] })],
);
