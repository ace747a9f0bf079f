import type { Editor } from '@tiptap/core';
import { useEditorState } from '@tiptap/react';
import {
  Bold,
  Hand,
  Heading2,
  Italic,
  List,
  ListOrdered,
  OctagonX,
  Redo2,
  ShieldCheck,
  SquarePen,
  SquarePlus,
  TriangleAlert,
  Undo2,
} from 'lucide-react';
import type { LucideIcon } from 'lucide-react';
import {
  apply,
  type Edit,
  insertControl,
  insertFillIn,
  insertHazard,
  insertInStep,
  insertStep,
} from './edits.ts';

const button =
  'inline-flex min-h-9 min-w-9 shrink-0 items-center justify-center gap-1.5 rounded px-2 hover:bg-chalk-wash disabled:opacity-40 aria-pressed:bg-chalk-wash aria-pressed:text-chalk pointer-coarse:min-h-12 pointer-coarse:min-w-12';

/** The tools over the document; everything here can also be done from the keyboard. */
export function Toolbar({ editor }: { editor: Editor }) {
  const state = useEditorState({
    editor,
    selector: ({ editor: current }) => ({
      bold: current.isActive('bold'),
      italic: current.isActive('italic'),
      bullets: current.isActive('bulletList'),
      numbers: current.isActive('orderedList'),
      heading: current.isActive('heading'),
      canUndo: current.can().undo(),
      canRedo: current.can().redo(),
    }),
  });
  const insert = (edit: Edit) => () => {
    apply(editor, edit);
    editor.commands.focus();
  };
  const mark = (name: string, keys: string, icon: LucideIcon, pressed: boolean, run: () => void) => (
    <Tool name={name} keys={keys} icon={icon} pressed={pressed} onPress={run} />
  );
  return (
    <div role="toolbar" aria-label="Tools" className="flex items-center gap-0.5 overflow-x-auto lg:flex-wrap">
      <Tool
        name="Undo"
        keys="Ctrl Z"
        icon={Undo2}
        disabled={!state.canUndo}
        onPress={() => editor.chain().focus().undo().run()}
      />
      <Tool
        name="Redo"
        keys="Ctrl Shift Z"
        icon={Redo2}
        disabled={!state.canRedo}
        onPress={() => editor.chain().focus().redo().run()}
      />
      {mark('Bold', 'Ctrl B', Bold, state.bold, () => editor.chain().focus().toggleBold().run())}
      {mark('Italic', 'Ctrl I', Italic, state.italic, () => editor.chain().focus().toggleItalic().run())}
      {mark('List', '', List, state.bullets, () => editor.chain().focus().toggleBulletList().run())}
      {mark('Numbered list', '', ListOrdered, state.numbers, () =>
        editor.chain().focus().toggleOrderedList().run(),
      )}
      {mark('Heading between steps', '', Heading2, state.heading, () =>
        editor.chain().focus().toggleHeading({ level: 2 }).run(),
      )}
      <span aria-hidden className="mx-1 h-6 border-l border-zinc" />
      <Tool words name="Step" keys="Ctrl Enter" icon={SquarePlus} onPress={insert(insertStep)} />
      <Tool words name="Hazard" keys="Ctrl Alt H" icon={TriangleAlert} onPress={insert(insertHazard)} />
      <Tool words name="Control" keys="Ctrl Alt C" icon={ShieldCheck} onPress={insert(insertControl)} />
      <Tool words name="Stop if" keys="" icon={OctagonX} onPress={insert(insertInStep('stopIf'))} />
      <Tool words name="Hold point" keys="" icon={Hand} onPress={insert(insertInStep('holdPoint'))} />
      <Tool words name="Fill-in" keys="" icon={SquarePen} onPress={() => apply(editor, insertFillIn)} />
    </div>
  );
}

type ToolProps = {
  name: string;
  keys: string;
  icon: LucideIcon;
  onPress: () => void;
  words?: boolean;
  pressed?: boolean;
  disabled?: boolean;
};

function Tool({ name, keys, icon: Icon, onPress, words = false, pressed, disabled = false }: ToolProps) {
  return (
    <button
      type="button"
      className={button}
      title={keys ? `${name} (${keys})` : name}
      aria-label={name}
      aria-pressed={pressed}
      disabled={disabled}
      onMouseDown={(event) => event.preventDefault()}
      onClick={onPress}
    >
      <Icon size={18} strokeWidth={1.75} aria-hidden />
      {words ? <span className="hidden xl:inline">{name}</span> : null}
    </button>
  );
}
