import type { Editor } from '@tiptap/core';
import { type KeyboardEvent, useEffect, useId, useRef, useState } from 'react';
import type { FillIn } from '#shared/statements/document/attributes.ts';
import { inputLook } from '../ui/Field.tsx';
import { apply, goToFillIn } from './edits.ts';
import { useSurroundings } from './StatementContext.ts';

/** The form of a hole: typed by its kind. Enter and Tab go to the next one. */
export function FillInForm({
  editor,
  fillIn,
  set,
}: {
  editor: Editor;
  fillIn: FillIn;
  set: (change: Record<string, unknown>) => void;
}) {
  const id = useId();
  const { people } = useSurroundings();
  const field = useRef<HTMLInputElement & HTMLSelectElement>(null);
  const [text, setText] = useState(fillIn.value);
  const [known, setKnown] = useState(fillIn.value);
  if (known !== fillIn.value) {
    setKnown(fillIn.value);
    setText(fillIn.value);
  }
  useEffect(() => field.current?.focus({ preventScroll: true }), []);
  const give = (value: string) => {
    setText(value);
    setKnown(value);
    set({ value });
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key === 'Escape') {
      event.preventDefault();
      editor.commands.focus(editor.state.selection.to);
    }
    if (event.key !== 'Enter' && event.key !== 'Tab') return;
    event.preventDefault();
    if (!apply(editor, goToFillIn(event.shiftKey ? -1 : 1))) editor.commands.focus(editor.state.selection.to);
  };
  const shared = { id, ref: field, value: text, className: inputLook, onKeyDown };
  return (
    <div className="flex flex-col gap-1">
      <label htmlFor={id} className="font-semibold">
        {fillIn.label}
        {fillIn.unit ? `, ${fillIn.unit}` : ''}
      </label>
      {fillIn.help ? <p className="text-sm text-ink-soft">{fillIn.help}</p> : null}
      {fillIn.kind === 'choice' ? (
        <select {...shared} onChange={(event) => give(event.target.value)}>
          <option value="">Choose</option>
          {fillIn.choices.map((choice) => (
            <option key={choice}>{choice}</option>
          ))}
        </select>
      ) : (
        <input
          {...shared}
          {...(fillIn.kind === 'number' ? { inputMode: 'decimal' as const } : {})}
          {...(fillIn.kind === 'person' ? { list: `${id}-people` } : {})}
          type={fillIn.kind === 'date' ? 'date' : 'text'}
          maxLength={300}
          aria-invalid={badNumber(fillIn, text) ? true : undefined}
          onChange={(event) => give(event.target.value)}
        />
      )}
      {badNumber(fillIn, text) ? <p className="text-sm text-oxide">Write a number.</p> : null}
      {fillIn.kind === 'person' ? (
        <datalist id={`${id}-people`}>
          {people.map((name) => (
            <option key={name} value={name} />
          ))}
        </datalist>
      ) : null}
    </div>
  );
}

const badNumber = ({ kind }: FillIn, text: string): boolean =>
  kind === 'number' && text !== '' && !/^-?\d+([.,]\d+)?$/.test(text.trim());
