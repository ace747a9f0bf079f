import { useQuery } from '@tanstack/react-query';
import { UserPlus } from 'lucide-react';
import { useState } from 'react';
import { Link, useParams, useSearchParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { UnsentNotice } from '../sign/UnsentNotice.tsx';
import { useOutgoing } from '../sign/useOutgoing.ts';
import { siteQuery } from '../sites/sites.queries.ts';
import { Button } from '../ui/Button.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page } from '../ui/Page.tsx';
import { accountOutbox } from './account-outbox.ts';
import { AddSigner } from './AddSigner.tsx';
import { type CrewMember, signersInWords } from './crew-to-sign.ts';
import { SendKept } from './SendKept.tsx';
import { type Signer, SigningOver } from './SigningOver.tsx';
import { useCrewToSign } from './useCrewToSign.ts';

/** A supervisor's signed-in device, handed from one of the crew to the next. */
export function HandedRoundPage() {
  const { siteId = '' } = useParams();
  const [search] = useSearchParams();
  const talkId = search.get('talk');
  const site = useQuery(siteQuery(siteId));
  const crew = useCrewToSign(siteId, talkId);
  const [signer, setSigner] = useState<Signer | null>(null);
  const [adding, setAdding] = useState(false);
  const open = ({ personId, name }: { personId: string; name: string }) =>
    setSigner({ personId, name, start: talkId ? { only: talkId } : 'first' });
  return (
    <Page
      title="Hand the device round"
      lead={
        <>
          <Link to={paths.site(siteId)} className="underline">
            {site.data?.name ?? 'The site'}
          </Link>
          . Each person taps their name, reads, signs, and hands the device on.
        </>
      }
      actions={
        <Button icon={UserPlus} onClick={() => setAdding(true)}>
          Somebody else
        </Button>
      }
    >
      <SendKept />
      {site.data?.archivedAt ? (
        <Notice kind="attention">This site is closed: nobody can sign on.</Notice>
      ) : null}
      <UnsentNotice outbox={accountOutbox} />
      <Loaded query={crew}>
        {({ members, talk }) => (
          <>
            <p className="mb-3 text-lg">{signersInWords(members, talk?.topic ?? null)}</p>
            <CrewList members={members} onOpen={open} />
            {talk && (
              <p className="mt-4">
                <Link to={paths.talk(talk.id)}>Back to the talk</Link>
              </p>
            )}
          </>
        )}
      </Loaded>
      <SigningOver
        signer={signer}
        siteId={siteId}
        finishLabel="Next person"
        onClose={() => setSigner(null)}
      />
      <AddSigner
        siteId={siteId}
        open={adding}
        onClose={() => setAdding(false)}
        onChosen={(person) => {
          setAdding(false);
          open(person);
        }}
      />
    </Page>
  );
}

function CrewList({ members, onOpen }: { members: CrewMember[]; onOpen: (member: CrewMember) => void }) {
  const waiting = useOutgoing(accountOutbox).filter(({ state }) => state === 'waiting');
  if (members.length === 0)
    return <p className="text-ink-soft">Nobody is on the crew yet. Add the first with “Somebody else”.</p>;
  return (
    <ul className="grid gap-2 md:grid-cols-2">
      {members.map((member) => (
        <li key={member.personId}>
          <button
            type="button"
            onClick={() => onOpen(member)}
            className="block min-h-16 w-full rounded border border-edge bg-sheet px-4 py-2 text-left text-ink hover:bg-chalk-wash"
          >
            <span className="block text-lg font-medium">{member.name}</span>
            <span className="block text-sm text-ink-soft">{member.employer}</span>
            {waiting.some(({ carrier }) => carrier.personId === member.personId) ? (
              <span className="block">Signed, kept on this device, will be sent</span>
            ) : null}
            {member.open.length === 0 ? (
              <span className="block text-lichen">Nothing left to sign</span>
            ) : (
              <span className="block">To sign: {member.open.join('; ')}</span>
            )}
          </button>
        </li>
      ))}
    </ul>
  );
}
