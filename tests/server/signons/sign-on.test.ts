import { and, eq, inArray } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { sha256Hex } from '#shared/kernel/canonical.ts';
import { newId } from '#shared/kernel/ids.ts';
import { listEmployers } from '#shared/people/people.api.ts';
import { getRegister, getSignOn } from '#shared/signons/register.api.ts';
import { signatureSvg } from '#shared/signons/signature.ts';
import * as api from '#shared/signons/signons.api.ts';
import { ledgerEntries } from '../../../server/ledger/ledger.table.ts';
import { verifyLedgers } from '../../../server/ledger/verify.service.ts';
import { signOns } from '../../../server/signons/signons.table.ts';
import { enrolPhone, signAccessOf, type SignAccess, signature, signOnBodyOf } from '../../support/phones.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

let world: DemoWorld;
let supervisor: Client;
let officer: Client;
let wattle: SignAccess;
let reading: api.Reading;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  officer = await world.as('safetyOfficer');
  wattle = await signAccessOf(supervisor, siteId());
  const phone = await phoneOf('bree');
  const { statements } = await phone.call(api.getOwnToSign, { params: { token: wattle.token } });
  const params = { token: wattle.token, revisionId: statements[0]?.revisionId ?? '' };
  reading = await phone.call(api.getOwnReading, { params });
});
afterAll(() => world.close());

const siteId = () => world.seeded.sites.get('wattle') ?? '';
const person = (key: string) => world.seeded.people.get(key) ?? '';
const phoneOf = (key: string) => enrolPhone(world.client(), wattle, { existing: person(key) });
const put = (phone: Client, id: string, body = signOnBodyOf(reading)) =>
  phone.call(api.signOn, { params: { token: wattle.token, id }, body });
const registerRowsOf = async (personId: string) =>
  (await officer.call(getRegister, { query: { siteId: siteId() } })).rows.filter(
    (row) => row.personId === personId,
  );
const rowsIn = (ids: string[]) => world.db.select().from(signOns).where(inArray(signOns.id, ids));
const entriesOf = (id: string) =>
  world.db
    .select()
    .from(ledgerEntries)
    .where(and(eq(ledgerEntries.orgId, world.seeded.orgId), eq(ledgerEntries.subject, `signOn:${id}`)));

async function expectLedgerHolds() {
  const [report] = await verifyLedgers(world.db);
  expect(report?.faults).toEqual([]);
}

test('a phone signs: the receipt, the register, the record and the ledger all say the same', async () => {
  const phone = await phoneOf('kit');
  const id = newId();
  const body = signOnBodyOf(reading, { readingMs: 432_000, language: 'vi' });
  const first = reading.questions[0];
  if (!first) throw new Error('The demo statement asks nothing.');
  body.answers[0] = { question: first.id, tries: [(first.right + 1) % first.answers.length, first.right] };

  const receipt = await put(phone, id, body);

  expect(receipt).toMatchObject({ id, superseded: false });
  const [row] = await registerRowsOf(person('kit'));
  expect(row).toMatchObject({
    status: 'current',
    name: 'Kit Marlowe-Hale',
    signOn: { id, revision: 1, signedAt: body.signedAt, receivedAt: receipt.receivedAt, handedRoundBy: null },
  });
  const record = await officer.call(getSignOn, { params: { id } });
  expect(record).toMatchObject({
    statement: 'Roof trusses by crane, Lot 7',
    revision: 1,
    revisionHash: reading.hash,
    standing: 'current',
    site: 'Lot 7 Wattle Rise',
    person: { id: person('kit'), name: 'Kit Marlowe-Hale', trade: 'Apprentice', inductionCard: 'SA-100205' },
    method: 'drawn',
    svg: signatureSvg(signature),
    declaration: reading.declaration,
    signedAt: body.signedAt,
    receivedAt: receipt.receivedAt,
    readingMs: 432_000,
    language: 'vi',
    device: 'node',
    handedRoundBy: null,
  });
  expect(record.declaration.words.join(' ')).toContain('revision 1 of “Roof trusses by crane, Lot 7”');
  expect(record.answers).toHaveLength(reading.questions.length);
  expect(record.answers[0]).toEqual({
    question: first.ask,
    tries: [first.answers[(first.right + 1) % first.answers.length], first.answers[first.right]],
    right: true,
  });
  const [entry, ...more] = await entriesOf(id);
  expect(more).toEqual([]);
  expect(entry).toMatchObject({ kind: 'signOn', actor: `person:${person('kit')}`, ...record.ledger });
  await expectLedgerHolds();
});

test('the hash that a phone signs is the SHA-256 of the revision as it was frozen', async () => {
  const { rows } = await world.db.execute<{ canonical: string }>(
    `select canonical from revisions where id = '${reading.revisionId}'`,
  );

  expect(sha256Hex(rows[0]?.canonical ?? '')).toBe(reading.hash);
});

test('a phone that sends its sign-on again gets the same receipt, and nothing is kept twice', async () => {
  const phone = await phoneOf('asha');
  const id = newId();
  const receipt = await put(phone, id);

  const again = await put(phone, id, signOnBodyOf(reading, { readingMs: 1 }));

  expect(again).toEqual(receipt);
  const rows = await rowsIn([id]);
  expect(rows).toHaveLength(1);
  expect(rows[0]?.readingMs).toBe(600_000);
  expect(await entriesOf(id)).toHaveLength(1);
});

test('twenty copies of one sign-on at the same moment leave one row, one entry and twenty equal receipts', async () => {
  const phone = await phoneOf('rua');
  const id = newId();
  const body = signOnBodyOf(reading);

  const receipts = await Promise.all(Array.from({ length: 20 }, () => put(phone, id, body)));

  expect(new Set(receipts.map((receipt) => JSON.stringify(receipt))).size).toBe(1);
  expect(await rowsIn([id])).toHaveLength(1);
  expect(await entriesOf(id)).toHaveLength(1);
  await expectLedgerHolds();
});

test('fifty people who sign at the same moment are all there, and the chain holds', async () => {
  const { employers } = await supervisor.call(listEmployers, {});
  const employerId = employers[0]?.id ?? '';
  const crowd: { phone: Client; id: string }[] = [];
  for (let at = 1; at <= 50; at += 1) {
    const self = { id: newId(), name: `Hand Number${at}`, employerId, trade: 'Framer' };
    crowd.push({ phone: await enrolPhone(world.client(), wattle, { new: self }), id: newId() });
  }

  const receipts = await Promise.all(crowd.map(({ phone, id }) => put(phone, id)));

  const ids = crowd.map(({ id }) => id);
  expect(receipts.map(({ id }) => id)).toEqual(ids);
  const rows = await rowsIn(ids);
  expect(new Set(rows.map(({ id }) => id))).toEqual(new Set(ids));
  expect(new Set(rows.map(({ personId }) => personId)).size).toBe(50);
  expect(new Set(rows.map(({ ledgerSequence }) => ledgerSequence)).size).toBe(50);
  await expectLedgerHolds();
});

test('an id that stands for one person’s sign-on is refused for another’s', async () => {
  const id = newId();
  await put(await phoneOf('bree'), id);

  await expect(put(await phoneOf('minh'), id)).rejects.toMatchObject({ code: 'conflict' });

  expect((await rowsIn([id])).map(({ personId }) => personId)).toEqual([person('bree')]);
});

test('a phone that showed something else than the revision is refused', async () => {
  const phone = await phoneOf('minh');
  const id = newId();

  await expect(
    put(phone, id, signOnBodyOf(reading, { revisionHash: sha256Hex('other') })),
  ).rejects.toMatchObject({
    code: 'conflict',
    message: expect.stringContaining('read it'),
  });
  expect(await rowsIn([id])).toEqual([]);
});

test.each([
  ['a dot', [[[10, 10, 0]]]],
  [
    'a short tick',
    [
      [
        [10, 10, 0],
        [30, 30, 50],
      ],
    ],
  ],
])('somebody who leaves only %s in the box is asked to sign again', async (_ink, strokes) => {
  const phone = await phoneOf('minh');
  const drawn = { width: 320, height: 140, strokes: strokes as [number, number, number][][] };

  await expect(
    put(phone, newId(), signOnBodyOf(reading, { signature: { method: 'drawn', drawn } })),
  ).rejects.toMatchObject({ code: 'invalid', message: expect.stringContaining('Sign again') });
});

test.each([{ version: 99 }, { id: 'nz-statement' }, { language: 'vi' as const }])(
  'a phone that showed other words than those in force (%o) is refused, and nothing is kept',
  async (change) => {
    const phone = await phoneOf('minh');
    const id = newId();
    const body = signOnBodyOf(reading);

    await expect(
      put(phone, id, { ...body, declaration: { ...body.declaration, ...change } }),
    ).rejects.toMatchObject({ code: 'invalid', fields: { declaration: expect.any(String) } });
    expect(await rowsIn([id])).toEqual([]);
  },
);

test('a signature of ten megabytes is refused with the limit in words', async () => {
  const phone = await phoneOf('minh');
  const body = JSON.stringify({ ...signOnBodyOf(reading), filler: 'x'.repeat(10 * 1024 * 1024) });

  const response = await phone.fetch(`/api/sign/${wattle.token}/sign-ons/${newId()}`, {
    method: 'PUT',
    body,
  });

  expect(response.status).toBe(413);
  expect(await response.json()).toMatchObject({
    code: 'tooLarge',
    detail: expect.stringMatching(/512 kB.*Nothing was saved/),
  });
});

const handed = (client: Client, personId: string, signOnId = newId(), body = signOnBodyOf(reading)) =>
  client.call(api.signOnFor, { params: { id: siteId(), personId, signOnId }, body });

test('a worker signs for themselves when signed in, and can’t sign for somebody else', async () => {
  const worker = await world.as('worker');
  const id = newId();

  await handed(worker, person('minh'), id);

  expect(await officer.call(getSignOn, { params: { id } })).toMatchObject({
    person: { id: person('minh') },
    handedRoundBy: null,
  });
  const other = newId();
  await expect(handed(worker, person('bree'), other)).rejects.toMatchObject({ code: 'forbidden' });
  await expect(
    worker.call(api.getToSign, { params: { id: siteId(), personId: person('bree') } }),
  ).rejects.toMatchObject({ code: 'forbidden' });
  expect(await rowsIn([other])).toEqual([]);
});

test('on a device handed round it is kept who handed it', async () => {
  const id = newId();

  await handed(supervisor, person('dell'), id);

  const record = await officer.call(getSignOn, { params: { id } });
  expect(record).toMatchObject({ person: { name: 'Dell Cartwright' }, handedRoundBy: 'Sina Vakalahi' });
  expect((await rowsIn([id]))[0]).toMatchObject({
    deviceId: null,
    handedRoundBy: world.seeded.supervisor.accountId,
  });
});

test('an administrator, who hands no devices round, can’t sign for anybody', async () => {
  await expect(handed(await world.as('administrator'), person('dell'))).rejects.toMatchObject({
    code: 'forbidden',
  });
});

test('somebody who can’t draw types their name before a witness, and both are kept', async () => {
  const id = newId();
  const typed = { method: 'typed', typedName: 'Tomás Arriaga', witness: 'Bree Ashcombe' } as const;

  await handed(supervisor, person('tomas'), id, signOnBodyOf(reading, { signature: typed }));

  expect(await officer.call(getSignOn, { params: { id } })).toMatchObject({ ...typed, svg: null });
});

test('a typed name without a witness is refused in words', async () => {
  const signature = { method: 'typed', typedName: 'Tomás Arriaga', witness: '' } as const;

  await expect(
    handed(supervisor, person('tomas'), newId(), signOnBodyOf(reading, { signature })),
  ).rejects.toMatchObject({
    code: 'invalid',
    fields: { 'signature.witness': 'The witness writes their name.' },
  });
});

test('nobody who isn’t signed in or known by phone gets in', async () => {
  const stranger = world.client();

  await expect(put(stranger, newId())).rejects.toMatchObject({ code: 'signedOut' });
  await expect(handed(stranger, person('kit'))).rejects.toMatchObject({ code: 'signedOut' });
});

test('after everything the ledger still holds', expectLedgerHolds);
