import type { Editor } from '@tiptap/core';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useEditorState } from '@tiptap/react';
import { Plus } from 'lucide-react';
import { useState } from 'react';
import { toast } from 'sonner';
import { stageNames, type Stage, stages } from '#shared/library/block.ts';
import type { BlockSummary } from '#shared/library/library.api.ts';
import { Badge } from '../ui/Badge.tsx';
import { Button } from '../ui/Button.tsx';
import { inputLook } from '../ui/Field.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { wordsOf } from '../lib/query.ts';
import { apply, insertBlock } from './edits.ts';
import { findBlocks } from './find-blocks.ts';
import { blockQuery, blocksQuery } from './library.queries.ts';
import { passagesOf } from './passages.ts';

/** The block library beside the page: search, look, put in. */
export function Library({ editor }: { editor: Editor }) {
  const query = useQuery(blocksQuery);
  const [search, setSearch] = useState('');
  const [stage, setStage] = useState<Stage | ''>('');
  const used = useEditorState({
    editor,
    selector: ({ editor: { state } }) =>
      passagesOf(state.doc, 'step').map(
        ({ node }) => (node.attrs.origin as { block: string } | null)?.block ?? '',
      ),
  });
  return (
    <div className="flex flex-col gap-2">
      <input
        type="search"
        aria-label="Search the library"
        placeholder="Search: wind, grinder, leads…"
        className={inputLook}
        value={search}
        onChange={(event) => setSearch(event.target.value)}
      />
      <select
        aria-label="Stage"
        className={inputLook}
        value={stage}
        onChange={(event) => setStage(event.target.value as Stage | '')}
      >
        <option value="">Every stage</option>
        {stages.map((value) => (
          <option key={value} value={value}>
            {stageNames[value]}
          </option>
        ))}
      </select>
      <Loaded query={query}>
        {({ blocks }) => {
          const found = findBlocks(
            blocks.filter((block) => stage === '' || block.stage === stage),
            search,
          );
          return (
            <ul>
              {found.map((block) => (
                <BlockEntry key={block.id} block={block} editor={editor} used={used.includes(block.id)} />
              ))}
              {found.length === 0 ? (
                <li className="py-3 text-ink-soft">No block holds these words.</li>
              ) : null}
            </ul>
          );
        }}
      </Loaded>
    </div>
  );
}

function BlockEntry({ block, editor, used }: { block: BlockSummary; editor: Editor; used: boolean }) {
  const client = useQueryClient();
  async function putIn() {
    try {
      const whole = await client.fetchQuery(blockQuery(block.id));
      apply(editor, insertBlock(whole));
      editor.commands.focus();
    } catch (error) {
      toast(wordsOf(error));
    }
  }
  return (
    <li className="border-b border-zinc py-2">
      <details>
        <summary className="font-medium">
          {block.title} {used ? <Badge tone="done">In</Badge> : null}
        </summary>
        <p className="mt-1 text-sm">{block.summary}</p>
        <ul className="mt-1 list-disc pl-5 text-sm text-ink-soft">
          {block.hazards.map((hazard) => (
            <li key={hazard}>{hazard}</li>
          ))}
        </ul>
        <p className="mt-1 text-sm text-ink-soft">
          {stageNames[block.stage]}, version {block.version}, {block.steps}{' '}
          {block.steps === 1 ? 'step' : 'steps'}, {block.fillIns} fill-ins
        </p>
      </details>
      <Button kind="bare" icon={Plus} onClick={() => void putIn()} aria-label={`Put in ${block.title}`}>
        Put in
      </Button>
    </li>
  );
}
