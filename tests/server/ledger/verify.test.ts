import { eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { withdrawStatement } from '#shared/statements/statements.api.ts';
import { appendToLedger } from '../../../server/ledger/ledger.service.ts';
import { signOnRecord } from '../../../server/ledger/records.ts';
import { verifyLedgers } from '../../../server/ledger/verify.service.ts';
import type { Db } from '../../../server/platform/db.ts';
import { signOns } from '../../../server/signons/signons.table.ts';
import { demoStatement } from '../../support/revisions.ts';
import { type DemoWorld, startDemoWorld } from '../../support/server.ts';

let world: DemoWorld;
beforeAll(async () => (world = await startDemoWorld()));
afterAll(() => world.close());

const verify = async () => (await verifyLedgers(world.db))[0] ?? { faults: [], entries: 0 };

const messagesOf = async (db: Db) =>
  ((await verifyLedgers(db))[0]?.faults ?? []).map(({ message }) => message);

/** Does something in a transaction and takes it back. */
async function rolledBack(act: (tx: Db) => Promise<void>): Promise<void> {
  await world.db
    .transaction(async (tx) => {
      await act(tx);
      throw new Error('take it back');
    })
    .catch((error: Error) => {
      if (error.message !== 'take it back') throw error;
    });
}

/** What verifying finds after what only somebody with the database in their hands could do. */
async function tampered(table: string, statement: string): Promise<string[]> {
  let messages: string[] = [];
  await rolledBack(async (tx) => {
    await tx.execute(sql.raw(`alter table ${table} disable trigger user`));
    await tx.execute(sql.raw(statement));
    messages = await messagesOf(tx);
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
  [
    'an unreadable payload',
    'ledger_entries',
    `update ledger_entries set payload = 'not JSON' where sequence = 2`,
    /record kept with entry 2 is not the one/,
  ],
  [
    'a sign-on that points to another entry',
    'sign_ons',
    `update sign_ons set ledger_sequence = 1 where person_name = 'Dell Cartwright'`,
    /sign-on of Dell Cartwright .* points to entry 1; it was entered by entry \d+/,
  ],
  [
    'an inserted revision',
    'revisions',
    `insert into revisions select (jsonb_populate_record(r, jsonb_build_object('id', gen_random_uuid(), 'number', 7))).* from revisions r`,
    /Revision 7 of .* has no entry/,
  ],
  [
    'a closed talk that was opened again',
    'talks',
    `update talks set state = 'open', closed_at = null where state = 'closed'`,
    /record of entry \d+ \(talk:.*\) is missing/,
  ],
  [
    'a talk that only looks closed',
    'talks',
    `update talks set state = 'closed' where state = 'open'`,
    /The talk “Leads and steel frames” .* has no entry/,
  ],
  [
    'a statement made to stand as withdrawn',
    'statements',
    `update statements set state = 'withdrawn', current_revision = null where state = 'issued'`,
    /stands as withdrawn, and the ledger holds no withdrawal/,
  ],
  [
    'a revision put in force that was never issued',
    'statements',
    `update statements set current_revision = 4 where state = 'issued'`,
    /has revision 4 in force; the last one issued is 1/,
  ],
  [
    'a head that was turned back',
    'ledger_heads',
    `update ledger_heads set sequence = sequence - 1`,
    /entries were added past its head/,
  ],
  [
    'a head with another hash',
    'ledger_heads',
    `update ledger_heads set hash = repeat('a', 64)`,
    /the chain was written anew/,
  ],
])('%s is found and named', async (_name, table, statement, expected) => {
  const messages = await tampered(table, statement);

  expect(messages.join('\n')).toMatch(expected);
});

test('a bent record is not made good by entering it once more', async () => {
  let messages: string[] = [];
  await rolledBack(async (tx) => {
    await tx.execute(sql`alter table sign_ons disable trigger user`);
    const [row] = await tx
      .update(signOns)
      .set({ readingMs: 999_999 })
      .where(eq(signOns.personName, 'Dell Cartwright'))
      .returning();
    if (!row) throw new Error('There is no such sign-on.');
    await appendToLedger(tx, row.orgId, {
      kind: 'signOn',
      actor: `person:${row.personId}`,
      subject: `signOn:${row.id}`,
      payload: signOnRecord(row),
      at: new Date(),
    });
    messages = await messagesOf(tx);
  });

  expect(messages.join('\n')).toMatch(/Entry \d+ enters signOn:.* again, which entry \d+ entered/);
  expect(messages.join('\n')).toMatch(/sign-on of Dell Cartwright .* was altered/);
});

test('a withdrawal that the ledger holds can’t be taken back behind it', async () => {
  const officer = await world.as('safetyOfficer');
  const { id, lockVersion } = await demoStatement(officer);
  await officer.call(withdrawStatement, { params: { id }, body: { lockVersion, reason: 'Job is done' } });
  expect((await verify()).faults).toEqual([]);

  const messages = await tampered(
    'statements',
    `update statements set state = 'issued', current_revision = 1 where state = 'withdrawn'`,
  );

  expect(messages.join('\n')).toMatch(/was withdrawn by entry \d+, and stands as in force again/);
});

test('nothing of a record or its entry is kept when the transaction fails', async () => {
  const before = await verify();
  await rolledBack(async (tx) => {
    await appendToLedger(tx, world.seeded.orgId, {
      kind: 'signOn',
      actor: 'person:x',
      subject: 'signOn:x',
      payload: { record: 'signOn' },
      at: new Date(),
    });
  });

  expect(await verify()).toEqual(before);
});

test('twenty who append at once stand one after another, none lost and none twice', async () => {
  const { entries } = await verify();
  await Promise.all(
    Array.from({ length: 20 }, (_, index) =>
      world.db.transaction((tx) =>
        appendToLedger(tx, world.seeded.orgId, {
          kind: 'signOn',
          actor: `person:${index}`,
          subject: `trial:${index}`,
          payload: { record: 'trial', index },
          at: new Date(),
        }),
      ),
    ),
  );

  const after = await verify();
  expect(after).toMatchObject({ entries: entries + 20, faults: [] });
});

test.each(['sign_ons', 'revisions', 'attendances', 'ledger_entries'])(
  'rows of %s can be neither changed nor deleted',
  async (table) => {
    await expect(world.db.execute(sql.raw(`update ${table} set org_id = org_id`))).rejects.toThrow();
    await expect(world.db.execute(sql.raw(`delete from ${table}`))).rejects.toThrow();
  },
);
