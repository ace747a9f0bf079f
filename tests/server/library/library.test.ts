import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { newId } from '#shared/kernel/ids.ts';
import { checkDocument } from '#shared/statements/document/document.ts';
import * as api from '#shared/library/library.api.ts';
import { createStatement } from '#shared/statements/statements.api.ts';
import { addShippedBlocksToAll } from '../../../server/library/library.service.ts';
import { blocks } from '../../../server/library/library.table.ts';
import { blockTemplates, checkTemplates } from '../../../server/library/templates.ts';
import { addSecondOrganisation } from '../../support/second-organisation.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

let world: DemoWorld;
let supervisor: Client;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
});
afterAll(() => world.close());

const listed = async () => (await supervisor.call(api.listBlocks, {})).blocks;
const block = (blockId: string) => supervisor.call(api.getBlock, { params: { blockId } });

/** Puts into an organisation's library a version of a block that is not shipped. */
async function addVersion(orgId: string, id: string, version: number, title: string) {
  const shipped = blockTemplates().find((one) => one.id === id);
  if (!shipped) throw new Error(`There is no block "${id}".`);
  await world.db.insert(blocks).values({ orgId, id, version, body: { ...shipped, version, title } });
}

test('the library of the demo holds every shipped block, each as it was shipped', async () => {
  const all = await listed();

  expect(all.map(({ id }) => id)).toEqual(
    blockTemplates()
      .map(({ id }) => id)
      .sort(),
  );
  for (const id of ['working-at-height', 'cutting-steel', 'temporary-truss-bracing'])
    expect(await block(id)).toEqual(blockTemplates().find((one) => one.id === id));
});

test('a summary shows no hole where a hazard has a fill-in', async () => {
  for (const { hazards } of await listed()) expect(hazards.join()).not.toContain('{{');
});

test('of several versions the newest is listed, given and used, by number and not by letter', async () => {
  await addVersion(world.seeded.orgId, 'cutting-steel', 9, 'Cutting, ninth');
  await addVersion(world.seeded.orgId, 'cutting-steel', 10, 'Cutting, tenth');

  expect((await listed()).filter(({ id }) => id === 'cutting-steel')).toMatchObject([
    { version: 10, title: 'Cutting, tenth' },
  ]);
  expect((await block('cutting-steel')).title).toBe('Cutting, tenth');
});

test('a newer start adds what it ships to every library and touches nothing that is there', async () => {
  const { orgId } = await addSecondOrganisation(world);
  const [{ id = '', version = 0 } = {}] = blockTemplates();
  await addVersion(orgId, id, version, 'Their own words');

  await addShippedBlocksToAll(world.db);

  const { rows } = await world.db.execute<{ id: string; title: string }>(
    sql`select id, body ->> 'title' as title from blocks where org_id = ${orgId} order by id`,
  );
  expect(rows).toHaveLength(blockTemplates().length);
  expect(rows.find((row) => row.id === id)?.title).toBe('Their own words');
  expect((await block('cutting-steel')).version).toBe(10);
});

test('another organisation’s block is not there', async () => {
  const { orgId } = await addSecondOrganisation(world);
  const [first] = blockTemplates();
  await world.db.insert(blocks).values({
    orgId,
    id: 'theirs-alone',
    version: 1,
    body: { ...(first as NonNullable<typeof first>), id: 'theirs-alone' },
  });

  await expect(block('theirs-alone')).rejects.toMatchObject({ code: 'missing' });
  expect((await listed()).map(({ id }) => id)).not.toContain('theirs-alone');
});

test('a worker has no library', async () => {
  const worker = await world.as('worker');

  await expect(worker.call(api.listBlocks, {})).rejects.toMatchObject({ code: 'forbidden' });
});

test('every starter begins a statement that fits, with its blocks in order and their high risk work ticked', async () => {
  const { starters } = await supervisor.call(api.listStarters, {});
  expect(starters.length).toBeGreaterThan(5);

  for (const starter of starters) {
    const { document } = await supervisor.call(createStatement, {
      params: { id: newId() },
      body: {
        siteId: world.seeded.sites.get('quarry') ?? '',
        title: starter.title,
        starterId: starter.id,
      },
    });
    expect(checkDocument(document)).toEqual([]);
    const origins = document.content?.flatMap(({ attrs }) => {
      const origin = attrs?.origin as { block: string } | null | undefined;
      return origin ? [origin.block] : [];
    });
    expect([...new Set(origins)]).toEqual(starter.blocks);
    const ticked = new Set(
      starter.blocks.flatMap((id) => blockTemplates().find((one) => one.id === id)?.highRisk ?? []),
    );
    expect(document.content?.[0]?.attrs?.highRisk).toEqual([...ticked].sort());
  }
});

test('a starter that is not there is refused beside its field', async () => {
  await expect(
    supervisor.call(createStatement, {
      params: { id: newId() },
      body: { siteId: world.seeded.sites.get('quarry') ?? '', title: 'X', starterId: 'roof-by-balloon' },
    }),
  ).rejects.toMatchObject({
    code: 'invalid',
    fields: { starterId: 'Choose a starter from the list.' },
  });
});

test('every template that ships fits its schema', () => {
  expect(() => checkTemplates()).not.toThrow();
});
