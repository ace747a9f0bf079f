import { useQuery } from '@tanstack/react-query';
import { type Editor, EditorContent, useEditorState } from '@tiptap/react';
import { BookOpen, ListChecks, ListTree } from 'lucide-react';
import { Tabs } from 'radix-ui';
import { type ReactNode, useMemo, useState } from 'react';
import type { NodeJson } from '#shared/statements/document/json.ts';
import { outlineOf } from '#shared/statements/document/outline.ts';
import { blocks, type Gap, gapsBeforeIssue } from '#shared/statements/readiness.ts';
import type { Statement } from '#shared/statements/statements.api.ts';
import { useSession } from '../app/session.queries.ts';
import { peopleQuery } from '../people/people.queries.ts';
import { Button } from '../ui/Button.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { apply, goToFillIn } from './edits.ts';
import { Inspector } from './Inspector.tsx';
import { Library } from './Library.tsx';
import { Outline } from './Outline.tsx';
import { Readiness } from './Readiness.tsx';
import { StatementContext } from './StatementContext.ts';
import { Toolbar } from './Toolbar.tsx';
import { useStatementEditor } from './useStatementEditor.ts';
import './editor.css';

type StatementEditorProps = {
  statement: Statement;
  document: NodeJson;
  editable: boolean;
  onChange?: (document: NodeJson) => void;
  /** Stands between the tools and the document: title and save state. */
  heading?: ReactNode;
};

const none = () => undefined;

/** The sheet in the middle, the outline at its left, readiness and library at its right; on a narrow screen the sides are drawers. */
export function StatementEditor({
  statement,
  document,
  editable,
  onChange = none,
  heading,
}: StatementEditorProps) {
  const { organisation } = useSession();
  const { data: known } = useQuery(peopleQuery({ siteId: statement.siteId }));
  const { matrix } = organisation;
  const surroundings = useMemo(
    () => ({ profile: statement.profile, matrix, people: (known?.people ?? []).map(({ name }) => name) }),
    [statement.profile, matrix, known],
  );
  const editor = useStatementEditor({ matrix, editable, label: statement.title, document, onChange });
  return (
    <StatementContext value={surroundings}>
      {editor ? (
        <Workbench editor={editor} statement={statement} editable={editable} heading={heading} />
      ) : null}
    </StatementContext>
  );
}

function Workbench({
  editor,
  statement,
  editable,
  heading,
}: {
  editor: Editor;
  statement: Statement;
  editable: boolean;
  heading: ReactNode;
}) {
  const { organisation } = useSession();
  const { matrix } = organisation;
  const doc = useEditorState({
    editor,
    selector: ({ editor: current }) => current.state.doc,
    equalityFn: (a, b) => a === b,
  });
  const outline = useMemo(() => outlineOf(doc.toJSON() as NodeJson), [doc]);
  const gaps = useMemo(
    () => gapsBeforeIssue(outline, { profile: statement.profile, matrix }),
    [outline, statement.profile, matrix],
  );
  const openFillIns = outline.fillIns.filter(({ value }) => value.trim() === '').length;
  const sides = { editor, gaps, editable };
  return (
    <div className="lg:grid lg:grid-cols-[15rem_minmax(0,1fr)_19rem] lg:gap-5">
      <aside
        aria-label="Outline"
        className="no-print hidden lg:sticky lg:top-2 lg:block lg:max-h-[calc(100dvh-7rem)] lg:overflow-y-auto"
      >
        <h2 className="mb-2 font-semibold">Steps</h2>
        <Outline editor={editor} />
      </aside>
      <div className="min-w-0">
        <div className="no-print sticky top-0 z-20 border-b border-zinc bg-paper py-1">
          {editable ? <Toolbar editor={editor} /> : null}
          <div className="flex flex-wrap items-center gap-2">
            <Drawers {...sides} />
            {editable ? (
              <Button kind="bare" disabled={openFillIns === 0} onClick={() => apply(editor, goToFillIn(1))}>
                {openFillIns === 0
                  ? 'Every fill-in is filled'
                  : `${openFillIns} of ${outline.fillIns.length} fill-ins open`}
              </Button>
            ) : null}
            <span className="ml-auto">{heading}</span>
          </div>
        </div>
        <div className="relative mt-4 border border-zinc bg-sheet p-4 sm:p-8">
          <EditorContent editor={editor} />
        </div>
        <div className="sticky bottom-30 z-20 lg:hidden">
          {editable ? <Inspector folded editor={editor} /> : null}
        </div>
      </div>
      <div className="hidden lg:block">
        <Sides {...sides} />
      </div>
    </div>
  );
}

type SidesProps = { editor: Editor; gaps: Gap[]; editable: boolean };

/** At the right: what is selected, and under it readiness and library. */
function Sides({ editor, gaps, editable }: SidesProps) {
  return (
    <div className="sticky top-2 flex max-h-[calc(100dvh-7rem)] flex-col gap-4 overflow-y-auto">
      {editable ? <Inspector editor={editor} /> : null}
      <SideTabs editor={editor} gaps={gaps} editable={editable} />
    </div>
  );
}

const tab =
  'min-h-10 grow border-b-2 border-transparent px-2 font-medium text-ink-soft data-[state=active]:border-chalk data-[state=active]:text-chalk';

function SideTabs({ editor, gaps, editable }: SidesProps) {
  const stopping = gaps.filter(blocks).length;
  return (
    <Tabs.Root defaultValue="readiness">
      <Tabs.List aria-label="Beside the document" className="mb-3 flex">
        <Tabs.Trigger value="readiness" className={tab}>
          Readiness{stopping > 0 ? `, ${stopping}` : ''}
        </Tabs.Trigger>
        {editable ? (
          <Tabs.Trigger value="library" className={tab}>
            Library
          </Tabs.Trigger>
        ) : null}
      </Tabs.List>
      <Tabs.Content value="readiness">
        <Readiness editor={editor} gaps={gaps} />
      </Tabs.Content>
      {editable ? (
        <Tabs.Content value="library">
          <Library editor={editor} />
        </Tabs.Content>
      ) : null}
    </Tabs.Root>
  );
}

type Drawer = 'outline' | 'readiness' | 'library';

/** The same sides on a narrow screen, opened over the page. */
function Drawers({ editor, gaps, editable }: SidesProps) {
  const [open, setOpen] = useState<Drawer | null>(null);
  const stopping = gaps.filter(blocks).length;
  const titles: Record<Drawer, string> = { outline: 'Steps', readiness: 'Readiness', library: 'Library' };
  return (
    <div className="flex gap-1 lg:hidden">
      <Button kind="bare" icon={ListTree} onClick={() => setOpen('outline')}>
        Steps
      </Button>
      <Button kind="bare" icon={ListChecks} onClick={() => setOpen('readiness')}>
        {stopping > 0 ? `${stopping} open` : 'Ready'}
      </Button>
      {editable ? (
        <Button kind="bare" icon={BookOpen} onClick={() => setOpen('library')}>
          Library
        </Button>
      ) : null}
      <Dialog title={open ? titles[open] : ''} open={open !== null} onClose={() => setOpen(null)}>
        <div onClick={open === 'outline' || open === 'readiness' ? () => setOpen(null) : undefined}>
          {open === 'outline' ? <Outline editor={editor} /> : null}
          {open === 'readiness' ? <Readiness editor={editor} gaps={gaps} /> : null}
          {open === 'library' ? <Library editor={editor} /> : null}
        </div>
      </Dialog>
    </div>
  );
}
