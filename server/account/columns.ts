import { timestamp, uuid } from 'drizzle-orm/pg-core';
import { accounts, organisations } from './account.table.ts';

/** An instant. */
export const at = () => timestamp({ withTimezone: true, mode: 'date' });

/** The organisation that a row belongs to; first in the key of every table. */
export const org = () =>
  uuid()
    .notNull()
    .references(() => organisations.id);

/** An account that did something. */
export const account = () => uuid().references(() => accounts.id);
