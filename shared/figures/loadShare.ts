import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { outcome, quantity } from './inputs.ts';
import { atLeast } from './words.ts';

const distance = (label: string) => quantity(label, 'm', { least: 0, most: 100 });

export const loadShare = defineFigure({
  id: 'loadShare',
  title: 'Share of a load',
  version: 1,
  summary: 'How a load is shared by two lifting points, or two people, either side of its centre of gravity.',
  input: z.strictObject({
    loadKg: quantity('Load', 'kg', { over: 0, most: 100_000 }),
    nearM: distance('Centre of gravity to the near point'),
    farM: distance('Centre of gravity to the far point'),
  }),
  output: z.strictObject({ nearKg: outcome('Near point', 'kg'), farKg: outcome('Far point', 'kg') }),
  formula: 'Near = load × far distance / (near + far distance). Far = load − near.',
  limits: [
    'The centre of gravity lies between the points, distances measured level, 0 to 100 m, not both 0. Straight pulls upwards.',
  ],
  caution:
    'The nearer point carries more. A frame with a heavy end or a wet pack has its centre where you don’t expect it: lift a hand’s breadth and look.',
  sources: [
    {
      title: 'Moments about the lifting points',
      locator: 'a rigging page: 10 000 at arms of 8 and 2 gives 8000 and 2000',
      verified: 'secondary',
    },
  ],
  calculate: ({ loadKg, nearM, farM }) => {
    const apart = nearM + farM;
    if (apart === 0) throw refuseInput('farM', 'The two points must be more than 0 m apart.');
    return { nearKg: (loadKg * farM) / apart, farKg: (loadKg * nearM) / apart };
  },
  reading: (_, { nearKg, farKg }) =>
    `The near point carries ${atLeast(nearKg, 0)} kg and the far point ${atLeast(farKg, 0)} kg.`,
  over: () => [],
});
