import { eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { newId } from '#shared/kernel/ids.ts';
import * as api from '#shared/people/people.api.ts';
import { getOwnToSign } from '#shared/signons/signons.api.ts';
import { getSite } from '#shared/sites/sites.api.ts';
import { memberships } from '../../../server/account/account.table.ts';
import { enrolPhone, signAccessOf } from '../../support/phones.ts';
import { addSecondOrganisation, type SecondOrganisation } from '../../support/second-organisation.ts';
import { codesOf, refusalOf } from '../../support/refusals.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

let world: DemoWorld;
let supervisor: Client;
let officer: Client;
let other: SecondOrganisation;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  officer = await world.as('safetyOfficer');
  other = await addSecondOrganisation(world);
});
afterAll(() => world.close());

const person = (key: string) => world.seeded.people.get(key) ?? '';
const site = (key: string) => world.seeded.sites.get(key) ?? '';
const employerNamed = async (name: string) =>
  (await supervisor.call(api.listEmployers, {})).employers.find((employer) => employer.name === name);
const bodyOf = async (changes: object = {}) => ({
  name: 'Noor Haddad',
  employerId: (await employerNamed('Plumb Line Crew'))?.id ?? '',
  trade: 'Framer',
  ...changes,
});
const namesOf = async (query: Parameters<typeof api.personFilters.parse>[0]) =>
  (await supervisor.call(api.listPeople, { query: query as object })).people.map(({ name }) => name);

describe('employers', () => {
  test('an employer that is saved twice with one id is there once, and counts the people who are not archived', async () => {
    const id = newId();
    const body = { name: 'Northfall Rigging', contact: 'rig@northfall.example' };

    const first = await supervisor.call(api.saveEmployer, { params: { id }, body });
    const again = await supervisor.call(api.saveEmployer, { params: { id }, body });
    expect(again).toEqual(first);
    expect(first).toEqual({ id, ...body, businessNumber: '', people: 0 });

    const noor = newId();
    await supervisor.call(api.savePerson, {
      params: { id: noor },
      body: await bodyOf({ employerId: id }),
    });
    expect((await employerNamed('Northfall Rigging'))?.people).toBe(1);
    await supervisor.call(api.archivePerson, { params: { id: noor }, body: { archived: true } });
    expect((await employerNamed('Northfall Rigging'))?.people).toBe(0);
  });

  test('an employer without a name is refused beside the field', async () => {
    const refusal = await refusalOf(
      supervisor.call(api.saveEmployer, { params: { id: newId() }, body: { name: '  ' } }),
    );

    expect(refusal).toMatchObject({ code: 'invalid', fields: { name: 'Write the name.' } });
  });
});

describe('people', () => {
  test('a person that is saved twice with one id is there once, and a later save changes the one', async () => {
    const id = newId();

    const first = await supervisor.call(api.savePerson, { params: { id }, body: await bodyOf() });
    expect(await supervisor.call(api.savePerson, { params: { id }, body: await bodyOf() })).toEqual(first);
    await supervisor.call(api.savePerson, { params: { id }, body: await bodyOf({ trade: 'Leading hand' }) });

    expect(await supervisor.call(api.getPerson, { params: { id } })).toMatchObject({
      name: 'Noor Haddad',
      trade: 'Leading hand',
      employer: 'Plumb Line Crew',
      sites: [],
      signIn: false,
      archivedAt: null,
    });
    expect(await namesOf({ search: 'noor haddad' })).toEqual(['Noor Haddad']);
  });

  test('a person of an employer that is not on the list, or is another organisation’s, is refused beside the field', async () => {
    for (const employerId of [newId(), other.employerId]) {
      const refusal = await refusalOf(
        supervisor.call(api.savePerson, { params: { id: newId() }, body: await bodyOf({ employerId }) }),
      );
      expect(refusal).toMatchObject({
        code: 'missing',
        fields: { employerId: 'Choose an employer from the list.' },
      });
    }
  });

  test('what does not fit is named field by field, and a field that nobody knows is not dropped in silence', async () => {
    const refusal = await refusalOf(
      supervisor.call(api.savePerson, {
        params: { id: newId() },
        body: await bodyOf({ name: '', trade: '', language: 'tlh' }),
      }),
    );
    expect(Object.keys(refusal?.fields ?? {}).sort()).toEqual(['language', 'name', 'trade']);

    const unknown = await refusalOf(
      supervisor.call(api.savePerson, { params: { id: newId() }, body: await bodyOf({ nickname: 'N' }) }),
    );
    expect(unknown?.code).toBe('invalid');
  });

  test('the list is found by name, employer and site; what a search has of wildcards is plain text', async () => {
    const hook = await employerNamed('High Hook Cranes');

    expect(await namesOf({ search: 'JOÃO' })).toEqual(['João Pinheiro']);
    expect(await namesOf({ employerId: hook?.id })).toEqual(['Dell Cartwright', 'Rua Henare']);
    expect(await namesOf({ siteId: site('quarry') })).toEqual([
      'Imran Sheikh',
      'Lena Okafor',
      'Rua Henare',
      'Sina Vakalahi',
      'Wes Thackeray',
    ]);
    expect(await namesOf({ search: '%' })).toEqual([]);
    expect(await namesOf({ search: '_' })).toEqual([]);
    expect(await namesOf({ siteId: other.siteId })).toEqual([]);
  });

  test('a person shows the open sites of their crew, and whether they have a sign-in', async () => {
    const { people } = await supervisor.call(api.listPeople, { query: {} });
    const named = (name: string) => people.find((one) => one.name === name);

    expect(named('Rua Henare')?.sites.map(({ name }) => name)).toEqual([
      'Lot 7 Wattle Rise',
      'Old Quarry Road, stage 2',
    ]);
    expect([named('Tran Van Minh')?.signIn, named('Bree Ashcombe')?.signIn]).toEqual([true, false]);
  });

  test('somebody to whom two sign-ins are tied stands in the list once', async () => {
    await world.db
      .update(memberships)
      .set({ personId: person('sina') })
      .where(eq(memberships.accountId, world.seeded.safetyOfficer.accountId));

    expect(await namesOf({ search: 'Sina' })).toEqual(['Sina Vakalahi']);
  });
});

describe('archiving', () => {
  test('takes a person off lists and crews and no longer knows their phone; what they signed stays', async () => {
    const access = await signAccessOf(supervisor, site('wattle'));
    const phone = await enrolPhone(world.client(), access, { existing: person('bree') });
    const toSign = () => phone.call(getOwnToSign, { params: { token: access.token } });
    expect((await toSign()).statements).toHaveLength(1);

    const archived = await supervisor.call(api.archivePerson, {
      params: { id: person('bree') },
      body: { archived: true },
    });

    expect(archived.archivedAt).not.toBeNull();
    expect(await refusalOf(toSign())).toMatchObject({ code: 'signedOut' });
    expect(await namesOf({ search: 'Bree' })).toEqual([]);
    expect(await namesOf({ search: 'Bree', archived: 'yes' })).toEqual(['Bree Ashcombe']);
    const { people } = await supervisor.call(getSite, { params: { id: site('wattle') } });
    expect(people.map(({ name }) => name)).not.toContain('Bree Ashcombe');
    const { rows } = await world.db.execute(sql`select 1 from sign_ons where person_id = ${person('bree')}`);
    expect(rows).toHaveLength(1);
  });

  test('said twice it keeps the first day; a person brought back is on the list again, and their old phone stays unknown', async () => {
    const access = await signAccessOf(supervisor, site('wattle'));
    const phone = await enrolPhone(world.client(), access, { existing: person('tomas') });
    const archive = (archived: boolean) =>
      supervisor.call(api.archivePerson, { params: { id: person('tomas') }, body: { archived } });

    const first = await archive(true);
    expect((await archive(true)).archivedAt).toBe(first.archivedAt);
    expect((await archive(false)).archivedAt).toBeNull();

    expect(await namesOf({ search: 'Tomás' })).toEqual(['Tomás Arriaga']);
    expect(await refusalOf(phone.call(getOwnToSign, { params: { token: access.token } }))).toMatchObject({
      code: 'signedOut',
    });
  });
});

describe('rights', () => {
  test('a safety officer reads people and can’t change them; a worker can’t read them', async () => {
    const worker = await world.as('worker');
    const params = { id: person('kit') };

    expect((await officer.call(api.getPerson, { params })).name).toBe('Kit Marlowe-Hale');
    const refused = await codesOf([
      officer.call(api.savePerson, { params, body: await bodyOf() }),
      officer.call(api.archivePerson, { params, body: { archived: true } }),
      officer.call(api.saveEmployer, { params: { id: newId() }, body: { name: 'X' } }),
      worker.call(api.listPeople, { query: {} }),
      worker.call(api.getPerson, { params }),
      worker.call(api.listEmployers, {}),
    ]);
    expect(new Set(refused)).toEqual(new Set(['forbidden']));
  });

  test('a person of another organisation is not there, to read or to archive, and stays as they were', async () => {
    const params = { id: other.personId };

    expect(await refusalOf(supervisor.call(api.getPerson, { params }))).toMatchObject({ code: 'missing' });
    expect(
      await refusalOf(supervisor.call(api.archivePerson, { params, body: { archived: true } })),
    ).toMatchObject({ code: 'missing' });
    // An id that is another organisation's names nobody here: saving makes a person of our own beside it.
    await supervisor.call(api.savePerson, { params, body: await bodyOf({ name: 'Ours now' }) });
    const { rows } = await world.db.execute<{ name: string; archived_at: string | null }>(
      sql`select name, archived_at from people where org_id = ${other.orgId}`,
    );
    expect(rows).toEqual([{ name: 'Olive Stranger', archived_at: null }]);
  });
});
