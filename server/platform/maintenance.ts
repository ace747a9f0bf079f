import { sql } from 'drizzle-orm';
import type { Logger } from 'pino';
import type { Database } from './db.ts';

const megabyte = 1024 * 1024;
const checkpointBytes = 64 * megabyte;
const checkpointMinutes = 15;

/**
 * What a database server does by itself and the embedded engine does not: checkpoints by growth and time, nightly vacuum and analyze.
 * It goes through the pool, so that it queues behind open transactions. On any engine it drops sessions and throttles that ran out.
 */
export function startMaintenance(
  database: Database,
  log: Logger,
  { embedded }: { embedded: boolean },
): { stop: () => void } {
  let lastPosition = '0/0';
  let lastCheckpoint = Date.now();
  let lastVacuumDay = new Date().toISOString().slice(0, 10);

  async function minute(): Promise<void> {
    if (embedded) {
      const grown = await walGrowth(database, lastPosition);
      if (grown.bytes >= checkpointBytes || Date.now() - lastCheckpoint >= checkpointMinutes * 60_000) {
        lastPosition = await checkpoint(database);
        lastCheckpoint = Date.now();
      }
    }
    const today = new Date().toISOString().slice(0, 10);
    if (today === lastVacuumDay) return;
    lastVacuumDay = today;
    await forget(database);
    if (embedded) await database.pool.query('VACUUM (ANALYZE)');
  }

  const timer = setInterval(() => {
    minute().catch((error: unknown) => log.error({ err: error }, 'Database maintenance failed'));
  }, 60_000);
  timer.unref();
  return { stop: () => clearInterval(timer) };
}

async function walGrowth({ db }: Database, since: string): Promise<{ bytes: number }> {
  const { rows } = await db.execute<{ bytes: string }>(
    sql`select pg_wal_lsn_diff(pg_current_wal_lsn(), ${since}::pg_lsn) as bytes`,
  );
  return { bytes: Number(rows[0]?.bytes ?? 0) };
}

/** Writes everything to the data files and says up to where in the log. */
export async function checkpoint({ pool }: Database): Promise<string> {
  await pool.query('CHECKPOINT');
  const { rows } = await pool.query<{ position: string }>('select pg_current_wal_lsn()::text as position');
  return rows[0]?.position ?? '0/0';
}

/** Fresh statistics after bulk work, which the embedded engine never gathers by itself. */
export async function analyze({ pool }: Database): Promise<void> {
  await pool.query('ANALYZE');
}

async function forget({ pool }: Database): Promise<void> {
  await pool.query('delete from http_sessions where expire < now()');
  await pool.query('delete from throttles where expire < $1', [Date.now()]);
}
