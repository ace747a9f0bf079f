import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { hashOf, sha256Hex } from '#shared/kernel/canonical.ts';
import { newId } from '#shared/kernel/ids.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import * as api from '#shared/statements/statements.api.ts';
import { verifyLedgers } from '../../../server/ledger/verify.service.ts';
import { revisions } from '../../../server/statements/statements.table.ts';
import { draftWith, mapNodes, readyDocument } from '../../support/drafts.ts';
import { refusalOf } from '../../support/refusals.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

let world: DemoWorld;
let supervisor: Client;
let officer: Client;
let ready: NodeJson;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  officer = await world.as('safetyOfficer');
  ready = await readyDocument(world, supervisor);
});
afterAll(() => world.close());

async function issued(document = ready) {
  const draft = await draftWith(world, supervisor, document);
  const submitted = await supervisor.call(api.submitDraft, {
    params: { id: draft.id },
    body: { lockVersion: draft.lockVersion },
  });
  return officer.call(api.issueStatement, {
    params: { id: draft.id },
    body: { lockVersion: submitted.lockVersion, material: true, changeNote: '' },
  });
}

test('a statement that is created twice with one id is there once', async () => {
  const id = newId();
  const body = {
    siteId: world.seeded.sites.get('quarry') ?? '',
    title: 'Once',
    starterId: 'roof-trusses-by-hand',
  };

  const first = await supervisor.call(api.createStatement, { params: { id }, body });
  const again = await supervisor.call(api.createStatement, {
    params: { id },
    body: { ...body, title: 'Twice' },
  });

  expect(again).toEqual(first);
  expect(first.document.content?.filter(({ type }) => type === 'step').length).toBeGreaterThan(5);
});

test('a stale save is refused and hands over the stored draft, and nothing is changed', async () => {
  const { id } = await draftWith(world, supervisor, ready);

  const refusal = await refusalOf(
    supervisor.call(api.saveDraft, {
      params: { id },
      body: { lockVersion: 1, title: 'Stale', document: ready },
    }),
  );

  expect(refusal).toMatchObject({
    code: 'conflict',
    extra: { lockVersion: 2, title: 'A draft of a test', updatedBy: 'Sina Vakalahi' },
  });
  expect((refusal?.extra.document as NodeJson).content).toEqual(ready.content);
  expect((await supervisor.call(api.getStatement, { params: { id } })).title).toBe('A draft of a test');
});

test('two saves at the same moment over one version: one is taken, the other is refused', async () => {
  const { id } = await draftWith(world, supervisor, ready);
  const save = (title: string) =>
    supervisor.call(api.saveDraft, { params: { id }, body: { lockVersion: 2, title, document: ready } });

  const results = await Promise.allSettled([save('one'), save('two')]);

  expect(results.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
});

test.each<[string, (document: NodeJson) => NodeJson, RegExp]>([
  [
    'an unknown node',
    (document) => ({ ...document, content: [...(document.content ?? []), { type: 'video' }] }),
    /"video" is not part of a statement/,
  ],
  [
    'an unknown attribute',
    (document) =>
      mapNodes(document, (node) =>
        node.type === 'control' ? { ...node, attrs: { ...node.attrs, colour: 'red' } } : node,
      ),
    /step 1, hazard 1, control 1.*colour/,
  ],
  [
    'a control outside a hazard',
    (document) =>
      mapNodes(document, (node) =>
        node.type === 'step'
          ? {
              ...node,
              content: [
                ...(node.content ?? []),
                { type: 'control', attrs: { id: newId(), origin: null, level: 'ppe', role: '', check: '' } },
              ],
            }
          : node,
      ),
    /A step can't hold a control/,
  ],
  [
    'no title block',
    (document) => ({ ...document, content: document.content?.slice(1) ?? [] }),
    /A doc can't hold a step there/,
  ],
  [
    'two passages of one id',
    (document) => ({
      ...document,
      content: [...(document.content ?? []), ...(document.content?.slice(-1) ?? [])],
    }),
    /Its id is the same as that of step \d+/,
  ],
])('a document with %s is refused, and the words name the place', async (_name, spoil, words) => {
  const { id } = await draftWith(world, supervisor, ready);

  const refusal = await refusalOf(
    supervisor.call(api.saveDraft, {
      params: { id },
      body: { lockVersion: 2, title: 'Spoilt', document: spoil(structuredClone(ready)) },
    }),
  );

  expect(refusal?.code).toBe('invalid');
  expect(refusal?.message).toMatch(words);
  expect((await supervisor.call(api.getStatement, { params: { id } })).lockVersion).toBe(2);
});

test('a document over two megabytes is refused and the limit is named', async () => {
  const { id } = await draftWith(world, supervisor, ready);
  const paragraph = { type: 'paragraph', content: [{ type: 'text', text: 'x'.repeat(2_200_000) }] };

  const refusal = await refusalOf(
    supervisor.call(api.saveDraft, {
      params: { id },
      body: {
        lockVersion: 2,
        title: 'Large',
        document: { ...ready, content: [...(ready.content ?? []), paragraph] },
      },
    }),
  );

  expect(refusal).toMatchObject({ code: 'tooLarge' });
  expect(refusal?.message).toContain('2 MB');
});

test('an issued revision is the canonical form of everything it says, numbered, hashed and in the ledger', async () => {
  const statement = await issued();

  const [revision] = statement.revisions;
  expect(statement).toMatchObject({ state: 'issued', currentRevision: 1 });
  expect(revision).toMatchObject({
    number: 1,
    standing: 'current',
    material: true,
    issuedBy: 'Oskar Brandt',
  });
  const { rows } = await world.db.execute<{ canonical: string }>(
    sql`select canonical from revisions where id = ${revision?.id}`,
  );
  const canonical = rows[0]?.canonical ?? '';
  expect(sha256Hex(canonical)).toBe(revision?.hash);
  expect(hashOf(JSON.parse(canonical))).toBe(revision?.hash);
  expect((await verifyLedgers(world.db))[0]?.faults).toEqual([]);
});

test('nobody issues what they submitted themselves, and only a safety officer issues', async () => {
  const draft = await draftWith(world, officer, ready);
  const submitted = await officer.call(api.submitDraft, {
    params: { id: draft.id },
    body: { lockVersion: 2 },
  });
  const body = { lockVersion: submitted.lockVersion, material: true, changeNote: '' };

  expect(await refusalOf(officer.call(api.issueStatement, { params: { id: draft.id }, body }))).toMatchObject(
    { code: 'forbidden' },
  );
  expect(
    await refusalOf(supervisor.call(api.issueStatement, { params: { id: draft.id }, body })),
  ).toMatchObject({ code: 'forbidden' });
});

test('a submitted draft can’t be written on; it can be taken back, and handed back with a note', async () => {
  const draft = await draftWith(world, supervisor, ready);
  const params = { id: draft.id };
  const submitted = await supervisor.call(api.submitDraft, { params, body: { lockVersion: 2 } });

  const writing = supervisor.call(api.saveDraft, {
    params,
    body: { lockVersion: submitted.lockVersion, title: 'No', document: ready },
  });
  expect(await refusalOf(writing)).toMatchObject({ code: 'conflict' });
  const recalled = await supervisor.call(api.recallDraft, {
    params,
    body: { lockVersion: submitted.lockVersion },
  });
  expect(recalled.state).toBe('draft');
  const again = await supervisor.call(api.submitDraft, {
    params,
    body: { lockVersion: recalled.lockVersion },
  });
  const returned = await officer.call(api.returnDraft, {
    params,
    body: { lockVersion: again.lockVersion, note: 'Say who reads the wind.' },
  });
  expect(returned).toMatchObject({ state: 'draft', returnNote: 'Say who reads the wind.' });
});

test('a frozen revision stays as it is whatever is done to the draft of the next, and is then superseded', async () => {
  const statement = await issued();
  const params = { id: statement.id };
  const before = await officer.call(api.getSheet, { params: { ...params, number: 1 } });

  const revising = await supervisor.call(api.reviseStatement, {
    params,
    body: { lockVersion: statement.lockVersion },
  });
  await supervisor.call(api.saveDraft, {
    params,
    body: { lockVersion: revising.lockVersion, title: 'The next', document: ready },
  });
  const submitted = await supervisor.call(api.submitDraft, {
    params,
    body: { lockVersion: revising.lockVersion + 1 },
  });
  const next = await officer.call(api.issueStatement, {
    params,
    body: { lockVersion: submitted.lockVersion, material: false, changeNote: 'A new title' },
  });

  expect(next.revisions.map(({ number, standing }) => [number, standing])).toEqual([
    [2, 'current'],
    [1, 'superseded'],
  ]);
  const after = await officer.call(api.getSheet, { params: { ...params, number: 1 } });
  expect(after.frozen).toEqual(before.frozen);
  expect(after.revision?.standing).toBe('superseded');
  await expect(world.db.update(revisions).set({ title: 'bent' })).rejects.toThrow();
});

test('whoever has a printed copy learns whether it is current, superseded, withdrawn or unknown, and nothing else', async () => {
  const statement = await issued();
  const hash = statement.revisions[0]?.hash.slice(0, 10) ?? '';
  const visitor = world.client();

  expect(await visitor.call(api.verifyHash, { params: { hash } })).toMatchObject({
    standing: 'current',
    number: 1,
  });
  await officer.call(api.withdrawStatement, {
    params: { id: statement.id },
    body: { lockVersion: statement.lockVersion, reason: 'Job done' },
  });
  expect(await visitor.call(api.verifyHash, { params: { hash } })).toMatchObject({ standing: 'withdrawn' });
  expect(await visitor.call(api.verifyHash, { params: { hash: '0123456789' } })).toEqual({
    standing: 'unknown',
    number: null,
    issuedAt: null,
  });
});

test('a draft that was never issued can be thrown away, an issued one can’t', async () => {
  const draft = await draftWith(world, supervisor, ready);
  const statement = await issued();

  await supervisor.call(api.discardStatement, { params: { id: draft.id } });

  expect(await refusalOf(supervisor.call(api.getStatement, { params: { id: draft.id } }))).toMatchObject({
    code: 'missing',
  });
  expect(
    await refusalOf(supervisor.call(api.discardStatement, { params: { id: statement.id } })),
  ).toMatchObject({ code: 'conflict' });
});
