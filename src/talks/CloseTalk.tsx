import { useState } from 'react';
import type { Talk } from '#shared/talks/talks.api.ts';
import { wordsOf } from '../lib/query.ts';
import { Button } from '../ui/Button.tsx';
import { ConfirmDialog, Dialog } from '../ui/Dialog.tsx';
import { Notice } from '../ui/Notice.tsx';
import { useCloseTalk } from './talks.queries.ts';

/** Closes a talk for good, after saying what freezes. */
export function CloseTalk({
  talk,
  lockVersion,
  unsaved,
}: {
  talk: Talk;
  lockVersion: number;
  unsaved: boolean;
}) {
  const [asking, setAsking] = useState(false);
  const close = useCloseTalk(talk.id);
  const { attendance, missing } = talk;
  const stay = () => setAsking(false);
  return (
    <>
      <Button onClick={() => setAsking(true)}>Close the talk</Button>
      <Dialog
        title="Save first"
        lead="You have written words that are not saved. A talk closes with what is saved."
        open={asking && unsaved}
        onClose={stay}
      >
        <div className="flex justify-end">
          <Button kind="filled" onClick={stay}>
            Back to the talk
          </Button>
        </div>
      </Dialog>
      <ConfirmDialog
        title="Close this talk?"
        act="Close the talk"
        open={asking && !unsaved}
        busy={close.isPending}
        lead={
          <>
            Its words and its {attendance.length === 1 ? '1 signature' : `${attendance.length} signatures`}{' '}
            freeze and go into the ledger. Nothing in it can be changed afterwards, and nobody can sign it any
            more.
          </>
        }
        onClose={stay}
        onConfirm={() => close.mutate(lockVersion, { onSuccess: stay })}
      >
        {missing.length > 0 ? (
          <p>
            {missing.length} of {attendance.length + missing.length} {missing.length === 1 ? 'has' : 'have'}{' '}
            not signed: {missing.map(({ name }) => name).join(', ')}.
          </p>
        ) : null}
        {talk.consultation ? null : (
          <p>
            No matters raised and outcome are written: it stands as a briefing only, not counted as
            consultation.
          </p>
        )}
        {close.error ? <Notice kind="stop">{wordsOf(close.error)}</Notice> : null}
      </ConfirmDialog>
    </>
  );
}
