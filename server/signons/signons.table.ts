import {
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import type { Declaration } from '../../shared/signons/signons.api.ts';
import type { DrawnSignature } from '../../shared/signons/signature.ts';
import { accounts } from '../account/account.table.ts';
import { at, org } from '../account/columns.ts';
import { people } from '../people/people.table.ts';
import { sites } from '../sites/sites.table.ts';
import { revisions, statements } from '../statements/statements.table.ts';

/** A phone that is tied to a person. The cookie carries the secret; only its hash is kept. */
export const devices = pgTable(
  'devices',
  {
    orgId: org(),
    id: uuid().notNull(),
    personId: uuid().notNull(),
    secretHash: text().notNull(),
    userAgent: text().notNull().default(''),
    noticeVersion: integer().notNull(),
    enrolledAt: at().notNull().defaultNow(),
    lastSeenAt: at().notNull().defaultNow(),
    revokedAt: at(),
  },
  (table) => [
    primaryKey({ columns: [table.orgId, table.id] }),
    foreignKey({ columns: [table.orgId, table.personId], foreignColumns: [people.orgId, people.id] }),
    uniqueIndex('devices_id').on(table.id),
  ],
);

/** What is kept of a signature, whatever was signed. `method` tells which of drawn and typed fields are filled. */
export const signatureColumns = () => ({
  method: text().$type<'drawn' | 'typed'>().notNull(),
  drawn: jsonb().$type<DrawnSignature>(),
  svg: text(),
  typedName: text(),
  witness: text(),
  /** The words signed, exactly as shown. */
  declaration: jsonb().$type<Declaration>().notNull(),
  /** By the device's clock. */
  signedAt: at().notNull(),
  receivedAt: at().notNull(),
  language: text().notNull(),
  deviceId: uuid(),
  userAgent: text().notNull().default(''),
  /** The signed-in person on whose device it was made, where that was not the signer. */
  handedRoundBy: uuid().references(() => accounts.id),
  handedRoundByName: text(),
  /** The signer as they stood then. */
  personName: text().notNull(),
  employerName: text().notNull(),
  trade: text().notNull(),
  inductionCard: text().notNull(),
  ledgerSequence: integer().notNull(),
});

/** Insert-only: a trigger refuses update and delete. */
export const signOns = pgTable(
  'sign_ons',
  {
    orgId: org(),
    /** Made on the device: a resend finds the row and changes nothing. */
    id: uuid().notNull(),
    siteId: uuid().notNull(),
    statementId: uuid().notNull(),
    revisionId: uuid().notNull(),
    revisionNumber: integer().notNull(),
    revisionHash: text().notNull(),
    personId: uuid().notNull(),
    readingMs: integer().notNull(),
    answers: jsonb().$type<{ question: string; tries: number[] }[]>().notNull(),
    ...signatureColumns(),
  },
  (table) => [
    primaryKey({ columns: [table.orgId, table.id] }),
    foreignKey({ columns: [table.orgId, table.siteId], foreignColumns: [sites.orgId, sites.id] }),
    foreignKey({
      columns: [table.orgId, table.statementId],
      foreignColumns: [statements.orgId, statements.id],
    }),
    foreignKey({ columns: [table.orgId, table.revisionId], foreignColumns: [revisions.orgId, revisions.id] }),
    foreignKey({ columns: [table.orgId, table.personId], foreignColumns: [people.orgId, people.id] }),
    index('sign_ons_statement').on(table.orgId, table.statementId, table.personId, table.revisionNumber),
    index('sign_ons_revision').on(table.orgId, table.revisionId),
  ],
);
