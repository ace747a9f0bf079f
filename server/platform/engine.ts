import { mkdtemp, rm } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { Worker } from 'node:worker_threads';
import type { PoolConfig } from 'pg';

export type Engine = { pool: PoolConfig; close: () => Promise<void> };

/**
 * The embedded database: PGlite in a worker thread behind its own wire protocol, on a Unix socket in a private folder, so that the
 * rest of the server knows only a connection pool. Take the lock on the data folder first.
 */
export async function openEngine({
  dataDir,
  durable = true,
}: {
  dataDir: string;
  durable?: boolean;
}): Promise<Engine> {
  // mkdtemp makes the folder with mode 0700: whoever can open the socket has the database.
  const folder = await mkdtemp(join(tmpdir(), 'tb-'));
  const worker = startWorker({
    dataDir: join(dataDir, 'pglite'),
    socketPath: join(folder, '.s.PGSQL.5432'),
    durable,
  });
  await new Promise<void>((resolve, reject) => {
    worker.once('message', () => resolve());
    worker.once('error', reject);
    worker.once('exit', (code) => reject(new Error(`The database engine ended with ${code}.`)));
  });
  return {
    // One connection. A query with values travels as several messages, the engine has one backend, and the socket server lets
    // another connection's messages in between: with two connections one query could run with the other's values. One is also quicker.
    pool: { host: folder, user: 'postgres', database: 'postgres', max: 1 },
    async close() {
      const closed = new Promise<void>((resolve) => worker.once('exit', () => resolve()));
      worker.postMessage('close');
      await closed;
      await rm(folder, { recursive: true, force: true });
    },
  };
}

/** From the bundle the worker is a file beside this one; from the sources it is TypeScript, which a worker must be taught to read. */
function startWorker(workerData: { dataDir: string; socketPath: string; durable: boolean }): Worker {
  if (!import.meta.url.endsWith('.ts'))
    return new Worker(new URL('./engine.worker.js', import.meta.url), { workerData });
  const loader = pathToFileURL(
    createRequire(import.meta.url)
      .resolve('tsx/esm/api')
      .replace(/\.cjs$/, '.mjs'),
  ).href;
  const worker = new URL('./engine.worker.ts', import.meta.url).href;
  const code = `import(${JSON.stringify(loader)}).then(({ register }) => { register(); return import(${JSON.stringify(worker)}); })`;
  return new Worker(code, { eval: true, workerData });
}
