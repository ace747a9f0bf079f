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
import type { NodeJson } from '../../shared/statements/document/json.ts';
import { account, at, org } from '../account/columns.ts';
import { sites } from '../sites/sites.table.ts';

export const statements = pgTable(
  'statements',
  {
    orgId: org(),
    id: uuid().notNull(),
    siteId: uuid().notNull(),
    title: text().notNull(),
    state: text().$type<'draft' | 'submitted' | 'issued' | 'withdrawn'>().notNull(),
    documentFormat: integer().notNull(),
    document: jsonb().$type<NodeJson>().notNull(),
    lockVersion: integer().notNull().default(1),
    /** Number of the revision in force; null where none is, or after withdrawal. */
    currentRevision: integer(),
    returnNote: text().notNull().default(''),
    createdBy: account().notNull(),
    createdAt: at().notNull().defaultNow(),
    updatedBy: account().notNull(),
    updatedAt: at().notNull().defaultNow(),
    submittedBy: account(),
    submittedAt: at(),
    withdrawnAt: at(),
  },
  (table) => [
    primaryKey({ columns: [table.orgId, table.id] }),
    foreignKey({ columns: [table.orgId, table.siteId], foreignColumns: [sites.orgId, sites.id] }),
    index('statements_site').on(table.orgId, table.siteId),
  ],
);

/** Issued revisions. Insert-only: a trigger refuses update and delete. */
export const revisions = pgTable(
  'revisions',
  {
    orgId: org(),
    id: uuid().notNull(),
    statementId: uuid().notNull(),
    siteId: uuid().notNull(),
    number: integer().notNull(),
    title: text().notNull(),
    /** The frozen form as canonical JSON (RFC 8785), byte for byte what `hash` is of. */
    canonical: text().notNull(),
    hash: text().notNull(),
    material: boolean().notNull(),
    changeNote: text().notNull(),
    issuedBy: account().notNull(),
    issuedByName: text().notNull(),
    issuedAt: at().notNull(),
    /** For judging reading times without opening the frozen form. */
    wordsOnCards: integer().notNull(),
    reviewDate: text(),
  },
  (table) => [
    primaryKey({ columns: [table.orgId, table.id] }),
    foreignKey({
      columns: [table.orgId, table.statementId],
      foreignColumns: [statements.orgId, statements.id],
    }),
    unique('revisions_number').on(table.orgId, table.statementId, table.number),
    index('revisions_hash').on(table.hash),
  ],
);
