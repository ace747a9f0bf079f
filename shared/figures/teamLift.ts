import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { list, outcome, quantity, warnings } from './inputs.ts';
import { noMoreThan } from './words.ts';

export const teamLift = defineFigure({
  id: 'teamLift',
  title: 'Lifting as a team',
  version: 1,
  summary: 'What two, three or four people can lift together: less than the sum of what each can lift.',
  input: z.strictObject({
    individualKg: list(
      'What each person can lift',
      quantity('What one person can lift', 'kg', { over: 0, most: 100 }),
      2,
      4,
    ),
  }),
  output: z.strictObject({
    sumKg: outcome('Sum of each', 'kg'),
    factor: outcome('Share of the sum'),
    teamKg: outcome('What the team can lift', 'kg'),
    warnings,
  }),
  formula:
    'Team = share × sum of what each can lift here; share two thirds for two people, one half for three.',
  limits: [
    'Two to four people. The guidance gives no share for four; one half is used, with care.',
    'What each can lift is for this lift: reach, height and grip as they are, not at best.',
  ],
  caution:
    'The lifting equation for one person does not cover teams; this is an approximate guide. On steps and slopes most of the weight falls on the lower people.',
  sources: [{ title: 'HSE L23, Manual handling', locator: 'guidance, paragraph 120', verified: 'secondary' }],
  calculate: ({ individualKg }) => {
    const sumKg = individualKg.reduce((sum, kg) => sum + kg, 0);
    const factor = individualKg.length === 2 ? 2 / 3 : 1 / 2;
    const four =
      'Four people are at the edge of what works: bigger teams are unlikely to work, and no share is published for four. Use a machine if you can.';
    return { sumKg, factor, teamKg: sumKg * factor, warnings: individualKg.length === 4 ? [four] : [] };
  },
  reading: ({ individualKg }, { teamKg }) =>
    `${individualKg.length} people together should lift no more than ${noMoreThan(teamKg)} kg${
      individualKg.length === 4 ? ', and four is unlikely to work well: use a machine if you can' : ''
    }.`,
  over: () => [],
});
