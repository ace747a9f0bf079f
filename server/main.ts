import { readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { isOrganisationThere, seedDemo } from './commands/seed.ts';
import { demoSignIns } from './commands/demo-sign-ins.ts';
import { addShippedBlocksToAll } from './library/library.service.ts';
import { checkTemplates } from './library/templates.ts';
import { BadConfig, readConfig } from './platform/config.ts';
import { DataFolderInUse } from './platform/data-lock.ts';
import { servePagesInDevelopment } from './platform/development.ts';
import { startServer } from './platform/server.ts';

const root = projectRoot(dirname(fileURLToPath(import.meta.url)));

try {
  const config = readConfig();
  const { version } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')) as { version: string };
  const running = await startServer({
    config,
    version,
    migrations: join(root, 'server/platform/migrations'),
    pages: config.production ? join(root, 'dist/client') : null,
    prepare: async (platform) => {
      checkTemplates();
      const { db } = platform.database;
      if (await isOrganisationThere(db)) return addShippedBlocksToAll(db);
      console.log('Seeding the demo organisation…');
      await seedDemo(platform);
    },
  });
  const development = config.production ? null : await servePagesInDevelopment(running, root);
  greet(running.platform.publicUrl(), config.databaseUrl ? 'the PostgreSQL server' : config.dataDir);
  let stopping = false;
  const stop = () => {
    if (stopping) return;
    stopping = true;
    void (async () => {
      await development?.close();
      await running.close();
      process.exit(0);
    })();
  };
  process.on('SIGTERM', stop);
  process.on('SIGINT', stop);
} catch (error) {
  if (!(error instanceof DataFolderInUse) && !(error instanceof BadConfig) && !isAddressInUse(error))
    throw error;
  console.error(
    isAddressInUse(error)
      ? 'Another program listens on this port. Set PORT to another one.'
      : (error as Error).message,
  );
  process.exit(1);
}

function greet(address: string, data: string): void {
  const signIns = demoSignIns(root);
  const width = Math.max(...signIns.map(({ email }) => email.length));
  console.log(
    `\nToeboard is at ${address}\n\nDemo sign-ins (everything in the demo organisation is invented):`,
  );
  for (const { role, email, password } of signIns)
    console.log(`  ${role.padEnd(14)} ${email.padEnd(width)}  ${password}`);
  console.log(`\nThe data lies in ${data}\n`);
}

function isAddressInUse(error: unknown): boolean {
  return (error as { code?: string }).code === 'EADDRINUSE';
}

/** The folder of package.json, from the sources and from the bundle alike. */
function projectRoot(folder: string): string {
  try {
    readFileSync(join(folder, 'package.json'));
    return folder;
  } catch {
    return projectRoot(dirname(folder));
  }
}
