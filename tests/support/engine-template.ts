import { createHash } from 'node:crypto';
import { existsSync } from 'node:fs';
import { mkdir, readdir, readFile, rename, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { TestProject } from 'vitest/node';
import { migrateDatabase, openDatabase } from '../../server/platform/db.ts';
import { openEngine } from '../../server/platform/engine.ts';

const root = fileURLToPath(new URL('../../', import.meta.url));
const migrations = join(root, 'server/platform/migrations');

declare module 'vitest' {
  interface ProvidedContext {
    engineTemplate: string;
  }
}

/** A migrated data folder, made once for these migrations; every test file starts from a copy. */
export default async function setup(project: TestProject): Promise<void> {
  const cache = join(root, 'node_modules/.cache/toeboard');
  const folder = join(cache, await hashOfMigrations());
  if (!existsSync(folder)) {
    const fresh = `${folder}.${process.pid}`;
    await mkdir(fresh, { recursive: true });
    const engine = await openEngine({ dataDir: fresh, durable: false });
    const database = openDatabase(engine.pool);
    await migrateDatabase(database, migrations);
    await database.pool.query('CHECKPOINT');
    await database.close();
    await engine.close();
    await rename(fresh, folder).catch(() => rm(fresh, { recursive: true }));
  }
  project.provide('engineTemplate', folder);
}

async function hashOfMigrations(): Promise<string> {
  const hash = createHash('sha256');
  for (const name of (await readdir(migrations)).filter((file) => file.endsWith('.sql')).sort())
    hash.update(await readFile(join(migrations, name)));
  return hash.digest('hex').slice(0, 16);
}
