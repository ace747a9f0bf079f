import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { BadConfig, readConfig } from '../platform/config.ts';
import { DataFolderInUse, lockDataFolder } from '../platform/data-lock.ts';
import { type Database, openDatabase } from '../platform/db.ts';
import { openEngine } from '../platform/engine.ts';
import { type LedgerReport, verifyLedgers } from '../ledger/verify.service.ts';

class NothingToVerify extends Error {}

/** `npm run verify`: exit code 0 when every ledger holds, 1 when one does not, 2 when the data can't be opened. */
async function verify(): Promise<number> {
  // No session is served here; a key is given so that none is made and kept beside the data.
  const config = readConfig({ SESSION_SECRET: 'no session is served', ...process.env });
  if (config.databaseUrl) {
    const database = openDatabase({ connectionString: config.databaseUrl });
    try {
      return tell(await reportsOf(database));
    } finally {
      await database.close();
    }
  }
  if (!existsSync(join(config.dataDir, 'pglite')))
    throw new NothingToVerify(
      `There is no data in ${config.dataDir}. Set TOEBOARD_DATA to the folder that the server uses.`,
    );
  const lock = await lockDataFolder(config.dataDir);
  const engine = await openEngine({ dataDir: config.dataDir });
  const database = openDatabase(engine.pool);
  try {
    return tell(await reportsOf(database));
  } finally {
    await database.close();
    await engine.close();
    lock.release();
  }
}

/** One picture of the whole database: a server that goes on writing meanwhile leaves no false faults. */
function reportsOf({ db }: Database): Promise<LedgerReport[]> {
  return db.transaction((tx) => verifyLedgers(tx), {
    isolationLevel: 'repeatable read',
    accessMode: 'read only',
  });
}

function tell(reports: LedgerReport[]): number {
  for (const { organisation, entries, head, faults } of reports) {
    console.log(`${organisation}: ${entries} entries, head ${head}`);
    for (const { message } of faults) console.log(`  ${message}`);
    const count = faults.length === 1 ? '1 fault' : `${faults.length} faults`;
    console.log(faults.length === 0 ? '  The ledger holds.' : `  ${count}.`);
  }
  if (reports.length === 0) console.log('There is no organisation, and so no ledger, in this database.');
  return reports.some(({ faults }) => faults.length > 0) ? 1 : 0;
}

try {
  process.exitCode = await verify();
} catch (error) {
  const expected =
    error instanceof DataFolderInUse || error instanceof BadConfig || error instanceof NothingToVerify;
  if (!expected) throw error;
  console.error(error.message);
  process.exitCode = 2;
}
