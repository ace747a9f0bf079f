import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { hashOf, sha256Hex } from '#shared/kernel/canonical.ts';
import { newId } from '#shared/kernel/ids.ts';
import type { Gap } from '#shared/statements/readiness.ts';
import { outlineOf } from '#shared/statements/document/outline.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import * as api from '#shared/statements/statements.api.ts';
import { verifyLedgers } from '../../../server/ledger/verify.service.ts';
import { revisions } from '../../../server/statements/statements.table.ts';
import { draftWith, mapNodes, readyDocument, withParticulars } from '../../support/drafts.ts';
import { codesOf, refusalOf } from '../../support/refusals.ts';
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

test('a save that is sent again because its answer went missing is taken as saved, and is no quarrel with oneself', async () => {
  const { id } = await draftWith(world, supervisor, ready);
  const save = (title: string) =>
    supervisor.call(api.saveDraft, { params: { id }, body: { lockVersion: 2, title, document: ready } });

  const first = await save('Sent twice');
  expect(await save('Sent twice')).toEqual(first);

  expect(await refusalOf(save('Sent over another'))).toMatchObject({ code: 'conflict' });
  expect((await supervisor.call(api.getStatement, { params: { id } })).lockVersion).toBe(3);
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
  [
    'a character that can’t be kept',
    (document) => withText(document, 'a\0b'),
    /character that can’t be kept/,
  ],
  ['half a character', (document) => withText(document, 'a\ud83db'), /character that can’t be kept/],
  [
    'nesting without end',
    (document) => {
      let inner: NodeJson = { type: 'paragraph' };
      for (let depth = 0; depth < 400; depth++) inner = { type: 'bulletList', content: [inner] };
      return { ...document, content: [...(document.content ?? []), inner] };
    },
    /nested too deeply/,
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

const withText = (document: NodeJson, text: string): NodeJson => ({
  ...document,
  content: [...(document.content ?? []), { type: 'paragraph', content: [{ type: 'text', text }] }],
});

test('a document nested so deeply that reading it would overflow is refused in words', async () => {
  const { id } = await draftWith(world, supervisor, ready);
  const document = '{"type":"bulletList","content":['.repeat(30_000) + ']}'.repeat(30_000);

  const response = await supervisor.fetch(`/api/statements/${id}/draft`, {
    method: 'PUT',
    body: `{"lockVersion":2,"title":"Deep","document":${document}}`,
  });

  expect(response.status).toBe(400);
  expect(await response.json()).toMatchObject({
    code: 'invalid',
    fields: { document: expect.stringContaining('deeply') },
  });
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

test('an act on a statement that moved on says so: by its state where that says more, else that it was changed', async () => {
  const draft = await draftWith(world, supervisor, ready);
  const params = { id: draft.id };
  const body = { lockVersion: draft.lockVersion };
  const submitted = await supervisor.call(api.submitDraft, { params, body });

  expect(await refusalOf(supervisor.call(api.submitDraft, { params, body }))).toMatchObject({
    code: 'conflict',
    message: 'Only a draft can be submitted.',
    extra: { state: 'submitted' },
  });
  expect(
    await refusalOf(
      officer.call(api.issueStatement, { params, body: { ...body, material: true, changeNote: '' } }),
    ),
  ).toMatchObject({
    code: 'conflict',
    message: expect.stringContaining('changed since you opened it'),
    extra: { state: 'submitted', lockVersion: submitted.lockVersion },
  });
  expect((await officer.call(api.getStatement, { params })).revisions).toEqual([]);
});

test('in every state only its own acts are taken, and the rest change nothing', async () => {
  const acts: Record<string, (id: string, lockVersion: number) => Promise<unknown>> = {
    save: (id, lockVersion) =>
      supervisor.call(api.saveDraft, {
        params: { id },
        body: { lockVersion, title: 'New', document: ready },
      }),
    submit: (id, lockVersion) => supervisor.call(api.submitDraft, { params: { id }, body: { lockVersion } }),
    recall: (id, lockVersion) => supervisor.call(api.recallDraft, { params: { id }, body: { lockVersion } }),
    return: (id, lockVersion) =>
      officer.call(api.returnDraft, { params: { id }, body: { lockVersion, note: 'No' } }),
    issue: (id, lockVersion) =>
      officer.call(api.issueStatement, {
        params: { id },
        body: { lockVersion, material: true, changeNote: '' },
      }),
    revise: (id, lockVersion) =>
      supervisor.call(api.reviseStatement, { params: { id }, body: { lockVersion } }),
    withdraw: (id, lockVersion) =>
      officer.call(api.withdrawStatement, { params: { id }, body: { lockVersion, reason: 'Done' } }),
    discard: (id) => supervisor.call(api.discardStatement, { params: { id } }),
  };
  const draft = await draftWith(world, supervisor, ready);
  const submitted = await draftWith(world, supervisor, ready);
  await supervisor.call(api.submitDraft, { params: { id: submitted.id }, body: { lockVersion: 2 } });
  const inForce = await issued();
  const withdrawn = await issued();
  await officer.call(api.withdrawStatement, {
    params: { id: withdrawn.id },
    body: { lockVersion: withdrawn.lockVersion, reason: 'Done' },
  });
  const taken = {
    [draft.id]: ['save', 'submit', 'discard'],
    [submitted.id]: ['recall', 'return', 'issue', 'discard'],
    [inForce.id]: ['revise', 'withdraw'],
    [withdrawn.id]: [],
  } as Record<string, string[]>;

  for (const [id, own] of Object.entries(taken)) {
    const before = await officer.call(api.getStatement, { params: { id } });
    for (const [name, act] of Object.entries(acts).filter(([name]) => !own.includes(name)))
      expect([before.state, name, (await refusalOf(act(id, before.lockVersion)))?.code]).toEqual([
        before.state,
        name,
        'conflict',
      ]);
    expect(await officer.call(api.getStatement, { params: { id } })).toEqual(before);
  }
});

test('two safety officers who issue at the same moment make one revision and one entry', async () => {
  const draft = await draftWith(world, supervisor, ready);
  const params = { id: draft.id };
  const { lockVersion } = await supervisor.call(api.submitDraft, { params, body: { lockVersion: 2 } });
  const issue = () =>
    officer.call(api.issueStatement, { params, body: { lockVersion, material: true, changeNote: '' } });

  expect((await codesOf([issue(), issue(), issue()])).sort()).toEqual(['conflict', 'conflict', undefined]);

  const { revisions: all } = await officer.call(api.getStatement, { params });
  expect(all).toHaveLength(1);
  const { rows } = await world.db.execute(
    sql`select 1 from ledger_entries where subject = ${`revision:${all[0]?.id}`}`,
  );
  expect(rows).toHaveLength(1);
});

test('the first revision is for everybody to sign, whatever was ticked', async () => {
  const draft = await draftWith(world, supervisor, ready);
  const params = { id: draft.id };
  const { lockVersion } = await supervisor.call(api.submitDraft, { params, body: { lockVersion: 2 } });

  const statement = await officer.call(api.issueStatement, {
    params,
    body: { lockVersion, material: false, changeNote: '' },
  });

  expect(statement.revisions[0]?.material).toBe(true);
});

test('a rating off the matrix, a residual risk above the initial one and high risk work that the law does not list keep a draft back', async () => {
  const first = outlineOf(ready).steps[0]?.hazards[0]?.id;
  const rated = (changes: object) =>
    mapNodes(structuredClone(ready), (node) =>
      node.attrs?.id === first ? { ...node, attrs: { ...node.attrs, ...changes } } : node,
    );
  const gapsOf = async (document: NodeJson) => {
    const draft = await draftWith(world, supervisor, document);
    const params = { id: draft.id };
    const { lockVersion } = await supervisor.call(api.submitDraft, { params, body: { lockVersion: 2 } });
    const refusal = await refusalOf(
      officer.call(api.issueStatement, { params, body: { lockVersion, material: true, changeNote: '' } }),
    );
    return ((refusal?.extra.gaps ?? []) as Gap[]).map(({ rule, place }) => [rule, place]);
  };
  const place = { kind: 'node', id: first };

  expect(await gapsOf(rated({ residual: { likelihood: 'Q', consequence: 5 } }))).toEqual([['rating', place]]);
  expect(
    await gapsOf(
      rated({
        initial: { likelihood: 'E', consequence: 1 },
        residual: { likelihood: 'C', consequence: 3 },
      }),
    ),
  ).toEqual([['residual', place]]);
  expect(await gapsOf(rated({ residual: { likelihood: 'A', consequence: 5 } }))).toEqual([
    ['residual', place],
  ]);
  expect(await gapsOf(withParticulars(structuredClone(ready), { highRisk: ['zz'] }))).toEqual([
    ['highRisk', { kind: 'titleBlock', field: 'highRisk' }],
  ]);
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

test('where the digits typed begin the hash of more than one revision, more are asked for instead of a guess', async () => {
  const statement = await issued();
  const [{ id = '', hash = '' } = {}] = statement.revisions;
  const twin = `${hash.slice(0, 12)}${'0'.repeat(52)}`;
  await world.db.execute(
    sql`insert into revisions select (r).* from (select jsonb_populate_record(revisions, jsonb_build_object('id', gen_random_uuid(), 'number', 99, 'hash', ${twin}::text)) as r from revisions where id = ${id}) as copies`,
  );
  const visitor = world.client();
  const verify = (digits: string) => visitor.call(api.verifyHash, { params: { hash: digits } });

  expect(await refusalOf(verify(hash.slice(0, 10)))).toMatchObject({ code: 'conflict' });
  expect((await verify(hash)).number).toBe(1);
  expect(await refusalOf(verify(hash.slice(0, 9)))).toMatchObject({ code: 'invalid' });
  expect(await refusalOf(verify(`${hash.slice(0, 9)}%`))).toMatchObject({ code: 'invalid' });
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
