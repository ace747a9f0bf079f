import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { Refusal } from '#shared/kernel/refusal.ts';
import { emptyDocument } from '#shared/statements/document/from-block.ts';
import { createAutosave, type Draft, type SaveState } from '../../../src/editor/autosave.ts';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

const content = (title: string) => ({ title, document: emptyDocument() });

/** A server that answers as it is told, and an autosave on it. */
function bench(answers: ((draft: Draft) => Promise<{ lockVersion: number; updatedAt: string }>)[]) {
  const sent: Draft[] = [];
  const states: SaveState[] = [];
  const kept: (Draft | null)[] = [];
  const autosave = createAutosave({
    send: (draft) => {
      sent.push(draft);
      const answer = answers.shift();
      if (!answer) throw new Error('Nothing more was expected.');
      return answer(draft);
    },
    keep: (draft) => kept.push(draft),
    onState: (state) => states.push(state),
    lockVersion: 1,
    savedAt: null,
  });
  return { autosave, sent, states, kept };
}

const saves = (draft: Draft) =>
  Promise.resolve({ lockVersion: draft.lockVersion + 1, updatedAt: '2026-12-01T06:02:00Z' });
const refuses = (refusal: Refusal) => () => Promise.reject(refusal);

test('what is typed quickly is sent once, and "saved" is said only after the answer', async () => {
  const { autosave, sent, states, kept } = bench([saves]);
  autosave.change(content('a'));
  autosave.change(content('ab'));
  expect(states.at(-1)?.kind).toBe('unsaved');
  expect(kept.at(-1)?.title).toBe('ab');

  await vi.advanceTimersByTimeAsync(1300);

  expect(sent.map(({ title }) => title)).toEqual(['ab']);
  expect(states.map(({ kind }) => kind).slice(-2)).toEqual(['saving', 'saved']);
  expect(kept.at(-1)).toBeNull();
});

test('what is typed while a save is on its way goes after it, over the new version', async () => {
  let answer: (reply: { lockVersion: number; updatedAt: string }) => void = () => undefined;
  const slow = () => new Promise<{ lockVersion: number; updatedAt: string }>((resolve) => (answer = resolve));
  const { autosave, sent, states } = bench([slow, saves]);
  autosave.change(content('first'));
  await vi.advanceTimersByTimeAsync(1300);

  autosave.change(content('second'));
  await vi.advanceTimersByTimeAsync(5000);
  expect(sent).toHaveLength(1);
  answer({ lockVersion: 2, updatedAt: '2026-12-01T06:02:00Z' });
  await vi.advanceTimersByTimeAsync(0);

  expect(sent.map(({ title, lockVersion }) => [title, lockVersion])).toEqual([
    ['first', 1],
    ['second', 2],
  ]);
  expect(states.at(-1)?.kind).toBe('saved');
});

test('without a connection the text stays on the device and is sent again by itself', async () => {
  const { autosave, states, kept } = bench([refuses(new Refusal('offline', 'no')), saves]);
  autosave.change(content('kept'));
  await vi.advanceTimersByTimeAsync(1300);
  expect(states.at(-1)?.kind).toBe('offline');
  expect(kept.at(-1)?.title).toBe('kept');
  expect(autosave.hasUnsaved()).toBe(true);

  await vi.advanceTimersByTimeAsync(5100);

  expect(states.at(-1)?.kind).toBe('saved');
  expect(autosave.hasUnsaved()).toBe(false);
});

const theirs = {
  lockVersion: 7,
  title: 'theirs',
  document: emptyDocument(),
  updatedAt: '2026-12-01T06:00:00Z',
  updatedBy: 'Another',
};

test('a conflict stops sending until a person chooses; mine then goes over theirs', async () => {
  const { autosave, sent, states } = bench([
    refuses(new Refusal('conflict', 'stale', { extra: theirs })),
    saves,
  ]);
  autosave.change(content('mine'));
  await vi.advanceTimersByTimeAsync(1300);
  expect(states.at(-1)).toMatchObject({ kind: 'conflict', theirs, mine: { title: 'mine' } });
  await vi.advanceTimersByTimeAsync(60_000);
  expect(sent).toHaveLength(1);

  await autosave.keepMine();

  expect(sent.at(-1)).toMatchObject({ title: 'mine', lockVersion: 7 });
  expect(states.at(-1)?.kind).toBe('saved');
  expect(autosave.lockVersion()).toBe(8);
});

test('taking theirs goes on from the stored version and sends nothing', async () => {
  const { autosave, sent, kept } = bench([refuses(new Refusal('conflict', 'stale', { extra: theirs }))]);
  autosave.change(content('mine'));
  await vi.advanceTimersByTimeAsync(1300);

  autosave.takeTheirs();

  expect(autosave.lockVersion()).toBe(7);
  expect(sent).toHaveLength(1);
  expect(kept.at(-1)).toBeNull();
});

test('what the server refuses is told in its words, kept, and tried again with the next change', async () => {
  const { autosave, states, kept } = bench([
    refuses(new Refusal('invalid', 'It does not fit at step 2.')),
    saves,
  ]);
  autosave.change(content('wrong'));
  await vi.advanceTimersByTimeAsync(1300);
  expect(states.at(-1)).toEqual({ kind: 'refused', words: 'It does not fit at step 2.' });
  expect(kept.at(-1)?.title).toBe('wrong');

  autosave.change(content('mended'));
  await vi.advanceTimersByTimeAsync(1300);

  expect(states.at(-1)?.kind).toBe('saved');
});
