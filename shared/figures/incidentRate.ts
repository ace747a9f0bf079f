import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { oneOf, outcome, quantity } from './inputs.ts';
import { inverseGammaP } from './numerics.ts';
import { about } from './words.ts';

/** Exact 95 % limits of a Poisson count: χ²(0.025; 2N) / 2 and χ²(0.975; 2N + 2) / 2. */
export function poissonInterval(count: number): { low: number; high: number } {
  return { low: count === 0 ? 0 : inverseGammaP(count, 0.025), high: inverseGammaP(count + 1, 0.975) };
}

export const incidentRate = defineFigure({
  id: 'incidentRate',
  title: 'Incident rate',
  version: 1,
  summary: 'Incidents for hours worked, with the range that chance alone leaves open.',
  input: z.strictObject({
    incidents: quantity('Incidents', '', { least: 0, most: 100_000, whole: true }),
    hoursWorked: quantity('Hours worked', 'h', {
      over: 0,
      most: 1e12,
      why: 'without hours there is no rate, and never a rate of 0',
    }),
    per: oneOf('For each', 'h', [1_000_000, 200_000]),
  }),
  output: z.strictObject({
    rate: outcome('Rate'),
    low: outcome('Low end, 95 %'),
    high: outcome('High end, 95 %'),
  }),
  formula:
    'Rate = incidents × per / hours. Ends: χ²(0.025; 2N) / 2 and χ²(0.975; 2N + 2) / 2 in place of the count N (exact Poisson).',
  limits: [
    'More than 0 hours, at most 100 000 incidents.',
    'For several sites add incidents and hours first, then divide: rates are not averaged.',
  ],
  caution:
    'A small crew’s rate swings by chance. A rate of 0 with few hours says little, and a low rate can mean that people stopped reporting.',
  sources: [
    {
      title: 'How to compute a firm’s incidence rate, US Bureau of Labor Statistics',
      locator: 'data.bls.gov: N / EH × 200 000',
      verified: 'regulator',
    },
    {
      title: 'Lost time injury frequency rate, AS 1885.1-1990',
      locator: 'a million hours; Safe Work Australia page',
      verified: 'secondary',
    },
    {
      title: 'Exact Poisson interval (Garwood 1936)',
      locator: 'checked against scipy',
      verified: 'secondary',
    },
  ],
  calculate: ({ incidents, hoursWorked, per }) => {
    const { low, high } = poissonInterval(incidents);
    const rateOf = (count: number) => (count * per) / hoursWorked;
    return { rate: rateOf(incidents), low: rateOf(low), high: rateOf(high) };
  },
  reading: ({ per }, { rate, low, high }) =>
    `${about(rate, 2)} for each ${per === 1_000_000 ? 'million' : '200 000'} hours; by chance alone the true rate could be ${about(low, 2)} to ${about(high, 2)}.`,
  over: () => [],
});
