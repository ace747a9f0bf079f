import { boolean, foreignKey, index, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { at, org } from '../account/columns.ts';

export const employers = pgTable(
  'employers',
  {
    orgId: org(),
    id: uuid().notNull(),
    name: text().notNull(),
    businessNumber: text().notNull().default(''),
    contact: text().notNull().default(''),
    createdAt: at().notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.orgId, table.id] })],
);

export const people = pgTable(
  'people',
  {
    orgId: org(),
    id: uuid().notNull(),
    employerId: uuid().notNull(),
    name: text().notNull(),
    trade: text().notNull(),
    contact: text().notNull().default(''),
    inductionCard: text().notNull().default(''),
    language: text().notNull().default('en'),
    /** True for somebody who put themselves on the list by phone. */
    enrolledSelf: boolean().notNull().default(false),
    createdAt: at().notNull().defaultNow(),
    archivedAt: at(),
  },
  (table) => [
    primaryKey({ columns: [table.orgId, table.id] }),
    foreignKey({ columns: [table.orgId, table.employerId], foreignColumns: [employers.orgId, employers.id] }),
    index('people_name').on(table.orgId, table.name),
  ],
);
