import { eq } from 'drizzle-orm';
import { newId } from '#shared/kernel/ids.ts';
import { signIn } from '#shared/account/account.api.ts';
import { accounts, memberships, organisations } from '../../server/account/account.table.ts';
import { hashPassword } from '../../server/account/password.ts';
import { saveEmployer, savePerson } from '../../server/people/people.service.ts';
import { dayCodeFor, putOnCrew, saveSite, todayAt } from '../../server/sites/sites.service.ts';
import { sites } from '../../server/sites/sites.table.ts';
import type { SignAccess } from './phones.ts';
import type { Client, DemoWorld } from './server.ts';

export type SecondOrganisation = {
  orgId: string;
  siteId: string;
  employerId: string;
  personId: string;
  access: SignAccess;
};

/** A second organisation beside the demo one, with a site, an employer and one person on the crew. */
export async function addSecondOrganisation({ db, seeded }: DemoWorld): Promise<SecondOrganisation> {
  const [first] = await db.select().from(organisations).where(eq(organisations.id, seeded.orgId));
  if (!first) throw new Error('The demo organisation is not there.');
  const [orgId, siteId, employerId, personId] = [newId(), newId(), newId(), newId()] as const;
  await db.insert(organisations).values({ ...first, id: orgId, name: 'Other Frames' });
  await saveSite(db, orgId, siteId, {
    name: 'Far paddock',
    address: '1 Far Road',
    timeZone: 'Australia/Perth',
    principalContractor: '',
    emergency: '',
  });
  await saveEmployer(db, orgId, employerId, { name: 'Other Frames', businessNumber: '', contact: '' });
  await savePerson(db, orgId, personId, {
    name: 'Olive Stranger',
    employerId,
    trade: 'Framer',
    contact: '',
    inductionCard: '',
    language: 'en',
  });
  await putOnCrew(db, orgId, siteId, personId);
  const [site] = await db.select().from(sites).where(eq(sites.id, siteId));
  if (!site) throw new Error('The second site was not kept.');
  const dayCode = await dayCodeFor(db, orgId, siteId, todayAt(site));
  return { orgId, siteId, employerId, personId, access: { token: site.signToken, dayCode } };
}

/** Somebody with every right of a safety officer in another organisation, signed in. */
export async function strangerIn(world: DemoWorld): Promise<Client> {
  const { orgId } = await addSecondOrganisation(world);
  const accountId = newId();
  const email = 'stranger@other.example';
  const password = 'a sentence of a stranger';
  await world.db
    .insert(accounts)
    .values({ id: accountId, email, name: 'A Stranger', passwordHash: await hashPassword(password) });
  await world.db
    .insert(memberships)
    .values({ orgId, accountId, role: 'safetyOfficer', joinedAt: new Date() });
  const client = world.client();
  await client.call(signIn, { body: { email, password } });
  return client;
}
