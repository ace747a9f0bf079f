import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { bandOf, bands, compareBands, matrixSchema } from '#shared/risk/matrix.ts';

const file = JSON.parse(
  readFileSync(new URL('../../../templates/matrices/as4360-1999.json', import.meta.url), 'utf8'),
) as Record<string, unknown>;
const matrix = matrixSchema.parse(file);

describe('AS/NZS 4360:1999 Table E3 (cells from secondary copies, number of the table from memory)', () => {
  test.each([
    ['A', 1, 'high'],
    ['B', 1, 'moderate'],
    ['C', 2, 'moderate'],
    ['D', 5, 'extreme'],
    ['E', 5, 'high'],
  ])('%s and %i is %s', (likelihood, consequence, band) => {
    expect(bandOf(matrix, { likelihood, consequence })).toBe(band);
  });
});

test('a rating that the matrix does not have has no band', () => {
  expect(bandOf(matrix, { likelihood: 'F', consequence: 1 })).toBeNull();
  expect(bandOf(matrix, { likelihood: 'A', consequence: 6 })).toBeNull();
});

test('bands stand in the order of the risk', () => {
  expect([...bands].reverse().sort(compareBands)).toEqual(['low', 'moderate', 'high', 'extreme']);
});

test('every band says what must happen before work goes on', () => {
  for (const band of bands) expect(matrix.acceptance[band]).toMatch(/\w/);
});

test.each([
  ['a row short', { cells: matrix.cells.slice(1) }],
  ['a column short', { cells: matrix.cells.map((row) => row.slice(1)) }],
  ['a band that nobody knows', { cells: matrix.cells.map((row) => row.map(() => 'purple')) }],
  ['no word on who accepts a band', { acceptance: { low: 'Work on.' } }],
])('a matrix with %s is refused', (_name, change) => {
  expect(matrixSchema.safeParse({ ...file, ...change }).success).toBe(false);
});
