import { and, asc, count, eq, ilike, inArray, isNotNull, isNull, sql } from 'drizzle-orm';
import type { z } from 'zod';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { Employer, employerBody, Person, personBody, personFilters } from '#shared/people/people.api.ts';
import { memberships } from '../account/account.table.ts';
import type { Db } from '../platform/db.ts';
import { devices } from '../signons/signons.table.ts';
import { crewMembers, sites } from '../sites/sites.table.ts';
import { employers, people } from './people.table.ts';

export async function listEmployers(db: Db, orgId: string): Promise<Employer[]> {
  const rows = await db
    .select({ employer: employers, people: count(people.id) })
    .from(employers)
    .leftJoin(
      people,
      and(eq(people.orgId, employers.orgId), eq(people.employerId, employers.id), isNull(people.archivedAt)),
    )
    .where(eq(employers.orgId, orgId))
    .groupBy(employers.orgId, employers.id)
    .orderBy(asc(employers.name));
  return rows.map(({ employer, people }) => ({
    id: employer.id,
    name: employer.name,
    businessNumber: employer.businessNumber,
    contact: employer.contact,
    people,
  }));
}

/** Creates or changes an employer; a resend changes nothing. */
export async function saveEmployer(
  db: Db,
  orgId: string,
  id: string,
  body: z.output<typeof employerBody>,
): Promise<Employer> {
  await db
    .insert(employers)
    .values({ orgId, id, ...body })
    .onConflictDoUpdate({ target: [employers.orgId, employers.id], set: body });
  const saved = (await listEmployers(db, orgId)).find((employer) => employer.id === id);
  if (!saved) throw new Refusal('missing', 'This employer is not there.');
  return saved;
}

export async function requireEmployer(
  db: Db,
  orgId: string,
  id: string,
): Promise<typeof employers.$inferSelect> {
  const [employer] = await db
    .select()
    .from(employers)
    .where(and(eq(employers.orgId, orgId), eq(employers.id, id)));
  if (!employer)
    throw new Refusal('missing', 'This employer is not on the list.', {
      fields: { employerId: 'Choose an employer from the list.' },
    });
  return employer;
}

export async function listPeople(
  db: Db,
  orgId: string,
  filters: z.output<typeof personFilters>,
): Promise<Person[]> {
  const onSite = filters.siteId
    ? inArray(
        people.id,
        db
          .select({ id: crewMembers.personId })
          .from(crewMembers)
          .where(and(eq(crewMembers.orgId, orgId), eq(crewMembers.siteId, filters.siteId))),
      )
    : undefined;
  const where = and(
    eq(people.orgId, orgId),
    filters.archived === 'yes' ? isNotNull(people.archivedAt) : isNull(people.archivedAt),
    filters.employerId ? eq(people.employerId, filters.employerId) : undefined,
    filters.search ? ilike(people.name, `%${filters.search.replace(/[\\%_]/g, '\\$&')}%`) : undefined,
    onSite,
  );
  return presentPeople(db, orgId, where);
}

export async function getPerson(db: Db, orgId: string, id: string): Promise<Person> {
  const [person] = await presentPeople(db, orgId, and(eq(people.orgId, orgId), eq(people.id, id)));
  if (!person) throw new Refusal('missing', 'This person is not on the list.');
  return person;
}

/** Asked, not joined: two sign-ins tied to one person would show the person twice. */
const hasSignIn = sql<boolean>`exists (select 1 from ${memberships} where ${memberships.orgId} = ${people.orgId} and ${memberships.personId} = ${people.id})`;

async function presentPeople(db: Db, orgId: string, where: ReturnType<typeof and>): Promise<Person[]> {
  const rows = await db
    .select({ person: people, employer: employers.name, signIn: hasSignIn })
    .from(people)
    .innerJoin(employers, and(eq(employers.orgId, people.orgId), eq(employers.id, people.employerId)))
    .where(where)
    .orderBy(asc(people.name));
  const sitesOf = await openSitesOf(db, orgId, where);
  return rows.map(({ person, employer, signIn }) => ({
    id: person.id,
    name: person.name,
    employerId: person.employerId,
    trade: person.trade,
    contact: person.contact,
    inductionCard: person.inductionCard,
    language: person.language as Person['language'],
    employer,
    sites: sitesOf.get(person.id) ?? [],
    signIn,
    archivedAt: person.archivedAt?.toISOString() ?? null,
  }));
}

/** The open sites on whose crew each of these people is. */
async function openSitesOf(db: Db, orgId: string, where: ReturnType<typeof and>) {
  const rows = await db
    .select({ personId: crewMembers.personId, id: sites.id, name: sites.name })
    .from(crewMembers)
    .innerJoin(sites, and(eq(sites.orgId, crewMembers.orgId), eq(sites.id, crewMembers.siteId)))
    .innerJoin(people, and(eq(people.orgId, crewMembers.orgId), eq(people.id, crewMembers.personId)))
    .where(and(eq(crewMembers.orgId, orgId), isNull(sites.archivedAt), where))
    .orderBy(asc(sites.name));
  const byPerson = new Map<string, Person['sites']>();
  for (const { personId, ...site } of rows) byPerson.set(personId, [...(byPerson.get(personId) ?? []), site]);
  return byPerson;
}

export async function savePerson(
  db: Db,
  orgId: string,
  id: string,
  body: z.output<typeof personBody>,
): Promise<Person> {
  await requireEmployer(db, orgId, body.employerId);
  await db
    .insert(people)
    .values({ orgId, id, ...body })
    .onConflictDoUpdate({ target: [people.orgId, people.id], set: body });
  return getPerson(db, orgId, id);
}

/** Takes a person off the lists or brings one back. Their records stay; their phones are no longer recognised. */
export async function archivePerson(db: Db, orgId: string, id: string, archived: boolean): Promise<Person> {
  const person = await getPerson(db, orgId, id);
  // Said twice, it keeps the day on which it was first said.
  if (archived === (person.archivedAt !== null)) return person;
  const now = new Date();
  await db
    .update(people)
    .set({ archivedAt: archived ? now : null })
    .where(and(eq(people.orgId, orgId), eq(people.id, id)));
  if (archived) {
    await db
      .update(devices)
      .set({ revokedAt: now })
      .where(and(eq(devices.orgId, orgId), eq(devices.personId, id), isNull(devices.revokedAt)));
    await db.delete(crewMembers).where(and(eq(crewMembers.orgId, orgId), eq(crewMembers.personId, id)));
  }
  return getPerson(db, orgId, id);
}
