import { bigint, index, integer, json, pgTable, text, timestamp, uuid, varchar } from 'drizzle-orm/pg-core';

/** Sessions, in the shape that connect-pg-simple asks for. */
export const httpSessions = pgTable(
  'http_sessions',
  {
    sid: varchar().primaryKey(),
    sess: json().notNull(),
    expire: timestamp({ precision: 6 }).notNull(),
  },
  (table) => [index('http_sessions_expire').on(table.expire)],
);

/** Throttles, in the shape that rate-limiter-flexible asks for. */
export const throttles = pgTable('throttles', {
  key: varchar({ length: 255 }).primaryKey(),
  points: integer().notNull().default(0),
  expire: bigint({ mode: 'number' }),
});

/** Mail to be sent, written in the transaction that calls for it. It belongs to an address, not to an organisation. */
export const outgoingMails = pgTable(
  'outgoing_mails',
  {
    id: uuid().primaryKey(),
    recipient: text().notNull(),
    subject: text().notNull(),
    body: text().notNull(),
    /** `queued`, `sent`, `kept` (no mail host: the development outbox), `failed`. */
    status: text().notNull().default('queued'),
    attempts: integer().notNull().default(0),
    createdAt: timestamp({ withTimezone: true, mode: 'date' }).notNull().defaultNow(),
    sentAt: timestamp({ withTimezone: true, mode: 'date' }),
  },
  (table) => [index('outgoing_mails_status').on(table.status, table.createdAt)],
);
