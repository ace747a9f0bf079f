import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { list, outcome, quantity, rowName } from './inputs.ts';
import { slip } from './numerics.ts';
import { about, listed, noLongerThan } from './words.ts';

export const actionMs2 = 2.5;
export const limitMs2 = 5;

const partial = { a8Ms2: outcome('A(8)', 'm/s²'), points: outcome('Exposure points') };

export const vibration = defineFigure({
  id: 'vibration',
  title: 'Hand-arm vibration over the day',
  version: 1,
  summary: 'The day’s vibration from its tools, and how long each may run.',
  input: z.strictObject({
    tools: list(
      'Tools',
      z.strictObject({
        name: rowName,
        magnitudeMs2: quantity('Vibration in use', 'm/s²', {
          over: 0,
          most: 100,
          help: 'Vector total of the worse hand; the maker’s figure is often too low on site.',
        }),
        hours: quantity('Trigger time', 'h', {
          over: 0,
          most: 24,
          help: 'Only while the tool runs in the hand.',
        }),
      }),
      1,
      30,
    ),
  }),
  output: z.strictObject({
    ...partial,
    perTool: z.array(z.strictObject(partial)).meta({ title: 'Each tool alone' }),
    hoursToAction: z.array(z.number()).meta({ title: 'To the action value, each tool alone', unit: 'h' }),
    hoursToLimit: z.array(z.number()).meta({ title: 'To the limit, each tool alone', unit: 'h' }),
  }),
  formula:
    'A(8) = √(Σ a²·T / 8). Points = Σ 2·a²·T. Time to a value v = 8·(v / a)². Action value 2.5 m/s² = 100 points, limit 5.0 m/s² = 400 points.',
  limits: [
    'Vibration up to 100 m/s², 24 hours at most.',
    'The action and limit values are those of the United Kingdom and the European Union; Australia has none in law.',
  ],
  caution:
    'Blunt discs and bits, hard concrete and a tight grip shake far more than the figure in the manual. Numb or white fingers: stop and report it, whatever the sum says.',
  sources: [
    {
      title: 'HSE hand-arm vibration ready reckoner',
      locator: 'hse.gov.uk/vibration/hav/readyreckoner.htm',
      verified: 'regulator',
    },
    { title: 'Directive 2002/44/EC', locator: 'Article 3 (2.5 and 5 m/s²)', verified: 'secondary' },
    { title: 'Points = 2·a² an hour', locator: 'an acoustic consultancy’s page', verified: 'secondary' },
  ],
  calculate: ({ tools }) => {
    const totalHours = tools.reduce((sum, { hours }) => sum + hours, 0);
    if (totalHours > 24 + slip)
      throw refuseInput('tools', 'Tools must come to at most 24 h: a day has no more.');
    const doses = tools.map(({ magnitudeMs2, hours }) => magnitudeMs2 ** 2 * hours);
    const dose = doses.reduce((sum, each) => sum + each, 0);
    const of = (each: number) => ({ a8Ms2: Math.sqrt(each / 8), points: 2 * each });
    const hoursTo = (value: number) => tools.map(({ magnitudeMs2 }) => 8 * (value / magnitudeMs2) ** 2);
    return {
      ...of(dose),
      perTool: doses.map(of),
      hoursToAction: hoursTo(actionMs2),
      hoursToLimit: hoursTo(limitMs2),
    };
  },
  reading: ({ tools }, { a8Ms2, points, hoursToAction, hoursToLimit }) => {
    const day = `The day comes to ${about(a8Ms2, 2)} m/s², ${about(points, 0)} points`;
    const times = (hours: readonly number[]) =>
      listed(
        tools.map(
          ({ name, magnitudeMs2 }, i) =>
            `${name ?? `${about(magnitudeMs2)} m/s²`} use to ${noLongerThan(hours[i] ?? 0)}`,
        ),
      );
    const alone = tools.length > 1 ? ', each alone' : '';
    if (a8Ms2 > limitMs2 + slip)
      return `${day}: above the limit, so not allowed where it applies. Limit ${times(hoursToLimit)} at the very most, ${times(hoursToAction)} to stay at the action value${alone}.`;
    if (a8Ms2 >= actionMs2 - slip)
      return `${day}: at or above the action value. To stay at it, limit ${times(hoursToAction)} today${alone}.`;
    return `${day}: below the action value.`;
  },
  over: (_, { a8Ms2 }) => {
    if (a8Ms2 > limitMs2 + slip) return [`Vibration of ${about(a8Ms2, 2)} m/s² is over the limit of 5 m/s².`];
    return a8Ms2 >= actionMs2 - slip
      ? [`Vibration of ${about(a8Ms2, 2)} m/s² reaches the action value of 2.5 m/s².`]
      : [];
  },
});
