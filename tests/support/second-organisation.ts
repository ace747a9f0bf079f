import { eq } from 'drizzle-orm';
import { newId } from '#shared/kernel/ids.ts';
import { organisations } from '../../server/account/account.table.ts';
import { saveEmployer, savePerson } from '../../server/people/people.service.ts';
import { dayCodeFor, putOnCrew, saveSite, todayAt } from '../../server/sites/sites.service.ts';
import { sites } from '../../server/sites/sites.table.ts';
import type { SignAccess } from './phones.ts';
import type { DemoWorld } from './server.ts';

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
