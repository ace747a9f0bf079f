import type { Node as DocumentNode, ResolvedPos } from '@tiptap/pm/model';
import type { EditorState } from '@tiptap/pm/state';

/** A node of the document with the position before it. */
export type Passage = { node: DocumentNode; pos: number };

/** The nearest node of a type around a position, the node at it included. */
export function passageAround($pos: ResolvedPos, type: string): Passage | null {
  for (let depth = $pos.depth; depth > 0; depth -= 1) {
    const node = $pos.node(depth);
    if (node.type.name === type) return { node, pos: $pos.before(depth) };
  }
  return null;
}

/** The innermost passage that the inspector edits: what the selection stands in. */
export function passageInHand(state: EditorState): Passage | null {
  const { $from } = state.selection;
  const selected = 'node' in state.selection ? (state.selection.node as DocumentNode) : null;
  if (selected?.type.name === 'fillIn') return { node: selected, pos: $from.pos };
  for (const type of ['control', 'holdPoint', 'stopIf', 'hazard', 'step']) {
    const found = passageAround($from, type);
    if (found) return found;
  }
  return null;
}

/** Every node of a type, in order. */
export function passagesOf(doc: DocumentNode, type: string): Passage[] {
  const found: Passage[] = [];
  doc.descendants((node, pos) => {
    if (node.type.name === type) found.push({ node, pos });
  });
  return found;
}

export const passageById = (doc: DocumentNode, id: string): Passage | null => {
  let found: Passage | null = null;
  doc.descendants((node, pos) => {
    if (node.attrs.id === id) found = { node, pos };
    return found === null;
  });
  return found;
};

export const endOf = ({ node, pos }: Passage): number => pos + node.nodeSize;
