import fc from 'fast-check';
import { expect, test } from 'vitest';
import {
  beginFlow,
  type Flow,
  maySign,
  type Move,
  moveOn,
  resumeFlow,
  type Script,
} from '../../../src/sign/flow.ts';

const script: Script = {
  cards: 3,
  questions: [
    { id: 'a', right: 1, card: 2 },
    { id: 'b', right: 0, card: null },
  ],
};
const play = (moves: Move[], from: Flow = beginFlow(), with_: Script = script) =>
  moves.reduce((flow, move) => moveOn(with_, flow, move), from);
const next: Move = { do: 'next' };
const back: Move = { do: 'back' };
const answer = (choice: number): Move => ({ do: 'answer', choice });

test('a worker goes card by card, answers, and comes to the signature', () => {
  const flow = play([next, next, next, answer(1), next, answer(0), next]);

  expect(flow.place).toEqual({ at: 'sign' });
  expect(maySign(script, flow)).toBe(true);
  expect(flow.tries).toEqual({ a: [1], b: [0] });
});

test('a wrong answer holds the worker at the question, is kept, and may be mended', () => {
  const wrong = play([next, next, next, answer(0), next]);
  expect(wrong.place).toEqual({ at: 'question', index: 0 });

  const mended = play([answer(2), answer(1), next], wrong);
  expect(mended.place).toEqual({ at: 'question', index: 1 });
  expect(mended.tries.a).toEqual([0, 2, 1]);
});

test('an answer after the right one changes nothing', () => {
  expect(play([next, next, next, answer(1), answer(0)]).tries.a).toEqual([1]);
});

test('a worker reads the card of a question again and comes back to the question', () => {
  const rereading = play([next, next, next, answer(0), { do: 'reread' }]);
  expect(rereading.place).toEqual({ at: 'card', index: 2 });

  expect(play([next], rereading).place).toEqual({ at: 'question', index: 0 });
  expect(play([back, next], rereading).place).toEqual({ at: 'question', index: 0 });
});

test('back goes through the questions to the last card and stops at the first', () => {
  const signing = play([next, next, next, answer(1), next, answer(0), next]);

  expect(play([back], signing).place).toEqual({ at: 'question', index: 1 });
  expect(play([back, back, back], signing).place).toEqual({ at: 'card', index: 2 });
  expect(play(Array<Move>(12).fill(back), signing).place).toEqual({ at: 'card', index: 0 });
});

test('a statement without questions goes from the last card straight to the signature', () => {
  const bare = { cards: 1, questions: [] };

  expect(play([next], beginFlow(), bare).place).toEqual({ at: 'sign' });
});

test('more than twenty tries still keep the right one as the last', () => {
  const flow = play([next, next, next, ...Array<Move>(30).fill(answer(2)), answer(1)]);

  expect(flow.tries.a).toHaveLength(20);
  expect(flow.tries.a?.at(-1)).toBe(1);
});

test('whatever somebody taps, nobody stands at the signature with a card unread or a question open', () => {
  const anyMove: fc.Arbitrary<Move> = fc.oneof(
    fc.constant(next),
    fc.constant(back),
    fc.constant<Move>({ do: 'reread' }),
    fc.integer({ min: 0, max: 3 }).map(answer),
    fc.integer({ min: -10, max: 1000 }).map((ms): Move => ({ do: 'read', ms })),
  );
  fc.assert(
    fc.property(fc.array(anyMove, { maxLength: 60 }), (moves) => {
      const flow = play(moves);
      if (flow.place.at === 'sign') expect(maySign(script, flow)).toBe(true);
      expect(flow.readingMs).toBeGreaterThanOrEqual(0);
      expect(resumeFlow(script, JSON.parse(JSON.stringify(flow)))).toEqual(flow);
    }),
  );
});

test('reading time adds up and a clock that ran backwards takes nothing away', () => {
  expect(
    play([
      { do: 'read', ms: 1200.4 },
      { do: 'read', ms: -50 },
      { do: 'read', ms: 800 },
    ]).readingMs,
  ).toBe(2000);
});

test('a remembered place that does not fit, or is no place at all, starts from the first card', () => {
  const forged = { ...beginFlow(), place: { at: 'sign' } };

  expect(resumeFlow(script, forged)).toEqual(beginFlow());
  expect(resumeFlow(script, { ...beginFlow(), place: { at: 'card', index: 9 } })).toEqual(beginFlow());
  for (const rubbish of [null, 'x', 7, {}, { place: 'card' }])
    expect(resumeFlow(script, rubbish)).toEqual(beginFlow());
});
