import { describe, expect, test } from 'vitest';
import { readability } from '#shared/figures/readability.ts';
import { countText, syllablesIn } from '#shared/figures/text-counts.ts';

/** Syllables as dictionaries divide the words. */
const dictionary = {
  1: [
    'brace',
    'truss',
    'the',
    'bolt',
    'screw',
    'climbed',
    'holds',
    'edge',
    'eye',
    'stopped',
    'height',
    'crane',
  ],
  2: [
    'ladder',
    'braces',
    'lifted',
    'harness',
    'hammer',
    'table',
    'hazard',
    'ready',
    'steelwork',
    'being',
    'control',
    'doorway',
    'quiet',
  ],
  3: [
    'supervise',
    'area',
    'telephone',
    'officer',
    'equipment',
    'platypus',
    'idea',
    'stability',
    'gradual',
    'unstable',
    'vibrating',
  ],
  4: [
    'reptilian',
    'seemingly an',
    'material',
    'supervision',
    'temporary',
    'immediate',
    'communicate',
    'anybody in',
  ],
  5: ['communication', 'electricity', 'responsibility a', 'examination', 'imagination'],
} as const;

describe('the syllable counter', () => {
  test('is within a twentieth of a dictionary over a list of site words, and mostly right word by word', () => {
    let counted = 0;
    let wanted = 0;
    let right = 0;
    let words = 0;
    for (const [syllables, list] of Object.entries(dictionary))
      for (const word of list.filter((each) => !each.includes(' '))) {
        const found = syllablesIn(word);
        counted += found;
        wanted += Number(syllables);
        words++;
        if (found === Number(syllables)) right++;
      }
    expect(Math.abs(counted / wanted - 1)).toBeLessThan(0.05);
    expect(right / words).toBeGreaterThan(0.85);
  });

  test('is within 8 % of the published 24 for the platypus sentence, where a well-known counter finds 26', () => {
    const { words, sentences, syllables } = countText(
      'The Australian platypus is seemingly a hybrid of a mammal and reptilian creature.',
    );
    expect([words, sentences]).toEqual([13, 1]);
    expect(Math.abs(syllables - 24)).toBeLessThanOrEqual(2);
  });

  test('a word has at least one syllable, a number one for each digit', () => {
    expect(['b', 'é', '漢字', 'nth', '12', 'M10'].map(syllablesIn)).toEqual([1, 1, 1, 1, 2, 3]);
  });
});

describe('counting a text', () => {
  test('decimals and hyphens stay inside a word, list items are sentences', () => {
    expect(countText('Keep 2.4 m clear.')).toMatchObject({ words: 4, sentences: 1 });
    expect(countText('Light-gauge frames\nBrace them\n\nStop!')).toMatchObject({ words: 5, sentences: 3 });
    expect(countText('Really?! Yes.')).toMatchObject({ sentences: 2 });
  });

  test('a plain instruction scores as its counts do', () => {
    const text = readability.compute({
      text: 'Brace the first truss to the ground. Do not climb on a truss until it is braced.',
    });
    const counts = readability.compute({ words: 17, sentences: 2, syllables: 18 });
    expect(text).toEqual({ ...counts, counted: true });
  });
});

describe('input', () => {
  test('a text without words, or counts of 0, get no score', () => {
    for (const text of ['', '   ', '... !!', '\n\n'])
      expect(() => readability.compute({ text })).toThrow('no words to score');
    expect(() => readability.compute({ words: 0, sentences: 1, syllables: 0 })).toThrow('at least 1');
  });

  test('half the counts, counts and a text together, or fewer syllables than words are refused', () => {
    expect(() => readability.compute({ words: 5 })).toThrow('given together');
    expect(() => readability.compute({ text: 'Stop.', words: 1, sentences: 1, syllables: 1 })).toThrow(
      'not both',
    );
    expect(() => readability.compute({ words: 5, sentences: 1, syllables: 4 })).toThrow(
      'at least as many as words',
    );
    expect(() => readability.compute({ words: 5, sentences: 6, syllables: 9 })).toThrow(
      'at most as many as words',
    );
    expect(() => readability.compute({})).toThrow('Text is missing');
  });
});
