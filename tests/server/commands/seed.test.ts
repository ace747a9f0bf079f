import { asc, eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { roles } from '#shared/kernel/roles.ts';
import { workDateOf } from '#shared/kernel/work-date.ts';
import { blocks as stopsIssue, gapsBeforeIssue } from '#shared/statements/readiness.ts';
import { organisations } from '../../../server/account/account.table.ts';
import { demoSignIns } from '../../../server/commands/demo-sign-ins.ts';
import { seedDemo } from '../../../server/commands/seed.ts';
import { inventedSignature } from '../../../server/commands/seed-statements.ts';
import type { Seeded } from '../../../server/commands/seeded.ts';
import { verifyLedgers } from '../../../server/ledger/verify.service.ts';
import { projectRoot } from '../../../server/library/templates.ts';
import { signOns } from '../../../server/signons/signons.table.ts';
import { frozenOf } from '../../../server/statements/sheet.service.ts';
import { revisions, statements } from '../../../server/statements/statements.table.ts';
import { attendances, talks } from '../../../server/talks/talks.table.ts';
import { crewMembers } from '../../../server/sites/sites.table.ts';
import { startEmptyWorld, type World } from '../../support/server.ts';

/** Seeded at a moment when it is the next day already in Adelaide. */
const now = new Date('2026-03-31T22:10:00Z');
const zone = 'Australia/Adelaide';

let world: World;
let seeded: Seeded;
beforeAll(async () => {
  world = await startEmptyWorld();
  seeded = await seedDemo(world.server.platform, now);
});
afterAll(() => world.close());

test('the demo organisation is marked as invented, and its addresses lead nowhere', async () => {
  const [organisation] = await world.db.select().from(organisations);

  expect(organisation?.invented).toBe(true);
  const text = JSON.stringify([seeded.scenario, demoSignIns(projectRoot)]);
  const addresses = text.match(/[\w.]+@[\w.]+/g) ?? [];
  expect(addresses.length).toBeGreaterThan(5);
  for (const address of addresses) expect(address).toMatch(/\.example$/);
});

test('there is a sign-in for each role, with a password that the product itself would take', () => {
  const signIns = demoSignIns(projectRoot);

  expect(signIns.map(({ role }) => role).sort()).toEqual([...roles].sort());
  for (const { password } of signIns) expect(password.length).toBeGreaterThanOrEqual(12);
});

test('a dozen people of three employers stand on the crews of two sites', async () => {
  expect([seeded.people.size, seeded.scenario.employers.length, seeded.sites.size]).toEqual([12, 3, 2]);
  const crew = await world.db.select().from(crewMembers);
  for (const siteId of seeded.sites.values())
    expect(crew.filter((member) => member.siteId === siteId).length).toBeGreaterThan(4);
});

test('one statement is issued without a gap, by another person than wrote it, and one is a draft', async () => {
  const all = await world.db.select().from(statements).orderBy(asc(statements.state));
  expect(all.map(({ state }) => state)).toEqual(['draft', 'issued']);
  const [revision] = await world.db.select().from(revisions);
  if (!revision) throw new Error('Nothing was issued.');

  const frozen = frozenOf(revision);
  expect(gapsBeforeIssue(frozen.outline, frozen).filter(stopsIssue)).toEqual([]);
  expect(frozen.preparedBy).not.toBe(frozen.issuedBy);
  expect(frozen.outline.fillIns.every(({ value }) => value !== '')).toBe(true);
  expect(frozen.outline.particulars.reviewDate).toMatch(/^2026-04-/);
});

test('it is signed in part: drawn on phones, handed round, typed with a witness, and once too fast to have been read', async () => {
  const signed = await world.db.select().from(signOns).orderBy(asc(signOns.receivedAt));
  const [revision] = await world.db.select().from(revisions);

  expect(signed.length).toBeGreaterThan(4);
  expect(signed.length).toBeLessThan(9);
  expect(signed.filter(({ deviceId }) => deviceId !== null).length).toBeGreaterThan(1);
  expect(
    signed.filter(({ handedRoundByName, method }) => handedRoundByName && method === 'drawn'),
  ).toHaveLength(1);
  expect(signed.filter(({ method, witness }) => method === 'typed' && witness)).toHaveLength(1);
  expect(signed.filter(({ readingMs }) => readingMs < 30_000)).toHaveLength(1);
  for (const { signedAt } of signed) {
    expect(signedAt.getTime()).toBeGreaterThan(revision?.issuedAt.getTime() ?? Infinity);
    expect(signedAt.getTime()).toBeLessThan(now.getTime());
  }
});

test('one talk was held with one of the crew missing, and one stands open today, by the site’s own calendar', async () => {
  const [held, open] = await world.db.select().from(talks).orderBy(asc(talks.date));

  expect([held?.state, open?.state]).toEqual(['closed', 'open']);
  expect(open?.date).toBe(workDateOf(now, zone));
  expect(open?.date).toBe('2026-04-01');
  const there = await world.db.$count(attendances, eq(attendances.talkId, held?.id ?? ''));
  expect(held?.expected?.length).toBe(there + 1);
});

test('everything seeded stands in the ledger, which holds', async () => {
  const [report] = await verifyLedgers(world.db);

  expect(report?.faults).toEqual([]);
  const records =
    (await world.db.$count(signOns)) +
    (await world.db.$count(attendances)) +
    (await world.db.$count(revisions));
  expect(report?.entries).toBe(records + 1);
});

test('an invented signature is the same every time and differs from name to name', () => {
  expect(inventedSignature('Bree Ashcombe')).toEqual(inventedSignature('Bree Ashcombe'));
  expect(inventedSignature('Bree Ashcombe')).not.toEqual(inventedSignature('Kit Marlowe-Hale'));
});
