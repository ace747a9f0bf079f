import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { requireDayCode } from '../../../server/signons/enrol.service.ts';
import { dayCodeFor, todayAt } from '../../../server/sites/sites.service.ts';
import { sites } from '../../../server/sites/sites.table.ts';
import { type DemoWorld, startDemoWorld } from '../../support/server.ts';

/** Whom a wrong day code holds up; the addresses are invented (RFC 5737). */

let world: DemoWorld;
beforeAll(async () => (world = await startDemoWorld()));
afterAll(() => world.close());

async function siteOf(key: string) {
  const [site] = await world.db
    .select()
    .from(sites)
    .where(eq(sites.id, world.seeded.sites.get(key) ?? ''));
  if (!site) throw new Error('The site is not there.');
  const right = await dayCodeFor(world.db, site.orgId, site.id, todayAt(site));
  const wrong = right === '0000' ? '0001' : '0000';
  const outcome = (code: string, address: string) =>
    requireDayCode(world.db, world.server.platform.throttles, { site, code, address }).then(
      () => 'let in',
      (error: { code: string }) => error.code,
    );
  return { right, wrong, outcome };
}

test('a whole crew with the right code gets in, however many they are', async () => {
  const { right, outcome } = await siteOf('wattle');

  for (let phone = 1; phone <= 150; phone += 1)
    expect([phone, await outcome(right, '192.0.2.1')]).toEqual([phone, 'let in']);
});

test('one phone that tries on and on holds up itself, and not the site', async () => {
  const { right, wrong, outcome } = await siteOf('wattle');
  for (let attempt = 1; attempt <= 150; attempt += 1) await outcome(wrong, '192.0.2.2');

  expect(await outcome(right, '192.0.2.2')).toBe('tooMany');
  expect(await outcome(right, '192.0.2.3')).toBe('let in');
});

test('tries from many addresses hold up the site, and right codes between them do not wipe them out', async () => {
  const { right, wrong, outcome } = await siteOf('quarry');
  for (let attempt = 1; attempt <= 119; attempt += 1)
    expect(await outcome(wrong, `198.51.100.${attempt}`)).toBe('invalid');
  expect(await outcome(right, '203.0.113.1')).toBe('let in');

  expect(await outcome(wrong, '203.0.113.2')).toBe('invalid');

  expect(await outcome(wrong, '203.0.113.3')).toBe('tooMany');
  expect(await outcome(right, '203.0.113.4')).toBe('tooMany');
});
