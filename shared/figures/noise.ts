import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { list, oneOf, outcome, outcomeOrNone, quantity, rowName, warnings } from './inputs.ts';
import { slip } from './numerics.ts';
import { about, listed, noLongerThan } from './words.ts';

const input = z.strictObject({
  tasks: list(
    'Tasks',
    z.strictObject({
      name: rowName,
      levelDb: quantity('Level at the ear', 'dB(A)', {
        least: 40,
        most: 140,
        why: 'no daily sum holds outside it; 140 dB is the peak limit',
      }),
      hours: quantity('Time', 'h', { over: 0, most: 24 }),
    }),
    1,
    30,
  ),
  criterionDb: quantity('Limit for 8 hours', 'dB(A)', { least: 70, most: 100 }).default(85),
  exchangeDb: oneOf('Exchange rate', 'dB', [3, 5]).default(3),
});

/** The factors that the two sources print: NIOSH 98-126 gives 10, 29 CFR 1910.95 gives 16.61 (exactly 3 / lg 2 and 5 / lg 2). */
const printedFactor = { 3: 10, 5: 16.61 } as const;

export const allowedHoursAt = (levelDb: number, criterionDb: number, exchangeDb: number): number =>
  8 / 2 ** ((levelDb - criterionDb) / exchangeDb);

/** The level that would give this dose in 8 hours. */
export const levelOfDose = (dosePercent: number, criterionDb: number, exchangeDb: 3 | 5): number =>
  printedFactor[exchangeDb] * Math.log10(dosePercent / 100) + criterionDb;

/** AS/NZS 1270: the class for days below this level, and the attenuation (SLC80) it starts at. */
export const protectorClasses = [
  { below: 90, protectorClass: 1, slc80Db: 10 },
  { below: 95, protectorClass: 2, slc80Db: 14 },
  { below: 100, protectorClass: 3, slc80Db: 18 },
  { below: 105, protectorClass: 4, slc80Db: 22 },
  { below: 110, protectorClass: 5, slc80Db: 26 },
] as const;

const output = z.strictObject({
  dailyDb: outcome('The day, as 8 hours', 'dB(A)'),
  laeq8hDb: outcome('LAeq,8h', 'dB(A)'),
  dosePercent: outcome('Dose', '%'),
  allowedHours: z.array(z.number()).meta({ title: 'Allowed alone, for each task', unit: 'h' }),
  totalHours: outcome('Time counted', 'h'),
  pascalSquaredHours: outcomeOrNone('Sound exposure', 'Pa²h'),
  points: outcomeOrNone('Exposure points'),
  protectorClass: outcomeOrNone('Hearing protector class'),
  slc80Db: outcomeOrNone('SLC80 of that class, from', 'dB'),
  warnings,
});

export const noise = defineFigure({
  id: 'noise',
  title: 'Noise over the day',
  version: 1,
  summary: 'The day’s noise from its tasks, how long each may last alone, and the hearing protector class.',
  input,
  output,
  formula:
    'LAeq,8h = 10·lg(Σ T·10^(L/10) / 8). Allowed hours = 8 / 2^((L − limit) / exchange rate); dose = 100·Σ time / allowed. With 5 dB the day = 16.61·lg(dose / 100) + limit. Sound exposure = 4·10⁻¹⁰·Σ T·10^(L/10) Pa²h. Points = 100·(T / 8)·10^((L − 85) / 10), added.',
  limits: [
    'Levels of 40 to 140 dB(A), 24 hours at most. Measured at the ear without protectors.',
    'Every task given counts. For the US limit of 90 dB(A) leave out tasks below 90, for hearing conservation those below 80.',
    'Peaks are a limit of their own: 140 dB(C). No figure from average levels shows that they are kept.',
    'The dose halves time for each 3 (or 5) dB exactly; the day’s level adds energy, where a doubling is 3.01 dB. They part by a quarter of a per cent for each 3 dB away from the limit.',
  ],
  caution:
    'Bring the noise down before reaching for muffs. The class is for muffs or plugs that fit and are worn all the time; below 70 dB(A) at the ear is too much protection.',
  sources: [
    {
      title: 'ISO 9612 and model WHS Regulations',
      locator: 'reg 56 (85 dB(A) over 8 hours, 140 dB(C) peak)',
      verified: 'secondary',
    },
    { title: '29 CFR 1910.95 Appendix A', locator: 'I(1), I(2) and Table G-16a', verified: 'law' },
    {
      title: 'NIOSH 98-126, Occupational noise exposure',
      locator: 'section 1.1, Tables 1-1 and 1-2',
      verified: 'secondary',
    },
    { title: 'HSE L108, Controlling noise at work', locator: 'exposure points', verified: 'secondary' },
    { title: 'AS/NZS 1270:2002', locator: 'class table, read on suppliers’ pages', verified: 'secondary' },
    { title: 'Specialist selection from 110 dB(A)', locator: 'AS/NZS 1269.3', verified: 'memory' },
  ],
  calculate: ({ tasks, criterionDb, exchangeDb }) => {
    const totalHours = tasks.reduce((sum, { hours }) => sum + hours, 0);
    if (totalHours > 24 + slip)
      throw refuseInput('tasks', 'Tasks must come to at most 24 h: a day has no more.');
    const energy = tasks.reduce((sum, { levelDb, hours }) => sum + hours * 10 ** (levelDb / 10), 0);
    const laeq8hDb = 10 * Math.log10(energy / 8);
    const allowedHours = tasks.map(({ levelDb }) => allowedHoursAt(levelDb, criterionDb, exchangeDb));
    const dosePercent =
      100 * tasks.reduce((sum, { hours }, i) => sum + hours / (allowedHours[i] ?? Infinity), 0);
    const equalEnergy = exchangeDb === 3;
    // None from 110 dB(A): a specialist must choose.
    const worn = protectorClasses.find(({ below }) => laeq8hDb < below - slip);
    return {
      dailyDb: equalEnergy ? laeq8hDb : levelOfDose(dosePercent, criterionDb, exchangeDb),
      laeq8hDb,
      dosePercent,
      allowedHours,
      totalHours,
      pascalSquaredHours: equalEnergy ? 4e-10 * energy : null,
      points: equalEnergy
        ? tasks.reduce((sum, { levelDb, hours }) => sum + 100 * (hours / 8) * 10 ** ((levelDb - 85) / 10), 0)
        : null,
      protectorClass: worn?.protectorClass ?? null,
      slc80Db: worn?.slc80Db ?? null,
      warnings: warningsFor(tasks, laeq8hDb, exchangeDb),
    };
  },
  reading: ({ tasks, criterionDb }, { dailyDb, dosePercent, allowedHours, protectorClass }) => {
    const day = `The day comes to ${about(dailyDb)} dB(A), ${about(dosePercent, 0)} % of the limit.`;
    if (dosePercent <= 100 + slip) return `${day} It is not over ${about(criterionDb)} dB(A).`;
    const times = tasks.map(
      ({ name, levelDb }, i) =>
        `${name ?? `${about(levelDb)} dB(A)`} for ${noLongerThan(allowedHours[i] ?? 0)}`,
    );
    const class_ =
      protectorClass === null
        ? 'a specialist must choose the protector'
        : `class ${protectorClass} hearing protectors`;
    return `${day} Alone, the limit allows ${listed(times)}. Quieten or shorten the work; until then ${class_}.`;
  },
  over: ({ criterionDb }, { dailyDb, dosePercent }) =>
    dosePercent > 100 + slip
      ? [`The day’s noise is ${about(dailyDb)} dB(A), over the limit of ${about(criterionDb)} dB(A).`]
      : [],
});

function warningsFor(tasks: readonly { levelDb: number }[], laeq8hDb: number, exchangeDb: 3 | 5): string[] {
  const loudest = Math.max(...tasks.map(({ levelDb }) => levelDb));
  return [
    ...(laeq8hDb >= 110
      ? ['From 110 dB(A) a class is not enough: a specialist must choose the protector.']
      : []),
    ...(loudest > 115 ? ['A level over 115 dB(A) is not allowed at any length in the United States.'] : []),
    ...(exchangeDb === 5
      ? ['Counted with 5 dB, a loud hour weighs less than with 3 dB, the rule in most places.']
      : []),
  ];
}
