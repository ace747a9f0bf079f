import { expect, test } from 'vitest';
import type { RegisterRow } from '#shared/signons/register.api.ts';
import { crewToSign, signersInWords } from '../../../src/signons/crew-to-sign.ts';
import { registerUrl } from '../../../src/signons/register-url.ts';
import { countsInWords, countsOf, durationInWords, groupsOf } from '../../../src/signons/register-words.ts';

const row = (statementId: string, personId: string, status: RegisterRow['status']): RegisterRow => ({
  statementId,
  statement: `Statement ${statementId}`,
  siteId: 'site',
  site: 'Lot 12',
  timeZone: 'Australia/Adelaide',
  currentRevision: 2,
  personId,
  name: personId,
  employer: 'Southern Frames',
  trade: 'Framer',
  onCrew: true,
  status,
  signOn: null,
});

test('counts say of how many, and leave out what is nought', () => {
  expect(countsInWords({ current: 5, older: 1, none: 3 }, 2)).toBe(
    '5 of 9 have signed revision 2; 1 signed an older revision; 3 have not signed.',
  );
  expect(countsInWords({ current: 1, older: 0, none: 1 }, 4)).toBe(
    '1 of 2 has signed revision 4; 1 has not signed.',
  );
  expect(countsInWords({ current: 3, older: 0, none: 0 }, 1)).toBe('3 of 3 have signed revision 1.');
});

test('rows of several statements are told apart, each keeping its order and losing nobody', () => {
  const rows = [row('a', 'kit', 'none'), row('b', 'kit', 'current'), row('a', 'lou', 'older')];
  const groups = groupsOf(rows);

  expect(groups.map(({ statementId }) => statementId)).toEqual(['a', 'b']);
  expect(groups[0]?.rows.map(({ personId }) => personId)).toEqual(['kit', 'lou']);
  expect(countsOf(groups[0]?.rows ?? [])).toEqual({ current: 0, older: 1, none: 1 });
});

test('a reading time is told in minutes and seconds', () => {
  expect(durationInWords(4_000)).toBe('4 s');
  expect(durationInWords(125_400)).toBe('2 min 05 s');
});

test('a word in the URL that the register does not know is passed over, the others stand', () => {
  expect(registerUrl.parse({ status: 'perhaps', sort: 'shoeSize', search: 'kit', siteId: '7' })).toEqual({
    search: 'kit',
    sort: 'name',
    direction: 'up',
  });
});

test('the crew stands with what each has to sign, those with nothing left last', () => {
  const people = ['kit', 'ama', 'lou'].map((id) => ({ id, name: id, employer: 'Southern Frames' }));
  const rows = [row('a', 'ama', 'current'), row('a', 'kit', 'older'), row('a', 'lou', 'none')];
  const talk = { topic: 'Leads', missing: [{ personId: 'lou', name: 'lou', employer: '' }] };
  const members = crewToSign(people, rows, [talk]);

  expect(members.map(({ personId, open }) => [personId, open])).toEqual([
    ['kit', ['Statement a, revision 2 again']],
    ['lou', ['Statement a, revision 2', 'talk: Leads']],
    ['ama', []],
  ]);
  expect(signersInWords(members, null)).toBe('1 of 3 has nothing left to sign.');
  expect(signersInWords(members, 'Leads')).toBe('1 of 3 has signed the talk “Leads”.');
});
