import { expect, test } from 'vitest';
import { Refusal } from '#shared/kernel/refusal.ts';
import { newId } from '#shared/kernel/ids.ts';
import { memoryStore } from '../../../src/sign/outbox-store.ts';
import { createOutbox, type Carrier, type Outgoing, type Send } from '../../../src/sign/outbox.ts';

const kit: Carrier = { kind: 'device', token: 'a'.repeat(20), personId: 'kit' };

const outgoing = (carrier: Carrier = kit): Outgoing => ({
  id: newId(),
  carrier,
  signed: { kind: 'signOn', body: {} as never },
  title: 'Trusses, revision 2',
  person: 'Kit',
  timeZone: 'Australia/Adelaide',
  state: 'waiting',
  receivedAt: null,
  superseded: false,
  trouble: null,
});

/** Stands for the register: keeps each id once, and loses requests or answers as told. */
function register({ lose = () => null as 'request' | 'answer' | null } = {}) {
  const rows = new Map<string, string>();
  let asked = 0;
  const send: Send = async ({ id }) => {
    asked += 1;
    const lost = lose();
    if (lost === 'request') throw new Refusal('offline', 'No signal.');
    if (!rows.has(id)) rows.set(id, '2026-12-01T06:14:00Z');
    if (lost === 'answer') throw new Refusal('offline', 'No signal.');
    return { id, receivedAt: rows.get(id) ?? '', superseded: false };
  };
  return { rows, send, asked: () => asked };
}

test('a signature is kept before it is sent, and leaves the phone only once it is answered', async () => {
  const store = memoryStore();
  const { send, rows } = register();
  const outbox = createOutbox({ store, send, maySend: () => true });
  const signature = outgoing();

  await outbox.keep(signature);
  expect(await store.all()).toHaveLength(1);
  expect(rows.size).toBe(0);

  await outbox.flush();
  expect(await store.all()).toHaveLength(0);
  expect(outbox.list()).toMatchObject([
    { id: signature.id, state: 'sent', receivedAt: '2026-12-01T06:14:00Z' },
  ]);
});

test('a signature whose answer is lost is sent again under the same id and stands once', async () => {
  const losses: ('answer' | null)[] = ['answer', 'answer', null];
  const { send, rows, asked } = register({ lose: () => losses.shift() ?? null });
  const outbox = createOutbox({ store: memoryStore(), send, maySend: () => true });
  await outbox.keep(outgoing());

  for (let round = 0; round < 5; round += 1) await outbox.flush();

  expect(rows.size).toBe(1);
  expect(asked()).toBe(3);
  expect(outbox.list()[0]?.state).toBe('sent');
});

test('forty signatures on a network that loses half arrive once each, across a page that is opened anew', async () => {
  let dice = 7;
  const roll = () => (dice = (dice * 1_103_515_245 + 12_345) % 2_147_483_648) / 2_147_483_648;
  const lose = () => (roll() < 0.25 ? 'request' : roll() < 0.33 ? 'answer' : null);
  const { send, rows } = register({ lose });
  const store = memoryStore();
  const first = createOutbox({ store, send, maySend: () => true });
  const signatures = Array.from({ length: 40 }, () => outgoing());
  for (const signature of signatures) await first.keep(signature);
  await first.flush();

  const second = createOutbox({ store, send, maySend: () => true });
  for (let round = 0; round < 60; round += 1) await second.flush();

  expect(await store.all()).toHaveLength(0);
  expect([...rows.keys()].toSorted()).toEqual(signatures.map(({ id }) => id).toSorted());
});

test('two flushes at once send a signature once', async () => {
  const { send, asked } = register();
  const outbox = createOutbox({ store: memoryStore(), send, maySend: () => true });
  await outbox.keep(outgoing());

  await Promise.all([outbox.flush(), outbox.flush()]);

  expect(asked()).toBe(1);
});

test('a signature kept while others are being sent goes with the same flush', async () => {
  const { send, rows } = register();
  const outbox = createOutbox({ store: memoryStore(), send, maySend: () => true });
  await outbox.keep(outgoing());
  const flushing = outbox.flush();
  await outbox.keep(outgoing());
  await flushing;

  expect(rows.size).toBe(2);
});

test('one person’s signature is never sent while the phone belongs to another', async () => {
  const { send, rows } = register();
  let owner = 'lou';
  const outbox = createOutbox({
    store: memoryStore(),
    send,
    maySend: (carrier) => carrier.personId === owner,
  });
  await outbox.keep(outgoing());

  await outbox.flush();
  expect(rows.size).toBe(0);
  expect(outbox.list()[0]?.state).toBe('waiting');

  owner = 'kit';
  await outbox.flush();
  expect(rows.size).toBe(1);
});

test('a refused signature stays on the phone with the reason, holds up no other, and can be tried again', async () => {
  let refusing = true;
  const refused = outgoing();
  const outbox = createOutbox({
    store: memoryStore(),
    send: async ({ id }) => {
      if (refusing && id === refused.id) throw new Refusal('missing', 'This site is closed.');
      return { id, receivedAt: '2026-12-01T06:14:00Z' };
    },
    maySend: () => true,
  });
  await outbox.keep(refused);
  await outbox.keep(outgoing());

  await outbox.flush();
  expect(outbox.list()).toMatchObject([
    { state: 'refused', trouble: 'This site is closed.' },
    { state: 'sent' },
  ]);

  refusing = false;
  await outbox.tryAgain(refused.id);
  expect(outbox.list()[0]?.state).toBe('sent');
});

test('a revision that was superseded meanwhile is told with the receipt', async () => {
  const outbox = createOutbox({
    store: memoryStore(),
    send: async ({ id }) => ({ id, receivedAt: '2026-12-01T06:14:00Z', superseded: true }),
    maySend: () => true,
  });
  await outbox.keep(outgoing());
  await outbox.flush();

  expect(outbox.list()[0]).toMatchObject({ state: 'sent', superseded: true });
});

test('whoever watches is told of each change', async () => {
  const { send } = register();
  const outbox = createOutbox({ store: memoryStore(), send, maySend: () => true });
  const seen: string[] = [];
  outbox.subscribe(() => seen.push(outbox.list()[0]?.state ?? 'none'));

  await outbox.keep(outgoing());
  await outbox.flush();

  expect(seen).toContain('waiting');
  expect(seen.at(-1)).toBe('sent');
});
