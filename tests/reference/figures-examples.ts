import { expect, test } from 'vitest';
import examples from './calc-examples.json' with { type: 'json' };

export type Example = {
  id: string;
  topic: string;
  // The file holds as many shapes as there are publications.
  inputs: any; // eslint-disable-line @typescript-eslint/no-explicit-any
  expected: any; // eslint-disable-line @typescript-eslint/no-explicit-any
  tolerance: any; // eslint-disable-line @typescript-eslint/no-explicit-any
  source: string;
  verified: string;
  kind: string;
};

export const allExamples = examples as Example[];

/** One test named after a published example and its source. */
export function published(id: string, run: (example: Example) => void): void {
  const example = allExamples.find((each) => each.id === id);
  if (!example) throw new Error(`There is no example ${id}.`);
  const sort = example.kind === 'erratum' ? 'stays off the misprint' : 'agrees with';
  const memory = example.verified === 'memory' ? ' (from memory)' : '';
  test(`${sort} ${id}${memory}: ${example.source}`, () => run(example));
}

/** Each value within the tolerance of its place, or the one tolerance of all. */
export function expectAll(
  actual: readonly number[],
  expected: readonly number[],
  tolerance: number | readonly number[],
): void {
  expect(actual).toHaveLength(expected.length);
  actual.forEach((value, i) => {
    const within = typeof tolerance === 'number' ? tolerance : (tolerance[i] ?? 0);
    expectNear(value, expected[i] ?? NaN, within, `number ${i}`);
  });
}

export function expectNear(actual: number, expected: number, tolerance: number, about = ''): void {
  // A tolerance of 0 still allows what a sum loses in binary.
  const within = Math.max(tolerance * (1 + 1e-9), Math.abs(expected) * 1e-12);
  expect(Math.abs(actual - expected), `${about} ${actual} for ${expected}`).toBeLessThanOrEqual(within);
}
