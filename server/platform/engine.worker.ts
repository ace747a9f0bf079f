import fs from 'node:fs';
import { parentPort, workerData } from 'node:worker_threads';
import { PGlite } from '@electric-sql/pglite';
import { PGLiteSocketServer } from '@electric-sql/pglite-socket';
import { DurableNodeFS } from './durable-fs.ts';
import { wholeQueries } from './whole-queries.ts';

const { dataDir, socketPath, durable } = workerData as {
  dataDir: string;
  socketPath: string;
  durable: boolean;
};

fs.mkdirSync(dataDir, { recursive: true, mode: 0o700 });
const startParams = durable
  ? [
      ...PGlite.defaultStartParams.filter((parameter) => parameter !== '-F'),
      '-c',
      'wal_sync_method=fsync',
      '-c',
      'max_wal_size=256MB',
    ]
  : undefined;
const pglite = await PGlite.create({
  fs: new DurableNodeFS(dataDir),
  ...(startParams ? { startParams } : {}),
});
const server = new PGLiteSocketServer({ db: wholeQueries(pglite), path: socketPath, maxConnections: 64 });
await server.start();
parentPort?.postMessage('ready');
parentPort?.once('message', () => {
  void (async () => {
    await server.stop();
    await pglite.close();
    parentPort?.postMessage('closed');
    parentPort?.close();
  })();
});
