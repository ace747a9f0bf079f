import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Talk } from '#shared/talks/talks.api.ts';
import { paths } from '../app/paths.ts';
import { wordsOf } from '../lib/query.ts';
import { Button } from '../ui/Button.tsx';
import { ConfirmDialog } from '../ui/Dialog.tsx';
import { Notice } from '../ui/Notice.tsx';
import { useDiscardTalk } from './talks.queries.ts';

/** Throws away a talk that nobody has signed. */
export function DiscardTalk({ talk }: { talk: Talk }) {
  const [asking, setAsking] = useState(false);
  const discard = useDiscardTalk(talk.id);
  const navigate = useNavigate();
  return (
    <>
      <Button kind="destructive" onClick={() => setAsking(true)}>
        Throw away
      </Button>
      <ConfirmDialog
        destructive
        title="Throw this talk away?"
        lead="Nobody has signed it. Its words are lost for good."
        act="Throw away"
        open={asking}
        busy={discard.isPending}
        onClose={() => setAsking(false)}
        onConfirm={() =>
          discard.mutate(undefined, { onSuccess: () => void navigate(paths.talks, { replace: true }) })
        }
      >
        {discard.error ? <Notice kind="stop">{wordsOf(discard.error)}</Notice> : null}
      </ConfirmDialog>
    </>
  );
}
