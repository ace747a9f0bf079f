import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { outcome, quantity, warnings } from './inputs.ts';
import { standardGravity } from './swingFall.ts';
import { about, atLeast } from './words.ts';

/** Lower bounds of Beaufort 1 to 12 in m/s. */
export const beaufortFrom = [0.3, 1.6, 3.4, 5.5, 8.0, 10.8, 13.9, 17.2, 20.8, 24.5, 28.5, 32.7] as const;

export const wind = defineFigure({
  id: 'wind',
  title: 'Wind on a frame',
  version: 1,
  summary: 'The push of the wind on a frame, a pack or a sheet, as a weight that people can picture.',
  input: z.strictObject({
    speedMs: quantity('Wind speed', 'm/s', {
      least: 0,
      most: 100,
      help: 'Gust at the height of the load for forces.',
    }),
    areaM2: quantity('Area facing the wind', 'm²', {
      over: 0,
      most: 1000,
      help: 'Of a clad frame the whole, of an open one the steel.',
    }),
    coefficient: quantity('Force coefficient', '', { over: 0, most: 5 }).default(1.3),
    airDensity: quantity('Air density', 'kg/m³', { least: 0.8, most: 1.5 }).default(1.2),
  }),
  output: z.strictObject({
    pressurePa: outcome('Pressure', 'Pa'),
    forceN: outcome('Force', 'N'),
    massEquivalentKg: outcome('As a weight', 'kg'),
    beaufort: outcome('Beaufort'),
    speedKmh: outcome('Wind speed', 'km/h'),
    warnings,
  }),
  formula:
    'Pressure = ½·density·speed². Force = pressure × coefficient × area. As a weight = force / 9.80665. Beaufort by the lower bound of each force.',
  limits: [
    'Speeds to 100 m/s, areas to 1000 m². A steady push; a frame that swings or flaps feels more.',
    'Beaufort is by the mean over 10 minutes at 10 m height; gusts are half as strong again and more. Forces follow the gust.',
  ],
  caution:
    'No law gives one wind limit for lifting frames: keep to the crane’s, the platform’s and the frame maker’s, and the site’s own number. When in doubt, put it down.',
  sources: [
    { title: 'AS/NZS 1170.2', locator: 'clause 2.4: 0.5·1.2·V²', verified: 'secondary' },
    {
      title: 'Beaufort limits in m/s (WMO)',
      locator: 'several meteorological pages agree',
      verified: 'secondary',
    },
    {
      title: 'Coefficient 1.3 for a flat panel',
      locator: 'common practice, no source',
      verified: 'practice',
    },
  ],
  calculate: ({ speedMs, areaM2, coefficient, airDensity }) => {
    const pressurePa = 0.5 * airDensity * speedMs ** 2;
    const forceN = pressurePa * coefficient * areaM2;
    return {
      pressurePa,
      forceN,
      massEquivalentKg: forceN / standardGravity,
      beaufort: beaufortFrom.filter((from) => speedMs >= from).length,
      speedKmh: speedMs * 3.6,
      warnings: [
        'The Beaufort force holds if the speed is a 10-minute mean; if it is a gust, the mean is lower and the force number smaller.',
      ],
    };
  },
  reading: ({ speedMs, areaM2 }, { massEquivalentKg, beaufort, speedKmh }) =>
    `At ${about(speedMs)} m/s (${about(speedKmh, 0)} km/h, Beaufort ${beaufort} as a mean) the wind pushes on ${about(areaM2)} m² like a weight of ${atLeast(massEquivalentKg, 0)} kg. Count on gusts.`,
  over: () => [],
});
