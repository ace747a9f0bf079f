import { and, asc, count, eq, sql } from 'drizzle-orm';
import type { Member } from '#shared/account/account.api.ts';
import type { z } from 'zod';
import type { inviteBody } from '#shared/account/account.api.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { Role } from '#shared/kernel/roles.ts';
import { queueMail } from '../mail/outgoing.service.ts';
import { people } from '../people/people.table.ts';
import type { UserActor } from '../platform/actor.ts';
import type { Db } from '../platform/db.ts';
import { passwordLink } from './account.service.ts';
import { accounts, memberships, organisations } from './account.table.ts';

const invitationHours = 7 * 24;

const memberColumns = {
  accountId: accounts.id,
  email: accounts.email,
  name: accounts.name,
  role: memberships.role,
  personId: memberships.personId,
  joinedAt: memberships.joinedAt,
};

const presentMember = ({
  joinedAt,
  ...member
}: Omit<Member, 'joinedAt'> & { joinedAt: Date | null }): Member => ({
  ...member,
  joinedAt: joinedAt?.toISOString() ?? null,
});

export async function listMembers(db: Db, orgId: string): Promise<Member[]> {
  const rows = await db
    .select(memberColumns)
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(eq(memberships.orgId, orgId))
    .orderBy(asc(accounts.name));
  return rows.map(presentMember);
}

async function memberOf(db: Db, orgId: string, accountId: string): Promise<Member> {
  const member = (await listMembers(db, orgId)).find((candidate) => candidate.accountId === accountId);
  if (!member) throw new Refusal('missing', 'This member is not there.');
  return member;
}

/** Gives somebody a sign-in. An address that has an account already joins with it; a new one gets a link to set a password. */
export async function inviteMember(
  db: Db,
  actor: UserActor,
  { id, publicUrl, ...invitation }: z.output<typeof inviteBody> & { id: string; publicUrl: string },
): Promise<Member> {
  if (invitation.personId) await requirePerson(db, actor.orgId, invitation.personId);
  const [known] = await db
    .select()
    .from(accounts)
    .where(eq(sql`lower(${accounts.email})`, invitation.email));
  const accountId = known?.id ?? id;
  if (!known)
    await db
      .insert(accounts)
      .values({ id, email: invitation.email, name: invitation.name })
      .onConflictDoNothing();
  const [added] = await db
    .insert(memberships)
    .values({
      orgId: actor.orgId,
      accountId,
      role: invitation.role,
      personId: invitation.personId,
      joinedAt: known?.passwordHash ? new Date() : null,
    })
    .onConflictDoNothing()
    .returning();
  if (added)
    await mailInvitation(db, actor, {
      accountId,
      email: invitation.email,
      publicUrl,
      known: Boolean(known?.passwordHash),
    });
  return memberOf(db, actor.orgId, accountId);
}

async function mailInvitation(
  db: Db,
  actor: UserActor,
  {
    accountId,
    email,
    publicUrl,
    known,
  }: { accountId: string; email: string; publicUrl: string; known: boolean },
): Promise<void> {
  const [organisation] = await db.select().from(organisations).where(eq(organisations.id, actor.orgId));
  const link = known ? `${publicUrl}/sign-in` : await passwordLink(db, accountId, publicUrl, invitationHours);
  const how = known ? 'Sign in with your password:' : 'Set a password with this link within a week:';
  await queueMail(db, {
    to: email,
    subject: `A sign-in to Toeboard for ${organisation?.name ?? ''}`,
    text: `${actor.name} gave you a sign-in to ${organisation?.name ?? ''}. ${how}\n\n${link}`,
  });
}

export async function changeRole(db: Db, actor: UserActor, accountId: string, role: Role): Promise<Member> {
  const member = await memberOf(db, actor.orgId, accountId);
  if (member.role === 'administrator' && role !== 'administrator')
    await requireAnotherAdministrator(db, actor.orgId);
  await db
    .update(memberships)
    .set({ role })
    .where(and(eq(memberships.orgId, actor.orgId), eq(memberships.accountId, accountId)));
  return memberOf(db, actor.orgId, accountId);
}

export async function removeMember(db: Db, actor: UserActor, accountId: string): Promise<void> {
  const member = await memberOf(db, actor.orgId, accountId);
  if (member.role === 'administrator') await requireAnotherAdministrator(db, actor.orgId);
  await db
    .delete(memberships)
    .where(and(eq(memberships.orgId, actor.orgId), eq(memberships.accountId, accountId)));
}

async function requireAnotherAdministrator(db: Db, orgId: string): Promise<void> {
  // The rows are locked so that two administrators can't take each other away at the same moment.
  await db
    .select()
    .from(memberships)
    .where(and(eq(memberships.orgId, orgId), eq(memberships.role, 'administrator')))
    .for('update');
  const [left] = await db
    .select({ count: count() })
    .from(memberships)
    .where(and(eq(memberships.orgId, orgId), eq(memberships.role, 'administrator')));
  if ((left?.count ?? 0) < 2)
    throw new Refusal('conflict', 'This is the last administrator. Make somebody else one first.');
}

async function requirePerson(db: Db, orgId: string, personId: string): Promise<void> {
  const [person] = await db
    .select({ id: people.id })
    .from(people)
    .where(and(eq(people.orgId, orgId), eq(people.id, personId)));
  if (!person) throw new Refusal('missing', 'This person is not on the list.');
}
