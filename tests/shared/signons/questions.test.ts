import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { matrixSchema } from '#shared/risk/matrix.ts';
import { checkQuestionsOf, mostQuestions } from '#shared/signons/questions.ts';
import type { OutlineStep } from '#shared/statements/document/outline.ts';

const matrix = matrixSchema.parse(JSON.parse(readFileSync('templates/matrices/as4360-1999.json', 'utf8')));
const likely = matrix.likelihoods[0]?.key ?? '';
const unlikely = matrix.likelihoods.at(-1)?.key ?? '';
const worst = { likelihood: likely, consequence: matrix.consequences.at(-1)?.key ?? 0 };
const slight = { likelihood: unlikely, consequence: matrix.consequences[0]?.key ?? 0 };

type Step = Pick<OutlineStep, 'id' | 'hazards' | 'questions'>;
const step = (id: string, initial: typeof worst | null, questions: number): Step => ({
  id,
  hazards: [{ initial } as OutlineStep['hazards'][number]],
  questions: Array.from({ length: questions }, (_, at) => ({
    ask: `${id} ${at}?`,
    answers: ['Yes', 'No'],
    right: 0,
    why: 'Because.',
  })),
});

test('of many questions at most five are asked, of the steps with the worst risks, in the order of the steps', () => {
  const steps = [
    ...['a', 'b', 'c'].map((id) => step(id, slight, 3)),
    ...['d', 'e', 'f', 'g'].map((id) => step(id, worst, 3)),
  ];

  expect(checkQuestionsOf(steps, matrix).map(({ id }) => id)).toEqual(['a.0', 'd.0', 'e.0', 'f.0', 'g.0']);
});

test('a short statement is asked about twice rather than left with one question', () => {
  expect(checkQuestionsOf([step('a', worst, 2), step('b', null, 1)], matrix).map(({ id }) => id)).toEqual([
    'a.0',
    'a.1',
    'b.0',
  ]);
});

test('a statement without questions asks none', () => {
  expect(checkQuestionsOf([step('a', worst, 0)], matrix)).toEqual([]);
});

test('whatever the steps, each question is asked once and stands under its own step', () => {
  const anyStep = fc.tuple(fc.constantFrom(worst, slight, null), fc.integer({ min: 0, max: 4 }));
  fc.assert(
    fc.property(fc.array(anyStep, { maxLength: 30 }), (given) => {
      const steps = given.map(([initial, count], at) => step(`s${at}`, initial, count));
      const asked = checkQuestionsOf(steps, matrix);
      const all = given.reduce((sum, [, count]) => sum + count, 0);

      expect(asked).toHaveLength(Math.min(mostQuestions, all));
      expect(new Set(asked.map(({ id }) => id)).size).toBe(asked.length);
      for (const { id, stepId, ask } of asked) {
        const turn = Number(id.slice(stepId.length + 1));
        expect(steps.find((one) => one.id === stepId)?.questions[turn]?.ask).toBe(ask);
      }
    }),
  );
});
