import { z } from 'zod';
import as4360 from '../../templates/matrices/as4360-1999.json' with { type: 'json' };
import { type Matrix, bandOf, bands, matrixSchema } from '../risk/matrix.ts';
import { defineFigure, refuseInput } from './figure.ts';
import { outcome, quantity, warnings } from './inputs.ts';
import { milBands, milStd882e } from './mil-std-882e.ts';

const builtIn = matrixSchema.parse(as4360);

const input = z.strictObject({
  matrix: z
    .union([z.enum(['as4360-1999', 'mil-std-882e']), matrixSchema], {
      error: 'Matrix must be as4360-1999, mil-std-882e or a matrix of the organisation.',
    })
    .meta({ title: 'Matrix' }),
  likelihood: z
    .string({ error: 'Likelihood must be a letter.' })
    .regex(/^[A-Z]$/, 'Likelihood must be one capital letter, a row of the matrix.')
    .meta({ title: 'Likelihood' }),
  consequence: quantity('Consequence', '', { least: 1, most: 9, whole: true }),
});

/** The band's word, its place counted from the least (1), and how many there are; “eliminated” stands at 0. */
function rate({ matrix, likelihood, consequence }: z.output<typeof input>) {
  if (matrix === 'mil-std-882e') {
    const row = milStd882e.cells[likelihood];
    if (!row)
      throw refuseInput('likelihood', 'Likelihood must be A to E (or F, eliminated) on mil-std-882e.');
    const band = row[consequence - 1];
    if (!band) throw refuseInput('consequence', 'Consequence must be 1 to 4 on mil-std-882e, 1 the worst.');
    return { band, order: milBands.indexOf(band), of: milBands.length - 1, name: 'MIL-STD-882E' };
  }
  const own = matrix === 'as4360-1999' ? builtIn : matrix;
  const band = bandOf(own, { likelihood, consequence });
  if (!band) throw refuseOffMatrix(own, likelihood);
  return { band, order: bands.indexOf(band) + 1, of: bands.length, name: own.name };
}

function refuseOffMatrix({ name, likelihoods, consequences }: Matrix, likelihood: string) {
  const letters = likelihoods.map(({ key }) => key);
  return letters.includes(likelihood)
    ? refuseInput(
        'consequence',
        `Consequence must be one of ${consequences.map(({ key }) => key).join(', ')} on ${name}.`,
      )
    : refuseInput('likelihood', `Likelihood must be one of ${letters.join(', ')} on ${name}.`);
}

export const riskBand = defineFigure({
  id: 'riskBand',
  title: 'Risk band',
  version: 1,
  summary: 'The band of a risk on a named matrix.',
  input,
  output: z.strictObject({
    band: z
      .enum([...bands, ...milBands.filter((band) => band !== 'low' && band !== 'high')])
      .meta({ title: 'Band' }),
    order: outcome('Place from the least'),
    of: outcome('Bands in all'),
    matrix: z.string().meta({ title: 'Matrix' }),
    warnings,
  }),
  formula: 'Read from the matrix: row by likelihood, column by consequence.',
  limits: [
    'as4360-1999: likelihood A (almost certain) to E (rare), consequence 1 (insignificant) to 5 (catastrophic).',
    'mil-std-882e: probability A (frequent) to E (improbable), severity 1 (catastrophic) to 4 (negligible): 1 is the worst. F is eliminated.',
    'Bands of two matrices can’t be compared.',
  ],
  caution: 'No Australian regulation prescribes a matrix, and a band is no reason to stop at a weak control.',
  sources: [
    {
      title: 'AS/NZS 4360:1999 Table E3',
      locator: 'cells as copied by others; the table’s number from memory',
      verified: 'secondary',
    },
    {
      title: 'MIL-STD-882E Table III (11 May 2012)',
      locator: 'two transcriptions agree; severity 3, probability E is medium',
      verified: 'secondary',
    },
  ],
  calculate: (given) => {
    const { band, order, of, name } = rate(given);
    return {
      band,
      order,
      of,
      matrix: name,
      warnings:
        band === 'eliminated'
          ? [
              'A hazard is eliminated only when it is gone: no rule, training, sign or protective gear brings it to F.',
            ]
          : [],
    };
  },
  reading: ({ likelihood, consequence }, { band, order, of, matrix }) =>
    band === 'eliminated'
      ? 'The hazard is gone: eliminated.'
      : `${likelihood}${consequence} is ${band}, ${order} of ${of} from the least, on ${matrix}.`,
  over: (_, { band, order, of }) =>
    order > 0 && order === of ? [`The risk is ${band}, the worst band of its matrix.`] : [],
});
