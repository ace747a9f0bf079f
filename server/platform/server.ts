import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { pino, type Logger } from 'pino';
import { startPostman } from '../mail/outgoing.service.ts';
import { createPrintService, findBrowser } from '../print/browser.ts';
import { createApp } from './app.ts';
import type { Config } from './config.ts';
import { lockDataFolder } from './data-lock.ts';
import { migrateDatabase, openDatabase } from './db.ts';
import { openEngine } from './engine.ts';
import { startMaintenance } from './maintenance.ts';
import type { Platform } from './platform.ts';
import { createSessions } from './session.ts';
import { createThrottles } from './throttle.ts';

export type RunningServer = { platform: Platform; server: Server; port: number; close: () => Promise<void> };

export type ServerOptions = {
  config: Config;
  version: string;
  migrations: string;
  /** Folder of the built pages, or null. */
  pages: string | null;
  /** Work on the database before anybody is let in: the demo seed. */
  prepare?: (platform: Platform) => Promise<void>;
  /** False gives up safety against power cuts for speed; tests only. */
  durable?: boolean;
};

/** Opens everything in order and closes it in the opposite one. Throws `DataFolderInUse` where another process has the data. */
export async function startServer({
  config,
  version,
  migrations,
  pages,
  prepare,
  durable = true,
}: ServerOptions): Promise<RunningServer> {
  const log: Logger = pino({ level: config.logLevel });
  const closing: (() => unknown)[] = [];
  const closeAll = async () => {
    for (const close of closing.splice(0).reverse()) await close();
  };
  try {
    const database = openDatabase(await databaseConfig());
    closing.push(() => database.close());
    await migrateDatabase(database, migrations);
    const print = createPrintService(await findBrowser(config.chromePath, config.path));
    closing.push(() => print.close());
    const postman = startPostman(database, config, log);
    closing.push(() => postman.stop());
    const maintenance = startMaintenance(database, log, { embedded: !config.databaseUrl });
    closing.push(() => maintenance.stop());
    let port = config.port;
    const platform: Platform = {
      config,
      publicUrl: () => config.publicUrl ?? `http://localhost:${port}`,
      database,
      throttles: createThrottles(database.pool),
      print,
      log,
      session: createSessions(database.pool, config),
      deliverMail: postman.deliver,
      version,
      endpoints: [],
    };
    await prepare?.(platform);
    const server = createServer(createApp(platform, { pages }));
    await new Promise<void>((resolve, reject) => {
      server.once('error', reject);
      server.listen(config.port, config.host, resolve);
    });
    closing.push(() => stopListening(server));
    port = (server.address() as AddressInfo).port;
    return { platform, server, port, close: closeAll };
  } catch (error) {
    await closeAll();
    throw error;
  }

  async function databaseConfig() {
    if (config.databaseUrl) return { connectionString: config.databaseUrl };
    const lock = await lockDataFolder(config.dataDir);
    closing.push(() => lock.release());
    const engine = await openEngine({ dataDir: config.dataDir, durable });
    closing.push(() => engine.close());
    return engine.pool;
  }
}

/** Lets requests under way finish; connections that only wait are closed. */
function stopListening(server: Server): Promise<void> {
  return new Promise((resolve) => {
    server.close(() => resolve());
    server.closeIdleConnections();
    setTimeout(() => server.closeAllConnections(), 10_000).unref();
  });
}
