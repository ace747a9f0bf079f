import { afterAll, beforeAll, expect, test } from 'vitest';
import { newId } from '#shared/kernel/ids.ts';
import { archivePerson } from '#shared/people/people.api.ts';
import { getRegister, getSignOn } from '#shared/signons/register.api.ts';
import * as api from '#shared/signons/signons.api.ts';
import { getSite } from '#shared/sites/sites.api.ts';
import { getTalk, saveTalk } from '#shared/talks/talks.api.ts';
import { signature, signOnBodyOf } from '../../support/phones.ts';
import { demoStatement } from '../../support/revisions.ts';
import { addSecondOrganisation, strangerIn } from '../../support/second-organisation.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

/** Signing on a signed-in device: one's own, somebody else's, and never somebody of another organisation. */

let world: DemoWorld;
let supervisor: Client;
let reading: api.Reading;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  const { revisions } = await demoStatement(supervisor);
  reading = await supervisor.call(api.getReading, { params: { id: revisions[0]?.id ?? '' } });
});
afterAll(() => world.close());

const site = (key: string) => world.seeded.sites.get(key) ?? '';
const person = (key: string) => world.seeded.people.get(key) ?? '';
const handed = (
  { siteId = site('wattle'), personId }: { siteId?: string; personId: string },
  { client = supervisor, signOnId = newId() } = {},
) =>
  client.call(api.signOnFor, {
    params: { id: siteId, personId, signOnId },
    body: signOnBodyOf(reading),
  });
const attended = (
  { siteId = site('wattle'), personId, talkId }: { siteId?: string; personId: string; talkId: string },
  client = supervisor,
) =>
  client.call(api.attendFor, {
    params: { id: siteId, personId, attendanceId: newId() },
    body: {
      talkId,
      signature: { method: 'drawn', drawn: signature },
      declaration: { id: 'au-talk', version: 1, language: 'en' },
      signedAt: new Date().toISOString(),
      language: 'en',
    },
  });
const crewOf = async (key: string) =>
  (await supervisor.call(getSite, { params: { id: site(key) } })).people.map(({ id }) => id);

async function newTalk(): Promise<string> {
  const id = newId();
  const body = { topic: 'Slings', presenter: 'Sina', date: '2026-03-02', time: '06:45', place: 'Slab' };
  await supervisor.call(saveTalk, {
    params: { id },
    body: { ...body, siteId: site('wattle'), lockVersion: 0 },
  });
  return id;
}

test('whoever signs on a device handed round is put on the crew', async () => {
  expect(await crewOf('wattle')).not.toContain(person('lena'));

  await handed({ personId: person('lena') });

  expect(await crewOf('wattle')).toContain(person('lena'));
  const { rows } = await supervisor.call(getRegister, { query: { siteId: site('wattle') } });
  expect(rows.find(({ personId }) => personId === person('lena'))).toMatchObject({
    status: 'current',
    onCrew: true,
    signOn: { handedRoundBy: 'Sina Vakalahi' },
  });
});

test('whoever signs a talk on a device handed round is put on the crew', async () => {
  const talkId = await newTalk();

  await attended({ personId: person('wes'), talkId });

  expect(await crewOf('wattle')).toContain(person('wes'));
});

test('a late signature of somebody taken off the lists is kept, and does not bring them back', async () => {
  const [id, signOnId, talkId] = [person('rua'), newId(), await newTalk()];
  await supervisor.call(archivePerson, { params: { id }, body: { archived: true } });

  await handed({ personId: id }, { signOnId });
  await attended({ personId: id, talkId });

  expect((await supervisor.call(getSignOn, { params: { id: signOnId } })).person.id).toBe(id);
  const talk = await supervisor.call(getTalk, { params: { id: talkId } });
  expect(talk.attendance).toMatchObject([{ personId: id }]);
  expect(talk.missing.map(({ personId }) => personId)).not.toContain(id);
  // Whoever is off the lists is not shown on a crew: it would come out when they are brought back.
  await supervisor.call(archivePerson, { params: { id }, body: { archived: false } });
  expect(await crewOf('wattle')).not.toContain(id);
});

test('a supervisor who signs for themselves has handed the device to nobody', async () => {
  const signOnId = newId();

  await handed({ personId: person('sina') }, { signOnId });

  const record = await supervisor.call(getSignOn, { params: { id: signOnId } });
  expect(record).toMatchObject({ person: { id: person('sina') }, handedRoundBy: null });
});

test('a resend from the device handed round answers as the first did', async () => {
  const signOnId = newId();
  const first = await handed({ personId: person('asha') }, { signOnId });

  expect(await handed({ personId: person('asha') }, { signOnId })).toEqual(first);
  await expect(handed({ personId: person('kit') }, { signOnId })).rejects.toMatchObject({ code: 'conflict' });
});

test('people, sites, statements and talks of another organisation lead nowhere, in either direction', async () => {
  const other = await addSecondOrganisation(world);
  const talkId = await newTalk();
  const stranger = await strangerIn(world);
  const missing = { code: 'missing' };

  await expect(handed({ personId: other.personId })).rejects.toMatchObject(missing);
  await expect(handed({ siteId: other.siteId, personId: person('kit') })).rejects.toMatchObject(missing);
  await expect(attended({ personId: other.personId, talkId })).rejects.toMatchObject(missing);
  await expect(handed({ personId: person('kit') }, { client: stranger })).rejects.toMatchObject(missing);
  await expect(attended({ personId: person('kit'), talkId }, stranger)).rejects.toMatchObject(missing);
  const params = { id: site('wattle'), personId: other.personId };
  await expect(supervisor.call(api.getToSign, { params })).rejects.toMatchObject(missing);
  expect(await crewOf('wattle')).not.toContain(other.personId);
});

test('a statement can’t be signed at a site that it is not for', async () => {
  const at = { siteId: site('quarry'), personId: person('imran') };

  await expect(handed(at)).rejects.toMatchObject({ code: 'missing' });
});

test('a signed-in person sees what they have to sign on every site whose crew they are on', async () => {
  const { sites } = await supervisor.call(api.getMyToSign, {});
  expect(sites.map((own) => own.site.name).toSorted()).toEqual([
    'Lot 7 Wattle Rise',
    'Old Quarry Road, stage 2',
  ]);
  expect(sites.every((own) => own.person.id === person('sina'))).toBe(true);

  const worker = await world.as('worker');
  const own = await worker.call(api.getMyToSign, {});
  expect(own.sites.map((at) => [at.person.name, at.site.name])).toEqual([
    ['Tran Van Minh', 'Lot 7 Wattle Rise'],
  ]);
  expect(own.sites[0]?.statements).toMatchObject([{ title: reading.title, standing: 'signed' }]);
});
