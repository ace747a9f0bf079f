import { Extension } from '@tiptap/core';
import { Selection, TextSelection } from '@tiptap/pm/state';
import { apply, type Edit, goToFillIn, insertControl, insertHazard, insertStep, moveStep } from './edits.ts';
import { endOf, passageAround } from './passages.ts';

/** What Enter, Backspace, Tab and the arrows with Alt do inside a statement's own passages. */
export const StatementKeys = Extension.create({
  name: 'statementKeys',
  priority: 1000,
  addKeyboardShortcuts() {
    const run = (edit: Edit) => () => apply(this.editor, edit);
    return {
      Enter: run(enter),
      Backspace: run(backspace),
      'Mod-Enter': run(insertStep),
      'Mod-Alt-h': run(insertHazard),
      'Mod-Alt-c': run(insertControl),
      'Alt-ArrowUp': run(moveStep(-1)),
      'Alt-ArrowDown': run(moveStep(1)),
      Tab: run(outsideLists(goToFillIn(1))),
      'Shift-Tab': run(outsideLists(goToFillIn(-1))),
    };
  },
});

/** In a list Tab indents, as everywhere; elsewhere it goes to the next hole. */
const outsideLists =
  (edit: Edit): Edit =>
  (state, dispatch) =>
    passageAround(state.selection.$from, 'listItem') ? false : edit(state, dispatch);

/** A title goes on as prose; a filled line makes the next of its kind; an empty one leaves. */
const enter: Edit = (state, dispatch) => {
  const { $from, empty } = state.selection;
  const name = $from.parent.type.name;
  if (!(state.selection instanceof TextSelection)) return false;
  if (name === 'stepTitle' || name === 'hazardTitle') {
    const after = $from.after();
    const inHazard = name === 'hazardTitle';
    const hazard = passageAround($from, 'hazard');
    const bare = inHazard && hazard?.node.childCount === 1;
    const node = bare ? state.schema.node('control') : state.schema.node('paragraph');
    if (dispatch) {
      const tr = state.tr.insert(after, node);
      dispatch(tr.setSelection(TextSelection.create(tr.doc, after + 1)));
    }
    return true;
  }
  if (name !== 'control' && name !== 'stopIf' && name !== 'holdPoint') return false;
  if (empty && $from.parent.content.size === 0) return leave(state, dispatch);
  if (!dispatch) return true;
  const tr = state.tr.deleteSelection();
  const type = $from.parent.type;
  const attrs = {
    ...$from.parent.attrs,
    id: null,
    origin: null,
    ...(name === 'control' ? { check: '' } : {}),
  };
  dispatch(tr.split(tr.selection.from, 1, [{ type, attrs }]));
  return true;
};

/** Takes the empty line out and goes on behind what it stood in. */
const leave: Edit = (state, dispatch) => {
  const { $from } = state.selection;
  const step = passageAround($from, 'step');
  const hazard = passageAround($from, 'hazard');
  const target = hazard ? endOf(hazard) : step ? endOf(step) : null;
  if (target === null) return false;
  if (!dispatch) return true;
  const tr = state.tr.delete($from.before(), $from.after());
  const at = tr.mapping.map(target);
  const node = hazard
    ? state.schema.node('paragraph')
    : state.schema.node('step', null, [state.schema.node('stepTitle')]);
  tr.insert(at, node);
  dispatch(tr.setSelection(Selection.near(tr.doc.resolve(at + 1))));
  return true;
};

/** At the start of an empty passage Backspace takes it out; titles never melt into what stands before them. */
const backspace: Edit = (state, dispatch) => {
  const { $from, empty } = state.selection;
  if (!empty || $from.parentOffset > 0) return false;
  const name = $from.parent.type.name;
  const isLine = name === 'control' || name === 'stopIf' || name === 'holdPoint';
  if (isLine && $from.parent.content.size === 0) {
    if (dispatch) {
      const tr = state.tr.delete($from.before(), $from.after());
      dispatch(tr.setSelection(Selection.near(tr.doc.resolve($from.before()), -1)));
    }
    return true;
  }
  if (isLine) {
    const before = state.doc.resolve($from.before()).nodeBefore;
    // Only lines of one kind run together; anything else would change what a passage is.
    return before?.type.name !== name;
  }
  if (name !== 'stepTitle' && name !== 'hazardTitle') return false;
  const whole = passageAround($from, name === 'stepTitle' ? 'step' : 'hazard');
  if (whole && whole.node.textContent === '' && whole.node.childCount === 1) {
    if (dispatch) {
      const tr = state.tr.delete(whole.pos, endOf(whole));
      dispatch(tr.setSelection(Selection.near(tr.doc.resolve(whole.pos), -1)));
    }
  }
  return true;
};
