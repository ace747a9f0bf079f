import type { CheckQuestion } from '../library/block.ts';
import { bandOf, bands, type Matrix } from '../risk/matrix.ts';
import type { OutlineStep } from '../statements/document/outline.ts';

/** Check questions asked before one signature: enough to show understanding, few enough to be read. */
export const mostQuestions = 5;

export type AskedQuestion = CheckQuestion & { id: string; stepId: string };

/**
 * The questions that a reader is asked: of the steps with the worst risk before controls first, one a step before a second of
 * any; then in the order of the steps. The id names step and place, so that answers can be read back.
 */
export function checkQuestionsOf(
  steps: Pick<OutlineStep, 'id' | 'hazards' | 'questions'>[],
  matrix: Matrix,
): AskedQuestion[] {
  const all = steps.flatMap((step, order) =>
    step.questions.map((question, turn) => ({
      order,
      turn,
      worst: worstBand(step, matrix),
      asked: { ...question, id: `${step.id}.${turn}`, stepId: step.id },
    })),
  );
  return all
    .toSorted((a, b) => a.turn - b.turn || b.worst - a.worst || a.order - b.order)
    .slice(0, mostQuestions)
    .toSorted((a, b) => a.order - b.order || a.turn - b.turn)
    .map(({ asked }) => asked);
}

/** 0 where nothing is rated, up to 4 for an extreme risk. */
function worstBand({ hazards }: Pick<OutlineStep, 'hazards'>, matrix: Matrix): number {
  return Math.max(
    0,
    ...hazards.map(({ initial }) => {
      const band = initial && bandOf(matrix, initial);
      return band ? bands.indexOf(band) + 1 : 0;
    }),
  );
}
