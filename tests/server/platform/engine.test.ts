import fs from 'node:fs';
import { cp, mkdtemp, rm } from 'node:fs/promises';
import { spawn } from 'node:child_process';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { PGlite } from '@electric-sql/pglite';
import { afterEach, expect, inject, test, vi } from 'vitest';
import { DataFolderInUse, lockDataFolder } from '../../../server/platform/data-lock.ts';
import { openDatabase } from '../../../server/platform/db.ts';
import { durableStartParams, DurableNodeFS } from '../../../server/platform/durable-fs.ts';
import { openEngine } from '../../../server/platform/engine.ts';

const folders: string[] = [];
afterEach(async () => {
  for (const folder of folders.splice(0)) await rm(folder, { recursive: true, force: true });
});

async function folderFrom(template?: string): Promise<string> {
  const folder = await mkdtemp(join(tmpdir(), 'tb-engine-'));
  folders.push(folder);
  if (template) await cp(template, folder, { recursive: true });
  return folder;
}

test('every commit of the embedded engine reaches the disk: fsync is called for each', async () => {
  const folder = await folderFrom(inject('engineTemplate'));
  const engine = await PGlite.create({
    fs: new DurableNodeFS(join(folder, 'pglite')),
    startParams: durableStartParams(),
  });
  const fsync = vi.spyOn(fs, 'fsyncSync');

  for (let index = 0; index < 20; index += 1)
    await engine.query('insert into throttles (key, points) values ($1, 1)', [`k${index}`]);

  expect(fsync.mock.calls.length).toBeGreaterThanOrEqual(20);
  fsync.mockRestore();
  await engine.close();
});

test('many requests at the same moment each get their own answer, and none another’s', async () => {
  const folder = await folderFrom(inject('engineTemplate'));
  const engine = await openEngine({ dataDir: folder, durable: false });
  const database = openDatabase(engine.pool);
  const asks = Array.from({ length: 400 }, (_, index) => index);

  const answers = await Promise.all(
    asks.map(async (index) => {
      const text = [
        'select $1::text as a',
        'select $1::text || $2::text as a, 1 as b',
        'select length($1::text) as n, $1::text as a',
        'select $1::text as a where $2::text = $1::text',
      ][index % 4];
      const values = index % 2 === 1 ? [`v${index}`, index % 4 === 1 ? '!' : `v${index}`] : [`v${index}`];
      const { rows } = await database.pool.query<{ a: string }>(text ?? '', values);
      return rows[0]?.a;
    }),
  );

  expect(answers).toEqual(asks.map((index) => (index % 4 === 1 ? `v${index}!` : `v${index}`)));
  await database.close();
  await engine.close();
});

test('a query beside an open transaction fails in words instead of waiting for ever', async () => {
  const folder = await folderFrom(inject('engineTemplate'));
  const engine = await openEngine({ dataDir: folder, durable: false });
  const database = openDatabase({ ...engine.pool, connectionTimeoutMillis: 500 });

  const slip = database.db.transaction(async () => {
    await database.pool.query('select 1');
  });

  await expect(slip).rejects.toThrow(/timeout/i);
  expect((await database.pool.query('select 1 as one')).rows).toEqual([{ one: 1 }]);
  await database.close();
  await engine.close();
});

test('a transaction that throws leaves nothing behind', async () => {
  const folder = await folderFrom(inject('engineTemplate'));
  const engine = await openEngine({ dataDir: folder, durable: false });
  const database = openDatabase(engine.pool);

  const failing = database.db.transaction(async (tx) => {
    await tx.execute(`insert into throttles (key, points) values ('gone', 1)`);
    throw new Error('thrown away');
  });

  await expect(failing).rejects.toThrow('thrown away');
  expect((await database.pool.query(`select * from throttles where key = 'gone'`)).rows).toEqual([]);
  await database.close();
  await engine.close();
});

test('a second holder of a data folder is refused at once, in words that name the first', async () => {
  const folder = await folderFrom();
  const lock = await lockDataFolder(folder);
  const started = Date.now();

  const second = lockDataFolder(folder);

  await expect(second).rejects.toBeInstanceOf(DataFolderInUse);
  await expect(second).rejects.toThrow(`process ${process.pid}`);
  expect(Date.now() - started).toBeLessThan(1000);
  lock.release();
});

test('the lock is free at once after its holder is killed', async () => {
  const folder = await folderFrom();
  const module = new URL('../../../server/platform/data-lock.ts', import.meta.url).href;
  const code = `import(${JSON.stringify(module)}).then(async ({ lockDataFolder }) => { await lockDataFolder(${JSON.stringify(folder)}); console.log('held'); setInterval(() => {}, 1000); })`;
  const holder = spawn(process.execPath, ['--import', 'tsx', '--input-type=module', '-e', code], {
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  await new Promise<void>((resolve) => holder.stdout.once('data', () => resolve()));
  await expect(lockDataFolder(folder)).rejects.toBeInstanceOf(DataFolderInUse);

  const gone = new Promise<void>((resolve) => holder.once('exit', () => resolve()));
  holder.kill('SIGKILL');
  await gone;

  const lock = await retryFor(500, () => lockDataFolder(folder));
  lock.release();
});

/** The kernel needs a moment to close the killed process's pipes. */
async function retryFor<T>(ms: number, attempt: () => Promise<T>): Promise<T> {
  const end = Date.now() + ms;
  for (;;) {
    try {
      return await attempt();
    } catch (error) {
      if (Date.now() > end) throw error;
      await new Promise((resolve) => setTimeout(resolve, 20));
    }
  }
}
