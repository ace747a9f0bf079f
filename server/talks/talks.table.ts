import {
  boolean,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import type { TalkBody } from '../../shared/talks/talks.api.ts';
import { accounts } from '../account/account.table.ts';
import { at, org } from '../account/columns.ts';
import { people } from '../people/people.table.ts';
import { signatureColumns } from '../signons/signons.table.ts';
import { sites } from '../sites/sites.table.ts';

/** Toolbox talks. Once closed a trigger refuses every change. */
export const talks = pgTable(
  'talks',
  {
    orgId: org(),
    id: uuid().notNull(),
    siteId: uuid().notNull(),
    topic: text().notNull(),
    presenter: text().notNull(),
    date: text().notNull(),
    time: text().notNull(),
    minutes: integer().notNull(),
    place: text().notNull(),
    points: jsonb().$type<string[]>().notNull(),
    mattersRaised: text().notNull(),
    outcome: text().notNull(),
    representativePresent: boolean().notNull(),
    actions: jsonb().$type<TalkBody['actions']>().notNull(),
    state: text().$type<'open' | 'closed'>().notNull().default('open'),
    lockVersion: integer().notNull().default(1),
    createdBy: uuid()
      .notNull()
      .references(() => accounts.id),
    createdAt: at().notNull().defaultNow(),
    closedAt: at(),
    closedByName: text(),
    /** The crew expected when the talk was closed. */
    expected: jsonb().$type<{ personId: string; name: string; employer: string }[]>(),
    /** The frozen talk with its attendance as canonical JSON, and its hash. */
    canonical: text(),
    hash: text(),
    ledgerSequence: integer(),
  },
  (table) => [
    primaryKey({ columns: [table.orgId, table.id] }),
    foreignKey({ columns: [table.orgId, table.siteId], foreignColumns: [sites.orgId, sites.id] }),
    index('talks_date').on(table.orgId, table.date),
  ],
);

/** Insert-only: a trigger refuses update and delete. */
export const attendances = pgTable(
  'attendances',
  {
    orgId: org(),
    id: uuid().notNull(),
    talkId: uuid().notNull(),
    personId: uuid().notNull(),
    ...signatureColumns(),
  },
  (table) => [
    primaryKey({ columns: [table.orgId, table.id] }),
    foreignKey({ columns: [table.orgId, table.talkId], foreignColumns: [talks.orgId, talks.id] }),
    foreignKey({ columns: [table.orgId, table.personId], foreignColumns: [people.orgId, people.id] }),
    unique('attendances_person').on(table.orgId, table.talkId, table.personId),
  ],
);
