import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { outcome, quantity, verdict } from './inputs.ts';
import { countText } from './text-counts.ts';
import { about } from './words.ts';

const count = (label: string) =>
  quantity(label, '', { least: 1, most: 1e7, whole: true, why: 'without any there is no score' }).optional();

const input = z
  .strictObject({
    text: z
      .string({ error: 'Text must be text.' })
      .max(500_000, 'Text must be at most 500 000 characters.')
      .optional()
      .meta({ title: 'Text, in English' }),
    words: count('Words'),
    sentences: count('Sentences'),
    syllables: count('Syllables'),
  })
  .superRefine(({ text, words, sentences, syllables }, context) => {
    const counts = { words, sentences, syllables };
    const given = Object.values(counts).filter((value) => value !== undefined).length;
    const refuse = (field: string, message: string) =>
      context.addIssue({ code: 'custom', path: [field], message });
    if (text !== undefined && given > 0) refuse('text', 'Give either a text or its counts, not both.');
    if (text === undefined && given === 0)
      refuse('text', 'Text is missing: give a text, or words, sentences and syllables.');
    if (text !== undefined || given === 0) return;
    for (const [field, value] of Object.entries(counts))
      if (value === undefined) refuse(field, 'Words, sentences and syllables must be given together.');
  });

function countsOf({ text, words, sentences, syllables }: z.output<typeof input>) {
  const counts =
    text === undefined
      ? { words: words ?? 0, sentences: sentences ?? 0, syllables: syllables ?? 0 }
      : countText(text);
  if (counts.words === 0 || counts.sentences === 0)
    throw refuseInput(text === undefined ? 'words' : 'text', 'There are no words to score.');
  if (counts.syllables < counts.words)
    throw refuseInput('syllables', 'Syllables must be at least as many as words.');
  if (counts.sentences > counts.words)
    throw refuseInput('sentences', 'Sentences must be at most as many as words.');
  return counts;
}

export const readability = defineFigure({
  id: 'readability',
  title: 'Reading ease',
  version: 1,
  summary: 'How easy an English text is to read: Flesch score and school grade.',
  input,
  output: z.strictObject({
    words: outcome('Words'),
    sentences: outcome('Sentences'),
    syllables: outcome('Syllables'),
    fleschEase: outcome('Flesch reading ease'),
    fleschKincaidGrade: outcome('School grade'),
    counted: verdict('Counted by us'),
  }),
  formula:
    'Reading ease = 206.835 − 1.015·words/sentences − 84.6·syllables/words. Grade = 0.39·words/sentences + 11.8·syllables/words − 15.59.',
  limits: [
    'English only. At least one word; up to 500 000 characters.',
    'Syllables are counted by rule, a few per cent off: near a limit, give a person’s counts.',
  ],
  caution:
    'No law sets a score. Short words in short sentences can still be unclear: ask someone who does the work to say it back.',
  sources: [
    {
      title: 'Kincaid et al. (1975), grade level; Flesch, reading ease',
      locator: 'formulas as copied in reference articles',
      verified: 'secondary',
    },
    {
      title: 'Year 7 as a target',
      locator: 'Australian Government Style Manual, quoted',
      verified: 'secondary',
    },
  ],
  calculate: (given) => {
    const counts = countsOf(given);
    const perSentence = counts.words / counts.sentences;
    const perWord = counts.syllables / counts.words;
    return {
      ...counts,
      fleschEase: 206.835 - 1.015 * perSentence - 84.6 * perWord,
      fleschKincaidGrade: 0.39 * perSentence + 11.8 * perWord - 15.59,
      counted: given.text !== undefined,
    };
  },
  reading: (_, { fleschKincaidGrade, words, sentences }) =>
    `Reads at about school year ${about(Math.max(1, fleschKincaidGrade), 0)} (${about(words / sentences)} words a sentence). ${
      fleschKincaidGrade <= 7
        ? 'Easy enough for most crews.'
        : 'Aim at year 7 or lower: shorter sentences, plainer words.'
    }`,
  over: () => [],
});
