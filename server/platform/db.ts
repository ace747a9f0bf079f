import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import { Pool, type PoolConfig } from 'pg';

/** The database or a transaction of it: a service can't tell, and need not. Nested `transaction` is a savepoint. */
export type Db = Pick<
  NodePgDatabase,
  | 'select'
  | 'selectDistinct'
  | 'selectDistinctOn'
  | 'insert'
  | 'update'
  | 'delete'
  | 'execute'
  | 'transaction'
  | '$with'
  | 'with'
  | '$count'
>;

export type Database = { db: NodePgDatabase; pool: Pool; close: () => Promise<void> };

/** A slip that queries the pool inside a transaction fails after this long instead of waiting for ever. */
const statementTimeout = 20_000;

export function openDatabase(config: PoolConfig): Database {
  const pool = new Pool({
    max: 10,
    connectionTimeoutMillis: statementTimeout,
    query_timeout: statementTimeout,
    ...config,
  });
  // A connection that breaks while idle is replaced on the next query; without a listener it would end the process.
  pool.on('error', () => undefined);
  return { db: drizzle(pool, { casing: 'snake_case' }), pool, close: () => pool.end() };
}

/** Brings the database to today's tables. */
export async function migrateDatabase({ db }: Database, folder: string): Promise<void> {
  await migrate(db, { migrationsFolder: folder });
}
