import fs from 'node:fs';
import { parentPort, workerData } from 'node:worker_threads';
import { PGlite } from '@electric-sql/pglite';
import { PGLiteSocketServer } from '@electric-sql/pglite-socket';
import { DurableNodeFS, durableStartParams } from './durable-fs.ts';

const { dataDir, socketPath, durable } = workerData as {
  dataDir: string;
  socketPath: string;
  durable: boolean;
};

fs.mkdirSync(dataDir, { recursive: true, mode: 0o700 });
const pglite = await PGlite.create({
  fs: new DurableNodeFS(dataDir),
  ...(durable ? { startParams: durableStartParams() } : {}),
});
const server = new PGLiteSocketServer({ db: pglite, path: socketPath, maxConnections: 4 });
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
