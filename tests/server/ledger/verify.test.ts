import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { verifyLedgers } from '../../../server/ledger/verify.service.ts';
import { type DemoWorld, startDemoWorld } from '../../support/server.ts';

let world: DemoWorld;
beforeAll(async () => (world = await startDemoWorld()));
afterAll(() => world.close());

const verify = async () => (await verifyLedgers(world.db))[0] ?? { faults: [], entries: 0 };

/** Does what only somebody with the database in their hands could do, looks, and takes it back. */
async function tampered(table: string, statement: string): Promise<string[]> {
  let messages: string[] = [];
  await world.db
    .transaction(async (tx) => {
      await tx.execute(sql.raw(`alter table ${table} disable trigger user`));
      await tx.execute(sql.raw(statement));
      messages = ((await verifyLedgers(tx))[0]?.faults ?? []).map(({ message }) => message);
      throw new Error('take it back');
    })
    .catch((error: Error) => {
      if (error.message !== 'take it back') throw error;
    });
  return messages;
}

test('the ledger of the demo organisation holds', async () => {
  const report = await verify();

  expect(report.faults).toEqual([]);
  expect(report.entries).toBeGreaterThan(10);
});

test.each([
  [
    'an altered sign-on',
    'sign_ons',
    `update sign_ons set reading_ms = 999999 where person_name = 'Dell Cartwright'`,
    /sign-on of Dell Cartwright .* was altered/,
  ],
  [
    'a deleted sign-on',
    'sign_ons',
    `delete from sign_ons where person_name = 'Dell Cartwright'`,
    /record of entry \d+ .* is missing/,
  ],
  [
    'an altered revision',
    'revisions',
    `update revisions set canonical = replace(canonical, 'scaffold', 'ladder')`,
    /does not match its own hash/,
  ],
  [
    'a renamed closed talk',
    'talks',
    `update talks set topic = 'Something else' where state = 'closed'`,
    /talk “Something else” .* was altered/,
  ],
  [
    'an altered entry',
    'ledger_entries',
    `update ledger_entries set actor = 'account:other' where sequence = 2`,
    /Entry 2 was altered/,
  ],
  [
    'a missing entry',
    'ledger_entries',
    `delete from ledger_entries where sequence = 3`,
    /Entry 3 is missing/,
  ],
  [
    'a missing last entry',
    'ledger_entries',
    `delete from ledger_entries where sequence = (select max(sequence) from ledger_entries)`,
    /missing at its end/,
  ],
  [
    'a swapped payload',
    'ledger_entries',
    `update ledger_entries set payload = '{}' where sequence = 2`,
    /not the one that was entered/,
  ],
  [
    'an inserted attendance',
    'attendances',
    `insert into attendances select org_id, gen_random_uuid(), (select id from talks where state = 'open' limit 1), person_id, method, drawn, svg, typed_name, witness, declaration, signed_at, received_at, language, device_id, user_agent, handed_round_by, handed_round_by_name, 'Inserted Person', employer_name, trade, induction_card, ledger_sequence from attendances limit 1`,
    /Inserted Person .* has no entry/,
  ],
])('%s is found and named', async (_name, table, statement, expected) => {
  const messages = await tampered(table, statement);

  expect(messages.join('\n')).toMatch(expected);
});

test.each(['sign_ons', 'revisions', 'attendances', 'ledger_entries'])(
  'rows of %s can be neither changed nor deleted',
  async (table) => {
    await expect(world.db.execute(sql.raw(`update ${table} set org_id = org_id`))).rejects.toThrow();
    await expect(world.db.execute(sql.raw(`delete from ${table}`))).rejects.toThrow();
  },
);
