import { cp, mkdtemp, rm } from 'node:fs/promises';
import { connect } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Pool } from 'pg';
import { afterAll, beforeAll, expect, inject, test } from 'vitest';
import { type Engine, openEngine } from '../../../server/platform/engine.ts';

let dataDir: string;
let engine: Engine;
let pool: Pool;

beforeAll(async () => {
  dataDir = await mkdtemp(join(tmpdir(), 'tb-engine-'));
  await cp(inject('engineTemplate'), dataDir, { recursive: true });
  engine = await openEngine({ dataDir, durable: false });
  pool = new Pool({ ...engine.pool, max: 10, query_timeout: 10_000 });
});
afterAll(async () => {
  await pool.end();
  await engine.close();
  await rm(dataDir, { recursive: true, force: true });
});

/** A query outside a transaction whose answer only its own text and values can give. */
async function ask(at: number): Promise<string> {
  const { rows } = await pool.query<{ answer: string }>(
    `select 'query ${at % 7}, value ' || $1::text as answer`,
    [String(at)],
  );
  return rows[0]?.answer ?? '';
}

/** Holds a transaction open for a while, so that the queries of the other connections pile up behind it. */
async function transact(at: number): Promise<string> {
  const client = await pool.connect();
  try {
    await client.query('begin');
    const { rows } = await client.query<{ answer: string }>(`select 'inside ' || $1::text as answer`, [at]);
    await new Promise((resolve) => setTimeout(resolve, 2));
    await client.query('commit');
    return rows[0]?.answer ?? '';
  } finally {
    client.release();
  }
}

test('queries at the same moment, in transactions and outside, each get the answer to their own', async () => {
  const numbers = Array.from({ length: 600 }, (_, at) => at);

  const answers = await Promise.allSettled(numbers.map((at) => (at % 4 === 0 ? transact(at) : ask(at))));

  expect(answers).toEqual(
    numbers.map((at) => ({
      status: 'fulfilled',
      value: at % 4 === 0 ? `inside ${at}` : `query ${at % 7}, value ${at}`,
    })),
  );
});

test('queries that fail among others spoil none of them', async () => {
  const numbers = Array.from({ length: 600 }, (_, at) => at);
  const fail = (at: number) => pool.query('select 1 / $1::int', [at - at]).then(String);

  const answers = await Promise.allSettled(
    numbers.map((at) => (at % 3 === 0 ? fail(at) : at % 3 === 1 ? transact(at) : ask(at))),
  );

  for (const [at, answer] of answers.entries()) {
    if (at % 3 === 0)
      expect(answer).toMatchObject({ status: 'rejected', reason: { message: 'division by zero' } });
    else
      expect(answer).toEqual({
        status: 'fulfilled',
        value: at % 3 === 1 ? `inside ${at}` : `query ${at % 7}, value ${at}`,
      });
  }
});

test('a client that breaks off in the middle of a query holds nobody up', async () => {
  const socket = connect(join(engine.pool.host ?? '', '.s.PGSQL.5432'));
  const startup = Buffer.from('\0\0\0\0\0\x03\0\0user\0postgres\0database\0postgres\0\0', 'latin1');
  startup.writeInt32BE(startup.length, 0);
  socket.write(startup);
  await new Promise((resolve) => socket.once('data', resolve));
  // A Parse of a statement that doesn't exist, and no Sync after it: the engine would skip everything up to one.
  const parse = Buffer.from('P\0\0\0\0\0select nonsense from nowhere\0\0\0', 'latin1');
  parse.writeInt32BE(parse.length - 1, 1);
  socket.write(parse);
  await new Promise((resolve) => setTimeout(resolve, 100));
  const waiting = ask(1);

  socket.destroy();

  expect(await waiting).toBe('query 1, value 1');
  expect(await ask(2)).toBe('query 2, value 2');
});
