import { afterAll, beforeAll, expect, test } from 'vitest';
import { newId } from '#shared/kernel/ids.ts';
import { getRegister, getSignOn } from '#shared/signons/register.api.ts';
import * as api from '#shared/signons/signons.api.ts';
import { verifyLedgers } from '../../../server/ledger/verify.service.ts';
import { withdrawStatement } from '#shared/statements/statements.api.ts';
import { enrolPhone, signAccessOf, type SignAccess, signOnBodyOf } from '../../support/phones.ts';
import { demoStatement, issueNextRevision } from '../../support/revisions.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

/** What becomes of signatures when a statement is revised; the tests follow one statement through its revisions. */

let world: DemoWorld;
let supervisor: Client;
let officer: Client;
let wattle: SignAccess;
let phone: Client;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  officer = await world.as('safetyOfficer');
  wattle = await signAccessOf(supervisor, world.seeded.sites.get('wattle') ?? '');
  phone = await enrolPhone(world.client(), wattle, { existing: person('kit') });
});
afterAll(() => world.close());

const person = (key: string) => world.seeded.people.get(key) ?? '';
const toSign = async (who = phone) =>
  (await who.call(api.getOwnToSign, { params: { token: wattle.token } })).statements[0];
const readCurrent = async () =>
  phone.call(api.getOwnReading, {
    params: { token: wattle.token, revisionId: (await toSign())?.revisionId ?? '' },
  });
const put = (reading: api.Reading, who = phone, id = newId()) =>
  who.call(api.signOn, { params: { token: wattle.token, id }, body: signOnBodyOf(reading) });
const statusOf = async (key: string) =>
  (await officer.call(getRegister, { query: {} })).rows.find(({ personId }) => personId === person(key))
    ?.status;

let first: api.Reading;

test('a phone that has signed the revision in force has nothing to sign', async () => {
  first = await readCurrent();
  expect((await toSign())?.standing).toBe('open');

  await put(first);

  expect(await toSign()).toMatchObject({ standing: 'signed', number: 1 });
  expect(await statusOf('kit')).toBe('current');
});

test('after a revision that changes nothing that matters, earlier signatures still count', async () => {
  await issueNextRevision({ supervisor, officer }, { material: false, changeNote: 'Spelling' });

  expect(await toSign()).toMatchObject({ number: 2, standing: 'signed' });
  expect(await statusOf('kit')).toBe('current');
  expect(await statusOf('bree')).toBe('current');
  expect(await statusOf('asha')).toBe('none');
});

test('after a material revision earlier signatures show as of an older one, and the crew has to sign again (law.md T15)', async () => {
  await issueNextRevision({ supervisor, officer }, { material: true, changeNote: 'Another crane' });

  expect(await toSign()).toMatchObject({ number: 3, standing: 'older', changeNote: 'Another crane' });
  expect(await statusOf('kit')).toBe('older');
  expect(await statusOf('bree')).toBe('older');
  expect(await statusOf('asha')).toBe('none');
});

test('a signature under a revision that was superseded meanwhile is kept for what was signed, and says so', async () => {
  const late = await enrolPhone(world.client(), wattle, { existing: person('asha') });
  const id = newId();

  const receipt = await put(first, late, id);

  expect(receipt).toMatchObject({ id, superseded: true });
  expect(await officer.call(getSignOn, { params: { id } })).toMatchObject({
    revision: 1,
    revisionHash: first.hash,
    standing: 'superseded',
  });
  expect(await toSign(late)).toMatchObject({ standing: 'older' });
  expect(await statusOf('asha')).toBe('older');
});

test('whoever signs the material revision is current again, and a late copy of the old one changes nothing', async () => {
  const third = await readCurrent();
  expect(third.number).toBe(3);
  await put(third);

  await put(first);

  expect(await toSign()).toMatchObject({ standing: 'signed' });
  expect(await statusOf('kit')).toBe('current');
});

test('a withdrawn statement asks nobody to sign, and a signature on its way is still kept', async () => {
  const reading = await readCurrent();
  const { id, lockVersion } = await demoStatement(officer);
  await officer.call(withdrawStatement, { params: { id }, body: { lockVersion, reason: 'Job is done' } });
  const late = await enrolPhone(world.client(), wattle, { existing: person('rua') });

  const receipt = await put(reading, late);

  expect(receipt.superseded).toBe(true);
  expect((await late.call(api.getOwnToSign, { params: { token: wattle.token } })).statements).toEqual([]);
  expect((await officer.call(getSignOn, { params: { id: receipt.id } })).standing).toBe('withdrawn');
  const [report] = await verifyLedgers(world.db);
  expect(report?.faults).toEqual([]);
});
