import fc from 'fast-check';
import { z } from 'zod';
import type { Figure } from '#shared/figures/figure.ts';

/** As much of JSON Schema as the figures' inputs use. */
export type Schema = {
  type?: string;
  title?: string;
  unit?: string;
  enum?: unknown[];
  const?: unknown;
  anyOf?: Schema[];
  minimum?: number;
  maximum?: number;
  exclusiveMinimum?: number;
  exclusiveMaximum?: number;
  minItems?: number;
  maxItems?: number;
  items?: Schema;
  properties?: Record<string, Schema>;
  required?: string[];
};

export const inputSchemaOf = ({ input }: Figure): Schema => z.toJSONSchema(input, { io: 'input' }) as Schema;

/** What a schema can't say, so that most generated inputs are worked out and not refused. */
const special: Record<string, fc.Arbitrary<unknown>> = {
  'powerLine.profile': fc.constantFrom(
    'us',
    'us-wa',
    'au',
    'au-nsw',
    'au-sa',
    'au-vic',
    'nz',
    'ca-ab',
    'ca-on',
    'uk',
  ),
  'powerLine.kilovolts': fc.double({ min: 0.1, max: 600, noNaN: true }),
  'riskBand.matrix': fc.constantFrom('as4360-1999', 'mil-std-882e'),
  'riskBand.likelihood': fc.constantFrom('A', 'B', 'C', 'D', 'E'),
  'riskBand.consequence': fc.integer({ min: 1, max: 4 }),
  'noise.tasks': fc.array(fc.record({ levelDb: fc.double({ min: 40, max: 140, noNaN: true }), hours: fc.double({ min: 0.01, max: 6, noNaN: true }) }), { minLength: 1, maxLength: 4 }), // prettier-ignore
  'dust.tasks': fc.array(fc.record({ mgPerM3: fc.double({ min: 0, max: 100, noNaN: true }), hours: fc.double({ min: 0.01, max: 6, noNaN: true }) }), { minLength: 1, maxLength: 4 }), // prettier-ignore
  'vibration.tools': fc.array(fc.record({ magnitudeMs2: fc.double({ min: 0.1, max: 100, noNaN: true }), hours: fc.double({ min: 0.01, max: 6, noNaN: true }) }), { minLength: 1, maxLength: 4 }), // prettier-ignore
  'braceAngle.minDeg': fc.integer({ min: 1, max: 35 }),
  'braceAngle.bestDeg': fc.integer({ min: 36, max: 80 }),
  'sampleSize.population': fc.integer({ min: 1, max: 5000 }),
  'incidentRate.incidents': fc.integer({ min: 0, max: 2000 }),
};

function valueOf(schema: Schema, path: string): fc.Arbitrary<unknown> {
  if (special[path]) return special[path];
  if (schema.enum) return fc.constantFrom(...schema.enum);
  if ('const' in schema) return fc.constant(schema.const);
  if (schema.anyOf) return fc.oneof(...schema.anyOf.map((each) => valueOf(each, path)));
  const min = schema.minimum ?? schema.exclusiveMinimum ?? -1e9;
  const max = schema.maximum ?? schema.exclusiveMaximum ?? 1e9;
  switch (schema.type) {
    case 'integer':
      return fc.integer({ min: Math.ceil(Math.max(min, -1e9)), max: Math.floor(Math.min(max, 1e9)) });
    case 'number': {
      const open = {
        minExcluded: schema.exclusiveMinimum !== undefined,
        maxExcluded: schema.exclusiveMaximum !== undefined,
      };
      // Doubles crowd round 0; the other half is spread evenly.
      const even = fc.integer({ min: 1, max: 999_999 }).map((step) => min + ((max - min) * step) / 1_000_000);
      return fc.oneof(even, fc.double({ min, max, noNaN: true, ...open }));
    }
    case 'boolean':
      return fc.boolean();
    case 'array':
      return fc.array(valueOf(schema.items ?? {}, `${path}.0`), {
        minLength: schema.minItems ?? 0,
        maxLength: Math.min(schema.maxItems ?? 4, 4),
      });
    case 'object':
      return objectOf(schema, path);
    default:
      return fc.string({ maxLength: 40 });
  }
}

function objectOf(
  { properties = {}, required = [] }: Schema,
  path: string,
): fc.Arbitrary<Record<string, unknown>> {
  const values = Object.fromEntries(
    Object.entries(properties).map(([key, schema]) => [
      key,
      valueOf(schema, path === '' ? key : `${path}.${key}`),
    ]),
  );
  return fc.record(values, { requiredKeys: required });
}

const counted = fc
  .tuple(
    fc.integer({ min: 1, max: 200 }),
    fc.integer({ min: 0, max: 2000 }),
    fc.integer({ min: 0, max: 4000 }),
  )
  .map(([sentences, more, extra]) => ({
    sentences,
    words: sentences + more,
    syllables: sentences + more + extra,
  }));
const written = fc
  .array(
    fc.constantFrom('brace', 'the', 'first', 'truss.', 'Stop!', 'ladder', 'area', 'on 2.4 m', '\n', 'é'),
    { minLength: 1 },
  )
  .map((words) => ({ text: words.join(' ') }));

/** Inputs that mostly fit: right types, inside the limits. */
export const fittingInput = (figure: Figure): fc.Arbitrary<Record<string, unknown>> =>
  figure.id === 'readability' ? fc.oneof(counted, written) : objectOf(inputSchemaOf(figure), figure.id);

const oddNumber = fc.oneof(
  fc.constantFrom(
    0,
    -0,
    -1,
    NaN,
    Infinity,
    -Infinity,
    Number.MAX_VALUE,
    Number.MIN_VALUE,
    -Number.MAX_VALUE,
    1e-300,
    2 ** 53,
  ),
  fc.double(),
);
const oddValue = fc.oneof(
  oddNumber,
  fc.string(),
  fc.constantFrom(null, true, undefined, '12', [], {}),
  fc.anything(),
);

/** The right names with anything in them, and things that are no input at all. */
export function anyInput(figure: Figure): fc.Arbitrary<unknown> {
  const { properties = {} } = inputSchemaOf(figure);
  const odd = fc.record(Object.fromEntries(Object.keys(properties).map((key) => [key, oddValue])), {
    requiredKeys: [],
  });
  const mixed = fc
    .tuple(fittingInput(figure), odd, fc.subarray(Object.keys(properties)))
    .map(([fitting, other, keys]) => ({
      ...fitting,
      ...Object.fromEntries(keys.map((key) => [key, other[key]])),
    }));
  return fc.oneof(mixed, odd, fc.anything());
}
