import { expect, test } from 'vitest';
import fc from 'fast-check';
import { controlLevels, controlTier, type ControlLevel } from '#shared/library/block.ts';
import {
  type CrewCard,
  controlsShownFirst,
  crewCardsOf,
  fastestReading,
  readTooFast,
  wordsOnCards,
} from '#shared/signons/cards.ts';
import type { OutlineControl, OutlineStep } from '#shared/statements/document/outline.ts';

const control = (text: string, level: ControlLevel): OutlineControl => ({
  id: text,
  text,
  level,
  role: 'Supervisor',
  check: '',
  origin: null,
});

function step(number: number, changes: Partial<OutlineStep> = {}): OutlineStep {
  return {
    id: `step-${number}`,
    number,
    title: `Step ${number}`,
    prose: ['Long prose of the step.'],
    card: 'Plain words.',
    hazards: [],
    stopIf: [],
    holdPoints: [],
    needs: {
      protective: [],
      competencies: [],
      equipment: [],
      permits: [],
    },
    questions: [],
    sources: [],
    caution: '',
    origin: null,
    ...changes,
  };
}

const hazard = (title: string, controls: OutlineControl[]): OutlineStep['hazards'][number] => ({
  id: title,
  title,
  category: 'fall',
  prose: [],
  initial: null,
  residual: null,
  controls,
  origin: null,
});

const cardsOf = (steps: OutlineStep[]) =>
  crewCardsOf({ outline: { particulars: {} as never, prose: [], steps, fillIns: [], words: 0 } });

test('a card lists what we do across the step’s hazards by tier, gear last, and keeps the writer’s order within a tier', () => {
  const [card] = cardsOf([
    step(1, {
      hazards: [
        hazard('Fall', [control('Harness', 'ppe'), control('Edge rails', 'engineering')]),
        hazard('Collapse', [
          control('Brief the crew', 'administrative'),
          control('Assemble on the ground', 'elimination'),
          control('Props', 'isolation'),
        ]),
      ],
    }),
  ]);

  expect(card?.controls.map(({ text }) => text)).toEqual([
    'Assemble on the ground',
    'Edge rails',
    'Props',
    'Brief the crew',
    'Harness',
  ]);
});

test('whatever the controls, the card keeps every one with words, in order of tier', () => {
  const anyControl = fc.tuple(fc.string({ minLength: 1, maxLength: 12 }), fc.constantFrom(...controlLevels));
  fc.assert(
    fc.property(fc.array(anyControl, { maxLength: 20 }), (given) => {
      const controls = given.map(([text, level]) => control(text, level));
      const [card] = cardsOf([step(1, { hazards: [hazard('Fall', controls)] })]);
      const shown = card?.controls ?? [];
      const tiers = shown.map(({ level }) => controlTier[level as ControlLevel]);

      expect(tiers).toEqual(tiers.toSorted((a, b) => a - b));
      expect(shown.map(({ text }) => text).toSorted()).toEqual(given.map(([text]) => text).toSorted());
    }),
  );
});

test('an empty control and an unnamed hazard leave no blank line on a card', () => {
  const [card] = cardsOf([step(1, { hazards: [hazard('', [control('', 'ppe')])] })]);

  expect(card).toMatchObject({ hurts: [], controls: [] });
});

test('a step without plain words shows its own prose instead', () => {
  const [plain, long] = cardsOf([step(1), step(2, { card: '' })]);

  expect(plain?.words).toEqual(['Plain words.']);
  expect(long?.words).toEqual(['Long prose of the step.']);
});

const cardOf = (words: string[]): CrewCard => ({
  stepId: 's',
  number: 1,
  title: 'One two',
  words,
  hurts: ['three'],
  controls: [{ text: 'four five', level: 'ppe', role: 'Worker' }],
  stopIf: ['six'],
  holdPoints: ['seven'],
  protective: [],
});

test('words on cards are counted over everything that is read, whatever the spaces', () => {
  expect(wordsOnCards([cardOf([])])).toBe(7);
  expect(wordsOnCards([cardOf(['  eight \n nine ']), cardOf([])])).toBe(16);
  expect(wordsOnCards([])).toBe(0);
});

test('controls that a card shows only when asked are not held against somebody’s reading time', () => {
  const many = Array.from({ length: 9 }, () => ({ text: 'two words', level: 'ppe', role: 'Worker' }));

  expect(wordsOnCards([{ ...cardOf([]), controls: many }])).toBe(5 + controlsShownFirst * 2);
});

test('reading at the line is not too fast, one millisecond quicker is', () => {
  const atTheLine = (1200 / fastestReading) * 60_000;

  expect(readTooFast(1200, atTheLine)).toBe(false);
  expect(readTooFast(1200, atTheLine - 1)).toBe(true);
  expect(readTooFast(1200, 4000)).toBe(true);
});

test('fewer than fifty words are never called too fast', () => {
  expect(readTooFast(49, 0)).toBe(false);
  expect(readTooFast(50, 0)).toBe(true);
});

test('more time never makes a reading too fast, and more words never make it slow enough', () => {
  const words = fc.integer({ min: 0, max: 5000 });
  const ms = fc.integer({ min: 0, max: 3_600_000 });
  fc.assert(
    fc.property(words, ms, fc.integer({ min: 0, max: 100_000 }), (count, time, more) => {
      if (!readTooFast(count, time)) expect(readTooFast(count, time + more)).toBe(false);
      if (readTooFast(count, time)) expect(readTooFast(count + more, time)).toBe(true);
    }),
  );
});
