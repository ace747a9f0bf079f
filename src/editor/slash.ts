import { type Editor, Extension, type Range } from '@tiptap/core';
import { PluginKey } from '@tiptap/pm/state';
import { ReactRenderer } from '@tiptap/react';
import { Suggestion, type SuggestionProps } from '@tiptap/suggestion';
import { SlashMenu, type SlashMenuHandle, type SlashMenuProps } from './SlashMenu.tsx';

export type SlashItem = {
  name: string;
  /** Further words to be found by. */
  words: string;
  hint: string;
  run: (editor: Editor) => void;
};

/** What `/` offers, asked each time: the library may have come meanwhile. */
export type SlashSource = { items: (query: string) => SlashItem[] };

/** Typing `/` at the start of a word offers what can be put in. */
export const slashMenu = (source: SlashSource) =>
  Extension.create({
    name: 'slashMenu',
    addProseMirrorPlugins() {
      return [
        Suggestion<SlashItem, SlashItem>({
          editor: this.editor,
          pluginKey: new PluginKey('slashMenu'),
          char: '/',
          allowSpaces: true,
          items: ({ query }) => source.items(query),
          command: ({ editor, range, props }) => insert(editor, range, props),
          render: () => {
            let renderer: ReactRenderer<SlashMenuHandle, SlashMenuProps> | null = null;
            let unmount: (() => void) | undefined;
            return {
              onStart: (props: SuggestionProps<SlashItem, SlashItem>) => {
                renderer = new ReactRenderer<SlashMenuHandle, SlashMenuProps>(SlashMenu, {
                  props,
                  editor: props.editor,
                });
                unmount = props.mount(renderer.element) ?? undefined;
              },
              onUpdate: (props: SuggestionProps<SlashItem, SlashItem>) => renderer?.updateProps(props),
              onKeyDown: ({ event }: { event: KeyboardEvent }) => renderer?.ref?.onKey(event) ?? false,
              onExit: () => {
                unmount?.();
                renderer?.destroy();
                renderer = null;
              },
            };
          },
        }),
      ];
    },
  });

function insert(editor: Editor, range: Range, item: SlashItem): void {
  editor.chain().focus().deleteRange(range).run();
  item.run(editor);
}
