import { expect, test } from 'vitest';
import { declarationFileSchema, fillWords } from '#shared/library/declaration.ts';
import { filesOf } from './files.ts';
import { countsOf, readingGrade } from './reading-grade.ts';

const files = filesOf('declarations').map(({ file, json }) => ({
  file,
  declaration: declarationFileSchema.parse(json),
}));
const au = files.find(({ file }) => file === 'au.json')?.declaration;
if (!au) throw new Error('au.json is missing');

test('every declaration file has the name of its id', () => {
  expect(files.map(({ declaration }) => `${declaration.id}.json`)).toEqual(files.map(({ file }) => file));
});

/** law.md 7.10: consulted; shown or read this revision in a language understood; knows the controls; will stop and tell. */
test('the words signed with a statement hold the four things that make a sign-on worth keeping, and the consent to sign so', () => {
  const said = au.statement.words.join(' ');

  expect(said).toMatch(/I was consulted/);
  expect(said).toMatch(/revision \{\{revision\}\}.*language that I understand/);
  expect(said).toMatch(/know the hazards and the controls for my tasks/);
  expect(said).toMatch(/I will stop and tell the supervisor/);
  expect(said).toMatch(/I agree to sign electronically/);
});

/** law.md 7.1: nothing in regs 299 to 303 asks workers to sign. */
test('no words claim that the law makes people sign', () => {
  const said = [...au.statement.words, ...au.talk.words, ...au.notice.paragraphs].join(' ');

  expect(said).not.toMatch(/(required|must|have to|obliged)[^.]*\bsign\b[^.]*\b(law|legal)/i);
  expect(said).not.toMatch(
    /\b(law|legal|legally)\b[^.]*\b(requires?|says?|makes?)\b(?! that you have to sign\.)[^.]*\bsign\b/i,
  );
  expect(said).toContain('It does not say that you have to sign.');
});

/** law.md 7.7 (APP 5): the matters of a collection notice. */
test.each([
  ['who collects, and how to reach them', /\{\{organisation\}\}.*\{\{contact\}\}/],
  ['what is collected, and how', /What we collect, from you and from this phone/],
  ['whether law requires it', /law asks us.*does not say that you have to sign/],
  ['the purposes', /Why: /],
  ['what happens if it is not given', /If you do not want to give this/],
  ['who usually receives it', /Who sees it: /],
  [
    'where access, correction and complaints are told',
    /privacy policy says how you can see and correct.*complain/,
  ],
  ['recipients in other countries', /another country/],
])('the collection notice says %s', (_matter, pattern) => {
  expect(au.notice.paragraphs.join(' ')).toMatch(pattern);
});

test('the words to be signed and the notice read at grade 8 or less', () => {
  for (const words of [au.statement.words, au.talk.words, au.notice.paragraphs])
    expect(readingGrade(countsOf(words.join(' ')))).toBeLessThanOrEqual(8);
});

test('words are filled whole, and words with a hole are refused', () => {
  const filled = fillWords(au.talk.words, { topic: 'Wind', date: '1 December 2026' });

  expect(filled[0]).toBe('I was at the talk “Wind” on 1 December 2026.');
  expect(() => fillWords(au.talk.words, { topic: 'Wind' })).toThrow('date');
});

test('a declaration with a placeholder that nobody fills is refused', () => {
  const broken = { ...au, talk: { ...au.talk, words: ['I was at {{place}}.'] } };

  expect(declarationFileSchema.safeParse(broken).success).toBe(false);
});
