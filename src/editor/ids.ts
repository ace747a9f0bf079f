import { Extension } from '@tiptap/core';
import { Plugin } from '@tiptap/pm/state';
import { newId } from '#shared/kernel/ids.ts';

/** Gives an id to every passage that has none, and a new one to a copy, in the same step of the history as what made it. */
export const PassageIds = Extension.create({
  name: 'passageIds',
  addProseMirrorPlugins() {
    return [
      new Plugin({
        appendTransaction(transactions, _before, state) {
          if (!transactions.some(({ docChanged }) => docChanged)) return null;
          const seen = new Set<string>();
          const tr = state.tr;
          state.doc.descendants((node, pos) => {
            if (!('id' in node.attrs)) return;
            const id = node.attrs.id as string | null;
            if (id !== null && !seen.has(id)) return void seen.add(id);
            tr.setNodeAttribute(pos, 'id', newId());
          });
          if (!tr.docChanged) return null;
          return tr.setSelection(state.selection.map(tr.doc, tr.mapping));
        },
      }),
    ];
  },
});
