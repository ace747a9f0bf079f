import fc from 'fast-check';
import { expect, test } from 'vitest';
import { holdDowns } from '#shared/figures/holdDowns.ts';

const gapsOf = (positions: readonly number[]) =>
  positions.slice(1).map((to, i) => [positions[i] ?? NaN, to] as const);

test('a layout keeps the ends, the sides of openings and the brace points, keeps out of openings and keeps to the spacing with the fewest', () => {
  const panel = fc.integer({ min: 600, max: 20_000 });
  fc.assert(
    fc.property(
      panel,
      fc.uniqueArray(fc.integer({ min: 0, max: 1000 }), { minLength: 0, maxLength: 8 }),
      fc.array(fc.integer({ min: 0, max: 1000 }), { maxLength: 5 }),
      fc.integer({ min: 300, max: 2400 }),
      (panelMm, edges, braces, spacingMm) => {
        const places = edges.toSorted((a, b) => a - b).map((part) => (panelMm * part) / 1000);
        const openings = places.flatMap((fromMm, i) => {
          const toMm = places[i + 1];
          return i % 2 === 0 && toMm !== undefined ? [{ fromMm, toMm }] : [];
        });
        const within = (at: number) => openings.some(({ fromMm, toMm }) => at > fromMm && at < toMm);
        const braceMm = braces.map((part) => (panelMm * part) / 1000).filter((at) => !within(at));

        const { positionsMm, count, widestMm } = holdDowns.compute({
          panelMm,
          openings: openings.toReversed(),
          braceMm,
          spacingMm,
        });

        expect(count).toBe(positionsMm.length);
        expect(positionsMm).toEqual(positionsMm.toSorted((a, b) => a - b));
        expect(new Set(positionsMm).size).toBe(count);
        for (const must of [
          0,
          panelMm,
          ...braceMm,
          ...openings.flatMap(({ fromMm, toMm }) => [fromMm, toMm]),
        ])
          expect(positionsMm.some((at) => Math.abs(at - must) < 1e-6)).toBe(true);
        expect(
          positionsMm.some((at) =>
            openings.some(({ fromMm, toMm }) => at > fromMm + 1e-5 && at < toMm - 1e-5),
          ),
        ).toBe(false);
        const solid = gapsOf(positionsMm).filter(
          ([from, to]) => !openings.some(({ fromMm, toMm }) => from >= fromMm - 1e-6 && to <= toMm + 1e-6),
        );
        const widest = Math.max(0, ...solid.map(([from, to]) => to - from));
        expect(widestMm).toBeCloseTo(widest, 6);
        expect(widest).toBeLessThanOrEqual(spacingMm + 1e-5);
      },
    ),
  );
});

test('6000 mm at 1200 mm takes six and never seven, however the division falls', () => {
  expect(holdDowns.compute({ panelMm: 6000 })).toEqual({
    positionsMm: [0, 1200, 2400, 3600, 4800, 6000],
    count: 6,
    widestMm: 1200,
  });
  for (let parts = 1; parts <= 30; parts++)
    for (const spacingMm of [1200, 600.3, 450.1, 333.3]) {
      const panelMm = parts * spacingMm;
      expect(holdDowns.compute({ panelMm, spacingMm }).count, `${parts} × ${spacingMm}`).toBe(parts + 1);
    }
});

test('a doorway has a hold-down on each side and none in it, and its width is not a gap', () => {
  const { positionsMm, widestMm } = holdDowns.compute({
    panelMm: 6000,
    openings: [{ fromMm: 2000, toMm: 4400 }],
  });
  expect(positionsMm).toEqual([0, 1000, 2000, 4400, 5200, 6000]);
  expect(widestMm).toBe(1000);
});

test('points given twice are one point', () => {
  expect(holdDowns.compute({ panelMm: 1000, braceMm: [500, 500, 0, 1000] }).positionsMm).toEqual([
    0, 500, 1000,
  ]);
});

test('a brace point in an opening, openings that overlap, end before they start or leave the panel are refused by name', () => {
  const panel = { panelMm: 5000, openings: [{ fromMm: 1000, toMm: 2000 }] };
  const fieldsOf = (given: object) => {
    try {
      holdDowns.compute({ ...panel, ...given });
      return null;
    } catch (error) {
      return Object.keys((error as { fields: object }).fields);
    }
  };
  expect(fieldsOf({ braceMm: [400, 1500] })).toEqual(['braceMm.1']);
  expect(fieldsOf({ braceMm: [5001] })).toEqual(['braceMm.0']);
  expect(fieldsOf({ openings: [{ fromMm: 1000, toMm: 2000 }, { fromMm: 1500, toMm: 3000 }] })).toEqual(['openings']); // prettier-ignore
  expect(fieldsOf({ openings: [{ fromMm: 2000, toMm: 2000 }] })).toEqual(['openings.0.toMm']);
  expect(fieldsOf({ openings: [{ fromMm: 2000, toMm: 5001 }] })).toEqual(['openings.0.toMm']);
  expect(fieldsOf({ braceMm: [1000, 2000] })).toBeNull();
});
