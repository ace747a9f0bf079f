import { BadConfig, readConfig } from '../platform/config.ts';
import { DataFolderInUse, lockDataFolder } from '../platform/data-lock.ts';
import { openDatabase } from '../platform/db.ts';
import { openEngine } from '../platform/engine.ts';
import { verifyLedgers } from '../ledger/verify.service.ts';

/** `npm run verify`: exit code 0 when every ledger holds, 1 when one does not, 2 when the data can't be opened. */
async function verify(): Promise<number> {
  const config = readConfig();
  const lock = config.databaseUrl ? null : await lockDataFolder(config.dataDir);
  const engine = config.databaseUrl ? null : await openEngine({ dataDir: config.dataDir });
  const database = openDatabase(engine?.pool ?? { connectionString: config.databaseUrl });
  try {
    const reports = await verifyLedgers(database.db);
    for (const { organisation, entries, head, faults } of reports) {
      console.log(`${organisation}: ${entries} entries, head ${head}`);
      for (const { message } of faults) console.log(`  ${message}`);
      console.log(faults.length === 0 ? '  The ledger holds.' : `  ${faults.length} faults.`);
    }
    return reports.some(({ faults }) => faults.length > 0) ? 1 : 0;
  } finally {
    await database.close();
    await engine?.close();
    lock?.release();
  }
}

try {
  process.exitCode = await verify();
} catch (error) {
  if (!(error instanceof DataFolderInUse) && !(error instanceof BadConfig)) throw error;
  console.error(error.message);
  process.exitCode = 2;
}
