import { expect, test } from 'vitest';
import type { Talk } from '#shared/talks/talks.api.ts';
import { newId } from '#shared/kernel/ids.ts';
import { differences, formOf, linesOf, newTalkForm, talkForm } from '../../../src/talks/talk-form.ts';

const talk: Talk = {
  id: newId(),
  siteId: newId(),
  site: 'Lot 12',
  timeZone: 'Australia/Adelaide',
  topic: 'Leads',
  presenter: 'Lou Karsten',
  date: '2026-12-01',
  time: '06:45',
  minutes: 10,
  place: 'Shed',
  points: ['Hang the leads.', 'Press the test button.'],
  mattersRaised: '',
  outcome: '',
  representativePresent: false,
  actions: [{ id: newId(), words: 'Buy hooks', owner: 'Lou Karsten', dueDate: '2026-12-04' }],
  state: 'open',
  lockVersion: 3,
  consultation: false,
  attendance: [],
  missing: [],
  closedAt: null,
  closedBy: null,
  hash: null,
  ledgerSequence: null,
};

test('points are one a line, without bullets and blank lines', () => {
  expect(linesOf(' - Hang the leads.\n\n• Press the test button.  \n')).toEqual(talk.points);
});

test('a talk comes out of its form as it went in', () => {
  expect(talkForm.parse(formOf(talk))).toMatchObject({
    points: talk.points,
    actions: talk.actions,
    minutes: 10,
  });
});

test('a new talk starts now by the site’s own clock, also past midnight', () => {
  const start = newTalkForm(
    { siteId: talk.siteId, timeZone: 'Australia/Adelaide', presenter: 'Lou' },
    new Date('2026-11-30T20:15:00Z'),
  );

  expect(start).toMatchObject({ date: '2026-12-01', time: '06:45' });
});

test('two versions of a talk are compared field by field, in words of both sides', () => {
  const mine = { ...formOf(talk), topic: 'Leads and steel', actions: [] };

  expect(differences(mine, talk)).toEqual([
    { field: 'Topic', mine: 'Leads and steel', theirs: 'Leads' },
    { field: 'Actions', mine: 'none', theirs: 'Buy hooks (Lou Karsten)' },
  ]);
  expect(differences(formOf(talk), talk)).toEqual([]);
});
