import { Printer, Send, Trash2 } from 'lucide-react';
import { useCallback, useEffect, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { toast } from 'sonner';
import type { NodeJson } from '#shared/statements/document/json.ts';
import { discardStatement, type Statement, submitDraft } from '#shared/statements/statements.api.ts';
import { paths } from '../app/paths.ts';
import { ConflictDialog } from '../editor/ConflictDialog.tsx';
import { keepDraft, keptDraft, putAside } from '../editor/kept-drafts.ts';
import { SaveStatus } from '../editor/SaveStatus.tsx';
import { StatementEditor } from '../editor/StatementEditor.tsx';
import { useAutosave } from '../editor/useAutosave.ts';
import { call } from '../lib/call.ts';
import { queryClient, wordsOf } from '../lib/query.ts';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { ConfirmDialog } from '../ui/Dialog.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page } from '../ui/Page.tsx';
import { statementQuery, useStatementAct } from './statements.queries.ts';

/** The draft being written. */
export function DraftView({ statement }: { statement: Statement }) {
  const { id, timeZone } = statement;
  // What this device kept because it was not saved comes back over the version that it was written over.
  const [kept] = useState(() => keptDraft(id));
  const restored = kept !== null && kept.lockVersion === statement.lockVersion;
  const [content, setContent] = useState(() => {
    const from = restored ? kept : statement;
    return { title: from.title, document: from.document };
  });
  const current = useRef(content);
  const [round, setRound] = useState(0);
  const { state, change, autosave } = useAutosave(statement);

  const write = useCallback(
    (part: Partial<{ title: string; document: NodeJson }>) => {
      current.current = { ...current.current, ...part };
      change(current.current);
    },
    [change],
  );

  // What came back from this device is sent without a change of its own.
  useEffect(() => {
    if (restored) change(current.current);
  }, [restored, change]);

  function takeTheirs() {
    if (state.kind !== 'conflict') return;
    putAside(id, state.mine);
    const theirs = { title: state.theirs.title, document: state.theirs.document };
    autosave.current?.takeTheirs();
    current.current = theirs;
    setContent(theirs);
    setRound(round + 1);
  }

  return (
    <Page
      wide
      title={content.title}
      lead={`${statement.site}. ${statement.currentRevision ? `Revision ${statement.currentRevision} is in force; this is the draft of the next.` : 'Draft, not issued yet.'}`}
      actions={<DraftActions statement={statement} autosave={autosave} saved={state.kind === 'saved'} />}
    >
      {statement.returnNote ? (
        <Notice kind="attention">The safety officer asks: {statement.returnNote}</Notice>
      ) : null}
      {restored ? (
        <Notice>What was not saved last time is back from this device, and is being saved.</Notice>
      ) : null}
      {kept && !restored ? <OldKept id={id} document={kept.document} title={kept.title} /> : null}
      <label className="mt-3 block">
        <span className="font-medium">Title</span>
        <input
          className="w-full rounded border border-edge bg-sheet px-3 py-2 text-lg"
          value={content.title}
          maxLength={140}
          onChange={(event) => {
            setContent({ ...content, title: event.target.value });
            write({ title: event.target.value });
          }}
        />
      </label>
      <div className="mt-4">
        <StatementEditor
          key={round}
          statement={statement}
          document={content.document}
          editable
          onChange={(document) => write({ document })}
          heading={<SaveStatus state={state} timeZone={timeZone} />}
        />
      </div>
      {state.kind === 'conflict' ? (
        <ConflictDialog
          theirs={state.theirs}
          mine={state.mine}
          timeZone={timeZone}
          onKeepMine={() => void autosave.current?.keepMine()}
          onTakeTheirs={takeTheirs}
        />
      ) : null}
    </Page>
  );
}

/** Kept text that was written over an older version than the stored one: it can't be laid over it blindly. */
function OldKept({ id, title, document }: { id: string; title: string; document: NodeJson }) {
  const [gone, setGone] = useState(false);
  if (gone) return null;
  const address = `data:application/json,${encodeURIComponent(JSON.stringify({ title, document }))}`;
  return (
    <Notice kind="attention">
      <p>This device kept an unsaved text of an older version. The draft below is the stored one.</p>
      <div className="mt-2 flex gap-2">
        <a href={address} download="kept draft.json" className="self-center">
          Keep it as a file
        </a>
        <Button
          onClick={() => {
            keepDraft(id, null);
            setGone(true);
          }}
        >
          Let it go
        </Button>
      </div>
    </Notice>
  );
}

type ActionsProps = {
  statement: Statement;
  autosave: ReturnType<typeof useAutosave>['autosave'];
  saved: boolean;
};

function DraftActions({ statement, autosave, saved }: ActionsProps) {
  const { id } = statement;
  const navigate = useNavigate();
  const [discarding, setDiscarding] = useState(false);
  const submit = useStatementAct(id, async () => {
    await autosave.current?.flush();
    return call(submitDraft, {
      params: { id },
      body: { lockVersion: autosave.current?.lockVersion() ?? statement.lockVersion },
    });
  });
  async function discard() {
    try {
      await call(discardStatement, { params: { id } });
      keepDraft(id, null);
      queryClient.removeQueries({ queryKey: statementQuery(id).queryKey });
      await queryClient.invalidateQueries({ queryKey: ['statements'] });
      await navigate(paths.statements);
    } catch (error) {
      toast(wordsOf(error));
    }
  }
  return (
    <>
      {statement.currentRevision === null ? (
        <Button icon={Trash2} onClick={() => setDiscarding(true)}>
          Throw away
        </Button>
      ) : null}
      <ButtonLink outside icon={Printer} to={paths.printDraft(id)}>
        Print the draft
      </ButtonLink>
      <Button
        kind="filled"
        icon={Send}
        busy={submit.isPending}
        onClick={() =>
          submit.mutate(undefined, {
            onError: (error) => toast(wordsOf(error)),
            onSuccess: () => toast('Handed to the safety officer.'),
          })
        }
        title={saved ? undefined : 'What is not saved yet is saved first'}
      >
        Submit
      </Button>
      <ConfirmDialog
        destructive
        title="Throw this draft away?"
        lead="The draft and everything in it is gone for good. It was never issued, so nothing else is lost."
        act="Throw it away"
        open={discarding}
        onClose={() => setDiscarding(false)}
        onConfirm={() => void discard()}
      />
    </>
  );
}
