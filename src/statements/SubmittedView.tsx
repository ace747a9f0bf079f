import { Check, Undo2 } from 'lucide-react';
import { useState } from 'react';
import { toast } from 'sonner';
import { formatInstant } from '#shared/kernel/work-date.ts';
import { outlineOf } from '#shared/statements/document/outline.ts';
import { blocks, gapsBeforeIssue } from '#shared/statements/readiness.ts';
import {
  issueStatement,
  recallDraft,
  returnDraft,
  type Statement,
} from '#shared/statements/statements.api.ts';
import { useMayDo, useSession } from '../app/session.queries.ts';
import { StatementEditor } from '../editor/StatementEditor.tsx';
import { call } from '../lib/call.ts';
import { wordsOf } from '../lib/query.ts';
import { Button } from '../ui/Button.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { CheckField, TextArea } from '../ui/Field.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page } from '../ui/Page.tsx';
import { useStatementAct } from './statements.queries.ts';

const told = { onError: (error: Error) => toast(wordsOf(error)) };

/** A draft that waits for the safety officer: to be read, sent back or issued. */
export function SubmittedView({ statement }: { statement: Statement }) {
  const { id, lockVersion, timeZone, submittedAt, submittedBy } = statement;
  const mayDo = useMayDo();
  const recall = useStatementAct(id, () => call(recallDraft, { params: { id }, body: { lockVersion } }));
  const submitted = statement.state === 'submitted';
  return (
    <Page
      wide
      title={statement.title}
      lead={
        submitted && submittedAt
          ? `${statement.site}. Submitted by ${submittedBy ?? ''}, ${formatInstant(submittedAt, timeZone)}.`
          : `${statement.site}. Draft, being written.`
      }
      actions={
        submitted ? (
          <>
            {mayDo('statement.write') ? (
              <Button icon={Undo2} busy={recall.isPending} onClick={() => recall.mutate(undefined, told)}>
                Take it back
              </Button>
            ) : null}
            {mayDo('statement.issue') ? <AskForChanges statement={statement} /> : null}
            {mayDo('statement.issue') ? <Issue statement={statement} /> : null}
          </>
        ) : null
      }
    >
      <StatementEditor statement={statement} document={statement.document} editable={false} />
    </Page>
  );
}

function AskForChanges({ statement: { id, lockVersion } }: { statement: Statement }) {
  const [open, setOpen] = useState(false);
  const [note, setNote] = useState('');
  const act = useStatementAct(id, () => call(returnDraft, { params: { id }, body: { lockVersion, note } }));
  return (
    <>
      <Button onClick={() => setOpen(true)}>Ask for changes</Button>
      <Dialog
        title="Ask for changes"
        lead="The draft goes back to whoever writes it, with your note."
        open={open}
        onClose={() => setOpen(false)}
      >
        <TextArea label="What should change" value={note} onChange={(event) => setNote(event.target.value)} />
        {act.error ? <Notice kind="stop">{wordsOf(act.error)}</Notice> : null}
        <Button
          kind="filled"
          className="self-end"
          busy={act.isPending}
          disabled={note.trim() === ''}
          onClick={() => act.mutate(undefined)}
        >
          Hand it back
        </Button>
      </Dialog>
    </>
  );
}

function Issue({ statement }: { statement: Statement }) {
  const { id, lockVersion, profile, currentRevision, document } = statement;
  const { organisation } = useSession();
  const [open, setOpen] = useState(false);
  const [material, setMaterial] = useState(true);
  const [changeNote, setChangeNote] = useState('');
  const act = useStatementAct(id, () =>
    call(issueStatement, { params: { id }, body: { lockVersion, material, changeNote } }),
  );
  const stopping = gapsBeforeIssue(outlineOf(document), { profile, matrix: organisation.matrix }).filter(
    blocks,
  );
  const next = (currentRevision ?? 0) + 1;
  return (
    <>
      <Button kind="filled" icon={Check} onClick={() => setOpen(true)}>
        Issue
      </Button>
      <Dialog
        title={`Issue revision ${next}`}
        lead="It is frozen, numbered and entered in the ledger. Nothing in it can be changed afterwards; a change is a new revision."
        open={open}
        onClose={() => setOpen(false)}
      >
        {stopping.length > 0 ? (
          <Notice kind="attention">
            <p>
              {stopping.length} {stopping.length === 1 ? 'gap stops' : 'gaps stop'} the issue. Hand the draft
              back to be mended.
            </p>
            <ul className="mt-1 list-disc pl-5">
              {stopping.slice(0, 8).map(({ words }, index) => (
                <li key={index}>{words}</li>
              ))}
            </ul>
          </Notice>
        ) : null}
        {currentRevision === null ? null : (
          <>
            <CheckField
              label="A material change: everybody signs again"
              help="Leave it ticked unless nothing changes in how the work is done."
              checked={material}
              onChange={(event) => setMaterial(event.target.checked)}
            />
            <TextArea
              label="What is different"
              help="Whoever signed the last revision reads this first."
              value={changeNote}
              onChange={(event) => setChangeNote(event.target.value)}
            />
          </>
        )}
        {act.error ? <Notice kind="stop">{wordsOf(act.error)}</Notice> : null}
        <div className="flex justify-end gap-2">
          <Button onClick={() => setOpen(false)}>Not now</Button>
          <Button
            kind="filled"
            busy={act.isPending}
            disabled={stopping.length > 0}
            onClick={() => act.mutate(undefined, { onSuccess: () => toast(`Revision ${next} is in force.`) })}
          >
            Issue revision {next}
          </Button>
        </div>
      </Dialog>
    </>
  );
}
