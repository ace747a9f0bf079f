import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { outcome, outcomeOrNone, quantity, warnings } from './inputs.ts';
import { slip } from './numerics.ts';
import { about, atLeast } from './words.ts';

const angle = (label: string) => quantity(label, '°', { least: 1, most: 89 });
const degrees = (radians: number) => (radians * 180) / Math.PI;

/** The number of truss spaces whose brace comes nearest to the best angle without being flatter than the least; 0 where none does. */
function nearestSpaces(slopeLengthM: number, trussSpacingM: number, minDeg: number, bestDeg: number): number {
  const angleOf = (spaces: number) => degrees(Math.atan(slopeLengthM / (spaces * trussSpacingM)));
  const ideal = slopeLengthM / (trussSpacingM * Math.tan((bestDeg * Math.PI) / 180));
  const candidates = [Math.floor(ideal + slip), Math.ceil(ideal - slip)]
    .map((spaces) => Math.max(1, spaces))
    .filter((spaces) => angleOf(spaces) >= minDeg - slip)
    .toSorted((a, b) => Math.abs(angleOf(a) - bestDeg) - Math.abs(angleOf(b) - bestDeg));
  return candidates[0] ?? 0;
}

export const braceAngle = defineFigure({
  id: 'braceAngle',
  title: 'Truss brace angle',
  version: 1,
  summary: 'How many truss spaces a diagonal brace from plate to apex should cross.',
  input: z.strictObject({
    slopeLengthM: quantity('Plate to apex along the top chord', 'm', { over: 0, most: 40 }),
    trussSpacingM: quantity('Truss spacing', 'm', { least: 0.1, most: 3 }),
    minDeg: angle('Flattest angle allowed').default(30),
    bestDeg: angle('Best angle').default(45),
    pitchDeg: quantity('Roof pitch', '°', {
      least: 0,
      most: 80,
      help: 'Give it to see the angle in plan, as most makers’ sheets count it.',
    }).optional(),
  }),
  output: z.strictObject({
    spacesCrossed: outcome('Truss spaces crossed'),
    trussesCrossed: outcome('Trusses crossed'),
    runM: outcome('Run along the wall', 'm'),
    angleDeg: outcome('Angle to the side wall, on the roof plane', '°'),
    planAngleDeg: outcomeOrNone('Angle to the side wall, in plan', '°'),
    braceLengthM: outcome('Brace length', 'm'),
    warnings,
  }),
  formula:
    'Run = whole spaces × spacing (at least one). Angle to the side wall = atan(plate to apex / run). Length = √(plate to apex² + run²). The whole number of spaces nearest to the best angle, never flatter than the least. In plan: atan(plate to apex·cos(pitch) / run).',
  limits: [
    'Plate to apex up to 40 m, spacing 0.1 to 3 m.',
    'The angle is on the roof plane. Makers’ sheets mostly count it in plan, where a pitched roof makes it flatter: give the pitch to see it.',
  ],
  caution:
    'For laying out temporary and steel-strap bracing; the truss maker’s bracing sheet and the engineer decide. Never stand on or clip to trusses until braced as they say.',
  sources: [
    {
      title: '30° to 45° to the wall, in plan',
      locator: 'trade training page and a maker’s sheet for AS 4440',
      verified: 'secondary',
    },
    {
      title: 'Whole truss spaces nearest to 45°',
      locator: 'common practice, no source',
      verified: 'practice',
    },
  ],
  calculate: ({ slopeLengthM, trussSpacingM, minDeg, bestDeg, pitchDeg }) => {
    if (bestDeg < minDeg)
      throw refuseInput('bestDeg', 'Best angle must be at least the flattest angle allowed.');
    const spacesCrossed = nearestSpaces(slopeLengthM, trussSpacingM, minDeg, bestDeg);
    if (spacesCrossed === 0)
      throw refuseInput(
        'slopeLengthM',
        `One truss space already makes the brace flatter than ${minDeg}°: this slope is too short for this spacing.`,
      );
    const runM = spacesCrossed * trussSpacingM;
    const planAngleDeg =
      pitchDeg === undefined
        ? null
        : degrees(Math.atan((slopeLengthM * Math.cos((pitchDeg * Math.PI) / 180)) / runM));
    return {
      spacesCrossed,
      trussesCrossed: spacesCrossed + 1,
      runM,
      angleDeg: degrees(Math.atan(slopeLengthM / runM)),
      planAngleDeg,
      braceLengthM: Math.hypot(slopeLengthM, runM),
      warnings:
        planAngleDeg !== null && planAngleDeg < minDeg - slip
          ? [
              `In plan the brace is at ${about(planAngleDeg)}°, flatter than ${minDeg}°: cross fewer spaces if the maker’s sheet counts it in plan.`,
            ]
          : [],
    };
  },
  reading: (_, { spacesCrossed, trussesCrossed, runM, angleDeg, braceLengthM }) =>
    `Run the brace from plate to apex across ${spacesCrossed} truss ${spacesCrossed === 1 ? 'space' : 'spaces'} (${trussesCrossed} trusses), ${about(runM, 2)} m along the wall: ${about(angleDeg)}° and ${atLeast(braceLengthM, 2)} m long before laps and folds.`,
  over: () => [],
});
