import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { choice, outcome, quantity } from './inputs.ts';
import { type Grip, frequencyRows, gripFactors, gripNames, leftOut } from './lifting-tables.ts';
import { slip } from './numerics.ts';
import { about, noMoreThan } from './words.ts';

const beyond = 'beyond it the equation gives a limit of 0 kg';

const handsAt = {
  horizontalCm: quantity('Hands out from the ankles', 'cm', {
    least: 0,
    most: 63,
    why: beyond,
    help: 'From midway between the ankles to midway between the hands.',
  }),
  verticalCm: quantity('Hands above the floor', 'cm', { least: 0, most: 175, why: beyond }),
  asymmetryDeg: quantity('Twist', '°', { least: 0, most: 135, why: beyond }),
  coupling: choice(
    'Grip',
    gripNames,
    'Good: handles or a comfortable full grip. Poor: bulky, sharp or sagging.',
  ),
};

const input = z.strictObject({
  loadKg: quantity('Load', 'kg', { over: 0, most: 1000 }),
  ...handsAt,
  travelCm: quantity('Height lifted through', 'cm', { least: 0, most: 175, why: beyond }),
  liftsPerMinute: quantity('Lifts a minute', '', {
    least: 0,
    most: 15,
    why: beyond,
    help: 'Averaged over 15 minutes.',
  }),
  durationHours: quantity('Time spent lifting', 'h', {
    over: 0,
    most: 8,
    why: 'the equation covers no longer day',
  }),
  destination: z.strictObject(handsAt).optional().meta({
    title: 'Where it is put down',
    description: 'Give it when the load must be placed with care.',
  }),
});
type Hands = Pick<z.output<typeof input>, 'horizontalCm' | 'verticalCm' | 'asymmetryDeg' | 'coupling'>;

const factors = {
  hm: outcome('Reach factor'),
  vm: outcome('Height factor'),
  dm: outcome('Distance factor'),
  am: outcome('Twist factor'),
  fm: outcome('Frequency factor'),
  cm: outcome('Grip factor'),
};

const output = z.strictObject({
  ...factors,
  rwlKg: outcome('Recommended limit for one person', 'kg'),
  liftingIndex: outcome('Load over limit'),
  originRwlKg: outcome('Limit where it is picked up', 'kg'),
  destination: z
    .strictObject({
      ...factors,
      rwlKg: outcome('Limit where it is put down', 'kg'),
      liftingIndex: outcome('Load over limit'),
    })
    .optional()
    .meta({ title: 'Where it is put down' }),
  leftOut: z.array(z.string()).meta({ title: 'The equation leaves out' }),
});

const loadConstantKg = 23;

/** Table 5, straight between its rows; the height is that of the pick-up. Past the last row that isn't 0 the limit would be 0 kg. */
export function frequencyFactor(liftsPerMinute: number, durationHours: number, verticalCm: number): number {
  const column = durationHours <= 1 ? 'oneHour' : durationHours <= 2 ? 'twoHours' : 'eightHours';
  const side = verticalCm < 75 ? 0 : 1;
  const rows = frequencyRows.filter((row) => row[column][side] > 0);
  const lifts = Math.max(liftsPerMinute, 0.2);
  const next = rows.findIndex((row) => row.lifts >= lifts);
  const upper = rows[next];
  if (!upper)
    throw refuseInput(
      'liftsPerMinute',
      `Lifts a minute must be at most ${rows.at(-1)?.lifts} for this time and height: ${beyond}.`,
    );
  const lower = rows[next - 1];
  if (!lower || upper.lifts === lifts) return upper[column][side];
  const part = (lifts - lower.lifts) / (upper.lifts - lower.lifts);
  return lower[column][side] + part * (upper[column][side] - lower[column][side]);
}

const gripFactor = (grip: Grip, verticalCm: number): number => gripFactors[grip][verticalCm < 75 ? 0 : 1];

function limitAt({ horizontalCm, verticalCm, asymmetryDeg, coupling }: Hands, travelCm: number, fm: number) {
  const hm = 25 / Math.max(horizontalCm, 25);
  const vm = 1 - 0.003 * Math.abs(verticalCm - 75);
  const dm = 0.82 + 4.5 / Math.max(travelCm, 25);
  const am = 1 - 0.0032 * asymmetryDeg;
  const cm = gripFactor(coupling, verticalCm);
  return { hm, vm, dm, am, fm, cm, rwlKg: loadConstantKg * hm * vm * dm * am * fm * cm };
}

export const lifting = defineFigure({
  id: 'lifting',
  title: 'Lifting by one person',
  version: 1,
  summary: 'How much one person should lift here, and how far the load is over it.',
  input,
  output,
  formula:
    'Limit = 23 kg × reach × height × distance × twist × frequency × grip. Reach = 25 / H; height = 1 − 0.003·|V − 75|; distance = 0.82 + 4.5 / D; twist = 1 − 0.0032·A; frequency and grip from the tables. H and D below 25 cm count as 25; fewer than 0.2 lifts a minute count as 0.2. Lifting index = load / limit.',
  limits: [
    'Hands at most 63 cm out and 175 cm up, lifted through at most 175 cm, twist at most 135°, as often as the table goes (at most 15 a minute).',
    'Metric constants throughout; the pound constants are not exact conversions.',
    'Where the load must be placed with care, give the putting-down too: the lower of the two limits holds.',
    ...leftOut,
  ],
  caution:
    'An index over 1 means that some people are at raised risk, over 3 that nearly all are. Under the limit isn’t a promise: people differ.',
  sources: [
    {
      title: 'Applications manual for the revised NIOSH lifting equation, NIOSH 94-110 (revised 9/2021)',
      locator: 'sections 1.2 and 1.3, Tables 5 and 7; doi 10.26616/NIOSHPUB94110revised092021',
      verified: 'secondary',
    },
  ],
  calculate: ({ loadKg, travelCm, liftsPerMinute, durationHours, destination, ...hands }) => {
    const fm = frequencyFactor(liftsPerMinute, durationHours, hands.verticalCm);
    const origin = limitAt(hands, travelCm, fm);
    const there = destination && limitAt(destination, travelCm, fm);
    const rwlKg = Math.min(origin.rwlKg, there?.rwlKg ?? Infinity);
    return {
      ...origin,
      rwlKg,
      liftingIndex: loadKg / rwlKg,
      originRwlKg: origin.rwlKg,
      ...(there ? { destination: { ...there, liftingIndex: loadKg / there.rwlKg } } : {}),
      leftOut: [...leftOut],
    };
  },
  reading: ({ loadKg }, { rwlKg, liftingIndex, originRwlKg }) => {
    const limit = `One person should lift no more than ${noMoreThan(rwlKg)} kg here${
      rwlKg < originRwlKg ? ' (the putting-down decides)' : ''
    }`;
    if (liftingIndex <= 1 + slip) return `${limit}; ${about(loadKg)} kg is within it.`;
    return `${limit}. ${about(loadKg)} kg is ${about(liftingIndex)} times that: use a machine or more people, split the load, or bring it closer.`;
  },
  over: ({ loadKg }, { rwlKg, liftingIndex }) =>
    liftingIndex > 1 + slip
      ? [`${about(loadKg)} kg is over the recommended limit of ${noMoreThan(rwlKg)} kg for one person.`]
      : [],
});
