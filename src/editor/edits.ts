import type { Editor } from '@tiptap/core';
import { Fragment, type Node as DocumentNode, Slice } from '@tiptap/pm/model';
import {
  type EditorState,
  NodeSelection,
  Selection,
  TextSelection,
  type Transaction,
} from '@tiptap/pm/state';
import type { Block } from '#shared/library/block.ts';
import { stepsOfBlock } from '#shared/statements/document/from-block.ts';
import { endOf, passageAround, passagesOf, passageById } from './passages.ts';

/** An edit of the document: a ProseMirror command. False where it has no place. */
export type Edit = (state: EditorState, dispatch?: (tr: Transaction) => void) => boolean;

export const apply = (editor: Editor, edit: Edit): boolean =>
  edit(editor.state, (tr) => editor.view.dispatch(tr.scrollIntoView()));

const emptyStep = ({ schema }: EditorState, content: DocumentNode[] = []) =>
  schema.node('step', null, [schema.node('stepTitle'), ...content]);
const emptyHazard = ({ schema }: EditorState, content: DocumentNode[] = []) =>
  schema.node('hazard', null, [schema.node('hazardTitle'), ...content]);

/** Puts a node in and the cursor into its first text. */
function insertAt(
  state: EditorState,
  pos: number,
  node: DocumentNode,
  dispatch?: (tr: Transaction) => void,
): boolean {
  if (!dispatch) return true;
  const tr = state.tr.insert(pos, node);
  dispatch(tr.setSelection(Selection.near(tr.doc.resolve(pos + 1))));
  return true;
}

/** Where a new step goes: after the step in hand, else at the end. */
function placeForStep(state: EditorState): number {
  const step = passageAround(state.selection.$from, 'step');
  if (step) return endOf(step);
  const { $from } = state.selection;
  return $from.depth >= 1
    ? Math.max($from.after(1), state.doc.firstChild?.nodeSize ?? 0)
    : state.doc.content.size;
}

export const insertStep: Edit = (state, dispatch) =>
  insertAt(state, placeForStep(state), emptyStep(state), dispatch);

export const insertHazard: Edit = (state, dispatch) => {
  const { $from } = state.selection;
  const step = passageAround($from, 'step');
  if (!step) return insertAt(state, placeForStep(state), emptyStep(state, [emptyHazard(state)]), dispatch);
  const hazard = passageAround($from, 'hazard');
  return insertAt(state, hazard ? endOf(hazard) : placeInStep(step), emptyHazard(state), dispatch);
};

/** In a step new hazards come before its hold points and stop-ifs, which close it. */
function placeInStep(step: { node: DocumentNode; pos: number }): number {
  let at = step.pos + 1;
  let place = endOf(step) - 1;
  let found = false;
  step.node.forEach((child) => {
    if (!found && (child.type.name === 'holdPoint' || child.type.name === 'stopIf')) {
      place = at;
      found = true;
    }
    at += child.nodeSize;
  });
  return place;
}

export const insertControl: Edit = (state, dispatch) => {
  const { $from } = state.selection;
  const control = state.schema.node('control');
  const own = passageAround($from, 'control');
  if (own) return insertAt(state, endOf(own), control, dispatch);
  const hazard = passageAround($from, 'hazard');
  if (hazard) return insertAt(state, endOf(hazard) - 1, control, dispatch);
  const step = passageAround($from, 'step');
  if (step) return insertAt(state, placeInStep(step), emptyHazard(state, [control]), dispatch);
  return insertAt(state, placeForStep(state), emptyStep(state, [emptyHazard(state, [control])]), dispatch);
};

/** A stop-if or hold point at the end of the step in hand. */
export const insertInStep =
  (type: 'stopIf' | 'holdPoint'): Edit =>
  (state, dispatch) => {
    const step = passageAround(state.selection.$from, 'step');
    return step ? insertAt(state, endOf(step) - 1, state.schema.node(type), dispatch) : false;
  };

export const insertFillIn: Edit = (state, dispatch) => {
  const { $from } = state.selection;
  const type = state.schema.nodes.fillIn;
  if (!type || !$from.parent.inlineContent) return false;
  if (!dispatch) return true;
  const tr = state.tr.replaceSelectionWith(type.create({ label: 'what goes here' }), false);
  const before = tr.selection.from - 1;
  dispatch(tr.setSelection(NodeSelection.create(tr.doc, before)));
  return true;
};

/** Puts a block's steps after the step in hand. */
export const insertBlock =
  (block: Block): Edit =>
  (state, dispatch) => {
    const pos = placeForStep(state);
    if (!dispatch) return true;
    const nodes = stepsOfBlock(block).map((json) => state.schema.nodeFromJSON(json));
    const tr = state.tr.replace(pos, pos, new Slice(Fragment.from(nodes), 0, 0));
    dispatch(tr.setSelection(Selection.near(tr.doc.resolve(pos + 2))));
    return true;
  };

/** Moves the step in hand, or the one named, past its neighbour; `by` is -1 or 1. */
export const moveStep =
  (by: -1 | 1, id?: string): Edit =>
  (state, dispatch) => {
    const steps = passagesOf(state.doc, 'step');
    const own = id ? passageById(state.doc, id) : passageAround(state.selection.$from, 'step');
    const index = steps.findIndex(({ pos }) => pos === own?.pos);
    const neighbour = steps[index + by];
    if (!own || !neighbour) return false;
    if (!dispatch) return true;
    const offset = state.selection.from - own.pos;
    const tr = state.tr.delete(own.pos, endOf(own));
    const target = tr.mapping.map(by === -1 ? neighbour.pos : endOf(neighbour));
    tr.insert(target, own.node);
    if (offset > 0 && offset < own.node.nodeSize)
      tr.setSelection(Selection.near(tr.doc.resolve(target + offset)));
    dispatch(tr);
    return true;
  };

export const duplicateStep =
  (id: string): Edit =>
  (state, dispatch) => {
    const step = passageById(state.doc, id);
    if (!step) return false;
    // The copy has the ids of the original until the ids are made good, in the same undo step.
    dispatch?.(state.tr.insert(endOf(step), step.node));
    return true;
  };

/** Takes out a step, hazard, control, hold point or stop-if by its id; undo brings it back. */
export const removePassage =
  (id: string): Edit =>
  (state, dispatch) => {
    const passage = passageById(state.doc, id);
    if (!passage) return false;
    dispatch?.(state.tr.delete(passage.pos, endOf(passage)));
    return true;
  };

/** Changes attributes of the passage with this id. */
export const setAttributes =
  (id: string, attributes: Record<string, unknown>): Edit =>
  (state, dispatch) => {
    const passage = passageById(state.doc, id);
    if (!passage) return false;
    if (dispatch) {
      const tr = state.tr;
      for (const [name, value] of Object.entries(attributes)) tr.setNodeAttribute(passage.pos, name, value);
      // Setting attributes of a selected node loses its selection.
      if (state.selection instanceof NodeSelection)
        tr.setSelection(NodeSelection.create(tr.doc, state.selection.from));
      dispatch(tr);
    }
    return true;
  };

/** Puts the cursor into the passage with this id, or selects it where it is one piece. */
export const selectPassage =
  (id: string): Edit =>
  (state, dispatch) => {
    const passage = passageById(state.doc, id);
    if (!passage) return false;
    const selection = passage.node.isAtom
      ? NodeSelection.create(state.doc, passage.pos)
      : TextSelection.near(state.doc.resolve(passage.pos + 1));
    dispatch?.(state.tr.setSelection(selection));
    return true;
  };

/** Selects the next open fill-in after the selection (or the one before it), around the end to the beginning. */
export const goToFillIn =
  (direction: 1 | -1, openOnly = true): Edit =>
  (state, dispatch) => {
    const all = passagesOf(state.doc, 'fillIn').filter(({ node }) => !openOnly || !node.attrs.value);
    const { from } = state.selection;
    const next =
      direction === 1
        ? (all.find(({ pos }) => pos > from) ?? all.find(({ pos }) => pos !== from))
        : (all.findLast(({ pos }) => pos < from) ?? all.findLast(({ pos }) => pos !== from));
    if (!next) return false;
    dispatch?.(state.tr.setSelection(NodeSelection.create(state.doc, next.pos)));
    return true;
  };
