import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { braceAngle } from '#shared/figures/braceAngle.ts';
import { crane } from '#shared/figures/crane.ts';
import { dust } from '#shared/figures/dust.ts';
import { fallClearance } from '#shared/figures/fallClearance.ts';
import { workOut } from '#shared/figures/figure.ts';
import { heat } from '#shared/figures/heat.ts';
import { incidentRate } from '#shared/figures/incidentRate.ts';
import { lifting } from '#shared/figures/lifting.ts';
import { noise } from '#shared/figures/noise.ts';
import { powerLine } from '#shared/figures/powerLine.ts';
import { riskBand } from '#shared/figures/riskBand.ts';
import { samplingPlan } from '#shared/figures/samplingPlan.ts';
import { sling } from '#shared/figures/sling.ts';
import { swingFall } from '#shared/figures/swingFall.ts';
import { teamLift } from '#shared/figures/teamLift.ts';
import { vibration } from '#shared/figures/vibration.ts';
import { wind } from '#shared/figures/wind.ts';
import { workHeat } from '#shared/figures/workHeat.ts';

const frame = {
  loadKg: 62,
  horizontalCm: 40,
  verticalCm: 60,
  travelCm: 100,
  asymmetryDeg: 30,
  liftsPerMinute: 1,
  durationHours: 2,
  coupling: 'fair',
};

describe('lifting', () => {
  test('a worker’s lift below 75 cm with a fair grip loses 5 %, above it nothing; copies exist that turn this round', () => {
    expect(lifting.compute({ ...frame, verticalCm: 74.99 }).cm).toBe(0.95);
    expect(lifting.compute({ ...frame, verticalCm: 75 }).cm).toBe(1);
  });

  test('the frequency factor goes by the height of the pick-up, the grip factor by the end that is looked at', () => {
    const { fm, cm, destination } = lifting.compute({
      ...frame,
      verticalCm: 40,
      liftsPerMinute: 9,
      destination: { horizontalCm: 40, verticalCm: 140, asymmetryDeg: 0, coupling: 'fair' },
    });
    expect(fm).toBe(0.3);
    expect(destination?.fm).toBe(0.3);
    expect([cm, destination?.cm]).toEqual([0.95, 1]);
  });

  test('a part of a lift a minute lies straight between two rows, and is not cut down to the lower one', () => {
    const fm = (liftsPerMinute: number) => lifting.compute({ ...frame, durationHours: 1, liftsPerMinute }).fm;
    expect(fm(2.5)).toBeCloseTo(0.895, 12);
    expect(fm(0.35)).toBeCloseTo(0.985, 12);
    expect(fm(0)).toBe(1);
  });

  test('lifts past the last row that is not 0 are refused, not faded out', () => {
    expect(() => lifting.compute({ ...frame, durationHours: 8, liftsPerMinute: 8.01 })).toThrow(
      'at most 8 for this time and height',
    );
    expect(lifting.compute({ ...frame, durationHours: 8, liftsPerMinute: 8 }).fm).toBe(0.18);
    expect(() => lifting.compute({ ...frame, durationHours: 1, liftsPerMinute: 12.5 })).toThrow('at most 12');
    expect(lifting.compute({ ...frame, verticalCm: 75, durationHours: 1, liftsPerMinute: 15 }).fm).toBe(0.28);
  });

  test('time changes class just above 1 and 2 hours', () => {
    const fm = (durationHours: number) => lifting.compute({ ...frame, durationHours }).fm;
    expect([fm(1), fm(1.01), fm(2), fm(2.01), fm(8)]).toEqual([0.94, 0.88, 0.88, 0.75, 0.75]);
  });

  test('hands closer than 25 cm and lifts shorter than 25 cm count as 25', () => {
    expect(lifting.compute({ ...frame, horizontalCm: 10 }).hm).toBe(1);
    expect(lifting.compute({ ...frame, travelCm: 0 }).dm).toBe(1);
  });

  test('every result lists what the equation leaves out, the hot roof among it', () => {
    expect(lifting.compute(frame).leftOut.join(' ')).toMatch(/hot roof/);
  });

  test('the reading says the limit, rounded down, and how far over it the load is', () => {
    const { reading, over } = workOut(lifting, frame);
    expect(reading).toContain('no more than 8.9 kg');
    expect(reading).toContain('6.9 times');
    expect(over).toHaveLength(1);
  });
});

test('four people get the half of three, with the caution that four is unlikely to work', () => {
  const { result, reading } = workOut(teamLift, { individualKg: [20, 20, 20, 20] });
  expect(result).toMatchObject({ factor: 0.5, teamKg: 40 });
  expect(result.warnings.join(' ')).toContain('unlikely to work');
  expect(reading).toContain('unlikely to work');
  expect(() => teamLift.compute({ individualKg: [20] })).toThrow('at least 2');
  expect(() => teamLift.compute({ individualKg: [1, 1, 1, 1, 1] })).toThrow('at most 4');
});

describe('noise and vibration', () => {
  test('a day at exactly the start of a class is in that class, in however many parts it comes', () => {
    for (const [levelDb, protectorClass] of [
      [90, 2],
      [95, 3],
      [100, 4],
      [105, 5],
      [110, null],
    ] as const)
      // prettier-ignore
      for (let parts = 1; parts <= 30; parts++) {
        const tasks = Array.from({ length: parts }, () => ({ levelDb, hours: 8 / parts }));
        expect(noise.compute({ tasks }).protectorClass, `${levelDb} dB(A) in ${parts}`).toBe(protectorClass);
      }
  });

  test('the factor of 29 CFR 1910.95 is 16.61 as printed, not rounded further', () => {
    const tenth = noise.compute({ tasks: [{ levelDb: 90, hours: 0.8 }], criterionDb: 90, exchangeDb: 5 });
    expect(tenth.dailyDb).toBeCloseTo(90 - 16.61, 9);
  });

  test('from 110 dB(A) no class is given and a specialist is asked for', () => {
    const { result, reading } = workOut(noise, { tasks: [{ levelDb: 110, hours: 8 }] });
    expect(result.protectorClass).toBeNull();
    expect(reading).toContain('specialist');
  });

  test('with 5 dB neither points nor pascal-squared hours are given', () => {
    const result = noise.compute({ tasks: [{ levelDb: 95, hours: 4 }], criterionDb: 90, exchangeDb: 5 });
    expect(result).toMatchObject({ points: null, pascalSquaredHours: null, dosePercent: 100 });
    expect(result.dailyDb).toBe(90);
  });

  test('tasks of more than a day are refused', () => {
    const tasks = [1, 2, 3].map(() => ({ levelDb: 80, hours: 9 }));
    expect(() => noise.compute({ tasks })).toThrow('at most 24 h');
    const tools = [1, 2, 3].map(() => ({ magnitudeMs2: 2, hours: 9 }));
    expect(() => vibration.compute({ tools })).toThrow('at most 24 h');
  });

  test('the reading gives the grinder its time, rounded down to the minute', () => {
    const { reading, over } = workOut(vibration, {
      tools: [{ name: 'grinder', magnitudeMs2: 7.9, hours: 2 }],
    });
    expect(reading).toContain('action value');
    expect(reading).toContain('limit grinder use to 48 minutes today');
    expect(over).toHaveLength(1);
    expect(workOut(vibration, { tools: [{ magnitudeMs2: 2, hours: 1 }] }).over).toEqual([]);
  });
});

describe('falls', () => {
  const person = { lanyardM: 1.5, tearOutM: 1.2, harnessStretchM: 0.3, attachmentHeightM: 1.5, marginM: 1 };

  test('no term has a built-in value: each one left out is asked for', () => {
    for (const term of Object.keys(person))
      expect(() => fallClearance.compute({ ...person, [term]: undefined })).toThrow('missing');
  });

  test('an anchor at the feet adds its depth to the free fall and to the room below the feet', () => {
    const level = fallClearance.compute(person);
    const low = fallClearance.compute({ ...person, anchorAboveAttachmentM: -1.5 });
    expect(low.freeFallM - level.freeFallM).toBeCloseTo(1.5, 12);
    expect(low.requiredBelowFeetM - level.requiredBelowFeetM).toBeCloseTo(1.5, 12);
    expect(low.requiredBelowAnchorM).toBe(level.requiredBelowAnchorM);
    expect(low.warnings.join(' ')).toMatch(/over 2 m.*Australia.*1\.8 m.*clip on higher/s);
  });

  test('a free fall is never less than 0, and an anchor out of reach is said or refused', () => {
    const high = fallClearance.compute({ ...person, anchorAboveAttachmentM: 2 });
    expect(high.freeFallM).toBe(0);
    expect(high.warnings.join(' ')).toContain('does not reach');
    expect(() => fallClearance.compute({ ...person, anchorAboveAttachmentM: 10 })).toThrow(
      'could not be clipped on',
    );
  });

  test('room below the feet is room below the anchor less the height of the anchor above them', () => {
    fc.assert(
      fc.property(fc.double({ min: -1.5, max: 1.5, noNaN: true }), (anchorAboveAttachmentM) => {
        const { requiredBelowAnchorM, requiredBelowFeetM } = fallClearance.compute({
          ...person,
          anchorAboveAttachmentM,
        });
        expect(requiredBelowFeetM).toBeCloseTo(
          requiredBelowAnchorM - anchorAboveAttachmentM - person.attachmentHeightM,
          12,
        );
      }),
    );
  });

  test('a swing of a millimetre keeps its digits', () => {
    const { extraDropM } = swingFall.compute({ verticalM: 50, offsetM: 0.001 });
    expect(extraDropM).toBeCloseTo(1e-8, 14);
    expect(swingFall.compute({ verticalM: 0, offsetM: 0 })).toEqual({ extraDropM: 0, speedMs: 0 });
    expect(swingFall.compute({ verticalM: 0, offsetM: 3 }).extraDropM).toBe(3);
  });
});

describe('brace angle', () => {
  const angleOf = (slope: number, spaces: number, spacing: number) =>
    (Math.atan(slope / (spaces * spacing)) * 180) / Math.PI;

  test('no other whole number of spaces comes nearer to the best angle without being too flat', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.5, max: 20, noNaN: true }),
        fc.double({ min: 0.3, max: 1.2, noNaN: true }),
        fc.integer({ min: 10, max: 40 }),
        fc.integer({ min: 40, max: 70 }),
        (slopeLengthM, trussSpacingM, minDeg, bestDeg) => {
          const allowed = Array.from({ length: 400 }, (_, i) =>
            angleOf(slopeLengthM, i + 1, trussSpacingM),
          ).filter((angle) => angle >= minDeg);
          fc.pre(allowed.length > 0);
          const { angleDeg, spacesCrossed, runM } = braceAngle.compute({
            slopeLengthM,
            trussSpacingM,
            minDeg,
            bestDeg,
          });
          const nearest = Math.min(...allowed.map((angle) => Math.abs(angle - bestDeg)));
          expect(Math.abs(angleDeg - bestDeg)).toBeCloseTo(nearest, 8);
          expect(angleDeg).toBeGreaterThanOrEqual(minDeg - 1e-6);
          expect(runM).toBeCloseTo(spacesCrossed * trussSpacingM, 12);
        },
      ),
    );
  });

  test('a slope too short for one space is refused, and so is a best angle below the least', () => {
    expect(() => braceAngle.compute({ slopeLengthM: 0.4, trussSpacingM: 0.9 })).toThrow(
      'too short for this spacing',
    );
    expect(() =>
      braceAngle.compute({ slopeLengthM: 4, trussSpacingM: 0.9, minDeg: 50, bestDeg: 45 }),
    ).toThrow('at least the flattest');
  });

  test('a steep roof’s brace is flatter in plan than on the roof, and says when it is too flat there', () => {
    const result = braceAngle.compute({ slopeLengthM: 5, trussSpacingM: 0.6, bestDeg: 32, pitchDeg: 45 });
    expect(result.angleDeg).toBeGreaterThan(30);
    expect(result.planAngleDeg).toBeLessThan(30);
    expect(result.warnings.join(' ')).toContain('In plan');
    expect(braceAngle.compute({ slopeLengthM: 5, trussSpacingM: 0.6 }).planAngleDeg).toBeNull();
  });
});

describe('lifting gear and wind', () => {
  test('one leg carries the whole load whatever angle is given; over 120° is refused', () => {
    expect(sling.compute({ loadKg: 500, legs: 1, angleBetweenLegsDeg: 90 }).legTensionKg).toBe(500);
    expect(() => sling.compute({ loadKg: 500, legs: 2, angleBetweenLegsDeg: 121 })).toThrow('at most 120 °');
    expect(() => sling.compute({ loadKg: 500, legs: 5 })).toThrow('1, 2, 3, 4');
  });

  test('a lift at exactly the limit is within it, a kilogram more is not', () => {
    expect(crane.compute({ loadKg: 700, riggingKg: 50, ratedKg: 1000 }).within).toBe(true);
    expect(crane.compute({ loadKg: 701, riggingKg: 50, ratedKg: 1000 }).within).toBe(false);
    expect(() => crane.compute({ loadKg: 1, riggingKg: 0, ratedKg: 1, limitPercent: 101 })).toThrow(
      'no lift may pass the chart',
    );
  });

  test('the wind’s push as a weight is its force over gravity, and the reading speaks of mean and gust', () => {
    const { result, reading } = workOut(wind, { speedMs: 10, areaM2: 1, coefficient: 1 });
    expect(result).toMatchObject({ pressurePa: 60, forceN: 60, beaufort: 5 });
    expect(result.massEquivalentKg).toBeCloseTo(60 / 9.80665, 12);
    expect(reading).toMatch(/mean.*gusts/s);
  });
});

describe('heat', () => {
  test('the simple form holds below 80 °F and the regression from there', () => {
    expect(heat.compute({ temperatureC: 25, humidityPercent: 50 }).heatIndexF).toBe(
      heat.compute({ temperatureC: 25, humidityPercent: 50 }).simpleF,
    );
    const warm = heat.compute({ temperatureC: 30, humidityPercent: 50 });
    expect(warm.heatIndexF).toBe(warm.regressionF + warm.adjustmentF);
  });

  test('dry air takes the adjustment up to 13 % and damp air from 85 %', () => {
    const adjustmentF = (fahrenheit: number, humidityPercent: number) =>
      heat.compute({ temperatureC: (fahrenheit - 32) / 1.8, humidityPercent }).adjustmentF;
    expect(adjustmentF(95, 12.5)).toBeCloseTo(-0.125, 9);
    expect([adjustmentF(95, 13), adjustmentF(82, 85), adjustmentF(113, 5)]).toEqual([0, 0, 0]);
    expect(adjustmentF(82, 86)).toBeCloseTo(0.1, 9);
  });

  test('a number beyond the printed chart says that it is no number', () => {
    expect(heat.compute({ temperatureC: 45, humidityPercent: 60 }).warnings.join(' ')).toContain(
      'beyond the published chart',
    );
    expect(heat.compute({ temperatureC: 40, humidityPercent: 40 }).warnings.join(' ')).not.toContain(
      'beyond',
    );
  });

  test('the bands start at 80, 90, 103 and 125 °F', () => {
    const band = (temperatureC: number, humidityPercent: number) =>
      heat.compute({ temperatureC, humidityPercent }).band;
    expect(band(20, 50)).toBe('none');
    expect(band(29, 50)).toBe('caution');
    expect(band(33, 50)).toBe('extreme caution');
    // 96 °F at 45 % is 104 °F on the chart: an older table would still say extreme caution.
    expect(band(64 / 1.8, 45)).toBe('danger');
    expect(band(38, 45)).toBe('danger');
    expect(band(40, 60)).toBe('extreme danger');
  });

  test('in the sun the air temperature is asked for, out of it it does not count', () => {
    const given = { naturalWetBulbC: 25, globeC: 32, metabolicW: 300, acclimatised: true };
    expect(() => workHeat.compute({ ...given, sun: true })).toThrow('Air is missing');
    expect(workHeat.compute({ ...given, sun: false, airC: 50 }).wbgtC).toBe(
      workHeat.compute({ ...given, sun: false }).wbgtC,
    );
    expect(workHeat.compute({ ...given, sun: true, airC: 20 }).wbgtC).toBeCloseTo(25.9, 12);
  });

  test('people new to the heat have the lower limit at every work rate', () => {
    fc.assert(
      fc.property(fc.double({ min: 100, max: 600, noNaN: true }), (metabolicW) => {
        const limitC = (acclimatised: boolean) =>
          workHeat.compute({ naturalWetBulbC: 20, globeC: 20, sun: false, metabolicW, acclimatised }).limitC;
        // The two curves meet near 17 W only.
        expect(limitC(false)).toBeLessThan(limitC(true));
      }),
    );
  });
});

describe('dust and rates', () => {
  test('time without a measurement counts as 0, and the result says so', () => {
    const { result, reading } = workOut(dust, { tasks: [{ mgPerM3: 0.2, hours: 2 }], limitMgPerM3: 0.05 });
    expect(result).toMatchObject({ twaMgPerM3: 0.05, ratio: 1, within: true, sampledHours: 2 });
    expect(result.warnings.join(' ')).toContain('6 of 8 hours');
    expect(reading).toContain('counts as no dust');
  });

  test('no hours is no rate, and no incidents still leave a high end', () => {
    expect(() => incidentRate.compute({ incidents: 0, hoursWorked: 0, per: 1_000_000 })).toThrow(
      'never a rate of 0',
    );
    const none = incidentRate.compute({ incidents: 0, hoursWorked: 1_000_000, per: 1_000_000 });
    expect(none).toMatchObject({ rate: 0, low: 0 });
    expect(none.high).toBeCloseTo(-Math.log(0.025), 9);
    expect(() => incidentRate.compute({ incidents: 1, hoursWorked: 1, per: 100 })).toThrow('1000000, 200000');
  });
});

describe('power lines', () => {
  test('a place without a table of its own takes that of its country and says so; an unknown place is refused', () => {
    const { distanceM, warnings, table } = powerLine.compute({ profile: 'au-nsw', kilovolts: 132 });
    expect([distanceM, table]).toEqual([3, 'au']);
    expect(warnings.join(' ')).toMatch(/no table of its own.*not verified/s);
    expect(powerLine.compute({ profile: 'AU-SA', kilovolts: 132 }).distanceM).toBe(5);
    expect(() => powerLine.compute({ profile: 'uk', kilovolts: 11 })).toThrow('no table for uk');
  });

  test('a table read in the law or at the regulator carries no such warning, and the rule names its row', () => {
    const { rule, warnings, verified } = powerLine.compute({ profile: 'us', kilovolts: 138 });
    expect(verified).toBe('law');
    expect(rule).toContain('Over 50 to 200 kV');
    expect(warnings.join(' ')).not.toMatch(/confirm|not verified/i);
  });

  test('above the end of a table nothing is made up', () => {
    expect(() => powerLine.compute({ profile: 'au-sa', kilovolts: 330 })).toThrow('at most 275 kV');
    expect(() => powerLine.compute({ profile: 'nz', kilovolts: 220 })).toThrow('ask the line’s owner');
  });
});

describe('sampling and risk', () => {
  test('a sample as large as the lot means every one is checked', () => {
    expect(samplingPlan.compute({ lotSize: 20, level: 'II', aql: 0.65 })).toMatchObject({
      letter: 'C',
      planLetter: 'F',
      size: 20,
      planSize: 20,
      inspectAll: true,
    });
    expect(samplingPlan.compute({ lotSize: 21, level: 'II', aql: 0.65 })).toMatchObject({
      size: 20,
      inspectAll: false,
    });
  });

  test('levels I and III have the letters of two transcriptions of MIL-STD-105E Table I', () => {
    const lotSizes = [
      8, 15, 25, 50, 90, 150, 280, 500, 1200, 3200, 10_000, 35_000, 150_000, 500_000, 500_001,
    ];
    const letters = (level: string) =>
      lotSizes.map((lotSize) => samplingPlan.compute({ lotSize, level, aql: 1 }).letter).join('');
    expect(letters('I')).toBe('AABCCDEFGHJKLMN');
    expect(letters('III')).toBe('BCDEFGHJKLMNPQR');
  });

  test('levels I, II and III ask for more and more', () => {
    const letters = (lotSize: number) =>
      (['I', 'II', 'III'] as const).map((level) => samplingPlan.compute({ lotSize, level, aql: 1 }).letter);
    expect(letters(100)).toEqual(['D', 'F', 'G']);
    expect(letters(5)).toEqual(['A', 'A', 'B']);
    expect(letters(600_000)).toEqual(['N', 'Q', 'R']);
    expect(() => samplingPlan.compute({ lotSize: 1, level: 'II', aql: 1 })).toThrow('start at a lot of 2');
    expect(() => samplingPlan.compute({ lotSize: 10, level: 'II', aql: 3 })).toThrow('0.065, 0.1');
  });

  test('severity 1 is the worst on MIL-STD-882E and consequence 1 the slightest on AS/NZS 4360', () => {
    expect(riskBand.compute({ matrix: 'mil-std-882e', likelihood: 'C', consequence: 1 }).band).toBe('high');
    expect(riskBand.compute({ matrix: 'as4360-1999', likelihood: 'C', consequence: 1 }).band).toBe('low');
  });

  test('a rating off the matrix is refused with the rows or columns that there are', () => {
    expect(() => riskBand.compute({ matrix: 'as4360-1999', likelihood: 'F', consequence: 1 })).toThrow(
      'A, B, C, D, E',
    );
    expect(() => riskBand.compute({ matrix: 'as4360-1999', likelihood: 'A', consequence: 6 })).toThrow(
      '1, 2, 3, 4, 5',
    );
    expect(() => riskBand.compute({ matrix: 'mil-std-882e', likelihood: 'A', consequence: 5 })).toThrow(
      '1 to 4',
    );
    expect(() => riskBand.compute({ matrix: 'mil-std-882e', likelihood: 'G', consequence: 1 })).toThrow(
      'A to E',
    );
  });

  test('the organisation’s own matrix is read as given', () => {
    const scale = (keys: (string | number)[]) =>
      keys.map((key) => ({ key, name: `Level ${key}`, meaning: 'As agreed' }));
    const matrix = {
      format: 1,
      id: 'ours',
      name: 'Three by three',
      source: 'Agreed with the crew',
      likelihoods: scale(['A', 'B', 'C']),
      consequences: scale([1, 2, 3]),
      cells: [['moderate', 'high', 'extreme'], ['low', 'moderate', 'high'], ['low', 'low', 'moderate']], // prettier-ignore
      acceptance: { low: 'Go on.', moderate: 'Ask.', high: 'Ask the officer.', extreme: 'Stop.' },
    };
    expect(riskBand.compute({ matrix, likelihood: 'A', consequence: 3 })).toMatchObject({
      band: 'extreme',
      order: 4,
      of: 4,
      matrix: 'Three by three',
    });
    expect(() =>
      riskBand.compute({ matrix: { ...matrix, cells: [] }, likelihood: 'A', consequence: 3 }),
    ).toThrow('do not fill the matrix');
  });
});
