import { setTimeout as wait } from 'node:timers/promises';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { newId } from '#shared/kernel/ids.ts';
import { getRegister, getRegisterCsv, getSignOn } from '#shared/signons/register.api.ts';
import * as api from '#shared/signons/signons.api.ts';
import { getStatement, reviseStatement, submitDraft } from '#shared/statements/statements.api.ts';
import { verifyLedgers } from '../../../server/ledger/verify.service.ts';
import { issueStatement } from '../../../server/statements/issue.service.ts';
import { lockStatement } from '../../../server/statements/read.service.ts';
import { enrolPhone, signAccessOf, type SignAccess, signOnBodyOf } from '../../support/phones.ts';
import { demoStatement } from '../../support/revisions.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

/** Sign-ons with odd clocks, from other sites, and in the middle of an issue. */

let world: DemoWorld;
let supervisor: Client;
let officer: Client;
let wattle: SignAccess;
let phone: Client;
let reading: api.Reading;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  officer = await world.as('safetyOfficer');
  wattle = await signAccessOf(supervisor, world.seeded.sites.get('wattle') ?? '');
  phone = await enrolPhone(world.client(), wattle, { existing: person('kit') });
  const { statements } = await phone.call(api.getOwnToSign, { params: { token: wattle.token } });
  const revisionId = statements[0]?.revisionId ?? '';
  reading = await phone.call(api.getOwnReading, { params: { token: wattle.token, revisionId } });
});
afterAll(() => world.close());

const person = (key: string) => world.seeded.people.get(key) ?? '';
const put = (changes: Partial<api.SignOnBody> = {}, id = newId(), who = phone, { token } = wattle) =>
  who.call(api.signOn, { params: { token, id }, body: signOnBodyOf(reading, changes) });

async function expectLedgerHolds() {
  const [report] = await verifyLedgers(world.db);
  expect(report?.faults).toEqual([]);
}

test.each([
  ['a clock that starts at 1970', '1970-01-01T00:00:00.000Z', '1970-01-01T00:00:00.000Z'],
  ['a clock a century ahead', '2126-06-01T00:00:00.000Z', '2126-06-01T00:00:00.000Z'],
  ['the last moment of all', '9999-12-31T23:59:59.999Z', '9999-12-31T23:59:59.999Z'],
  ['a leap day', '2028-02-29T12:00:00.000Z', '2028-02-29T12:00:00.000Z'],
  ['an offset of its own', '2026-03-02T06:45:00+10:30', '2026-03-01T20:15:00.000Z'],
])('a phone with %s is believed, and its time stands beside the server’s', async (_clock, signedAt, kept) => {
  const id = newId();
  const before = Date.now();

  const receipt = await put({ signedAt }, id);

  const record = await officer.call(getSignOn, { params: { id } });
  expect(record).toMatchObject({ signedAt: kept, receivedAt: receipt.receivedAt });
  expect(Date.parse(record.receivedAt)).toBeGreaterThanOrEqual(before);
  expect(Date.parse(record.receivedAt)).toBeLessThanOrEqual(Date.now());
  await expectLedgerHolds();
});

test.each([
  '0000-06-01T00:00:00Z',
  '0001-06-01T00:00:00Z',
  '0099-06-01T00:00:00Z',
  '1969-12-31T23:59:59.999Z',
  '9999-12-31T23:59:59.999-12:00',
  '2026-02-30T00:00:00Z',
  'yesterday',
])('a phone whose clock says %s is told so in words, and nothing is kept', async (signedAt) => {
  const id = newId();

  await expect(put({ signedAt }, id)).rejects.toMatchObject({
    code: 'invalid',
    fields: { signedAt: expect.any(String) },
  });

  expect((await officer.send(getSignOn, { params: { id } })).status).toBe(404);
  await expectLedgerHolds();
});

test('the register and its CSV are still read when a clock was far off', async () => {
  await put({ signedAt: '9999-12-31T23:59:59.999Z' });

  expect((await officer.send(getRegister, { query: {} })).status).toBe(200);
  expect((await officer.send(getRegisterCsv, { query: {} })).status).toBe(200);
});

test('a phone on one site’s crew can’t read or sign another site’s statement there', async () => {
  const quarry = await signAccessOf(supervisor, world.seeded.sites.get('quarry') ?? '');
  const other = await enrolPhone(world.client(), quarry, { existing: person('lena') });
  const params = { token: quarry.token, revisionId: reading.revisionId };

  await expect(other.call(api.getOwnReading, { params })).rejects.toMatchObject({ code: 'missing' });
  await expect(put({}, newId(), other, quarry)).rejects.toMatchObject({ code: 'missing' });
  await expect(put({}, newId(), other)).rejects.toMatchObject({ code: 'signedOut' });
});

test('a known phone on another site needs the day code once, for the person that it is tied to', async () => {
  const quarry = await signAccessOf(supervisor, world.seeded.sites.get('quarry') ?? '');
  const { token } = quarry;
  const deviceId = newId();
  const kits = await enrolPhone(world.client(), wattle, { existing: person('kit') }, deviceId);
  const page = () => kits.call(api.getSignPage, { params: { token } });
  expect(await page()).toMatchObject({ recognised: { personId: person('kit') }, dayCodeNeeded: true });
  await expect(kits.call(api.getOwnToSign, { params: { token } })).rejects.toMatchObject({
    code: 'signedOut',
  });

  await enrolPhone(kits, quarry, { existing: person('kit') }, deviceId);

  expect(await page()).toMatchObject({ recognised: { personId: person('kit') }, dayCodeNeeded: false });
  await kits.call(api.getOwnToSign, { params: { token } });
  await kits.call(api.getOwnToSign, { params: { token: wattle.token } });
});

test('somebody who signs while the next revision is issued is kept, and told that it is another now', async () => {
  const { id, lockVersion } = await demoStatement(supervisor);
  const draft = await supervisor.call(reviseStatement, { params: { id }, body: { lockVersion } });
  const submitted = await supervisor.call(submitDraft, {
    params: { id },
    body: { lockVersion: draft.lockVersion },
  });
  const { orgId, safetyOfficer } = world.seeded;
  const signOnId = newId();

  let signing: ReturnType<typeof put> | undefined;
  await world.db.transaction(async (tx) => {
    await lockStatement(tx, orgId, id);
    signing = put({}, signOnId);
    // Long enough for the sign-on to come as far as it can.
    await wait(500);
    const change = { lockVersion: submitted.lockVersion, material: true, changeNote: 'Another crane' };
    await issueStatement(tx, safetyOfficer, id, change);
  });

  expect(await signing).toMatchObject({ id: signOnId, superseded: true });
  expect((await officer.call(getStatement, { params: { id } })).currentRevision).toBe(2);
  expect((await officer.call(getSignOn, { params: { id: signOnId } })).revision).toBe(1);
  await expectLedgerHolds();
});
