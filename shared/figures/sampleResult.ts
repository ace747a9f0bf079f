import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { outcome, quantity } from './inputs.ts';
import { about } from './words.ts';

export const sampleResult = defineFigure({
  id: 'sampleResult',
  title: 'What a sample says',
  version: 1,
  summary: 'The share found in a sample, with the range the true share may lie in.',
  input: z.strictObject({
    hits: quantity('Found', '', { least: 0, most: 1e9, whole: true }),
    size: quantity('Looked at', '', { least: 1, most: 1e9, whole: true }),
    z: quantity('z', '', { over: 0, most: 10, help: '1.96 for 95 %.' }).default(1.96),
  }),
  output: z.strictObject({ share: outcome('Share'), low: outcome('Low end'), high: outcome('High end') }),
  formula: 'Wilson score: (p + z²/2n ± z·√(p·(1 − p)/n + z²/4n²)) / (1 + z²/n), no continuity correction.',
  limits: [
    'Found at most as many as looked at. A sample drawn by chance from many more; for a small whole the range is wider than need be.',
  ],
  caution: 'The range speaks of chance, not of a sample picked to look good.',
  sources: [
    {
      title: 'NIST/SEMATECH engineering statistics handbook',
      locator: 'section 7.2.4.1',
      verified: 'secondary',
    },
    { title: 'Wilson (1927)', locator: 'twelve cases to 1e-12, z = 1.96', verified: 'secondary' },
  ],
  calculate: ({ hits, size, z: score }) => {
    if (hits > size) throw refuseInput('hits', `Found must be at most the ${size} looked at.`);
    const share = hits / size;
    const square = score ** 2 / size;
    const centre = share + square / 2;
    const half = score * Math.sqrt((share * (1 - share)) / size + square / (4 * size));
    return {
      share,
      // Nothing found and everything found end exactly at 0 and 1.
      low: hits === 0 ? 0 : (centre - half) / (1 + square),
      high: hits === size ? 1 : (centre + half) / (1 + square),
    };
  },
  reading: ({ hits, size }, { share, low, high }) =>
    `${hits} of ${size} is ${about(share * 100)} %; the true share may be ${about(low * 100)} to ${about(high * 100)} %.`,
  over: () => [],
});
