import { afterAll, beforeAll, expect, test } from 'vitest';
import { inviteMember } from '#shared/account/account.api.ts';
import * as api from '#shared/audit/audit.api.ts';
import { newId } from '#shared/kernel/ids.ts';
import { getRegister, getSignOn } from '#shared/signons/register.api.ts';
import * as sign from '#shared/signons/signons.api.ts';
import { setCrewMember } from '#shared/sites/sites.api.ts';
import { closeTalk, getTalk, listTalks, saveTalk } from '#shared/talks/talks.api.ts';
import { lapsingOf, listExceptions } from '../../../server/audit/audit.service.ts';
import { signature, signOnBodyOf } from '../../support/phones.ts';
import { demoStatement, issueNextRevision } from '../../support/revisions.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

/** The demo organisation has one of each kind; the tests mend them one after another. */

let world: DemoWorld;
let supervisor: Client;
let officer: Client;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  officer = await world.as('safetyOfficer');
});
afterAll(() => world.close());

const siteId = () => world.seeded.sites.get('wattle') ?? '';
const person = (key: string) => world.seeded.people.get(key) ?? '';
const nameOf = (key: string) => world.seeded.scenario.people.find((one) => one.key === key)?.name ?? '';
const audit = (query = {}) => officer.call(api.listExceptions, { query });
const namesOf = async (kind: api.Exception['kind']) =>
  (await audit({ kind })).exceptions.map((exception) => exception.person).toSorted();

async function signFor(key: string, readingMs = 600_000) {
  const params = { id: siteId(), personId: person(key) };
  const { statements } = await supervisor.call(sign.getToSign, { params });
  const reading = await supervisor.call(sign.getReading, { params: { id: statements[0]?.revisionId ?? '' } });
  await supervisor.call(sign.signOnFor, {
    params: { ...params, signOnId: newId() },
    body: signOnBodyOf(reading, { readingMs }),
  });
}

test('everybody of the crew who has not signed is found, and the register shows the same people', async () => {
  const { exceptions } = await audit({ kind: 'notSigned' });

  const expected = ['kit', 'asha', 'rua'].map(nameOf).toSorted();
  expect(exceptions.map(({ person: name }) => name).toSorted()).toEqual(expected);
  const statement = await demoStatement(officer);
  const evidence = new URL(exceptions[0]?.evidence ?? '', world.url);
  expect(`${evidence.pathname}${evidence.search}`).toBe(`/register?statementId=${statement.id}&status=none`);
  const { rows } = await officer.call(getRegister, { query: { statementId: statement.id, status: 'none' } });
  expect(rows.map(({ name }) => name).toSorted()).toEqual(expected);
});

test('whoever read too fast is found, and the evidence is that sign-on', async () => {
  const { exceptions } = await audit({ kind: 'readTooFast' });

  expect(exceptions.map(({ person: name }) => name)).toEqual([nameOf('dell')]);
  const id = /^\/sign-ons\/(.+)$/.exec(exceptions[0]?.evidence ?? '')?.[1] ?? '';
  expect(await officer.call(getSignOn, { params: { id } })).toMatchObject({
    person: { id: person('dell') },
    readingMs: 6000,
  });
  expect(exceptions[0]?.words).toMatch(/^Passed \d+ words of “Roof trusses by crane, Lot 7” in 6 seconds\.$/);
});

test('whoever missed a closed talk is found, and the evidence is that talk', async () => {
  const { exceptions } = await audit({ kind: 'talkMissed' });

  expect(exceptions.map(({ person: name }) => name)).toEqual([nameOf('dell')]);
  const id = /^\/talks\/(.+)$/.exec(exceptions[0]?.evidence ?? '')?.[1] ?? '';
  const talk = await officer.call(getTalk, { params: { id } });
  expect(talk.missing.map(({ personId }) => personId)).toEqual([person('dell')]);
  expect(exceptions[0]?.at).toBe(talk.closedAt);
});

test('the counts are of all kinds, whichever one is looked at, and the ledger’s head stands beside them', async () => {
  const all = await audit();

  expect(all.counts).toEqual({ notSigned: 3, signedOlder: 0, readTooFast: 1, talkMissed: 1 });
  expect(all.exceptions).toHaveLength(5);
  expect((await audit({ kind: 'readTooFast' })).counts).toEqual(all.counts);
  expect(all.ledger.entries).toBeGreaterThan(10);
  expect(all.ledger.hash).toMatch(/^[0-9a-f]{64}$/);
  const quarry = await audit({ siteId: world.seeded.sites.get('quarry') });
  expect(quarry.counts).toEqual({ notSigned: 0, signedOlder: 0, readTooFast: 0, talkMissed: 0 });
});

test('whoever signs, or leaves the crew, is no longer listed as not having signed', async () => {
  await signFor('kit');
  expect(await namesOf('notSigned')).toEqual(['asha', 'rua'].map(nameOf).toSorted());

  const params = { id: siteId(), personId: person('rua') };
  await supervisor.call(setCrewMember, { params, body: { onCrew: false } });
  expect(await namesOf('notSigned')).toEqual([nameOf('asha')]);
  await supervisor.call(setCrewMember, { params, body: { onCrew: true } });
  expect(await namesOf('notSigned')).toEqual(['asha', 'rua'].map(nameOf).toSorted());
});

test('whoever reads again at a reader’s pace and signs is no longer listed as too fast', async () => {
  await signFor('dell', 5_000);
  expect(await namesOf('readTooFast')).toEqual([nameOf('dell')]);

  await signFor('dell', 700_000);

  expect(await namesOf('readTooFast')).toEqual([]);
});

test('after a material revision everybody who signed is listed with the old signature, until they sign again', async () => {
  await issueNextRevision({ supervisor, officer }, { material: true, changeNote: 'Another crane' });
  const signed = ['sina', 'minh', 'bree', 'joao', 'dell', 'tomas', 'kit'];
  expect(await namesOf('signedOlder')).toEqual(signed.map(nameOf).toSorted());
  const { exceptions } = await audit({ kind: 'signedOlder' });
  for (const exception of exceptions) {
    const id = /^\/sign-ons\/(.+)$/.exec(exception.evidence)?.[1] ?? '';
    expect(await officer.call(getSignOn, { params: { id } })).toMatchObject({
      person: { id: exception.personId },
      revision: 1,
    });
  }

  for (const key of signed) await signFor(key);

  expect(await namesOf('signedOlder')).toEqual([]);
  expect((await audit()).counts.notSigned).toBe(2);
});

test('whoever comes to the next talk is not listed as missing it, and whoever doesn’t is', async () => {
  const id = newId();
  const body = {
    siteId: siteId(),
    topic: 'Slings',
    presenter: 'Sina Vakalahi',
    date: '2026-03-02',
    time: '06:45',
    place: 'Slab',
    lockVersion: 0,
  };
  await supervisor.call(saveTalk, { params: { id }, body });
  const attend = (key: string) =>
    supervisor.call(sign.attendFor, {
      params: { id: siteId(), personId: person(key), attendanceId: newId() },
      body: {
        talkId: id,
        signature: { method: 'drawn', drawn: signature },
        declaration: { id: 'au-talk', version: 1, language: 'en' },
        signedAt: new Date().toISOString(),
        language: 'en',
      },
    });
  for (const { key, sites } of world.seeded.scenario.people)
    if (sites.includes('wattle') && key !== 'joao') await attend(key);
  expect((await audit({ kind: 'talkMissed' })).exceptions.map(({ words }) => words).join()).not.toContain(
    'Slings',
  );

  await supervisor.call(closeTalk, { params: { id }, body: { lockVersion: 1 } });

  const { exceptions } = await audit({ kind: 'talkMissed' });
  const missed = exceptions.filter(({ evidence }) => evidence === `/talks/${id}`);
  expect(missed.map(({ person: name }) => name)).toEqual([nameOf('joao')]);
});

test('a missed talk is no longer listed after thirty days', async () => {
  const later = new Date(Date.now() + 31 * 24 * 60 * 60 * 1000);

  const { counts } = await listExceptions(world.db, world.seeded.orgId, {}, later);

  expect(counts.talkMissed).toBe(0);
});

test('the audit is for the safety officer and the administrator only', async () => {
  await expect(supervisor.call(api.listExceptions, {})).rejects.toMatchObject({ code: 'forbidden' });
  await expect((await world.as('worker')).call(api.listExceptions, {})).rejects.toMatchObject({
    code: 'forbidden',
  });
  await expect((await world.as('administrator')).call(api.listExceptions, {})).resolves.toBeDefined();
});

test('the supervisor’s morning shows each open site, the drafts that wait and the talks of the day', async () => {
  const today = await supervisor.call(api.getToday, {});

  expect(today.sites.map(({ name }) => name).toSorted()).toEqual([
    'Lot 7 Wattle Rise',
    'Old Quarry Road, stage 2',
  ]);
  const wattle = today.sites.find(({ id }) => id === siteId());
  expect(wattle?.parts.find(({ key }) => key === 'signOn')).toMatchObject({
    words: '7 of 9 signed on, rev 2',
    well: false,
  });
  expect(today.drafts.map(({ title }) => title)).toEqual(['Roof trusses by hand, stage 2']);
  expect(today.talks.map(({ topic }) => topic)).toEqual(['Leads and steel frames']);
  const { talks } = await supervisor.call(listTalks, {});
  expect(talks.length).toBeGreaterThan(today.talks.length);
});

test('a review that comes due within thirty days is listed, and is overdue the day after it', async () => {
  const { reviews } = await (await world.as('administrator')).call(api.getLapsing, {});
  expect(reviews).toMatchObject([{ title: 'Roof trusses by crane, Lot 7', overdue: false }]);

  const due = reviews[0]?.reviewDate ?? '';
  const overdueAt = async (now: string) =>
    (await lapsingOf(world.db, world.seeded.orgId, new Date(now))).reviews.map(({ overdue }) => overdue);
  // The organisation is in Adelaide, which is past midnight well before 18:00 UTC.
  expect(await overdueAt(`${due}T01:00:00Z`)).toEqual([false]);
  expect(await overdueAt(`${due}T18:00:00Z`)).toEqual([true]);
  expect(await overdueAt(`${Number(due.slice(0, 4)) - 1}${due.slice(4)}T01:00:00Z`)).toEqual([]);
});

test('an invitation that nobody has taken up is listed', async () => {
  const administrator = await world.as('administrator');
  const body = {
    email: 'late@ridgeline.example',
    name: 'Late Hand',
    role: 'worker' as const,
    personId: null,
  };
  expect((await administrator.call(api.getLapsing, {})).invitations).toEqual([]);

  await administrator.call(inviteMember, { params: { id: newId() }, body });

  const { invitations } = await administrator.call(api.getLapsing, {});
  expect(invitations).toMatchObject([{ name: 'Late Hand', email: 'late@ridgeline.example' }]);
});
