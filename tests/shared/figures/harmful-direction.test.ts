import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Figure } from '#shared/figures/figure.ts';
import { figureById } from '#shared/figures/registry.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import { type Schema, fittingInput, inputSchemaOf } from './arbitraries.ts';

/** What must never look safer when an input gets worse: [figure, input, worse way, output, way in which it must go]. */
const rules: [string, string, 'up' | 'down', string, 'up' | 'down'][] = [
  ['lifting', 'loadKg', 'up', 'liftingIndex', 'up'],
  ['lifting', 'horizontalCm', 'up', 'rwlKg', 'down'],
  ['lifting', 'travelCm', 'up', 'rwlKg', 'down'],
  ['lifting', 'asymmetryDeg', 'up', 'rwlKg', 'down'],
  ['lifting', 'liftsPerMinute', 'up', 'rwlKg', 'down'],
  ['lifting', 'durationHours', 'up', 'rwlKg', 'down'],
  ['noise', 'criterionDb', 'down', 'dosePercent', 'up'],
  ['fallClearance', 'lanyardM', 'up', 'requiredBelowAnchorM', 'up'],
  ['fallClearance', 'lanyardM', 'up', 'freeFallM', 'up'],
  ['fallClearance', 'tearOutM', 'up', 'requiredBelowFeetM', 'up'],
  ['fallClearance', 'harnessStretchM', 'up', 'requiredBelowFeetM', 'up'],
  ['fallClearance', 'attachmentHeightM', 'up', 'requiredBelowAnchorM', 'up'],
  ['fallClearance', 'marginM', 'up', 'requiredBelowFeetM', 'up'],
  ['fallClearance', 'anchorAboveAttachmentM', 'down', 'freeFallM', 'up'],
  ['fallClearance', 'anchorAboveAttachmentM', 'down', 'requiredBelowFeetM', 'up'],
  ['swingFall', 'offsetM', 'up', 'extraDropM', 'up'],
  ['swingFall', 'offsetM', 'up', 'speedMs', 'up'],
  ['ladder', 'landingHeightM', 'up', 'ladderLengthM', 'up'],
  ['wind', 'speedMs', 'up', 'forceN', 'up'],
  ['wind', 'speedMs', 'up', 'beaufort', 'up'],
  ['wind', 'areaM2', 'up', 'massEquivalentKg', 'up'],
  ['wind', 'coefficient', 'up', 'forceN', 'up'],
  ['sling', 'angleBetweenLegsDeg', 'up', 'legTensionKg', 'up'],
  ['sling', 'loadKg', 'up', 'legTensionKg', 'up'],
  ['loadShare', 'nearM', 'down', 'nearKg', 'up'],
  ['crane', 'loadKg', 'up', 'utilisationPercent', 'up'],
  ['crane', 'riggingKg', 'up', 'utilisationPercent', 'up'],
  ['crane', 'ratedKg', 'down', 'utilisationPercent', 'up'],
  ['workHeat', 'naturalWetBulbC', 'up', 'wbgtC', 'up'],
  ['workHeat', 'globeC', 'up', 'wbgtC', 'up'],
  ['workHeat', 'metabolicW', 'up', 'limitC', 'down'],
  ['dust', 'limitMgPerM3', 'down', 'ratio', 'up'],
  ['powerLine', 'kilovolts', 'up', 'distanceM', 'up'],
  ['incidentRate', 'incidents', 'up', 'high', 'up'],
  ['incidentRate', 'hoursWorked', 'down', 'rate', 'up'],
  ['sampleSize', 'tolerableShare', 'down', 'size', 'up'],
  ['sampleSize', 'confidence', 'up', 'size', 'up'],
  ['surveySize', 'population', 'up', 'size', 'up'],
  ['surveySize', 'margin', 'down', 'size', 'up'],
  ['surveySize', 'confidence', 'up', 'size', 'up'],
  ['sampleResult', 'hits', 'up', 'high', 'up'],
  ['sampleResult', 'z', 'up', 'high', 'up'],
  ['readability', 'syllables', 'up', 'fleschKincaidGrade', 'up'],
  ['readability', 'sentences', 'down', 'fleschKincaidGrade', 'up'],
];

const figureOf = (id: string): Figure => {
  const figure = figureById(id);
  if (!figure) throw new Error(`There is no figure ${id}.`);
  return figure;
};

function computeOrNull(figure: Figure, given: unknown): Record<string, unknown> | null {
  try {
    return figure.compute(given);
  } catch (error) {
    if (error instanceof Refusal) return null;
    throw error;
  }
}

/** A second value of the same input, drawn like the first. */
const twoOf = (figure: Figure, key: string) =>
  fc
    .tuple(fittingInput(figure), fittingInput(figure))
    .filter(([a, b]) => typeof a[key] === 'number' && typeof b[key] === 'number')
    .map(([a, b]): [Record<string, unknown>, number, number] => {
      const values = [a[key] as number, b[key] as number].sort((x, y) => x - y);
      return [a, values[0] ?? 0, values[1] ?? 0];
    });

describe('no figure looks safer when an input gets worse', () => {
  test.each(rules)('%s: %s going %s makes %s go %s or stay', (id, key, worse, output, way) => {
    const figure = figureOf(id);
    let compared = 0;
    fc.assert(
      fc.property(twoOf(figure, key), ([base, low, high]) => {
        const [better, bad] = worse === 'up' ? [low, high] : [high, low];
        const before = computeOrNull(figure, { ...base, [key]: better })?.[output];
        const after = computeOrNull(figure, { ...base, [key]: bad })?.[output];
        if (typeof before !== 'number' || typeof after !== 'number') return;
        compared++;
        const slip = 1e-9 * Math.max(1, Math.abs(before));
        if (way === 'up') expect(after).toBeGreaterThanOrEqual(before - slip);
        else expect(after).toBeLessThanOrEqual(before + slip);
      }),
      { numRuns: 400 },
    );
    expect(compared).toBeGreaterThan(20);
  });

  test('every named input and output is one of its figure', () => {
    for (const [id, key, , output] of rules) {
      const schema: Schema = inputSchemaOf(figureOf(id));
      expect(schema.properties, id).toHaveProperty(key);
      expect(figureOf(id).output.shape, id).toHaveProperty(output);
    }
  });

  test('a hand further from 75 cm, up or down, lowers the lifting limit as far as height alone goes', () => {
    const vm = (verticalCm: number) =>
      figureOf('lifting').compute({ loadKg: 10, horizontalCm: 30, verticalCm, travelCm: 30, asymmetryDeg: 0, liftsPerMinute: 1, durationHours: 1, coupling: 'good' }).vm as number; // prettier-ignore
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 75, noNaN: true }),
        fc.double({ min: 0, max: 75, noNaN: true }),
        (a, b) => {
          const [near, far] = a < b ? [a, b] : [b, a];
          expect(vm(75 - far)).toBeLessThanOrEqual(vm(75 - near));
          expect(vm(75 + far)).toBeLessThanOrEqual(vm(75 + near));
        },
      ),
    );
  });

  test('a louder or longer task never lowers the day’s noise, dose, points or class', () => {
    const task = fc.record({
      levelDb: fc.double({ min: 40, max: 139, noNaN: true }),
      hours: fc.double({ min: 0.01, max: 5, noNaN: true }),
    });
    fc.assert(
      fc.property(
        fc.array(task, { minLength: 1, maxLength: 3 }),
        fc.constantFrom(3, 5),
        fc.boolean(),
        (tasks, exchangeDb, louder) => {
          const worse = tasks.map((each, i) =>
            i > 0
              ? each
              : louder
                ? { ...each, levelDb: each.levelDb + 1 }
                : { ...each, hours: each.hours * 1.5 },
          );
          const before = figureOf('noise').compute({ tasks, exchangeDb });
          const after = figureOf('noise').compute({ tasks: worse, exchangeDb });
          for (const key of ['dailyDb', 'laeq8hDb', 'dosePercent', 'points', 'pascalSquaredHours'])
            if (before[key] !== null)
              expect(after[key]).toBeGreaterThanOrEqual((before[key] as number) * (1 - 1e-12));
          expect((after.protectorClass as number | null) ?? 6).toBeGreaterThanOrEqual(
            (before.protectorClass as number | null) ?? 6,
          );
        },
      ),
    );
  });

  test('a rougher or longer tool never lowers the day’s vibration, and time to a limit undoes the sum', () => {
    const tool = fc.record({
      magnitudeMs2: fc.double({ min: 0.5, max: 60, noNaN: true }),
      hours: fc.double({ min: 0.01, max: 5, noNaN: true }),
    });
    fc.assert(
      fc.property(fc.array(tool, { minLength: 1, maxLength: 4 }), (tools) => {
        const before = figureOf('vibration').compute({ tools }) as {
          a8Ms2: number;
          hoursToAction: number[];
          hoursToLimit: number[];
        };
        const rougher = tools.map((each, i) =>
          i > 0 ? each : { ...each, magnitudeMs2: each.magnitudeMs2 * 1.2 },
        );
        expect(figureOf('vibration').compute({ tools: rougher }).a8Ms2).toBeGreaterThan(before.a8Ms2);
        tools.forEach(({ magnitudeMs2 }, i) => {
          expect(magnitudeMs2 * Math.sqrt((before.hoursToAction[i] ?? NaN) / 8)).toBeCloseTo(2.5, 9);
          expect(magnitudeMs2 * Math.sqrt((before.hoursToLimit[i] ?? NaN) / 8)).toBeCloseTo(5, 9);
        });
      }),
    );
  });

  test('more dust, or longer in it, never lowers the average', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 50, noNaN: true }),
        fc.double({ min: 0.01, max: 8, noNaN: true }),
        (mgPerM3, hours) => {
          const twa = (mg: number, h: number) =>
            figureOf('dust').compute({ tasks: [{ mgPerM3: mg, hours: h }], limitMgPerM3: 1 })
              .twaMgPerM3 as number;
          expect(twa(mgPerM3 + 1, hours)).toBeGreaterThan(twa(mgPerM3, hours));
          expect(twa(mgPerM3, hours * 2)).toBeGreaterThanOrEqual(twa(mgPerM3, hours));
        },
      ),
    );
  });

  test('within the printed chart, warmer or damper air never feels cooler', () => {
    const degree = fc.double({ min: 26.7, max: 43.3, noNaN: true });
    const humidity = fc.double({ min: 40, max: 100, noNaN: true });
    const feels = (temperatureC: number, humidityPercent: number) =>
      figureOf('heat').compute({ temperatureC, humidityPercent }).heatIndexC as number;
    fc.assert(
      fc.property(degree, degree, humidity, humidity, (t1, t2, r1, r2) => {
        const [cool, warm] = [Math.min(t1, t2), Math.max(t1, t2)];
        const [dry, damp] = [Math.min(r1, r2), Math.max(r1, r2)];
        expect(feels(warm, damp)).toBeGreaterThanOrEqual(feels(cool, dry) - 1e-9);
      }),
      { numRuns: 500 },
    );
  });

  test('on both matrices a risk never falls when likelihood or consequence rises', () => {
    const order = (matrix: string, likelihood: string, consequence: number) =>
      figureOf('riskBand').compute({ matrix, likelihood, consequence }).order as number;
    for (const [row, likelihood] of [...'ABCD'].entries()) {
      const rarer = 'BCDE'[row] ?? 'E';
      for (const n of [1, 2, 3, 4, 5]) {
        expect(order('as4360-1999', likelihood, n)).toBeGreaterThanOrEqual(order('as4360-1999', rarer, n));
        if (n < 5)
          expect(order('as4360-1999', likelihood, n + 1)).toBeGreaterThanOrEqual(
            order('as4360-1999', likelihood, n),
          );
        if (n < 5)
          expect(order('mil-std-882e', likelihood, n)).toBeGreaterThanOrEqual(
            order('mil-std-882e', rarer, n),
          );
        if (n < 4)
          expect(order('mil-std-882e', likelihood, n)).toBeGreaterThanOrEqual(
            order('mil-std-882e', likelihood, n + 1),
          );
      }
    }
  });
});
