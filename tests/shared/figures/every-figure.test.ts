import { readdirSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { type Figure, verificationNames, verifications, workOut } from '#shared/figures/figure.ts';
import { figureById, figures } from '#shared/figures/registry.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import { type Schema, anyInput, fittingInput, inputSchemaOf } from './arbitraries.ts';

const named = figures.map((figure): [string, Figure] => [figure.id, figure]);

/** The result, or the refusal; anything else thrown fails the test. */
function attempt(figure: Figure, given: unknown) {
  try {
    return workOut(figure, given);
  } catch (error) {
    if (error instanceof Refusal) return error;
    throw error;
  }
}

function numbersIn(value: unknown): number[] {
  if (typeof value === 'number') return [value];
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersIn) : [];
}

test('the registry holds the 24 figures of the contract, each in a file of its name', () => {
  const ids =
    'lifting teamLift noise vibration fallClearance swingFall ladder braceAngle holdDowns wind sling loadShare crane heat workHeat dust powerLine incidentRate sampleSize surveySize sampleResult samplingPlan riskBand readability';

  expect(figures.map(({ id }) => id)).toEqual(ids.split(' '));
  const files = readdirSync(new URL('../../../shared/figures', import.meta.url));
  for (const { id } of figures) expect(files).toContain(`${id}.ts`);
  expect(new Set(figures.map(({ title }) => title)).size).toBe(figures.length);
  expect(figureById('heat')?.id).toBe('heat');
  expect(figureById('toString')).toBeNull();
});

describe.each(named)('%s', (_, figure) => {
  test('says its formula, limits, caution and sources, and how each source was checked', () => {
    const { title, summary, formula, limits, caution, sources, version } = figure;
    for (const words of [title, summary, formula, caution, ...limits]) expect(words.trim()).not.toBe('');
    expect(limits.length).toBeGreaterThan(0);
    expect(sources.length).toBeGreaterThan(0);
    for (const { verified } of sources) expect(verificationNames).toContain(verified);
    expect(Number.isInteger(version)).toBe(true);
  });

  test('labels every input and output, and gives every number its unit', () => {
    const check = (schema: Schema, path: string): void => {
      for (const [key, part] of Object.entries(schema.properties ?? {})) {
        const at = `${path}.${key}`;
        if (at === 'riskBand.matrix') continue;
        expect(part.title, at).toBeTruthy();
        if (part.type === 'number' || part.type === 'integer') expect(part.unit, at).toBeDefined();
        check(part, at);
        if (part.items) check(part.items, at);
      }
    };
    check(inputSchemaOf(figure), figure.id);
    check(z.toJSONSchema(figure.output) as Schema, figure.id);
  });

  test('refuses a number outside a limit, naming the input and the limit', () => {
    const { properties = {} } = inputSchemaOf(figure);
    const [base] = fc.sample(fittingInput(figure), { numRuns: 1, seed: 7 });
    for (const [key, schema] of Object.entries(properties)) {
      const bounds = [
        [schema.minimum, -0.001],
        [schema.maximum, 0.001],
        [schema.exclusiveMinimum, 0],
        [schema.exclusiveMaximum, 0],
      ] as const;
      for (const [bound, step] of bounds) {
        // The whole numbers' own bounds are no limit of the figure.
        if (bound === undefined || Math.abs(bound) > 2 ** 52) continue;
        const outside = schema.type === 'integer' ? bound + Math.sign(step) : bound + step;
        const refusal = attempt(figure, { ...base, [key]: outside });
        expect(refusal, `${key} = ${outside}`).toBeInstanceOf(Refusal);
        const { code, fields } = refusal as Refusal;
        expect(code).toBe('invalid');
        expect(fields[key], `${key} = ${outside}`).toContain(String(bound));
      }
    }
  });

  test('refuses an input that it does not know rather than take a default for a slip of the pen', () => {
    const [base] = fc.sample(fittingInput(figure), { numRuns: 1, seed: 11 });
    const refusal = attempt(figure, { ...base, spelledWrong: 1 });
    expect(refusal).toBeInstanceOf(Refusal);
    expect((refusal as Refusal).fields).toHaveProperty('spelledWrong');
  });

  test('answers whatever it is given with finite numbers or with a refusal in words', () => {
    fc.assert(
      fc.property(anyInput(figure), (given) => {
        const answer = attempt(figure, given);
        if (answer instanceof Refusal) {
          expect(answer.code).toBe('invalid');
          expect(answer.message.length).toBeGreaterThan(10);
          expect(Object.values(answer.fields).join('')).not.toMatch(
            /undefined|\[object|Invalid input|Too (big|small)/,
          );
          return;
        }
        expect(numbersIn(answer.result).every(Number.isFinite)).toBe(true);
      }),
      { numRuns: 300 },
    );
  });

  test('works out inputs that fit, the same each time and through JSON, and reads them in words', () => {
    let worked = 0;
    fc.assert(
      fc.property(fittingInput(figure), (given) => {
        const answer = attempt(figure, given);
        if (answer instanceof Refusal) return;
        worked++;
        const { input, result, reading, over } = answer;
        expect(numbersIn(result).every(Number.isFinite)).toBe(true);
        expect(JSON.parse(JSON.stringify(figure.compute(input)))).toEqual(JSON.parse(JSON.stringify(result)));
        for (const words of [reading, ...over]) {
          expect(words).toMatch(/[.!]$/);
          expect(words).not.toMatch(/NaN|undefined|Infinity|null|\[object/);
        }
      }),
      { numRuns: 300 },
    );
    // The fuzz must not pass by being refused.
    expect(worked).toBeGreaterThan(30);
  });
});

test('a table from memory says so wherever it is shown', () => {
  expect(verifications.memory).toBe('not verified: confirm before relying on it');
  const powerLine = figureById('powerLine');
  expect(powerLine?.compute({ profile: 'au-nsw', kilovolts: 11 }).warnings).toContainEqual(
    expect.stringContaining(verifications.memory),
  );
});
