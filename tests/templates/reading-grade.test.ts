import { expect, test } from 'vitest';
import { countsOf, readingGrade, syllablesIn } from './reading-grade.ts';

/** Vectors of law.md 9.5: the counts are given, so that the formula is tested apart from the counting. */
test('the grade of given counts is the Flesch–Kincaid grade', () => {
  expect(readingGrade({ words: 13, sentences: 1, syllables: 24 })).toBeCloseTo(11.265, 3);
  expect(readingGrade({ words: 6, sentences: 1, syllables: 6 })).toBeCloseTo(-1.45, 3);
  expect(readingGrade({ words: 1, sentences: 1, syllables: 1 })).toBeCloseTo(-3.4, 3);
  expect(readingGrade({ words: 17, sentences: 2, syllables: 18 })).toBeCloseTo(0.219, 3);
});

test('a text without words has no grade', () => {
  expect(readingGrade(countsOf(''))).toBeNull();
  expect(readingGrade(countsOf('...'))).toBeNull();
});

test('words and sentences of the published short texts are counted as published', () => {
  expect(countsOf('The cat sat on the mat.')).toEqual({ words: 6, sentences: 1, syllables: 6 });
  expect(
    countsOf('Brace the first truss to the ground. Do not climb on a truss until it is braced.'),
  ).toEqual({ words: 17, sentences: 2, syllables: 18 });
});

test('words of the trade have the syllables that a speaker gives them', () => {
  const spoken = {
    brace: 1, braced: 1, trusses: 2, edges: 2, plates: 1, handles: 2, area: 3, ladder: 2, carrying: 3, supervisor: 4,
    emergency: 4, caution: 2, people: 2, manual: 3, electrical: 4, needed: 2, tied: 1, serious: 3, hazard: 2,
  }; // prettier-ignore

  for (const [word, syllables] of Object.entries(spoken))
    expect([word, syllablesIn(word)]).toEqual([word, syllables]);
});
