import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { outcome, quantity } from './inputs.ts';
import { inverseGammaP } from './numerics.ts';
import { about } from './words.ts';

/** Chi-square with one degree of freedom, as tables print it: to three places. */
export const chiSquareOne = (confidence: number): number =>
  Math.round(2 * inverseGammaP(0.5, confidence) * 1000) / 1000;

export const surveySize = defineFigure({
  id: 'surveySize',
  title: 'Sample to estimate a share',
  version: 1,
  summary: 'How many people to ask, or records to look at, to know a share to within a margin.',
  input: z.strictObject({
    population: quantity('People or records in all', '', { least: 1, most: 1e9, whole: true }),
    margin: quantity('Margin', '', { over: 0, most: 0.5, why: 'it is a share, 0.05 for 5 %' }).default(0.05),
    confidence: quantity('Confidence', '', { least: 0.5, most: 0.999 }).default(0.95),
  }),
  output: z.strictObject({
    size: outcome('People or records to take'),
    exact: outcome('Before rounding'),
    chiSquare: outcome('χ², one degree of freedom'),
  }),
  formula:
    's = χ²·N·P·(1 − P) / (d²·(N − 1) + χ²·P·(1 − P)), P = 0.5, rounded to the nearest whole number; χ² to three places as tables print it (3.841 at 95 %).',
  limits: [
    'Drawn by chance. Margin up to 0.5, confidence 0.5 to 0.999.',
    'Rounded to nearest as the published table is; others round up and ask for one more.',
  ],
  caution:
    'For a share of the whole, not for finding a rare fault: for that take the sample to find trouble.',
  sources: [
    {
      title: 'Krejcie and Morgan, Determining sample size for research activities (1970)',
      locator: 'formula and Table 1, all 90 rows',
      verified: 'secondary',
    },
  ],
  calculate: ({ population, margin, confidence }) => {
    const chiSquare = chiSquareOne(confidence);
    const exact = (chiSquare * population * 0.25) / (margin ** 2 * (population - 1) + chiSquare * 0.25);
    return { size: Math.max(1, Math.round(exact)), exact, chiSquare };
  },
  reading: ({ population, margin, confidence }, { size }) =>
    `Take ${size} of ${population}, drawn by chance, to know the share to within ${about(margin * 100, 2)} % with ${about(confidence * 100, 1)} % confidence.`,
  over: () => [],
});
