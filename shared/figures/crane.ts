import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { outcome, quantity, verdict } from './inputs.ts';
import { slip } from './numerics.ts';
import { about, atLeast } from './words.ts';

export const crane = defineFigure({
  id: 'crane',
  title: 'Crane use',
  version: 1,
  summary: 'How much of the crane’s rated capacity the lift takes, rigging included.',
  input: z.strictObject({
    loadKg: quantity('Load', 'kg', { over: 0, most: 1_000_000 }),
    riggingKg: quantity('Hook, slings and spreader', 'kg', { least: 0, most: 100_000 }),
    ratedKg: quantity('Rated capacity at the working radius', 'kg', {
      over: 0,
      most: 1_000_000,
      help: 'From the crane’s chart at the longest radius of the lift, in this configuration.',
    }),
    limitPercent: quantity('Limit', '%', { over: 0, most: 100, why: 'no lift may pass the chart' }).default(
      75,
    ),
  }),
  output: z.strictObject({
    grossKg: outcome('Load and rigging', 'kg'),
    utilisationPercent: outcome('Of rated capacity', '%'),
    spareKg: outcome('Left under the limit', 'kg'),
    within: verdict('Within the limit'),
  }),
  formula: 'Use = (load + hook, slings and spreader) / rated capacity at the working radius × 100.',
  limits: [
    'The chart’s capacity for this radius, boom, counterweight and ground. Wind, side pull and snatching are not in it.',
  ],
  caution:
    'Over the limit is a lift for a written plan and a bigger crane, not for a try. The crane operator decides.',
  sources: [
    {
      title: '29 CFR 1926.751, critical lift',
      locator: 'over 75 % of rated capacity, or more than one crane; quoted on rigging pages',
      verified: 'secondary',
    },
  ],
  calculate: ({ loadKg, riggingKg, ratedKg, limitPercent }) => {
    const grossKg = loadKg + riggingKg;
    const utilisationPercent = (grossKg / ratedKg) * 100;
    return {
      grossKg,
      utilisationPercent,
      spareKg: (ratedKg * limitPercent) / 100 - grossKg,
      within: utilisationPercent <= limitPercent + slip,
    };
  },
  reading: ({ limitPercent }, { grossKg, utilisationPercent, within }) =>
    `${atLeast(grossKg, 0)} kg on the hook is ${atLeast(utilisationPercent)} % of what the crane may lift here: ${
      within ? 'within' : 'over'
    } the limit of ${about(limitPercent)} %.${within ? '' : ' Don’t lift: shorten the radius, lighten the load or get a bigger crane.'}`,
  over: ({ limitPercent }, { utilisationPercent, within }) =>
    within
      ? []
      : [
          `The lift takes ${atLeast(utilisationPercent)} % of the crane’s capacity, over ${about(limitPercent)} %.`,
        ],
});
