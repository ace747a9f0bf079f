import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { oneOf, outcome, quantity, warnings } from './inputs.ts';
import { about, atLeast } from './words.ts';

export const sling = defineFigure({
  id: 'sling',
  title: 'Sling legs',
  version: 1,
  summary: 'The pull in each sling leg, which grows as the legs spread.',
  input: z.strictObject({
    loadKg: quantity('Load', 'kg', { over: 0, most: 100_000 }),
    legs: oneOf('Legs', '', [1, 2, 3, 4]),
    angleBetweenLegsDeg: quantity('Angle between the legs', '°', {
      least: 0,
      most: 120,
      why: 'beyond it the pull in a leg is more than the load; use longer slings or a spreader',
      help: 'At the hook; between opposite legs where there are more than two.',
    }).default(0),
  }),
  output: z.strictObject({
    factor: outcome('Load over the pull in one leg'),
    legTensionKg: outcome('Pull in each leg', 'kg'),
    legsCounted: outcome('Legs counted'),
    warnings,
  }),
  formula:
    'Factor = 2·cos(angle / 2) for two legs, 1 for one. Pull in each leg = load / factor. Three and four legs are counted as two.',
  limits: [
    'Angle between legs at most 120°. One leg hangs straight, whatever the angle given.',
    'Legs of equal length, load level, its weight midway. Otherwise one leg carries more.',
    'Three and four legs are counted as two: on a stiff load two opposite legs may carry it all.',
    'Choke hitches, edges and reeving take off more: see the sling’s tag.',
  ],
  caution:
    'The tag on the sling, its hitch and its condition come first. A licensed dogger slings and directs the load.',
  sources: [
    {
      title: 'Load factor 2·cos(angle / 2), AS 3775 and dogging guides',
      locator: 'factors 1.93, 1.73, 1.41, 1.00',
      verified: 'memory',
    },
    { title: 'Tension factors', locator: 'a web-sling sheet, 90° to 30°', verified: 'secondary' },
    {
      title: 'Dogging and rigging guide, NSW',
      locator: 'nsw.gov.au, selection and use of slings: at most 120°',
      verified: 'regulator',
    },
  ],
  calculate: ({ loadKg, legs, angleBetweenLegsDeg }) => {
    const factor = legs === 1 ? 1 : 2 * Math.cos((angleBetweenLegsDeg * Math.PI) / 360);
    return {
      factor,
      legTensionKg: loadKg / factor,
      legsCounted: Math.min(legs, 2),
      warnings: [
        ...(legs > 2 ? [`${legs} legs are counted as two: two of them may carry the whole load.`] : []),
        ...(legs > 1 && angleBetweenLegsDeg > 90
          ? ['Over 90° the pull rises fast: use longer slings if there is room.']
          : []),
      ],
    };
  },
  reading: ({ loadKg, legs, angleBetweenLegsDeg }, { legTensionKg }) =>
    legs === 1
      ? `The sling carries the whole ${about(loadKg)} kg.`
      : `Each leg pulls ${atLeast(legTensionKg, 0)} kg with the legs ${about(angleBetweenLegsDeg)}° apart${
          legs > 2 ? `; of the ${legs} legs only two are counted` : ''
        }. Every leg, hook and shackle must be marked for at least that.`,
  over: () => [],
});
