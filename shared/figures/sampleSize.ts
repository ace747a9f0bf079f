import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { outcome, quantity } from './inputs.ts';
import { about } from './words.ts';

export const sampleSize = defineFigure({
  id: 'sampleSize',
  title: 'Sample to find trouble',
  version: 1,
  summary: 'How many records to look at so that a share of bad ones would show at least once.',
  input: z.strictObject({
    population: quantity('Records in all', '', { least: 1, most: 1_000_000, whole: true }),
    tolerableShare: quantity('Share that may not go unseen', '', {
      over: 0,
      most: 1,
      why: 'it is a share, 0.05 for 5 %',
    }),
    confidence: quantity('Confidence', '', { least: 0.5, below: 1, why: 'certainty takes every record' }),
  }),
  output: z.strictObject({
    size: outcome('Records to look at'),
    bad: outcome('Bad records to be found'),
    chanceOfNone: outcome('Chance of seeing none of them'),
  }),
  formula:
    'Bad = share × records, rounded up. The least n for which C(N − bad, n) / C(N, n) ≤ 1 − confidence.',
  limits: [
    '1 to 1 000 000 records, confidence 0.5 to under 1.',
    'Records drawn by chance, none left out. A sample picked by hand proves nothing.',
  ],
  caution:
    'Finding none says that the share is probably below the one you gave, not that there are none. One found: look at all of that kind.',
  sources: [
    {
      title: 'Hypergeometric distribution',
      locator: 'checked against scipy; sizes as in published detection tables',
      verified: 'secondary',
    },
  ],
  calculate: ({ population, tolerableShare, confidence }) => {
    // 0.07 × 100 is a hair over 7, and 1 − 0.95 a hair under 0.05.
    const bad = Math.max(1, Math.ceil(population * tolerableShare * (1 - 1e-12)));
    const most = (1 - confidence) * (1 + 1e-12);
    let size = 0;
    let chance = 1;
    while (chance > most) {
      chance *= Math.max(0, population - bad - size) / (population - size);
      size++;
    }
    return { size, bad, chanceOfNone: chance };
  },
  reading: ({ population, confidence }, { size, bad }) =>
    `Look at ${size} of ${population} records, drawn by chance: if ${bad} or more are bad, at least one shows with ${about(confidence * 100, 2)} % confidence.`,
  over: () => [],
});
