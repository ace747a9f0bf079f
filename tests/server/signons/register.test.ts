import { afterAll, beforeAll, expect, test } from 'vitest';
import type { z } from 'zod';
import { newId } from '#shared/kernel/ids.ts';
import { archivePerson, listEmployers, listPeople, savePerson } from '#shared/people/people.api.ts';
import * as api from '#shared/signons/register.api.ts';
import * as sign from '#shared/signons/signons.api.ts';
import { setCrewMember } from '#shared/sites/sites.api.ts';
import { readCsv } from '../../support/csv.ts';
import { signOnBodyOf } from '../../support/phones.ts';
import { demoStatement } from '../../support/revisions.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

/** The demo's crew of nine: six have signed, Kit, Asha and Rua have not. */

let world: DemoWorld;
let supervisor: Client;
let officer: Client;
let reading: sign.Reading;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  officer = await world.as('safetyOfficer');
  const { revisions } = await demoStatement(officer);
  reading = await officer.call(sign.getReading, { params: { id: revisions[0]?.id ?? '' } });
});
afterAll(() => world.close());

type Query = z.input<typeof api.registerQuery>;
const siteId = () => world.seeded.sites.get('wattle') ?? '';
const person = (key: string) => world.seeded.people.get(key) ?? '';
const register = (query: Query = {}) => officer.call(api.getRegister, { query });
const namesOf = async (query: Query) => (await register(query)).rows.map(({ name }) => name);
const rowOf = async (id: string) => (await register()).rows.find(({ personId }) => personId === id);

async function signFor(personId: string, changes: Partial<sign.SignOnBody> = {}) {
  const signOnId = newId();
  const params = { id: siteId(), personId, signOnId };
  await supervisor.call(sign.signOnFor, { params, body: signOnBodyOf(reading, changes) });
  return signOnId;
}

async function addPerson(name: string): Promise<string> {
  const id = newId();
  const { employers } = await officer.call(listEmployers, {});
  const employerId = employers.find((employer) => employer.name === 'High Hook Cranes')?.id ?? '';
  const body = { name, employerId, trade: 'Dogger', contact: '', inductionCard: '', language: 'en' as const };
  await supervisor.call(savePerson, { params: { id }, body });
  return id;
}

test('the register holds the whole crew of a site with a statement in force, each with their standing', async () => {
  const { rows, counts } = await register();

  expect(counts).toEqual({ current: 6, older: 0, none: 3 });
  expect(rows).toHaveLength(9);
  expect(new Set(rows.map(({ site }) => site))).toEqual(new Set(['Lot 7 Wattle Rise']));
  for (const { status, signOn } of rows) expect(signOn === null).toBe(status === 'none');
});

test('the counts are of everybody, whichever standing is looked at', async () => {
  const all = await register();

  for (const status of api.registerStatuses) {
    const chosen = await register({ status });
    expect(chosen.counts).toEqual(all.counts);
    expect(chosen.rows).toEqual(all.rows.filter((row) => row.status === status));
  }
});

test('the register is narrowed by statement, site, employer and name, and counts what is left', async () => {
  const { employers } = await officer.call(listEmployers, {});
  const employerId = employers.find(({ name }) => name === 'Plumb Line Crew')?.id ?? '';
  const { id: statementId } = await demoStatement(officer);

  expect(await register({ employerId })).toMatchObject({
    counts: { current: 1, older: 0, none: 1 },
    rows: [{ name: 'Asha Gurung' }, { name: 'Tomás Arriaga' }],
  });
  expect((await register({ statementId, siteId: siteId() })).rows).toHaveLength(9);
  expect((await register({ siteId: world.seeded.sites.get('quarry') ?? '' })).rows).toEqual([]);
  expect((await register({ statementId: newId() })).rows).toEqual([]);
  for (const search of ['joao', 'João', 'PINH', 'ao pi'])
    expect(await namesOf({ search })).toEqual(['João Pinheiro']);
  expect(await register({ search: 'nobody' })).toEqual({
    rows: [],
    counts: { current: 0, older: 0, none: 0 },
  });
});

test('the register is in order by every column, both ways', async () => {
  const valueOf = {
    name: (row: api.RegisterRow) => row.name,
    employer: (row: api.RegisterRow) => row.employer,
    statement: (row: api.RegisterRow) => row.statement,
    signedAt: (row: api.RegisterRow) => row.signOn?.signedAt ?? '',
    status: (row: api.RegisterRow) => ({ none: '0', older: '1', current: '2' })[row.status],
  };
  for (const sort of ['name', 'employer', 'statement', 'signedAt', 'status'] as const) {
    const up = (await register({ sort })).rows.map(valueOf[sort]);
    const down = (await register({ sort, direction: 'down' })).rows.map(valueOf[sort]);
    expect(up).toEqual(up.toSorted((a, b) => a.localeCompare(b, 'en')));
    expect(down).toEqual(up.toReversed());
  }
  expect(await namesOf({ sort: 'status', status: 'none' })).toEqual([
    'Asha Gurung',
    'Kit Marlowe-Hale',
    'Rua Henare',
  ]);
});

test('whoever signed stays in the register after leaving the crew or the lists; whoever did not is gone', async () => {
  const off = async (key: string) => {
    const params = { id: siteId(), personId: person(key) };
    await supervisor.call(setCrewMember, { params, body: { onCrew: false } });
  };
  await off('bree');
  await off('rua');
  for (const key of ['dell', 'asha'])
    await supervisor.call(archivePerson, { params: { id: person(key) }, body: { archived: true } });

  expect(await rowOf(person('bree'))).toMatchObject({ onCrew: false, status: 'current' });
  expect(await rowOf(person('dell'))).toMatchObject({ onCrew: false, status: 'current' });
  expect(await rowOf(person('rua'))).toBeUndefined();
  expect(await rowOf(person('asha'))).toBeUndefined();
});

test('of several sign-ons under one revision the first one stands in the register', async () => {
  const first = await signFor(person('kit'));
  await signFor(person('kit'));

  expect((await rowOf(person('kit')))?.signOn?.id).toBe(first);
});

test('a signer who is renamed later stays in the record as they signed', async () => {
  const id = await addPerson('Ann Before');
  const signOnId = await signFor(id);
  const { people } = await officer.call(listPeople, {});
  const { employerId } = people.find((one) => one.id === id) ?? { employerId: '' };

  const renamed = { name: 'Ann After', employerId, trade: 'Framer', contact: '', inductionCard: 'NEW-1' };
  await supervisor.call(savePerson, { params: { id }, body: { ...renamed, language: 'en' } });

  expect(await rowOf(id)).toMatchObject({ name: 'Ann Before', trade: 'Dogger' });
  expect((await officer.call(api.getSignOn, { params: { id: signOnId } })).person).toMatchObject({
    name: 'Ann Before',
    trade: 'Dogger',
    inductionCard: '',
  });
});

test('a sign-on that nobody made is answered as missing', async () => {
  await expect(officer.call(api.getSignOn, { params: { id: newId() } })).rejects.toMatchObject({
    code: 'missing',
  });
});

async function csvRows(query: Query) {
  const response = await officer.send(api.getRegisterCsv, { query });
  const text = new TextDecoder('utf-8', { ignoreBOM: true }).decode(await response.arrayBuffer());
  const [header = [], ...rows] = readCsv(text);
  const cell = (row: string[] | undefined, name: string) => row?.[header.indexOf(name)];
  return { response, text, header, rows, cell };
}

// South Australia is 10½ hours ahead of UTC in summer and 9½ in winter (IANA time zone database, Australia/Adelaide).
test.each([
  ['2026-01-15T20:44:00.000Z', 'Fri 16 Jan 2026, 07:14'],
  ['2026-07-15T20:44:00.000Z', 'Thu 16 Jul 2026, 06:14'],
])('in the CSV %s stands in the site’s own time and in UTC', async (signedAt, local) => {
  const name = `Clock ${signedAt}`;
  await signFor(await addPerson(name), { signedAt });

  const { rows, cell } = await csvRows({ search: name });

  expect(rows).toHaveLength(1);
  expect(cell(rows[0], 'Signed')).toBe(local);
  expect(cell(rows[0], 'Time zone')).toBe('Australia/Adelaide');
  expect(cell(rows[0], 'Signed (ISO 8601)')).toBe(signedAt);
});

test('the CSV holds what the screen shows, row by row, for spreadsheets too', async () => {
  const query = { sort: 'employer', direction: 'down' } as const;
  const { rows: shown } = await register(query);

  const { response, text, header, rows, cell } = await csvRows(query);

  expect(response.headers.get('content-type')).toBe('text/csv; charset=utf-8');
  expect(response.headers.get('content-disposition')).toContain('sign-on%20register.csv');
  expect(text.startsWith('\uFEFFSite,')).toBe(true);
  expect(text.endsWith('\r\n')).toBe(true);
  for (const row of rows) expect(row).toHaveLength(header.length);
  expect(rows.map((row) => [cell(row, 'Name'), cell(row, 'Employer'), cell(row, 'Standing')])).toEqual(
    shown.map(({ name, employer, status }) => [name, employer, api.registerStatusNames[status]]),
  );
  expect(rows.map((row) => cell(row, 'Received (ISO 8601)'))).toEqual(
    shown.map(({ signOn }) => signOn?.receivedAt ?? ''),
  );
});

// The signs that a spreadsheet takes for the start of a formula: OWASP, "CSV Injection".
test.each(['=1+1', '+61 400', '-2', '@SUM(A1)', '=HYPERLINK("https://bad.example","a, b")'])(
  'a name that would be a formula in a spreadsheet, %s, is text in the CSV',
  async (name) => {
    await signFor(await addPerson(name));

    const { rows, cell } = await csvRows({ search: name });

    expect(rows.map((row) => cell(row, 'Name'))).toEqual([`'${name}`]);
    for (const value of rows.flat()) expect(value).not.toMatch(/^[=+\-@\t\r]/);
  },
);
