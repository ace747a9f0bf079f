import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { outcome, outcomeOrNone, quantity, verdict, warnings, yesNo } from './inputs.ts';
import { slip } from './numerics.ts';
import { about } from './words.ts';

const celsius = (label: string, help: string) => quantity(label, '°C', { least: -10, most: 80, help });

export const workHeat = defineFigure({
  id: 'workHeat',
  title: 'Work in heat (WBGT)',
  version: 1,
  summary: 'Whether the heat, measured with a globe and a wet bulb, is within the limit for this work.',
  input: z
    .strictObject({
      naturalWetBulbC: celsius('Natural wet bulb', 'In the wind and sun as it is, not whirled.'),
      globeC: celsius('Globe', 'Black globe.'),
      airC: celsius('Air', 'Shaded thermometer. Needed in the sun.').optional(),
      sun: yesNo('In the sun'),
      metabolicW: quantity('Work rate', 'W', {
        least: 100,
        most: 600,
        why: 'the limit curves end there',
        help: 'Averaged over the hour, rests included: light 180, moderate 300, heavy 415, very heavy 520.',
      }),
      acclimatised: yesNo(
        'Used to the heat',
        'One to two weeks of this heat and work, with no week away since.',
      ),
    })
    .refine(({ sun, airC }) => !sun || airC !== undefined, {
      path: ['airC'],
      message: 'Air is missing: in the sun the air temperature counts.',
    }),
  output: z.strictObject({
    wbgtC: outcome('WBGT', '°C'),
    limitC: outcome('Limit', '°C'),
    marginC: outcome('Left to the limit', '°C'),
    airShareC: outcomeOrNone('Part from the air', '°C'),
    within: verdict('Within the limit'),
    warnings,
  }),
  formula:
    'In the sun WBGT = 0.7·wet bulb + 0.2·globe + 0.1·air; out of it 0.7·wet bulb + 0.3·globe. Limit = 56.7 − 11.5·lg M for people used to the heat, 59.9 − 14.1·lg M for others, M in W over an hour.',
  limits: [
    'Work of 100 to 600 W averaged over an hour, thermometers −10 to 80 °C.',
    'Ordinary work clothes. Double layers add about 3 °C to the WBGT, vapour-tight suits about 11 °C: add it by hand.',
    'Estimates of work rate are off by up to 30 %, which moves the limit by more than a degree.',
  ],
  caution:
    'Within the limit most healthy people cope; illness, medicines, drink, age and the first days back do not show in it. Anyone confused or no longer sweating: cool them, call for help.',
  sources: [
    {
      title: 'NIOSH 2016-106, Occupational exposure to heat and hot environments',
      locator: 'sections 8.1 and 9.3.2',
      verified: 'secondary',
    },
    { title: 'Clothing additions', locator: 'OSHA Technical Manual III:4, quoted', verified: 'secondary' },
  ],
  calculate: ({ naturalWetBulbC, globeC, airC, sun, metabolicW, acclimatised }) => {
    const airShareC = sun ? 0.1 * (airC ?? NaN) : null;
    const wbgtC = 0.7 * naturalWetBulbC + (airShareC === null ? 0.3 * globeC : 0.2 * globeC + airShareC);
    const lg = Math.log10(metabolicW);
    const limitC = acclimatised ? 56.7 - 11.5 * lg : 59.9 - 14.1 * lg;
    return {
      wbgtC,
      limitC,
      marginC: limitC - wbgtC,
      airShareC,
      within: wbgtC <= limitC + slip,
      warnings: [
        ...(naturalWetBulbC > globeC
          ? ['The wet bulb reads hotter than the globe: check that the two are not swapped.']
          : []),
        ...(acclimatised
          ? []
          : ['New people: a fifth of the time in the heat on the first day, a fifth more each day after.']),
      ],
    };
  },
  reading: ({ acclimatised }, { wbgtC, limitC, within }) =>
    `WBGT ${about(wbgtC, 2)} °C against a limit of ${about(limitC, 2)} °C for people ${
      acclimatised ? 'used to' : 'not yet used to'
    } the heat: ${within ? 'within it. Keep water, shade and breaks' : 'over it. Slow the work, rest in the cool, change the hours, or stop'}.`,
  over: (_, { wbgtC, limitC, within }) =>
    within ? [] : [`WBGT ${about(wbgtC, 2)} °C is over the limit of ${about(limitC, 2)} °C for this work.`],
});
