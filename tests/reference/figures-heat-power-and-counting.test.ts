import { describe, expect, test } from 'vitest';
import { heat, regression, toCelsius, toFahrenheit } from '#shared/figures/heat.ts';
import { incidentRate } from '#shared/figures/incidentRate.ts';
import { powerLine } from '#shared/figures/powerLine.ts';
import { readability } from '#shared/figures/readability.ts';
import { riskBand } from '#shared/figures/riskBand.ts';
import { sampleResult } from '#shared/figures/sampleResult.ts';
import { sampleSize } from '#shared/figures/sampleSize.ts';
import { samplingPlan } from '#shared/figures/samplingPlan.ts';
import { surveySize } from '#shared/figures/surveySize.ts';
import { workHeat } from '#shared/figures/workHeat.ts';
import { expectAll, expectNear, published } from './figures-examples.ts';

const feelsF = ([t, humidityPercent]: [number, number]) =>
  heat.compute({ temperatureC: toCelsius(t), humidityPercent }).heatIndexF;

describe('Heat index', () => {
  published('heat-index-chart', ({ inputs, expected, tolerance }) => {
    const cells = inputs.cells_T_RH as [number, number][];
    expect(cells).toHaveLength(135);
    // The printed chart is the regression alone …
    expectAll(
      cells.map(([t, r]) => Math.round(regression(t, r))),
      expected,
      tolerance,
    );
    // … to which the weather service's own algorithm adds its adjustments: 124 cells stay, the others rise, two at 80 °F by 2.
    const rises = cells.map((cell, i) => Math.round(feelsF(cell)) - (expected[i] as number));
    expect(rises.filter((rise) => rise === 0)).toHaveLength(124);
    expect(cells.filter((_, i) => Math.abs(rises[i] ?? 9) > tolerance)).toEqual([[80, 95], [80, 100]]); // prettier-ignore
    expect(Math.max(...rises.map(Math.abs))).toBe(2);
  });

  published('heat-index-nws-calculator', ({ inputs, expected, tolerance }) => {
    expectAll((inputs.T_RH as [number, number][]).map(feelsF), expected, tolerance);
  });

  published('heat-index-pythermal', ({ inputs, expected, tolerance }) => {
    // Their numbers are of the regression alone, without limits or adjustments.
    const raw = (inputs.T_C as number[]).map((t, i) => toCelsius(regression(toFahrenheit(t), inputs.RH[i])));
    expectAll(raw, expected, tolerance);
  });

  published('heat-index-adjustments', ({ inputs, expected, tolerance }) => {
    expectAll((inputs.T_RH as [number, number][]).map(feelsF), expected, tolerance);
  });

  test('35 °C at 70 % feels like 50.3405 °C: a public comfort library’s test value', () => {
    expectNear(heat.compute({ temperatureC: 35, humidityPercent: 70 }).heatIndexC, 50.3405, 0.0001);
  });

  test('agrees with a full implementation at 86 °F/45 %, 95/70 and 86/90: npm heat-index 0.0.3', () => {
    expectAll([feelsF([86, 45]), feelsF([95, 70]), feelsF([86, 90])], [86.569, 122.613, 105.394], 0.0006);
  });
});

const wbgt = (naturalWetBulbC: number, globeC: number, airC?: number) =>
  workHeat.compute({
    naturalWetBulbC,
    globeC,
    ...(airC === undefined ? {} : { airC }),
    sun: airC !== undefined,
    metabolicW: 300,
    acclimatised: true,
  });
const limit = (metabolicW: number, acclimatised: boolean) =>
  workHeat.compute({ naturalWetBulbC: 20, globeC: 30, sun: false, metabolicW, acclimatised }).limitC;

describe('Work in heat', () => {
  test('gives the WBGT of six published readings: MIT-licensed validation data for comfort models', () => {
    const cases: [number, number, number | undefined, number][] = [
      [25, 32, 20, 25.9],
      [17.3, 40, undefined, 24.1],
      [21.1, 55, undefined, 31.3],
      [16.7, 40, undefined, 23.7],
      [25, 30, undefined, 26.5],
      [25, 32, undefined, 27.1],
    ];
    for (const [wet, globe, air, expected] of cases) expectNear(wbgt(wet, globe, air).wbgtC, expected, 0.05);
  });

  published('niosh-ral', ({ inputs, expected, tolerance }) => {
    expectAll(
      (inputs.M_W as number[]).map((watts) => limit(watts, false)),
      expected,
      tolerance,
    );
  });

  test('the limit for people used to the heat is 29.45 °C at 234 W and 27.46 at 349 W: NIOSH 2016-106 s8.1', () => {
    expectAll([limit(234, true), limit(349, true)], [29.45, 27.46], 0.006);
  });

  published('niosh-table51-moderate', ({ inputs, expected, tolerance }) => {
    expectNear(limit(inputs.M_W, inputs.acclimatized), expected.WBGT_C, tolerance);
  });

  published('niosh-figure-reading-erratum', ({ inputs, expected, tolerance }) => {
    expect(Math.abs(limit(inputs.M_W, true) - expected.REL_C)).toBeGreaterThan(tolerance);
    expect(Math.abs(limit(inputs.M_W, false) - expected.RAL_C)).toBeGreaterThan(tolerance);
    expectNear(limit(inputs.M_W, true), 27.46, 0.01);
    expectNear(limit(inputs.M_W, false), 24.05, 0.01);
  });

  published('acgih-screening-tlv', ({ expected }) => {
    // The table is in whole and half degrees; the curve behind it passes within a quarter at moderate work.
    expectNear(limit(300, true), expected.acclimatized_moderate_75_100, 0.25);
    expectNear(limit(300, false), expected.unacclimatized_moderate_75_100, 0.25);
  });
});

const distance = (profile: string, kilovolts: number) => powerLine.compute({ profile, kilovolts }).distanceM;

describe('Power lines', () => {
  published('osha-table-a', ({ inputs, expected }) => {
    expectAll(
      (inputs.kV as number[]).map((kv) => distance('us', kv) / 0.3048),
      expected,
      0,
    );
  });

  test('T22: in the United States 138 kV is 15 ft, 50 kV 10, 50.1 kV 15 and 200 kV 15; 500.1 to 750 is 35: 29 CFR 1926.1408 Table A', () => {
    const feet = [138, 50, 50.1, 200, 200.1, 350, 500, 500.1, 750, 750.1, 1000].map(
      (kv) => distance('us', kv) / 0.3048,
    );
    expectAll(feet, [15, 10, 15, 15, 20, 20, 25, 35, 35, 45, 45], 0);
    expect(() => distance('us', 1000.1)).toThrow('at most 1000 kV');
  });

  published('sa-approach-anyone', ({ inputs, expected }) => {
    const kilovolts: Record<string, number[]> = {
      '240-415 V': [0.24, 0.415],
      '7.6-11 kV': [7.6, 11],
      '19-33 kV': [19, 33],
      '66 kV': [66],
      '132 kV': [132],
      '275 kV': [275],
    };
    (inputs.volts as string[]).forEach((name, i) => {
      for (const kv of kilovolts[name] ?? []) expect(distance('au-sa', kv)).toBe(expected[i]);
      expect(kilovolts[name]).toBeDefined();
    });
  });
});

describe('Rates', () => {
  const rateOf = (incidents: number, hoursWorked: number, per: number) =>
    incidentRate.compute({ incidents, hoursWorked, per });

  published('trir-bls', ({ inputs, expected, tolerance }) => {
    expectNear(rateOf(inputs.cases, inputs.hours, 200_000).rate, expected.rate, tolerance);
  });

  for (const id of ['ltifr-2.4', 'ltifr-7'])
    published(id, ({ inputs, expected, tolerance }) => {
      expectNear(rateOf(inputs.lti, inputs.hours, 1_000_000).rate, expected.ltifr, tolerance);
    });

  published('iogp-far-2024', ({ inputs, expected, tolerance }) => {
    // Their rate is for a hundred million hours.
    expectNear(rateOf(inputs.fatalities, inputs.hours, 1_000_000).rate * 100, expected.FAR, tolerance);
  });

  published('garwood-7', ({ inputs, expected, tolerance }) => {
    const { low, high } = rateOf(inputs.count, inputs.hours, 200_000);
    expectAll([low, high], [expected.lower, expected.upper], tolerance);
  });

  test('the exact Poisson ends agree with chi-square quantiles for 0 to 100 000 incidents: SciPy 1.17.1', () => {
    const cases: [number, number, number][] = [
      [0, 0, 3.6888794541139354],
      [1, 0.025317807984289876, 5.571643390938898],
      [2, 0.24220927854396496, 7.22468766772396],
      [5, 1.6234863901184207, 11.66833207932267],
      [7, 2.8143630515198654, 14.422675361702376],
      [30, 20.240874021420915, 42.82686539480766],
      [100, 81.36399125092314, 121.62679379242638],
      [1000, 938.9730184076952, 1063.952136016302],
      [100_000, 99381.15266374472, 100621.74473974388],
    ];
    for (const [count, low, high] of cases) {
      const found = rateOf(count, 1_000_000, 1_000_000);
      expectAll([found.low, found.high], [low, high], high * 1e-9);
    }
  });
});

describe('Samples', () => {
  published('krejcie-morgan-table', ({ inputs, expected }) => {
    expect(expected).toHaveLength(90);
    const results = (inputs.N as number[]).map((population) => surveySize.compute({ population }));
    expect(results.map(({ size }) => size)).toEqual(expected);
    expect(results[0]?.chiSquare).toBe(inputs.X2);
  });

  published('cochran-400', ({ inputs, expected, tolerance }) => {
    expectNear(surveySize.compute({ population: inputs.N, margin: inputs.d }).size, expected.n, tolerance);
  });

  published('cochran-infinite', ({ inputs, expected, tolerance }) => {
    const { exact, size } = surveySize.compute({ population: 1e9, margin: inputs.d });
    expectNear(exact, expected.n, tolerance);
    expect(size).toBe(expected.n);
  });

  test('chi-square with one degree of freedom is that of the tables at 50 to 99.9 %: SciPy 1.17.1', () => {
    const quantiles = [0.5, 0.8, 0.9, 0.95, 0.99, 0.999].map(
      (confidence) => surveySize.compute({ population: 10, confidence }).chiSquare,
    );
    expect(quantiles).toEqual([0.455, 1.642, 2.706, 3.841, 6.635, 10.828]);
  });

  published('wilson-z1.96', ({ inputs, expected, tolerance }) => {
    (inputs.x_n as [number, number][]).forEach(([hits, size], i) => {
      const { low, high } = sampleResult.compute({ hits, size, z: inputs.z });
      expectAll([low, high], expected[i], tolerance);
    });
  });

  published('hypergeom-scipy', ({ inputs, expected, tolerance }) => {
    // A confidence just under the published chance makes the sample the published ten.
    const result = sampleSize.compute({
      population: inputs.N,
      tolerableShare: inputs.D / inputs.N,
      confidence: 1 - 0.311,
    });
    expect(result).toMatchObject({ size: inputs.n, bad: inputs.D });
    expectNear(result.chanceOfNone, expected[0], tolerance);
  });

  published('detect-95', ({ inputs, expected }) => {
    const sizes = (inputs.N_D as [number, number][]).map(
      ([population, bad]) =>
        sampleSize.compute({ population, tolerableShare: bad / population, confidence: 0.95 }).size,
    );
    expect(sizes).toEqual(expected);
  });

  test('sample sizes agree with the hypergeometric distribution where shares and chances fall between binary fractions: SciPy 1.17.1', () => {
    const cases: [number, number, number, number][] = [
      [100, 0.07, 0.95, 34],
      [20, 0.05, 0.95, 19],
      [30, 0.1, 0.9, 16],
      [250, 0.02, 0.99, 150],
      [4000, 0.03, 0.95, 98],
      [100_000, 0.001, 0.95, 2950],
      [7, 0.5, 0.99, 4],
      [1, 1, 0.95, 1],
      [12, 0.25, 0.8, 5],
    ];
    for (const [population, tolerableShare, confidence, size] of cases)
      expect(sampleSize.compute({ population, tolerableShare, confidence }).size).toBe(size);
  });

  const lots = (range: string) => range.replace('+', '-2000000').split('-').map(Number);

  published('z14-code-letters-II', ({ inputs, expected }) => {
    (inputs.lot as string[]).forEach((range, i) => {
      for (const lotSize of lots(range))
        expect(samplingPlan.compute({ lotSize, level: 'II', aql: 1 }).letter).toBe(expected[i]);
    });
  });

  published('z14-single-normal-II', ({ inputs, expected }) => {
    (inputs.rows as string[]).forEach((range, row) => {
      (inputs.AQL as string[]).forEach((aql, column) => {
        const [size, accept, reject] = expected[row][column];
        for (const lotSize of lots(range)) {
          const plan = samplingPlan.compute({ lotSize, level: 'II', aql: Number(aql) });
          expect(plan, `lot ${lotSize}, AQL ${aql}`).toMatchObject({ planSize: size, accept, reject });
          expect(plan.inspectAll).toBe(size >= lotSize);
          expect(plan.size).toBe(Math.min(size, lotSize));
        }
      });
    });
  });

  test('follows every arrow of a US agency’s copy of MIL-STD-105E Table II-A, 0.65 to 15 %, letters A to Q (its letter A at 10 % has an arrow to nowhere)', () => {
    const columns = [0.65, 1, 1.5, 2.5, 4, 6.5, 10, 15];
    const lotSizes = [2, 9, 16, 26, 51, 91, 151, 281, 501, 1201, 3201, 10_001, 35_001, 150_001, 500_001];
    // Rejection numbers; v and ^ are the arrows, ; an arrow that goes on.
    const rows = `
      ; ; ; ; v 1 ^ v
      ; ; ; v 1 ^ v 2
      ; ; v 1 ^ v 2 3
      ; v 1 ^ v 2 3 4
      v 1 ^ v 2 3 4 6
      1 ^ v 2 3 4 6 8
      ^ v 2 3 4 6 8 11
      v 2 3 4 6 8 11 15
      2 3 4 6 8 11 15 22
      3 4 6 8 11 15 22 ^
      4 6 8 11 15 22 ^ ;
      6 8 11 15 22 ^ ; ;
      8 11 15 22 ^ ; ; ;
      11 15 22 ^ ; ; ; ;
      15 22 ^ ; ; ; ; ;`
      .trim()
      .split('\n')
      .map((line) => line.trim().split(' '));
    for (const [row, lotSize] of lotSizes.entries())
      for (const [column, aql] of columns.entries()) {
        if (row === 0 && aql === 10) continue;
        // An arrow that goes on points down left of the numbers and up right of them.
        const numberLeft = (rows[row] ?? []).slice(0, column).some((cell) => /\d/.test(cell));
        let at = row;
        const direction = () => {
          const cell = rows[at]?.[column];
          return cell === 'v' ? 1 : cell === '^' ? -1 : numberLeft ? -1 : 1;
        };
        while (!/\d/.test(rows[at]?.[column] ?? '')) at += direction();
        expect(samplingPlan.compute({ lotSize, level: 'II', aql }).reject, `lot ${lotSize}, AQL ${aql}`).toBe(
          Number(rows[at]?.[column]),
        );
      }
  });
});

describe('Risk bands', () => {
  const band = (matrix: unknown, likelihood: string, consequence: number) =>
    riskBand.compute({ matrix, likelihood, consequence }).band;

  published('mil-std-882e-table3', ({ expected }) => {
    [...'ABCDE'].forEach((likelihood, row) => {
      const bands = [1, 2, 3, 4].map((severity) => band('mil-std-882e', likelihood, severity));
      expect(bands).toEqual((expected[row] as string[]).map((word) => word.toLowerCase()));
    });
    expect([1, 2, 3, 4].map((severity) => band('mil-std-882e', 'F', severity))).toEqual(
      Array(4).fill('eliminated'),
    );
  });

  test('T13: MIL-STD-882E severity 3 probability E is medium, (2,D) medium, (1,D) serious, (4,B) medium: law facts 2.11', () => {
    expect(band('mil-std-882e', 'E', 3)).toBe('medium');
    expect(band('mil-std-882e', 'D', 2)).toBe('medium');
    expect(band('mil-std-882e', 'D', 1)).toBe('serious');
    expect(band('mil-std-882e', 'B', 4)).toBe('medium');
  });

  test('T14: AS/NZS 4360:1999 has (A,1) high, (B,1) moderate, (C,2) moderate, (D,5) extreme, (E,5) high: law facts 2.10', () => {
    const cells: [string, number][] = [['A', 1], ['B', 1], ['C', 2], ['D', 5], ['E', 5]]; // prettier-ignore
    expect(cells.map(([row, column]) => band('as4360-1999', row, column))).toEqual([
      'high',
      'moderate',
      'moderate',
      'extreme',
      'high',
    ]);
  });

  test('AS/NZS 4360:1999 Table E3 cell by cell, 8 extreme, 8 high, 4 moderate, 5 low: law facts 2.10 and a mining site’s copy', () => {
    const letters = { L: 'low', M: 'moderate', H: 'high', E: 'extreme' } as Record<string, string>;
    const printed = { A: 'HHEEE', B: 'MHHEE', C: 'LMHEE', D: 'LLMHE', E: 'LLMHH' };
    const found = Object.keys(printed).map((row) =>
      [1, 2, 3, 4, 5].map((column) => band('as4360-1999', row, column)),
    );
    expect(found).toEqual(Object.values(printed).map((row) => [...row].map((letter) => letters[letter])));
    const count = (word: string) => found.flat().filter((each) => each === word).length;
    expect(['extreme', 'high', 'moderate', 'low'].map(count)).toEqual([8, 8, 4, 5]);
  });
});

describe('Reading ease', () => {
  const score = (inputs: { words: number; sentences: number; syllables: number }) =>
    readability.compute(inputs);

  published('fk-platypus', ({ inputs, expected, tolerance }) => {
    expectNear(score(inputs).fleschKincaidGrade, expected.FK, tolerance);
  });

  published('fre-platypus', ({ inputs, expected, tolerance }) => {
    expectNear(score(inputs).fleschEase, expected.FRE, tolerance);
  });

  published('fre-maximum', ({ inputs, expected, tolerance }) => {
    expectNear(score(inputs).fleschEase, expected.FRE, tolerance);
    expectNear(score(inputs).fleschKincaidGrade, expected.FK, tolerance);
  });

  published('fre-cat-mat', ({ inputs, expected, tolerance }) => {
    expectNear(score(inputs).fleschEase, expected.FRE, tolerance);
  });

  test('scores four texts of known counts to three decimals: law facts 9.5', () => {
    const cases: [number, number, number, number, number][] = [
      [13, 1, 24, 37.455, 11.265],
      [6, 1, 6, 116.145, -1.45],
      [1, 1, 1, 121.22, -3.4],
      [17, 2, 18, 108.631, 0.219],
    ];
    for (const [words, sentences, syllables, ease, grade] of cases) {
      const { fleschEase, fleschKincaidGrade } = score({ words, sentences, syllables });
      expectAll([fleschEase, fleschKincaidGrade], [ease, grade], 0.0005);
    }
  });
});
