import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { Outside } from '../account/Outside.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Notice } from '../ui/Notice.tsx';
import { verifyQuery } from './statements.queries.ts';

/** What anybody with a printed copy may learn: whether it is the one in force. No content is shown. */
export function VerifyPage() {
  const { hash = '' } = useParams();
  const query = useQuery(verifyQuery(hash));
  return (
    <Outside title="Is this copy current?">
      <p className="mb-4 break-all text-ink-soft">Short hash {hash}</p>
      <Loaded query={query}>
        {({ standing, number, issuedAt }) => {
          const which = number
            ? `Revision ${number}, issued ${issuedAt ? new Date(issuedAt).toLocaleString() : ''}. `
            : '';
          if (standing === 'current') return <Notice kind="done">{which}It is the revision in force.</Notice>;
          if (standing === 'superseded')
            return (
              <Notice kind="stop">
                {which}It is superseded: a newer revision is in force. Do not work from this copy.
              </Notice>
            );
          if (standing === 'withdrawn')
            return <Notice kind="stop">{which}It was withdrawn. Do not work from this copy.</Notice>;
          return (
            <Notice kind="attention">
              This hash is not known here. Compare it with the printed one, letter by letter.
            </Notice>
          );
        }}
      </Loaded>
    </Outside>
  );
}
