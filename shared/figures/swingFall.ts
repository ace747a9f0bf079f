import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { outcome, quantity } from './inputs.ts';
import { atLeast } from './words.ts';

export const standardGravity = 9.80665;

export const swingFall = defineFigure({
  id: 'swingFall',
  title: 'Swing fall',
  version: 1,
  summary:
    'How far a person who falls to the side of the anchor swings down, and how fast they pass under it.',
  input: z.strictObject({
    verticalM: quantity('Anchor above the harness', 'm', {
      least: 0,
      most: 100,
      help: 'Straight up, taut line.',
    }),
    offsetM: quantity('Distance to the side of the anchor', 'm', { least: 0, most: 100 }),
  }),
  output: z.strictObject({
    extraDropM: outcome('Extra drop', 'm'),
    speedMs: outcome('Speed under the anchor', 'm/s'),
  }),
  formula: 'Extra drop = √(h² + x²) − h. Speed = √(2·g·drop), g = 9.80665 m/s².',
  limits: [
    'A taut line, nothing in the way, no stretch. Distances 0 to 100 m.',
    'The drop comes on top of the clearance for a straight fall.',
  ],
  caution:
    'A swing into a wall or an edge hurts like a fall of the same drop. Move the anchor overhead rather than work to its side.',
  sources: [
    {
      title: 'Pendulum geometry and energy',
      locator: 'no published worked number found',
      verified: 'arithmetic',
    },
  ],
  calculate: ({ verticalM, offsetM }) => {
    const line = Math.hypot(verticalM, offsetM);
    // The same as line − h without losing digits when x is small.
    const extraDropM = line === 0 ? 0 : offsetM ** 2 / (line + verticalM);
    return { extraDropM, speedMs: Math.sqrt(2 * standardGravity * extraDropM) };
  },
  reading: (_, { extraDropM, speedMs }) =>
    `A fall from here swings down ${atLeast(extraDropM, 2)} m further and passes under the anchor at ${atLeast(speedMs)} m/s (${atLeast(speedMs * 3.6, 0)} km/h): keep that path clear and add the drop to the clearance.`,
  over: () => [],
});
