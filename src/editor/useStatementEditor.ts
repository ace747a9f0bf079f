import { useQuery, useQueryClient } from '@tanstack/react-query';
import { type Editor, useEditor } from '@tiptap/react';
import { useEffect, useRef, useState } from 'react';
import { toast } from 'sonner';
import type { Matrix } from '#shared/risk/matrix.ts';
import type { NodeJson } from '#shared/statements/document/json.ts';
import { wordsOf } from '../lib/query.ts';
import {
  apply,
  type Edit,
  insertBlock,
  insertControl,
  insertFillIn,
  insertHazard,
  insertInStep,
  insertStep,
} from './edits.ts';
import { editorExtensions } from './extensions.ts';
import { findBlocks } from './find-blocks.ts';
import { blockQuery, blocksQuery } from './library.queries.ts';
import type { SlashItem, SlashSource } from './slash.ts';

const pieces: [name: string, hint: string, edit: Edit][] = [
  ['Step', 'The next step of the work', insertStep],
  ['Hazard', 'What can hurt somebody in this step', insertHazard],
  ['Control', 'What is done about the hazard', insertControl],
  ['Stop if', 'When work must stop', insertInStep('stopIf')],
  ['Hold point', 'Where work waits until somebody releases it', insertInStep('holdPoint')],
  ['Fill-in', 'A place that must be filled before issue', insertFillIn],
];

const most = 14;

type Options = {
  matrix: Matrix;
  editable: boolean;
  label: string;
  document: NodeJson;
  onChange: (document: NodeJson) => void;
};

/** The TipTap editor of one statement, with the slash menu over pieces and library. */
export function useStatementEditor({ matrix, editable, label, document, onChange }: Options): Editor | null {
  const client = useQueryClient();
  // Fetched here, so that the menu finds the library when it is opened.
  useQuery(blocksQuery);
  const latest = useRef(onChange);
  useEffect(() => {
    latest.current = onChange;
  });

  const [slash] = useState<SlashSource>(() => ({
    items(query) {
      const own = pieces
        .filter(([name]) => name.toLowerCase().includes(query.toLowerCase()))
        .map(([name, hint, edit]): SlashItem => ({
          name,
          words: '',
          hint,
          run: (editor) => void apply(editor, edit),
        }));
      const blocks = findBlocks(client.getQueryData(blocksQuery.queryKey)?.blocks ?? [], query).map(
        (block): SlashItem => ({
          name: block.title,
          words: '',
          hint: `Block: ${block.summary}`,
          run: (editor) => {
            client
              .fetchQuery(blockQuery(block.id))
              .then((whole) => apply(editor, insertBlock(whole)))
              .catch((error: unknown) => toast(wordsOf(error)));
          },
        }),
      );
      return [...own, ...blocks].slice(0, most);
    },
  }));

  return useEditor(
    {
      extensions: editorExtensions({ matrix, slash }),
      content: document,
      editable,
      shouldRerenderOnTransaction: false,
      editorProps: {
        attributes: { role: 'textbox', 'aria-multiline': 'true', 'aria-label': label, class: 'statement' },
      },
      onUpdate: ({ editor }) => latest.current(editor.getJSON() as NodeJson),
    },
    [],
  );
}
