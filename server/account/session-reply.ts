import { and, asc, eq } from 'drizzle-orm';
import type { Session } from '#shared/account/account.api.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { Db } from '../platform/db.ts';
import { accounts, memberships, organisations } from './account.table.ts';

/** What every screen needs to know of who is signed in and where. */
export async function sessionReply(
  db: Db,
  { accountId, orgId }: { accountId: string; orgId: string },
  outbox: boolean,
): Promise<Session> {
  const rows = await db
    .select({ account: accounts, membership: memberships, organisation: organisations })
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .innerJoin(organisations, eq(organisations.id, memberships.orgId))
    .where(eq(memberships.accountId, accountId))
    .orderBy(asc(organisations.name));
  const here = rows.find(({ membership }) => membership.orgId === orgId);
  if (!here) throw new Refusal('signedOut', 'Sign in to go on.');
  const { account, membership, organisation } = here;
  return {
    account: { id: account.id, email: account.email, name: account.name },
    role: membership.role,
    personId: membership.personId,
    organisation: {
      id: organisation.id,
      name: organisation.name,
      timeZone: organisation.timeZone,
      profile: organisation.profileId,
      matrix: organisation.matrix,
      invented: organisation.invented,
    },
    memberships: rows.map((row) => ({
      orgId: row.membership.orgId,
      organisation: row.organisation.name,
      role: row.membership.role,
    })),
    outbox,
  };
}

/** The first organisation of an account, or the one asked for if it is a member there. */
export async function organisationToOpen(
  db: Db,
  accountId: string,
  wanted: string | undefined,
): Promise<string | null> {
  const rows = await db
    .select({ orgId: memberships.orgId })
    .from(memberships)
    .innerJoin(organisations, eq(organisations.id, memberships.orgId))
    .where(and(eq(memberships.accountId, accountId), wanted ? eq(memberships.orgId, wanted) : undefined))
    .orderBy(asc(organisations.name))
    .limit(1);
  return rows[0]?.orgId ?? null;
}
