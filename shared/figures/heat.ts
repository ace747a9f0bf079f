import { z } from 'zod';
import { defineFigure } from './figure.ts';
import { outcome, quantity, warnings } from './inputs.ts';
import { slip } from './numerics.ts';
import { about } from './words.ts';

export const toFahrenheit = (celsius: number): number => celsius * 1.8 + 32;
export const toCelsius = (fahrenheit: number): number => (fahrenheit - 32) / 1.8;

/** Bands of the US weather service, by the whole °F. */
const bands = [
  { from: 125, name: 'extreme danger' },
  { from: 103, name: 'danger' },
  { from: 90, name: 'extreme caution' },
  { from: 80, name: 'caution' },
] as const;
const bandNames = ['none', 'caution', 'extreme caution', 'danger', 'extreme danger'] as const;
type HeatBand = (typeof bandNames)[number];

const bandOf = (heatIndexF: number): HeatBand =>
  bands.find(({ from }) => Math.round(heatIndexF) >= from)?.name ?? 'none';

const advice: Record<HeatBand, string> = {
  none: 'no heat warning from this figure',
  caution: 'tiredness with long work: water and shade at hand',
  'extreme caution': 'cramps and heat exhaustion possible: plan breaks in the shade, watch each other',
  danger:
    'heat exhaustion likely, heat stroke possible: move heavy work to the cool hours, short spells only',
  'extreme danger': 'heat stroke likely: stop outdoor work',
};

/** The regression of the US weather service, T in °F and R in per cent, without its adjustments. */
export const regression = (t: number, r: number): number =>
  -42.379 +
  2.04901523 * t +
  10.14333127 * r -
  0.22475541 * t * r -
  0.00683783 * t * t -
  0.05481717 * r * r +
  0.00122874 * t * t * r +
  0.00085282 * t * r * r -
  0.00000199 * t * t * r * r;

// The bounds give way by `slip`: 26.67 °C comes back as 79.9999… °F.
function adjustment(t: number, r: number): number {
  if (r < 13 && t >= 80 - slip && t <= 112 + slip)
    return -((13 - r) / 4) * Math.sqrt(Math.max(0, 17 - Math.abs(t - 95)) / 17);
  if (r > 85 && t >= 80 - slip && t <= 87 + slip) return ((r - 85) / 10) * ((87 - t) / 5);
  return 0;
}

export const heat = defineFigure({
  id: 'heat',
  title: 'Heat index',
  version: 1,
  summary: 'What the heat feels like in the shade with this humidity, and what it does to people.',
  input: z.strictObject({
    temperatureC: quantity('Air temperature in the shade', '°C', {
      least: 0,
      most: 50,
      why: 'the index was worked out for no other air',
    }),
    humidityPercent: quantity('Relative humidity', '%', { least: 0, most: 100 }),
  }),
  output: z.strictObject({
    heatIndexC: outcome('Feels like', '°C'),
    heatIndexF: outcome('Feels like', '°F'),
    band: z.enum(bandNames).meta({ title: 'Band' }),
    simpleF: outcome('Simple form', '°F'),
    regressionF: outcome('Regression', '°F'),
    adjustmentF: outcome('Adjustment', '°F'),
    warnings,
  }),
  formula:
    'In °F: simple form 0.5·(T + 61 + 1.2·(T − 68) + 0.094·R), averaged with T. From 80 °F on, the regression of nine terms; below 13 % humidity (80 to 112 °F) less (13 − R)/4·√((17 − |T − 95|)/17), above 85 % (80 to 87 °F) plus (R − 85)/10·(87 − T)/5. Bands from 80, 90, 103 and 125 °F.',
  limits: [
    '0 to 50 °C, humidity 0 to 100 %. Shade and a light wind: full sun adds up to 15 °F (8 °C).',
    'The printed chart ends at 137 °F (58 °C); above it the number is beyond the data and says so.',
    'The fit is good to about 1.3 °F; the adjustments move single cells of the printed chart, which leaves them out, by up to 2 °F, upwards where it is humid. In dry air the number steps down by up to 2.5 °F where the simple form hands over to the regression.',
  ],
  caution:
    'Says nothing of hard work, clothing or people new to the heat: for those use the work heat figure. An older chart has its bands at 105 and 130 °F.',
  sources: [
    {
      title: 'Heat index equation, US National Weather Service',
      locator: 'wpc.ncep.noaa.gov/html/heatindex_equation.shtml',
      verified: 'regulator',
    },
    {
      title: 'Bands 80, 90, 103, 125 °F',
      locator: 'pages that copy the weather service’s table',
      verified: 'secondary',
    },
  ],
  calculate: ({ temperatureC, humidityPercent: r }) => {
    const t = toFahrenheit(temperatureC);
    const simpleF = (0.5 * (t + 61 + 1.2 * (t - 68) + 0.094 * r) + t) / 2;
    const regressionF = regression(t, r);
    const full = simpleF >= 80 - slip;
    const adjustmentF = full ? adjustment(t, r) : 0;
    const heatIndexF = full ? regressionF + adjustmentF : simpleF;
    return {
      heatIndexC: toCelsius(heatIndexF),
      heatIndexF,
      band: bandOf(heatIndexF),
      simpleF,
      regressionF,
      adjustmentF,
      warnings: [
        'In full sun it feels up to 8 °C hotter.',
        ...(heatIndexF > 137.5
          ? ['This is beyond the published chart (58 °C): take it as extreme danger, not as a number.']
          : []),
        ...(full && r < 40
          ? ['The regression was fitted from 40 % humidity up; below that it is less sure.']
          : []),
      ],
    };
  },
  reading: (_, { heatIndexC, band }) =>
    `It feels like ${about(heatIndexC, 0)} °C in the shade (${band === 'none' ? 'below the bands' : band}): ${advice[band]}.`,
  over: (_, { heatIndexC, band }) =>
    band === 'danger' || band === 'extreme danger'
      ? [`The heat index is ${about(heatIndexC, 0)} °C: ${band}.`]
      : [],
});
