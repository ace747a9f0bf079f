import { afterAll, beforeAll, expect, test } from 'vitest';
import type { Refusal } from '#shared/kernel/refusal.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import { outlineOf } from '#shared/statements/document/outline.ts';
import type { Gap } from '#shared/statements/readiness.ts';
import * as api from '#shared/statements/statements.api.ts';
import { draftWith, mapNodes, readyDocument, withParticulars } from '../../support/drafts.ts';
import { type Client, type DemoWorld, startDemoWorld } from '../../support/server.ts';

/**
 * What model Work Health and Safety Regulations reg 299 asks of a statement (text seen as SA and NT reg 299), held against the issued
 * statement of the demo; and that each is missed when it is not there.
 */

let world: DemoWorld;
let supervisor: Client;
let officer: Client;
let sheet: api.Sheet;
let ready: NodeJson;

beforeAll(async () => {
  world = await startDemoWorld();
  supervisor = await world.as('supervisor');
  officer = await world.as('safetyOfficer');
  const { statements } = await officer.call(api.listStatements, { query: { state: 'issued' } });
  sheet = await officer.call(api.getSheet, { params: { id: statements[0]?.id ?? '', number: 1 } });
  ready = await readyDocument(world, supervisor);
});
afterAll(() => world.close());

const outline = () => sheet.frozen.outline;

test('299(2)(a): the high risk construction work is named, each with its letter of reg 291', () => {
  const { highRisk } = outline().particulars;

  expect(highRisk).toContain('a');
  const names = sheet.frozen.profile.highRisk.filter(({ key }) => highRisk.includes(key));
  expect(names.map(({ clause }) => clause)).toEqual(highRisk.map((key) => `reg 291(${key})`));
});

test('299(2)(b): hazards and the risks from them are specified in every step', () => {
  for (const step of outline().steps) {
    expect(step.hazards.length).toBeGreaterThan(0);
    for (const hazard of step.hazards)
      expect([hazard.title, hazard.prose.join()].every((words) => words.length > 5)).toBe(true);
  }
});

test('299(2)(c): every hazard has measures to control its risk', () => {
  for (const hazard of outline().steps.flatMap(({ hazards }) => hazards))
    expect(hazard.controls.some(({ text }) => text !== '')).toBe(true);
});

test.each(['implementation', 'monitoring', 'review'] as const)(
  '299(2)(d): it is described how the measures are put in place, watched and reviewed: %s',
  (field) => {
    expect(outline().particulars[field].length).toBeGreaterThan(20);
  },
);

test('299(3)(a)(i): the circumstances of the workplace are taken into account, at an address', () => {
  expect(outline().particulars.circumstances.length).toBeGreaterThan(20);
  expect(sheet.frozen.site.address).toContain('Wattle Rise');
});

test('299(3)(a)(ii): the site’s safety management plan is taken into account', () => {
  expect(outline().particulars.managementPlan).toContain('site plan');
});

test('299(3)(b): it is readily accessible and understandable: every step has a card in plain words', () => {
  for (const step of outline().steps) expect(step.card).not.toBe('');
});

/** The gaps that keep a document from being issued. */
async function gapsOnIssue(document: NodeJson): Promise<Gap[]> {
  const draft = await draftWith(world, supervisor, document);
  const submitted = await supervisor.call(api.submitDraft, {
    params: { id: draft.id },
    body: { lockVersion: 2 },
  });
  const refusal = await officer
    .call(api.issueStatement, {
      params: { id: draft.id },
      body: { lockVersion: submitted.lockVersion, material: true, changeNote: '' },
    })
    .then(
      () => null,
      (error: Refusal) => error,
    );
  return (refusal?.extra.gaps ?? []) as Gap[];
}

test('the statement as it stands is issued without a gap (T5: no signature is asked for)', async () => {
  expect(await gapsOnIssue(ready)).toEqual([]);
});

test.each<[string, (document: NodeJson) => NodeJson, string]>([
  ['without high risk work', (document) => withParticulars(document, { highRisk: [] }), 'reg 299(2)(a)'],
  [
    'with a step without hazards',
    (document) => mapNodes(document, (node) => (node.type === 'hazard' ? null : node)),
    'reg 299(2)(b)',
  ],
  [
    'with hazards without controls',
    (document) => mapNodes(document, (node) => (node.type === 'control' ? null : node)),
    'reg 299(2)(c)',
  ],
  [
    'that does not say how it is put in place',
    (document) => withParticulars(document, { implementation: ' ' }),
    'reg 299(2)(d)',
  ],
  [
    'that does not say how it is watched (T4)',
    (document) => withParticulars(document, { monitoring: '' }),
    'reg 299(2)(d)',
  ],
  [
    'that does not say how it is reviewed (T4)',
    (document) => withParticulars(document, { review: '' }),
    'reg 299(2)(d)',
  ],
  [
    'that says nothing of the site (T6)',
    (document) => withParticulars(document, { circumstances: '' }),
    'reg 299(3)(a)(i)',
  ],
])('a statement %s is not issued, and the clause is named', async (_name, spoil, clause) => {
  const gaps = await gapsOnIssue(spoil(structuredClone(ready)));

  expect(gaps.length).toBeGreaterThan(0);
  for (const gap of gaps) expect(gap).toMatchObject({ severity: 'law', clause });
});

test('a statement without risk scores is held back by the product’s own rule; no clause of the law is named for it (T5)', async () => {
  const gaps = await gapsOnIssue(
    mapNodes(structuredClone(ready), (node) =>
      node.type === 'hazard' ? { ...node, attrs: { ...node.attrs, initial: null, residual: null } } : node,
    ),
  );

  expect(gaps.length).toBe(outlineOf(ready).steps.flatMap(({ hazards }) => hazards).length);
  for (const gap of gaps) expect(gap).toMatchObject({ rule: 'rating', severity: 'rule', clause: null });
});

test('an open fill-in keeps a statement from being issued, as the product’s own rule and not as law', async () => {
  const id = outlineOf(ready).fillIns[0]?.id;
  const opened = mapNodes(structuredClone(ready), (node) =>
    node.attrs?.id === id ? { ...node, attrs: { ...node.attrs, value: '' } } : node,
  );

  const gaps = await gapsOnIssue(opened);

  expect(gaps).toHaveLength(1);
  expect(gaps[0]).toMatchObject({ rule: 'fillIn', severity: 'rule', clause: null });
});
