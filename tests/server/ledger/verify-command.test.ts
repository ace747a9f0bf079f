import { execFile } from 'node:child_process';
import { cp, mkdtemp, rm } from 'node:fs/promises';
import { existsSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, inject, test, vi } from 'vitest';
import { seedDemo } from '../../../server/commands/seed.ts';
import { openDatabase } from '../../../server/platform/db.ts';
import { openEngine } from '../../../server/platform/engine.ts';
import { lockDataFolder } from '../../../server/platform/data-lock.ts';

// Processes of their own that open the engine: slow where the machine is busy.
vi.setConfig({ testTimeout: 120_000 });

const root = fileURLToPath(new URL('../../../', import.meta.url));
let dataDir: string;

beforeAll(async () => {
  dataDir = await mkdtemp(join(tmpdir(), 'tb-verify-'));
  await cp(inject('engineTemplate'), dataDir, { recursive: true });
  await onData(async (database) => void (await seedDemo({ database })));
});
afterAll(() => rm(dataDir, { recursive: true, force: true }));

async function onData(act: (database: ReturnType<typeof openDatabase>) => Promise<void>): Promise<void> {
  const engine = await openEngine({ dataDir, durable: false });
  const database = openDatabase(engine.pool);
  await act(database);
  await database.pool.query('CHECKPOINT');
  await database.close();
  await engine.close();
}

/** Runs the command as `npm run verify` does, in a process of its own. */
function verify(folder = dataDir): Promise<{ code: number | string; out: string; err: string }> {
  const env = { PATH: process.env.PATH, TOEBOARD_DATA: folder };
  return new Promise((resolve) =>
    execFile(
      process.execPath,
      ['--import', 'tsx', 'server/commands/verify.ts'],
      { cwd: root, env },
      (error, out, err) => resolve({ code: error?.code ?? 0, out, err }),
    ),
  );
}

test('on data that was not touched it tells entries and head, and ends with 0', async () => {
  const { code, out } = await verify();

  expect(out).toMatch(
    /^Ridgeline Frame and Truss: \d+ entries, head [0-9a-f]{64}\n {2}The ledger holds\.\n$/,
  );
  expect(code).toBe(0);
});

test('while another process has the data it says so and which, and ends with 2', async () => {
  const lock = await lockDataFolder(dataDir);
  try {
    const { code, err, out } = await verify();

    expect(err).toMatch(
      new RegExp(`in use by another Toeboard process \\(process ${process.pid} on .*Stop it first`),
    );
    expect([code, out]).toEqual([2, '']);
  } finally {
    lock.release();
  }
});

test('where there is no data it says so, makes none, and ends with 2', async () => {
  const empty = join(dataDir, 'nothing-here');

  const { code, err } = await verify(empty);

  expect(err).toContain(`There is no data in ${empty}`);
  expect(code).toBe(2);
  expect(existsSync(empty)).toBe(false);
});

test('on data that was bent it names what was bent, and ends with 1', async () => {
  await onData(async ({ db }) => {
    await db.execute(sql`alter table sign_ons disable trigger user`);
    await db.execute(sql`delete from sign_ons where person_name = 'Dell Cartwright'`);
    await db.execute(sql`alter table sign_ons enable trigger user`);
  });

  const { code, out } = await verify();

  expect(out).toMatch(/The record of entry \d+ \(signOn:[0-9a-f-]+\) is missing\.\n {2}1 fault\.\n$/);
  expect(code).toBe(1);
});
