import { date, foreignKey, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { at, org } from '../account/columns.ts';
import { people } from '../people/people.table.ts';

export const sites = pgTable(
  'sites',
  {
    orgId: org(),
    id: uuid().notNull(),
    name: text().notNull(),
    address: text().notNull(),
    timeZone: text().notNull(),
    principalContractor: text().notNull().default(''),
    emergency: text().notNull().default(''),
    /** Secret part of the sign-on page's address; finds the site, and through it the organisation. */
    signToken: text().notNull(),
    createdAt: at().notNull().defaultNow(),
    archivedAt: at(),
  },
  (table) => [
    primaryKey({ columns: [table.orgId, table.id] }),
    unique('sites_sign_token').on(table.signToken),
  ],
);

/** Who is expected to sign at a site. */
export const crewMembers = pgTable(
  'crew_members',
  {
    orgId: org(),
    siteId: uuid().notNull(),
    personId: uuid().notNull(),
    since: at().notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ columns: [table.orgId, table.siteId, table.personId] }),
    foreignKey({ columns: [table.orgId, table.siteId], foreignColumns: [sites.orgId, sites.id] }),
    foreignKey({ columns: [table.orgId, table.personId], foreignColumns: [people.orgId, people.id] }),
  ],
);

/** The code that keeps strangers out of a site's sign-on page, one a day in the site's own zone. */
export const dayCodes = pgTable(
  'day_codes',
  {
    orgId: org(),
    siteId: uuid().notNull(),
    day: date({ mode: 'string' }).notNull(),
    code: text().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.orgId, table.siteId, table.day] }),
    foreignKey({ columns: [table.orgId, table.siteId], foreignColumns: [sites.orgId, sites.id] }),
  ],
);
