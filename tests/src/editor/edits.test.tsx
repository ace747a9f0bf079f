import { Editor } from '@tiptap/core';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { checkDocument } from '#shared/statements/document/document.ts';
import { documentFromBlocks } from '#shared/statements/document/from-block.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import { documentExtensions } from '#shared/statements/document/nodes.ts';
import { type Outline, outlineOf } from '#shared/statements/document/outline.ts';
import { blockTemplates } from '../../../server/library/templates.ts';
import * as edits from '../../../src/editor/edits.ts';
import { PassageIds } from '../../../src/editor/ids.ts';
import { StatementKeys } from '../../../src/editor/keys.ts';

const [first, second] = blockTemplates();
let editor: Editor;

beforeEach(() => {
  if (!first || !second) throw new Error('Two blocks are needed.');
  editor = new Editor({
    extensions: [...documentExtensions, PassageIds, StatementKeys],
    content: documentFromBlocks([first, second]),
  });
});
afterEach(() => editor.destroy());

const json = () => editor.getJSON() as NodeJson;
const outline = (): Outline => outlineOf(json());
const titles = () => outline().steps.map(({ title }) => title);
const fits = () => expect(checkDocument(json())).toEqual([]);
const press = (key: string, modifiers: KeyboardEventInit = {}) =>
  editor.view.someProp('handleKeyDown', (handle) =>
    handle(editor.view, new KeyboardEvent('keydown', { key, ...modifiers })),
  );
const goTo = (id: string | undefined) => edits.apply(editor, edits.selectPassage(id ?? ''));
const firstHazard = () => outline().steps[0]?.hazards[0];

test('a step moves past its neighbour and back, and undo restores the order', () => {
  const before = titles();
  goTo(outline().steps[0]?.id);

  edits.apply(editor, edits.moveStep(1));
  expect(titles().slice(0, 2)).toEqual([before[1], before[0]]);
  fits();
  editor.commands.undo();

  expect(titles()).toEqual(before);
});

test('a step at the edge does not move', () => {
  const before = json();

  expect(edits.apply(editor, edits.moveStep(-1, outline().steps[0]?.id))).toBe(false);

  expect(json()).toEqual(before);
});

test('a copied step has the words of its original and ids of its own', () => {
  const id = outline().steps[0]?.id ?? '';

  edits.apply(editor, edits.duplicateStep(id));

  expect(titles()[1]).toBe(titles()[0]);
  expect(outline().steps[0]?.id).toBe(id);
  fits();
});

test('a step, a hazard and a control are put in where they belong', () => {
  edits.apply(editor, edits.insertStep);
  editor.commands.insertContent('Sweep');
  edits.apply(editor, edits.insertHazard);
  editor.commands.insertContent('Screws');
  edits.apply(editor, edits.insertControl);
  editor.commands.insertContent('Magnet');

  const step = outline().steps.find(({ title }) => title === 'Sweep');
  expect(step?.hazards.map(({ title, controls }) => [title, controls.map(({ text }) => text)])).toEqual([
    ['Screws', ['Magnet']],
  ]);
  fits();
});

test('a block is put in after the step in hand, and one undo takes all of it out', () => {
  const before = json();
  const block = blockTemplates()[2];
  if (!block) throw new Error('A third block is needed.');
  goTo(outline().steps[0]?.id);

  edits.apply(editor, edits.insertBlock(block));
  expect(titles()[1]).toBe(block.steps[0]?.title);
  fits();
  editor.commands.undo();

  expect(json()).toEqual(before);
});

test('Enter in a control makes the next one; in an empty one it leaves the hazard', () => {
  const count = firstHazard()?.controls.length ?? 0;
  goTo(firstHazard()?.controls.at(-1)?.id);
  editor.commands.setTextSelection(editor.state.selection.$from.end());

  press('Enter');
  expect(countControls()).toBe(count + 1);
  fits();
  press('Enter');

  expect(countControls()).toBe(count);
  expect(editor.state.selection.$from.parent.type.name).toBe('paragraph');
  fits();

  function countControls() {
    let found = 0;
    const node = json()
      .content?.find(({ type }) => type === 'step')
      ?.content?.find(({ type }) => type === 'hazard');
    for (const child of node?.content ?? []) if (child.type === 'control') found += 1;
    return found;
  }
});

test('Backspace takes out an empty control, and never melts a title into what stands before it', () => {
  const before = json();
  edits.apply(editor, edits.selectPassage(firstHazard()?.id ?? ''));
  edits.apply(editor, edits.insertControl);
  press('Backspace');
  expect(outline().steps).toEqual(outlineOf(before).steps);

  goTo(firstHazard()?.id);
  editor.commands.setTextSelection(editor.state.selection.$from.start());
  press('Backspace');

  expect(json()).toEqual(before);
});

test('Tab goes from open fill-in to open fill-in and around the end', () => {
  const open = outline().fillIns.map(({ id }) => id);
  editor.commands.setTextSelection(3);

  const seen = open.map(() => {
    press('Tab');
    return (editor.state.selection as unknown as { node: { attrs: { id: string } } }).node.attrs.id;
  });
  press('Tab');

  expect(seen).toEqual(open);
  expect((editor.state.selection as unknown as { node: { attrs: { id: string } } }).node.attrs.id).toBe(
    open[0],
  );
});

test('ratings and levels are set in place, in the history', () => {
  const id = firstHazard()?.id ?? '';
  const rating = { likelihood: 'E', consequence: 1 };

  edits.apply(editor, edits.setAttributes(id, { initial: rating }));
  expect(firstHazard()?.initial).toEqual(rating);
  fits();
  editor.commands.undo();

  expect(firstHazard()?.initial).not.toEqual(rating);
});

test('what is taken out comes back with undo', () => {
  const before = json();

  edits.apply(editor, edits.removePassage(outline().steps[1]?.id ?? ''));
  expect(titles()).not.toEqual(outlineOf(before).steps.map(({ title }) => title));
  editor.commands.undo();

  expect(json()).toEqual(before);
});
