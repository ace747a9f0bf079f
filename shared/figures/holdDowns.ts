import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { list, outcome, quantity } from './inputs.ts';
import { slip } from './numerics.ts';
import { atLeast } from './words.ts';

const along = (label: string) => quantity(label, 'mm', { least: 0, most: 50_000 });

const input = z.strictObject({
  panelMm: quantity('Panel length', 'mm', { least: 100, most: 50_000 }),
  openings: list(
    'Openings',
    z.strictObject({ fromMm: along('Opening from'), toMm: along('Opening to') }),
    0,
    50,
  ).default([]),
  braceMm: list('Brace points', along('Brace point'), 0, 100).default([]),
  spacingMm: quantity('Widest spacing', 'mm', { least: 100, most: 3000 }).default(1200),
});
type Input = z.output<typeof input>;
type Opening = Input['openings'][number];

/** Millimetres closer than this are one place. */
const same = 1e-6;

function checkedOpenings({ openings, panelMm }: Input): Opening[] {
  openings.forEach(({ fromMm, toMm }, i) => {
    if (toMm <= fromMm) throw refuseInput(`openings.${i}.toMm`, `Opening ${i + 1} must end after it starts.`);
    if (toMm > panelMm)
      throw refuseInput(`openings.${i}.toMm`, `Opening ${i + 1} must end within the panel of ${panelMm} mm.`);
  });
  const inOrder = openings.toSorted((a, b) => a.fromMm - b.fromMm);
  inOrder.forEach((opening, i) => {
    const before = inOrder[i - 1];
    if (before && opening.fromMm < before.toMm - same)
      throw refuseInput('openings', `The opening from ${opening.fromMm} mm overlaps the one before it.`);
  });
  return inOrder;
}

function fixedPoints(panelMm: number, openings: readonly Opening[], braceMm: readonly number[]): number[] {
  braceMm.forEach((at, i) => {
    if (at > panelMm)
      throw refuseInput(`braceMm.${i}`, `Brace point ${i + 1} must be within the panel of ${panelMm} mm.`);
    if (openings.some(({ fromMm, toMm }) => at > fromMm + same && at < toMm - same))
      throw refuseInput(
        `braceMm.${i}`,
        `Brace point ${i + 1} is inside an opening, where there is nothing to hold down.`,
      );
  });
  const all = [0, panelMm, ...openings.flatMap(({ fromMm, toMm }) => [fromMm, toMm]), ...braceMm];
  const inOrder = all.toSorted((a, b) => a - b);
  return inOrder.filter((at, i) => i === 0 || at - (inOrder[i - 1] ?? 0) > same);
}

export const holdDowns = defineFigure({
  id: 'holdDowns',
  title: 'Hold-down layout',
  version: 1,
  summary: 'Where the hold-downs of a wall panel go.',
  input,
  output: z.strictObject({
    positionsMm: z.array(z.number()).meta({ title: 'From the left end', unit: 'mm' }),
    count: outcome('Hold-downs'),
    widestMm: outcome('Widest gap, openings aside', 'mm'),
  }),
  formula:
    'One at both ends, on both sides of each opening and at each brace point; then each gap that is left is divided equally, into the fewest parts that keep to the spacing. None inside an opening.',
  limits: [
    'Panels of 100 mm to 50 m, spacing 100 to 3000 mm. Openings don’t overlap.',
    'The widest gap leaves openings out: nothing is fixed across a doorway.',
  ],
  caution:
    'A layout, not a design: the frame maker’s drawings and the engineer say how many, which and where, and the edge distance in the slab.',
  sources: [
    { title: 'Nominal 1200 mm centres', locator: 'common practice, no source', verified: 'practice' },
  ],
  calculate: (given) => {
    const { panelMm, braceMm, spacingMm } = given;
    const openings = checkedOpenings(given);
    const fixed = fixedPoints(panelMm, openings, braceMm);
    const positionsMm = [0];
    let widestMm = 0;
    fixed.slice(1).forEach((to, i) => {
      const from = fixed[i] ?? 0;
      const open = openings.some(({ fromMm, toMm }) => from >= fromMm - same && to <= toMm + same);
      // 6000 / 1200 must stay 5 however the division falls.
      const parts = open ? 1 : Math.max(1, Math.ceil((to - from) / spacingMm - slip));
      for (let part = 1; part < parts; part++) positionsMm.push(from + ((to - from) * part) / parts);
      positionsMm.push(to);
      if (!open) widestMm = Math.max(widestMm, (to - from) / parts);
    });
    return { positionsMm, count: positionsMm.length, widestMm };
  },
  reading: (_, { positionsMm, count, widestMm }) =>
    `${count} hold-downs, at ${positionsMm.map((at) => Math.round(at)).join(', ')} mm from the left end; no gap over ${atLeast(widestMm, 0)} mm beside openings.`,
  over: () => [],
});
