import { useState } from 'react';
import type { Talk } from '#shared/talks/talks.api.ts';
import { wordsOf } from '../lib/query.ts';
import { Button } from '../ui/Button.tsx';
import { ConfirmDialog } from '../ui/Dialog.tsx';
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
  return (
    <>
      <Button onClick={() => setAsking(true)}>Close the talk</Button>
      <ConfirmDialog
        title="Close this talk?"
        act="Close the talk"
        open={asking}
        busy={close.isPending}
        lead={
          <>
            Its words and its {attendance.length === 1 ? '1 signature' : `${attendance.length} signatures`}{' '}
            freeze and go into the ledger. Nothing in it can be changed afterwards, and nobody can sign it any
            more.
          </>
        }
        onClose={() => setAsking(false)}
        onConfirm={() => {
          if (!unsaved) close.mutate(lockVersion, { onSuccess: () => setAsking(false) });
        }}
      >
        {unsaved ? (
          <Notice kind="stop">
            You have written words that are not saved. Save them first, or they are not in it.
          </Notice>
        ) : null}
        {missing.length > 0 ? (
          <p>
            {missing.length} of {attendance.length + missing.length} have not signed:{' '}
            {missing.map(({ name }) => name).join(', ')}.
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
