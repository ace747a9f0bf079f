import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { newId } from '#shared/kernel/ids.ts';
import { workDateOf } from '#shared/kernel/work-date.ts';
import { archivePerson } from '#shared/people/people.api.ts';
import { getSignPage } from '#shared/signons/signons.api.ts';
import * as api from '#shared/sites/sites.api.ts';
import { createStatement } from '#shared/statements/statements.api.ts';
import { dayCodeFor, todayAt } from '../../../server/sites/sites.service.ts';
import { issueNextRevision } from '../../support/revisions.ts';
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

const site = (key: string) => world.seeded.sites.get(key) ?? '';
const person = (key: string) => world.seeded.people.get(key) ?? '';
const body = {
  name: 'Kiln Street',
  address: '4 Kiln Street, Harrow Bend SA',
  timeZone: 'Australia/Adelaide',
  emergency: 'Muster at the kerb.',
};
const newSite = async (changes: object = {}) => {
  const id = newId();
  await supervisor.call(api.saveSite, { params: { id }, body: { ...body, ...changes } });
  return id;
};
const crewOf = async (id: string) =>
  (await supervisor.call(api.getSite, { params: { id } })).people.map(({ name }) => name);
const setCrew = (id: string, personId: string, onCrew: boolean) =>
  supervisor.call(api.setCrewMember, { params: { id, personId }, body: { onCrew } });

describe('sites', () => {
  test('a site that is saved twice is there once and keeps its sign-on address', async () => {
    const id = newId();
    const first = await supervisor.call(api.saveSite, { params: { id }, body });
    const again = await supervisor.call(api.saveSite, {
      params: { id },
      body: { ...body, name: 'Kiln Street, rear' },
    });

    expect(again).toEqual({ ...first, name: 'Kiln Street, rear' });
    expect(first.signToken).toMatch(/^[a-z2-9]{20}$/);
    expect(first.crew).toBe(0);
  });

  test('a site without an address or with an unknown time zone is refused beside the fields', async () => {
    const refusal = await refusalOf(
      supervisor.call(api.saveSite, {
        params: { id: newId() },
        body: { ...body, address: ' ', timeZone: 'Australia/Nowhere' },
      }),
    );

    expect(refusal?.code).toBe('invalid');
    expect(Object.keys(refusal?.fields ?? {}).sort()).toEqual(['address', 'timeZone']);
  });

  test('the crew grows and shrinks by one, however often it is said', async () => {
    const id = await newSite();

    await setCrew(id, person('kit'), true);
    expect((await setCrew(id, person('kit'), true)).crew).toBe(1);
    expect(await crewOf(id)).toEqual(['Kit Marlowe-Hale']);
    await setCrew(id, person('kit'), false);
    expect((await setCrew(id, person('kit'), false)).crew).toBe(0);
  });

  test('somebody who was taken off the lists can’t be put on a crew', async () => {
    const id = await newSite();
    await supervisor.call(archivePerson, { params: { id: person('wes') }, body: { archived: true } });

    expect(await refusalOf(setCrew(id, person('wes'), true))).toMatchObject({ code: 'conflict' });
    expect(await crewOf(id)).toEqual([]);
  });

  test('a closed site leaves the list, its sign-on page and code are gone, nothing is begun for it; opened again all is as before', async () => {
    const id = await newSite();
    const { address } = await supervisor.call(api.getSignAccess, { params: { id } });
    const token = address.split('/').at(-1) ?? '';
    const archive = (archived: boolean) =>
      supervisor.call(api.archiveSite, { params: { id }, body: { archived } });
    const listed = async (archived: 'yes' | 'no') =>
      (await supervisor.call(api.listSites, { query: { archived } })).sites.some((one) => one.id === id);

    const closed = await archive(true);
    expect((await archive(true)).archivedAt).toBe(closed.archivedAt);
    expect([await listed('no'), await listed('yes')]).toEqual([false, true]);
    const refused = await codesOf([
      supervisor.call(api.getSignAccess, { params: { id } }),
      supervisor.call(createStatement, {
        params: { id: newId() },
        body: { siteId: id, title: 'Late', starterId: null },
      }),
    ]);
    expect(new Set(refused)).toEqual(new Set(['conflict']));
    const page = () => world.client().call(getSignPage, { params: { token } });
    expect(await refusalOf(page())).toMatchObject({ code: 'missing' });

    await archive(false);
    expect((await page()).site).toBe('Kiln Street');
    expect([await listed('no'), await listed('yes')]).toEqual([true, false]);
  });
});

describe('the way in by phone', () => {
  test('the address leads to the site, its code stands as QR code, and the day’s code is four digits that stay', async () => {
    const access = await supervisor.call(api.getSignAccess, { params: { id: site('wattle') } });

    expect(access.address).toMatch(new RegExp(`^${world.server.platform.publicUrl()}/s/[a-z2-9]{20}$`));
    expect(access.qrSvg).toMatch(/^<svg .*<\/svg>\s*$/s);
    expect(access.dayCode).toMatch(/^\d{4}$/);
    expect(access.day).toBe(workDateOf(new Date(), 'Australia/Adelaide'));
    expect(await officer.call(api.getSignAccess, { params: { id: site('wattle') } })).toEqual(access);
    const page = await world
      .client()
      .call(getSignPage, { params: { token: access.address.split('/').at(-1) ?? '' } });
    expect(page.site).toBe('Lot 7 Wattle Rise');
  });

  test('each day and each site has a code of its own, and several who ask at once get the same', async () => {
    const { db, seeded } = world;
    const days = Array.from({ length: 28 }, (_, index) => `2031-02-${String(index + 1).padStart(2, '0')}`);
    const codes = async (key: string) =>
      Promise.all(days.map((day) => dayCodeFor(db, seeded.orgId, site(key), day)));

    const [wattle, quarry] = [await codes('wattle'), await codes('quarry')];

    expect(wattle.every((code) => /^\d{4}$/.test(code))).toBe(true);
    expect(new Set(wattle).size).toBeGreaterThan(20);
    expect(wattle).not.toEqual(quarry);
    expect(await codes('wattle')).toEqual(wattle);
    const asked = await Promise.all(
      Array.from({ length: 8 }, () => dayCodeFor(db, seeded.orgId, site('wattle'), '2031-03-01')),
    );
    expect(new Set(asked).size).toBe(1);
  });

  test('the day changes at midnight of the site, not of the server', () => {
    const zone = { timeZone: 'Australia/Adelaide' };

    expect(todayAt(zone, new Date('2026-12-01T13:29:59Z'))).toBe('2026-12-01');
    expect(todayAt(zone, new Date('2026-12-01T13:30:00Z'))).toBe('2026-12-02');
  });
});

describe('the board', () => {
  const partsOf = async (key: string) =>
    (await officer.call(api.getBoard, { params: { id: site(key) } })).parts;

  test('says how many of the crew have signed the revision in force and leads to who has not', async () => {
    const [signOn] = await partsOf('wattle');

    expect(signOn).toEqual({
      key: 'signOn',
      words: '6 of 9 signed on, rev 1',
      well: false,
      link: expect.stringMatching(
        new RegExp(`^/register\\?siteId=${site('wattle')}&statementId=[0-9a-f-]+&status=none$`),
      ),
    });
  });

  test('leads to who signed an older revision when nobody else is left', async () => {
    await world.db.execute(
      sql`delete from crew_members where site_id = ${site('wattle')} and person_id not in (select person_id from sign_ons)`,
    );
    expect((await partsOf('wattle'))[0]).toMatchObject({ words: '6 of 6 signed on, rev 1', well: true });
    expect((await partsOf('wattle'))[0]?.link).not.toContain('status');

    await issueNextRevision({ supervisor, officer }, { material: true, changeNote: 'Another crane' });

    expect((await partsOf('wattle'))[0]).toMatchObject({ words: '0 of 6 signed on, rev 2', well: false });
    expect((await partsOf('wattle'))[0]?.link).toMatch(/&status=older$/);
  });

  test('says that today’s talk is not closed, and that there is none where there is none', async () => {
    const [wattle, quarry] = [await partsOf('wattle'), await partsOf('quarry')];

    expect(wattle.find(({ key }) => key === 'talk')).toMatchObject({
      words: 'talk 06:45 not closed',
      well: false,
      link: expect.stringMatching(/^\/talks\/[0-9a-f-]+$/),
    });
    expect(quarry.find(({ key }) => key === 'talk')).toMatchObject({ words: 'no talk today', well: true });
  });

  test('says that nothing is in force, that nobody is on the crew, and how many drafts wait', async () => {
    expect((await partsOf('quarry'))[0]).toMatchObject({ words: 'no statement in force', well: false });
    expect((await partsOf('quarry')).some(({ key }) => key === 'draft')).toBe(false);

    await world.db.execute(sql`update statements set state = 'submitted' where site_id = ${site('quarry')}`);
    expect((await partsOf('quarry')).find(({ key }) => key === 'draft')).toMatchObject({
      words: '1 draft waits for the safety officer',
      link: `/statements?siteId=${site('quarry')}&state=submitted`,
    });

    await world.db.execute(sql`delete from crew_members where site_id = ${site('wattle')}`);
    expect((await partsOf('wattle'))[0]).toEqual({
      key: 'signOn',
      words: 'nobody on the crew yet',
      well: false,
      link: `/sites/${site('wattle')}`,
    });
  });
});

describe('rights', () => {
  test('a safety officer reads sites and can’t change them; an administrator gets no day code; a worker none of it', async () => {
    const [worker, administrator] = [await world.as('worker'), await world.as('administrator')];
    const params = { id: site('wattle') };

    expect((await officer.call(api.getSite, { params })).name).toBe('Lot 7 Wattle Rise');
    const refused = await codesOf([
      officer.call(api.saveSite, { params, body }),
      officer.call(api.archiveSite, { params, body: { archived: true } }),
      officer.call(api.setCrewMember, {
        params: { ...params, personId: person('kit') },
        body: { onCrew: false },
      }),
      administrator.call(api.getSignAccess, { params }),
      worker.call(api.getSignAccess, { params }),
      worker.call(api.listSites, { query: {} }),
      worker.call(api.getBoard, { params }),
    ]);
    expect(new Set(refused)).toEqual(new Set(['forbidden']));
  });

  test('a site or person of another organisation is not there, whichever way it is asked for', async () => {
    const params = { id: other.siteId };

    const refused = await codesOf([
      supervisor.call(api.getSite, { params }),
      supervisor.call(api.getBoard, { params }),
      supervisor.call(api.getSignAccess, { params }),
      supervisor.call(api.archiveSite, { params, body: { archived: true } }),
      setCrew(other.siteId, person('kit'), true),
      setCrew(site('wattle'), other.personId, true),
      supervisor.call(createStatement, {
        params: { id: newId() },
        body: { siteId: other.siteId, title: 'Theirs', starterId: null },
      }),
    ]);
    expect(new Set(refused)).toEqual(new Set(['missing']));
    const { sites } = await supervisor.call(api.listSites, { query: {} });
    expect(sites.map(({ id }) => id)).not.toContain(other.siteId);
  });
});
