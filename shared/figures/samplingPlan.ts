import { z } from 'zod';
import { defineFigure, refuseInput } from './figure.ts';
import { choice, oneOf, outcome, quantity, verdict } from './inputs.ts';
import {
  type CodeLetter,
  acceptOnDiagonal,
  aqls,
  codeLetters,
  firstZeroColumn,
  inspectionLevels,
  lotRows,
  sampleSizes,
} from './sampling-tables.ts';

type Aql = (typeof aqls)[number];

function cellAt(row: number, aql: Aql): (typeof acceptOnDiagonal)[number] {
  const diagonal = row + aqls.indexOf(aql) - firstZeroColumn + 1;
  const cell = acceptOnDiagonal[Math.min(Math.max(diagonal, 0), acceptOnDiagonal.length - 1)] ?? 'up';
  // Above the first row there is nothing to go up to.
  return row === 0 && cell === 'up' ? 'down' : cell;
}

/** The letter whose plan holds, arrows followed, and its acceptance number. */
function planFor(letter: CodeLetter, aql: Aql): { letter: CodeLetter; accept: number } {
  for (let row = codeLetters.indexOf(letter); ;) {
    const cell = cellAt(row, aql);
    const here = codeLetters[row];
    if (here === undefined) throw refuseInput('aql', 'The table has no plan for this lot and limit.');
    if (typeof cell === 'number') return { letter: here, accept: cell };
    row += cell === 'down' ? 1 : -1;
  }
}

export const samplingPlan = defineFigure({
  id: 'samplingPlan',
  title: 'Acceptance sampling',
  version: 1,
  summary: 'How many of a lot to check, and how many faults still pass it.',
  input: z.strictObject({
    lotSize: quantity('Lot', '', {
      least: 2,
      most: 100_000_000,
      whole: true,
      why: 'the tables start at a lot of 2',
    }),
    level: choice('Inspection level', inspectionLevels, 'II unless there is a reason.'),
    aql: oneOf('Acceptance quality limit', '%', aqls),
  }),
  output: z.strictObject({
    letter: z.enum(codeLetters).meta({ title: 'Code letter' }),
    planLetter: z.enum(codeLetters).meta({ title: 'Letter of the plan, arrows followed' }),
    size: outcome('To check'),
    accept: outcome('Pass with at most'),
    reject: outcome('Reject from'),
    planSize: outcome('Sample size of the plan'),
    inspectAll: verdict('Check every one'),
  }),
  formula:
    'Code letter from lot and level (Table 1); sample size and acceptance number from Table 2-A, following the arrows up or down to the next plan. If the sample is as large as the lot, every one is checked.',
  limits: [
    'Single sampling, normal inspection, levels I to III, limits of 0.065 to 25 %.',
    'Letter A at 10 %, where an arrow has no row above it, takes the plan below.',
    'Going over to tightened or reduced inspection is not worked out here.',
  ],
  caution:
    'Never for what can kill: a missing brace or an unread statement is checked one by one, not by sample.',
  sources: [
    {
      title: 'ISO 2859-1 / MIL-STD-105E',
      locator: 'Table 1 and Table II-A, two transcriptions and a US agency’s copy',
      verified: 'secondary',
    },
    {
      title: 'Letters of levels I and III',
      locator: 'MIL-STD-105E Table I, transcriptions',
      verified: 'secondary',
    },
  ],
  calculate: ({ lotSize, level, aql }) => {
    const letter = lotRows.find(({ upTo }) => lotSize <= upTo)?.[level] ?? 'R';
    const plan = planFor(letter, aql);
    const planSize = sampleSizes[plan.letter];
    return {
      letter,
      planLetter: plan.letter,
      size: Math.min(planSize, lotSize),
      accept: plan.accept,
      reject: plan.accept + 1,
      planSize,
      inspectAll: planSize >= lotSize,
    };
  },
  reading: ({ lotSize }, { size, accept, reject, inspectAll }) =>
    `${inspectAll ? `Check all ${lotSize}` : `Check ${size} of ${lotSize}, drawn by chance`}: ${
      accept === 0 ? 'none may be faulty' : `up to ${accept} faulty still pass`
    }; ${reject} or more and the lot is refused.`,
  over: () => [],
});
