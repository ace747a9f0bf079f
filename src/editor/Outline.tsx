import type { Editor } from '@tiptap/core';
import { useEditorState } from '@tiptap/react';
import { ArrowDown, ArrowUp, Copy } from 'lucide-react';
import { apply, duplicateStep, moveStep, selectPassage } from './edits.ts';
import { passageAround, passagesOf } from './passages.ts';

type Entry = { id: string; title: string; hazards: { id: string; title: string }[]; current: boolean };

/** The steps and their hazards; a click goes there, and the step in hand can be moved and copied. */
export function Outline({ editor }: { editor: Editor }) {
  const entries = useEditorState({ editor, selector: ({ editor: current }) => entriesOf(current) });
  const go = (id: string) => {
    apply(editor, selectPassage(id));
    editor.commands.focus();
  };
  if (entries.length === 0)
    return (
      <p className="text-ink-soft">No steps yet. Type / in the document, or take a block from the library.</p>
    );
  return (
    <ol className="flex flex-col">
      {entries.map((entry, index) => (
        <li key={entry.id} className={`border-b border-zinc py-1 ${entry.current ? 'bg-chalk-wash' : ''}`}>
          <button
            type="button"
            className="flex w-full gap-2 px-1 text-left hover:text-chalk"
            aria-current={entry.current || undefined}
            onClick={() => go(entry.id)}
          >
            <span className="w-6 shrink-0 text-right text-ink-soft tabular-nums">{index + 1}</span>
            <span>{entry.title || 'Step without a title'}</span>
          </button>
          {entry.current ? (
            <>
              <ul className="pl-9">
                {entry.hazards.map((hazard) => (
                  <li key={hazard.id}>
                    <button
                      type="button"
                      className="text-left text-sm text-ink-soft hover:text-chalk"
                      onClick={() => go(hazard.id)}
                    >
                      {hazard.title || 'Hazard without a title'}
                    </button>
                  </li>
                ))}
              </ul>
              {editor.isEditable ? (
                <Moves
                  editor={editor}
                  id={entry.id}
                  first={index === 0}
                  last={index === entries.length - 1}
                />
              ) : null}
            </>
          ) : null}
        </li>
      ))}
    </ol>
  );
}

function Moves({ editor, id, first, last }: { editor: Editor; id: string; first: boolean; last: boolean }) {
  const tool =
    'inline-flex size-9 items-center justify-center rounded hover:bg-sheet disabled:opacity-40 pointer-coarse:size-12';
  return (
    <div className="flex pl-8" role="group" aria-label="Step in hand">
      <button
        type="button"
        className={tool}
        title="Move up (Alt+Up)"
        aria-label="Move the step up"
        disabled={first}
        onClick={() => apply(editor, moveStep(-1, id))}
      >
        <ArrowUp size={18} strokeWidth={1.75} aria-hidden />
      </button>
      <button
        type="button"
        className={tool}
        title="Move down (Alt+Down)"
        aria-label="Move the step down"
        disabled={last}
        onClick={() => apply(editor, moveStep(1, id))}
      >
        <ArrowDown size={18} strokeWidth={1.75} aria-hidden />
      </button>
      <button
        type="button"
        className={tool}
        title="Copy the step"
        aria-label="Copy the step"
        onClick={() => apply(editor, duplicateStep(id))}
      >
        <Copy size={18} strokeWidth={1.75} aria-hidden />
      </button>
    </div>
  );
}

function entriesOf({ state }: Editor): Entry[] {
  const inHand = passageAround(state.selection.$from, 'step')?.pos;
  return passagesOf(state.doc, 'step').map(({ node, pos }) => ({
    id: (node.attrs.id as string | null) ?? String(pos),
    title: node.firstChild?.textContent ?? '',
    current: pos === inHand,
    hazards: passagesOf(node, 'hazard').map((hazard) => ({
      id: (hazard.node.attrs.id as string | null) ?? String(hazard.pos),
      title: hazard.node.firstChild?.textContent ?? '',
    })),
  }));
}
