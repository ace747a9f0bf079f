import { expect, test } from 'vitest';
import { type AuditFacts, exceptionsOf } from '#shared/audit/exceptions.ts';

const where = { siteId: 'site', site: 'Lot 7', timeZone: 'Australia/Adelaide' };
const bree = { personId: 'bree', person: 'Bree Ashcombe', employer: 'Ridgeline' };
const kit = { personId: 'kit', person: 'Kit Marlowe-Hale', employer: 'Ridgeline' };
const at = '2026-03-02T20:00:00.000Z';
const now = new Date('2026-03-03T00:00:00.000Z');

type Statement = AuditFacts['statements'][number];
const statementOf = (changes: Partial<Statement>): Statement => ({
  ...where,
  statementId: 'statement',
  title: 'Roof trusses',
  current: 1,
  wordsOnCards: 600,
  revisions: [{ number: 1, material: true }],
  crew: [bree],
  signOns: [],
  ...changes,
});
const signedBy = (personId: string, changes: Partial<Statement['signOns'][number]> = {}) => ({
  id: `sign-on-${personId}`,
  personId,
  revision: 1,
  signedAt: at,
  readingMs: 300_000,
  ...changes,
});
const ofStatement = (changes: Partial<Statement>) =>
  exceptionsOf({ statements: [statementOf(changes)], talks: [] }, now);

test('somebody of the crew who has not signed is shown with the register as evidence', () => {
  expect(ofStatement({})).toEqual([
    {
      ...where,
      ...bree,
      kind: 'notSigned',
      words: 'Has not signed “Roof trusses”, revision 1.',
      at: null,
      evidence: '/register?statementId=statement&status=none',
    },
  ]);
});

test('somebody who signed the revision in force at a reader’s pace is no exception', () => {
  expect(ofStatement({ signOns: [signedBy('bree')] })).toEqual([]);
});

test('a signature under an older revision is shown once a material revision followed, with that sign-on as evidence', () => {
  const revisions = [
    { number: 1, material: true },
    { number: 2, material: true },
  ];

  expect(ofStatement({ revisions, current: 2, signOns: [signedBy('bree')] })).toMatchObject([
    {
      kind: 'signedOlder',
      words: 'Signed revision 1 of “Roof trusses”; revision 2 is in force.',
      at,
      evidence: '/sign-ons/sign-on-bree',
    },
  ]);
  expect(ofStatement({ revisions, current: 2, signOns: [signedBy('bree', { revision: 2 })] })).toEqual([]);
});

test('a signature still counts after a revision that changes nothing that matters', () => {
  const revisions = [
    { number: 1, material: true },
    { number: 2, material: false },
  ];

  expect(ofStatement({ revisions, current: 2, signOns: [signedBy('bree')] })).toEqual([]);
});

// 600 words a minute is our own line: 600 words take a minute, no less.
test.each([
  [59_999, 'Passed 600 words of “Roof trusses” in 60 seconds.'],
  [6_000, 'Passed 600 words of “Roof trusses” in 6 seconds.'],
  [1_000, 'Passed 600 words of “Roof trusses” in 1 second.'],
  [0, 'Passed 600 words of “Roof trusses” in 1 second.'],
])('600 words in %i ms are shown as read too fast', (readingMs, words) => {
  expect(ofStatement({ signOns: [signedBy('bree', { readingMs })] })).toMatchObject([
    { kind: 'readTooFast', words, at, evidence: '/sign-ons/sign-on-bree' },
  ]);
});

test('600 words in a full minute, and a statement of a few words, are not shown as read too fast', () => {
  expect(ofStatement({ signOns: [signedBy('bree', { readingMs: 60_000 })] })).toEqual([]);
  expect(ofStatement({ wordsOnCards: 49, signOns: [signedBy('bree', { readingMs: 0 })] })).toEqual([]);
});

test('a person has one exception a statement: an old signature is not called too fast as well', () => {
  const revisions = [
    { number: 1, material: true },
    { number: 2, material: true },
  ];

  const found = ofStatement({ revisions, current: 2, signOns: [signedBy('bree', { readingMs: 0 })] });

  expect(found.map(({ kind }) => kind)).toEqual(['signedOlder']);
});

test('whoever signed but is not on the crew is nobody’s exception', () => {
  expect(ofStatement({ crew: [], signOns: [signedBy('bree', { readingMs: 0 })] })).toEqual([]);
});

const talk = { ...where, talkId: 'talk', topic: 'The wind number', date: '2026-03-02', closedAt: at };

test('whoever was expected at a talk and was not there is shown, with the talk as evidence', () => {
  const found = exceptionsOf(
    { statements: [], talks: [{ ...talk, expected: [bree, kit], attended: ['bree', 'visitor'] }] },
    now,
  );

  expect(found).toEqual([
    {
      ...where,
      ...kit,
      kind: 'talkMissed',
      words: 'Was not at “The wind number” on 2026-03-02.',
      at,
      evidence: '/talks/talk',
    },
  ]);
});

// Thirty days is our own line: closed on 2 March at 20:00, last shown on 1 April at 20:00.
test.each([
  ['2026-04-01T20:00:00.000Z', 1],
  ['2026-04-01T20:00:00.001Z', 0],
])('at %s a talk that was closed thirty days ago is shown %i times', (moment, times) => {
  const facts = { statements: [], talks: [{ ...talk, expected: [bree], attended: [] }] };

  expect(exceptionsOf(facts, new Date(moment))).toHaveLength(times);
});

test('nothing to look at gives no exceptions', () => {
  expect(exceptionsOf({ statements: [], talks: [] }, now)).toEqual([]);
});
