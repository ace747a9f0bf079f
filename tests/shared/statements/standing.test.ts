import fc from 'fast-check';
import { expect, test } from 'vitest';
import { countsAsCurrent } from '#shared/statements/standing.ts';

const revisions = (...material: boolean[]) =>
  material.map((one, index) => ({ number: index + 1, material: one }));

test.each([
  ['the revision in force counts', 2, revisions(true, true), 2, true],
  ['an earlier one does not count after a material change (law.md T15)', 1, revisions(true, true), 2, false],
  ['an earlier one counts after a change that is not material', 1, revisions(true, false), 2, true],
  ['one material change among several is enough', 1, revisions(true, false, true, false), 4, false],
  ['nothing counts where nothing is in force', 1, revisions(true), null, false],
  ['a revision that is not in force yet does not count', 3, revisions(true, true, true), 2, false],
])('%s', (_name, signed, all, current, expected) => {
  expect(countsAsCurrent(signed, all, current)).toBe(expected);
});

test('whoever signed a later revision is never worse off', () => {
  fc.assert(
    fc.property(
      fc.array(fc.boolean(), { minLength: 1, maxLength: 8 }),
      fc.nat(),
      fc.nat(),
      (material, a, b) => {
        const all = revisions(true, ...material);
        const [early, late] = [1 + (a % all.length), 1 + (b % all.length)].sort((x, y) => x - y) as [
          number,
          number,
        ];
        if (countsAsCurrent(early, all, all.length))
          expect(countsAsCurrent(late, all, all.length)).toBe(true);
      },
    ),
  );
});
