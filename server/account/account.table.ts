import { boolean, jsonb, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { sql } from 'drizzle-orm';
import type { Role } from '../../shared/kernel/roles.ts';
import type { Matrix } from '../../shared/risk/matrix.ts';

const at = () => timestamp({ withTimezone: true, mode: 'date' });

export const organisations = pgTable('organisations', {
  id: uuid().primaryKey(),
  name: text().notNull(),
  timeZone: text().notNull(),
  profileId: text().notNull(),
  matrix: jsonb().$type<Matrix>().notNull(),
  /** Whom people ask about their data; stands in the collection notice. */
  contact: text().notNull(),
  invented: boolean().notNull().default(false),
  createdAt: at().notNull().defaultNow(),
});

/** A sign-in. One account may belong to several organisations, so it is keyed by itself; what it may do hangs on memberships. */
export const accounts = pgTable(
  'accounts',
  {
    id: uuid().primaryKey(),
    email: text().notNull(),
    name: text().notNull(),
    /** Argon2id; null until the invitation is taken up. */
    passwordHash: text(),
    createdAt: at().notNull().defaultNow(),
  },
  (table) => [uniqueIndex('accounts_email').on(sql`lower(${table.email})`)],
);

export const memberships = pgTable(
  'memberships',
  {
    orgId: uuid()
      .notNull()
      .references(() => organisations.id),
    accountId: uuid()
      .notNull()
      .references(() => accounts.id),
    role: text().$type<Role>().notNull(),
    personId: uuid(),
    invitedAt: at().notNull().defaultNow(),
    joinedAt: at(),
  },
  (table) => [primaryKey({ columns: [table.orgId, table.accountId] })],
);

/** Links that set a password: single use, an hour for a reset, a week for an invitation. Only the hash is kept. */
export const passwordTokens = pgTable('password_tokens', {
  tokenHash: text().primaryKey(),
  accountId: uuid()
    .notNull()
    .references(() => accounts.id),
  expiresAt: at().notNull(),
  usedAt: at(),
});
