import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { z } from 'zod';
import { newId } from '#shared/kernel/ids.ts';
import * as sign from '#shared/signons/signons.api.ts';
import { setCrewMember } from '#shared/sites/sites.api.ts';
import * as api from '#shared/talks/talks.api.ts';
import { verifyLedgers } from '../../../server/ledger/verify.service.ts';
import { readCsv } from '../../support/csv.ts';
import { enrolPhone, signAccessOf, type SignAccess, signature } from '../../support/phones.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

let world: DemoWorld;
let supervisor: Client;
let wattle: SignAccess;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  wattle = await signAccessOf(supervisor, site('wattle'));
});
afterAll(() => world.close());

const site = (key: string) => world.seeded.sites.get(key) ?? '';
const person = (key: string) => world.seeded.people.get(key) ?? '';

type Body = z.input<typeof api.talkBody>;
const bodyOf = (changes: Partial<Body> = {}): Body => ({
  siteId: site('wattle'),
  topic: 'The wind number',
  presenter: 'Sina Vakalahi',
  date: '2026-03-02',
  time: '06:45',
  place: 'Slab',
  points: ['Read the wind before each lift.'],
  ...changes,
});
const save = (id: string, lockVersion = 0, changes: Partial<Body> = {}) =>
  supervisor.call(api.saveTalk, { params: { id }, body: { ...bodyOf(changes), lockVersion } });
const close = (id: string, lockVersion: number) =>
  supervisor.call(api.closeTalk, { params: { id }, body: { lockVersion } });
const get = (id: string) => supervisor.call(api.getTalk, { params: { id } });
const list = async (query: z.input<typeof api.talkQuery>) =>
  (await supervisor.call(api.listTalks, { query })).talks;

const attendanceOf = (talkId: string) => ({
  talkId,
  signature: { method: 'drawn' as const, drawn: signature },
  declaration: { id: 'au-talk', version: 1, language: 'en' as const },
  signedAt: new Date().toISOString(),
  language: 'en' as const,
});
const attend = (talkId: string, who: string, attendanceId = newId()) =>
  supervisor.call(sign.attendFor, {
    params: { id: site('wattle'), personId: person(who), attendanceId },
    body: attendanceOf(talkId),
  });

test('a talk that is sent twice is there once, as it was sent first', async () => {
  const id = newId();
  const first = await save(id);

  const again = await save(id, 0, { topic: 'Something else' });

  expect(again).toEqual(first);
  expect(first).toMatchObject({ topic: 'The wind number', minutes: 10, state: 'open', lockVersion: 1 });
  expect((await list({ search: 'wind number' })).filter((talk) => talk.id === id)).toHaveLength(1);
});

test('whoever saves over somebody else’s change is refused, and is handed the talk as it stands now', async () => {
  const id = newId();
  await save(id);
  await save(id, 1, { topic: 'Theirs' });

  const mine = save(id, 1, { topic: 'Mine' });

  await expect(mine).rejects.toMatchObject({
    code: 'conflict',
    message: expect.stringContaining('still here'),
    extra: { talk: { topic: 'Theirs', lockVersion: 2 } },
  });
  expect((await get(id)).topic).toBe('Theirs');
  expect(await save(id, 2, { topic: 'Mine' })).toMatchObject({ topic: 'Mine', lockVersion: 3 });
});

test.each([
  [{ topic: '' }, 'topic', 'Write the topic.'],
  [{ presenter: ' ' }, 'presenter', 'Name who presents.'],
  [{ place: '' }, 'place', 'Say where.'],
  [{ date: '2026-02-30' }, 'date', expect.any(String)],
  [{ time: '24:61' }, 'time', expect.any(String)],
])('a talk with %o is refused, and the field is named', async (changes, field, words) => {
  await expect(save(newId(), 0, changes)).rejects.toMatchObject({
    code: 'invalid',
    fields: { [field]: words },
  });
});

test('a person signs a talk once: on their phone, again, and on a device handed round', async () => {
  const id = newId();
  await save(id);
  const phone = await enrolPhone(world.client(), wattle, { existing: person('bree') });
  const own = (attendanceId: string) =>
    phone.call(sign.attend, { params: { token: wattle.token, id: attendanceId }, body: attendanceOf(id) });
  const first = await own(newId());

  const more = await Promise.all([own(first.id), own(newId()), own(newId()), attend(id, 'bree')]);

  for (const receipt of more) expect(receipt).toEqual(first);
  const talk = await get(id);
  expect(talk.attendance).toMatchObject([{ id: first.id, name: 'Bree Ashcombe', handedRoundBy: null }]);
  expect(talk.missing.map(({ personId }) => personId)).not.toContain(person('bree'));
});

test('the words that are signed under a talk name its topic and its day', async () => {
  const id = newId();
  await save(id, 0, { topic: 'Slings and hooks', date: '2026-03-04' });

  await attend(id, 'kit');

  const { rows } = await world.db.execute<{ words: string }>(
    sql`select declaration ->> 'words' as words from attendances where talk_id = ${id}`,
  );
  expect(rows[0]?.words).toMatch(/Slings and hooks.*4 Mar 2026/);
});

test('an id that stands for one person’s attendance is refused for another’s', async () => {
  const [id, attendanceId] = [newId(), newId()];
  await save(id);
  await attend(id, 'bree', attendanceId);

  await expect(attend(id, 'minh', attendanceId)).rejects.toMatchObject({ code: 'conflict' });

  expect((await get(id)).attendance.map(({ name }) => name)).toEqual(['Bree Ashcombe']);
});

test('a talk that people have signed can’t move to another site', async () => {
  const id = newId();
  await save(id);
  await attend(id, 'minh');

  await expect(save(id, 1, { siteId: site('quarry') })).rejects.toMatchObject({ code: 'conflict' });
  expect((await get(id)).siteId).toBe(site('wattle'));
});

test('a closed talk is frozen: no route and no statement to the database changes it', async () => {
  const id = newId();
  await save(id, 0, { mattersRaised: 'The ladder', outcome: 'A second one' });
  await attend(id, 'minh');

  const closed = await close(id, 1);

  expect(closed).toMatchObject({
    state: 'closed',
    closedBy: 'Sina Vakalahi',
    hash: expect.stringMatching(/^[0-9a-f]{64}$/),
    ledgerSequence: expect.any(Number),
    consultation: true,
  });
  const refused = { code: 'conflict', message: expect.stringMatching(/closed/i) };
  await expect(save(id, closed.lockVersion, { topic: 'New' })).rejects.toMatchObject(refused);
  await expect(close(id, closed.lockVersion)).rejects.toMatchObject(refused);
  await expect(supervisor.call(api.discardTalk, { params: { id } })).rejects.toMatchObject(refused);
  await expect(attend(id, 'bree')).rejects.toMatchObject(refused);
  expect(await save(id, 0, { topic: 'New' })).toEqual(closed);
  for (const statement of [
    sql`update talks set topic = 'New' where id = ${id}`,
    sql`update talks set state = 'open' where id = ${id}`,
    sql`update attendances set person_name = 'New' where talk_id = ${id}`,
    sql`delete from attendances where talk_id = ${id}`,
    sql`delete from talks where id = ${id}`,
  ])
    await expect(world.db.execute(statement)).rejects.toThrow();
  expect(await get(id)).toEqual(closed);
});

test('who was expected at a closed talk stays as it was, whoever joins the crew later', async () => {
  const id = newId();
  await save(id);
  const closed = await close(id, 1);
  const crew = { id: site('wattle'), personId: person('lena') };

  await supervisor.call(setCrewMember, { params: crew, body: { onCrew: true } });

  expect((await get(id)).missing).toEqual(closed.missing);
  expect((await list({})).find((talk) => talk.id === id)?.crew).toBe(closed.missing.length);
  await supervisor.call(setCrewMember, { params: crew, body: { onCrew: false } });
});

test('closing a talk that was changed meanwhile is refused, and hands over the talk as it stands', async () => {
  const id = newId();
  await save(id);
  await save(id, 1, { outcome: 'Decided since' });

  await expect(close(id, 1)).rejects.toMatchObject({
    code: 'conflict',
    extra: { talk: { outcome: 'Decided since' } },
  });
  expect((await get(id)).state).toBe('open');
});

test('signing while the talk is closed leaves everybody either on the frozen list or refused', async () => {
  const id = newId();
  await save(id);
  const keys = ['sina', 'minh', 'bree', 'joao', 'kit', 'asha', 'tomas', 'dell'];

  const [closing, ...signing] = await Promise.allSettled([
    close(id, 1),
    ...keys.map((key) => attend(id, key)),
  ]);

  expect(closing.status).toBe('fulfilled');
  const { attendance } = await get(id);
  const { rows } = await world.db.execute<{ canonical: string }>(
    sql`select canonical from talks where id = ${id}`,
  );
  const frozen = JSON.parse(rows[0]?.canonical ?? '{}') as { attendance: { personId: string }[] };
  const signed = keys.filter((_, at) => signing[at]?.status === 'fulfilled').map(person);
  expect(new Set(attendance.map(({ personId }) => personId))).toEqual(new Set(signed));
  expect(new Set(frozen.attendance.map(({ personId }) => personId))).toEqual(new Set(signed));
});

test.each([
  ['neither matters raised nor an outcome', {}, false],
  ['matters raised only', { mattersRaised: 'The ladder is far off.' }, false],
  ['an outcome only', { outcome: 'A second ladder.' }, false],
  ['blanks for both', { mattersRaised: '  ', outcome: '\n' }, false],
  [
    'matters raised and an outcome',
    { mattersRaised: 'The ladder is far off.', outcome: 'A second one.' },
    true,
  ],
])(
  'a talk with attendance and %s is saved; it counts as consultation: %s (law.md T24)',
  async (_case, changes, consultation) => {
    const id = newId();
    await save(id, 0, { ...changes, topic: `Consulted ${id}` });
    await attend(id, 'minh');

    const closed = await close(id, 1);

    expect(closed.consultation).toBe(consultation);
    expect((await list({ search: id })).map((talk) => talk.consultation)).toEqual([consultation]);
    const [header = [], row = []] = readCsv(await csv({ search: id }));
    expect(row[header.indexOf('Consultation')]).toBe(consultation ? 'yes' : 'briefing only');
  },
);

test('an open talk is thrown away while nobody has signed it, and not after', async () => {
  const [unsigned, signed] = [newId(), newId()];
  await save(unsigned);
  await save(signed);
  await attend(signed, 'minh');

  await supervisor.call(api.discardTalk, { params: { id: unsigned } });

  await expect(get(unsigned)).rejects.toMatchObject({ code: 'missing' });
  await expect(supervisor.call(api.discardTalk, { params: { id: signed } })).rejects.toMatchObject({
    code: 'conflict',
    message: expect.stringContaining('have signed'),
  });
  expect((await get(signed)).attendance).toHaveLength(1);
});

test('the register is filtered by site, state, person, days and words', async () => {
  const [march, april, quarry] = [newId(), newId(), newId()];
  await save(march, 0, { topic: 'Filter 100% one_two', date: '2025-03-10' });
  await save(april, 0, { topic: 'Filter in April', date: '2025-04-10' });
  await save(quarry, 0, { topic: 'Filter at the quarry', date: '2025-04-11', siteId: site('quarry') });
  await attend(march, 'dell');
  await close(march, 1);
  const idsOf = async (query: z.input<typeof api.talkQuery>) => (await list(query)).map(({ id }) => id);
  const year = { from: '2025-01-01', to: '2025-12-31' };

  expect(await idsOf(year)).toEqual([quarry, april, march]);
  expect(await idsOf({ ...year, siteId: site('wattle') })).toEqual([april, march]);
  expect(await idsOf({ ...year, state: 'closed' })).toEqual([march]);
  expect(await idsOf({ ...year, personId: person('dell') })).toEqual([march]);
  expect(await idsOf({ from: '2025-04-10', to: '2025-04-10' })).toEqual([april]);
  expect(await idsOf({ ...year, search: 'IN APRIL' })).toEqual([april]);
  expect(await idsOf({ ...year, search: '100%' })).toEqual([march]);
  expect(await idsOf({ ...year, search: 'e_t' })).toEqual([march]);
  expect(await idsOf({ ...year, search: '%' })).toEqual([march]);
});

async function csv(query: z.input<typeof api.talkQuery>): Promise<string> {
  const response = await supervisor.send(api.getTalksCsv, { query });
  expect(response.headers.get('content-type')).toBe('text/csv; charset=utf-8');
  return new TextDecoder('utf-8', { ignoreBOM: true }).decode(await response.arrayBuffer());
}

test('the register as CSV is read back cell by cell, and no cell begins a formula', async () => {
  const topic = '=HYPERLINK("https://bad.example","a, b")';
  await save(newId(), 0, { topic, presenter: '@Sina "the crane",\nV.', date: '2024-05-06' });
  await save(newId(), 0, { topic: '+61 in the phone book', presenter: '-', date: '2024-05-05' });

  const text = await csv({ from: '2024-05-01', to: '2024-05-31' });

  expect(text.startsWith('\uFEFFDate,')).toBe(true);
  expect(text.endsWith('\r\n')).toBe(true);
  const [header = [], ...rows] = readCsv(text);
  expect(rows.map((row) => row.length)).toEqual([header.length, header.length]);
  const column = (name: string) => rows.map((row) => row[header.indexOf(name)]);
  expect(column('Date')).toEqual(['2024-05-06', '2024-05-05']);
  expect(column('Time zone')).toEqual(['Australia/Adelaide', 'Australia/Adelaide']);
  expect(column('Topic')).toEqual([`'${topic}`, `'+61 in the phone book`]);
  expect(column('Presenter')).toEqual([`'@Sina "the crane",\nV.`, `'-`]);
  for (const cell of rows.flat()) expect(cell).not.toMatch(/^[=+\-@\t\r]/);
});

test('a worker can’t read the register of talks or write a talk', async () => {
  const worker = await world.as('worker');

  await expect(worker.call(api.listTalks, {})).rejects.toMatchObject({ code: 'forbidden' });
  await expect(
    worker.call(api.saveTalk, { params: { id: newId() }, body: { ...bodyOf(), lockVersion: 0 } }),
  ).rejects.toMatchObject({ code: 'forbidden' });
});

test('a worker who is signed in signs a talk for themselves, and not for somebody else', async () => {
  const [id, worker] = [newId(), await world.as('worker')];
  await save(id);
  const signFor = (who: string) =>
    worker.call(sign.attendFor, {
      params: { id: site('wattle'), personId: person(who), attendanceId: newId() },
      body: attendanceOf(id),
    });

  await expect(signFor('bree')).rejects.toMatchObject({ code: 'forbidden' });
  await signFor('minh');
  await attend(id, 'kit');

  expect((await get(id)).attendance).toMatchObject([
    { name: 'Tran Van Minh', handedRoundBy: null },
    { name: 'Kit Marlowe-Hale', handedRoundBy: 'Sina Vakalahi' },
  ]);
});

test('after everything the ledger holds', async () => {
  const [report] = await verifyLedgers(world.db);

  expect(report?.faults).toEqual([]);
});
