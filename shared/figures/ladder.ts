import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { outcome, quantity, warnings } from './inputs.ts';
import { about, atLeast } from './words.ts';

export const ladder = defineFigure({
  id: 'ladder',
  title: 'Setting a ladder',
  version: 1,
  summary: 'How far out the foot goes and how long the ladder must be.',
  input: z.strictObject({
    landingHeightM: quantity('Height of the landing', 'm', { over: 0, most: 20 }),
    projectionM: quantity('Ladder past the landing', 'm', {
      least: 0,
      most: 3,
      help: 'Along the ladder.',
    }).default(1),
  }),
  output: z.strictObject({
    baseOffsetM: outcome('Foot out from the landing edge', 'm'),
    angleDeg: outcome('Angle to the ground', '°'),
    ladderLengthM: outcome('Ladder length', 'm'),
    quarterLengthOffsetM: outcome('Foot out, a quarter of the working length', 'm'),
    quarterLengthAngleDeg: outcome('Angle, a quarter of the working length', '°'),
    warnings,
  }),
  formula:
    'Foot out = height / 4 (75.96°). Length = √(height² + foot²) + the part past the landing. Other reading of “4 to 1”: foot out = a quarter of the working length along the ladder (75.52°).',
  limits: [
    'Level ground, landing up to 20 m. 4 up and 1 out is counted by height.',
    'The part past the landing is measured along the ladder; straight up it is 3 % less, so 1 m along is 0.97 m up.',
  ],
  caution:
    'For getting up and light work only: tied at the top, footed, three points of contact, one person.',
  sources: [
    {
      title: '4 up, 1 out; 1 m past the landing',
      locator: 'ladder safety pages; Alberta OHS Code s 136',
      verified: 'secondary',
    },
    {
      title: 'WA OSH Regulations 1996',
      locator: 'reg 3.26(1)(a), a quarter of the working length; 900 mm past the landing',
      verified: 'secondary',
    },
    { title: 'Single ladders to 9 m', locator: 'a regulator-style guide', verified: 'secondary' },
  ],
  calculate: ({ landingHeightM, projectionM }) => {
    const baseOffsetM = landingHeightM / 4;
    const ladderLengthM = Math.hypot(landingHeightM, baseOffsetM) + projectionM;
    return {
      baseOffsetM,
      angleDeg: (Math.atan(4) * 180) / Math.PI,
      ladderLengthM,
      quarterLengthOffsetM: landingHeightM / Math.sqrt(15),
      quarterLengthAngleDeg: (Math.acos(0.25) * 180) / Math.PI,
      warnings: [
        ...(projectionM < 0.9
          ? ['Less than 0.9 m past the landing leaves nothing to hold when stepping off.']
          : []),
        ...(ladderLengthM > 9
          ? ['Over 9 m: longer than a single ladder should be. Use a stair or a platform.']
          : []),
      ],
    };
  },
  reading: (_, { baseOffsetM, ladderLengthM, quarterLengthOffsetM }) =>
    `Set the foot ${about(baseOffsetM, 2)} m out and use a ladder of at least ${atLeast(ladderLengthM, 2)} m. Where a rule says a quarter of the working length, the foot is ${about(quarterLengthOffsetM, 2)} m out.`,
  over: (_, { ladderLengthM }) =>
    ladderLengthM > 9
      ? [`A ladder of ${atLeast(ladderLengthM, 2)} m is longer than the 9 m of a single ladder.`]
      : [],
});
