import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { ToSign } from '#shared/signons/signons.api.ts';
import { useSession } from '../app/session.queries.ts';
import { tasksOf } from '../sign/tasks.ts';
import { TaskList } from '../sign/ToSignScreen.tsx';
import { UnsentNotice } from '../sign/UnsentNotice.tsx';
import { useOutgoing } from '../sign/useOutgoing.ts';
import { Loaded } from '../ui/Loaded.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { accountOutbox } from './account-outbox.ts';
import { SendKept } from './SendKept.tsx';
import { type Signer, SigningOver } from './SigningOver.tsx';
import { myToSignQuery } from './signons.queries.ts';

/** What the signed-in person has to sign, site by site. */
export function ToSignPage() {
  const session = useSession();
  const query = useQuery(myToSignQuery);
  const [signing, setSigning] = useState<{ siteId: string; signer: Signer } | null>(null);
  return (
    <Page title="To sign">
      <SendKept />
      <UnsentNotice outbox={accountOutbox} />
      <Loaded query={query}>
        {({ sites }) =>
          sites.length === 0 ? (
            <Nowhere known={session.personId !== null} />
          ) : (
            sites.map((toSign) => (
              <Site
                key={toSign.site.id}
                toSign={toSign}
                onOpen={(key) =>
                  setSigning({
                    siteId: toSign.site.id,
                    signer: { personId: toSign.person.id, name: toSign.person.name, start: { only: key } },
                  })
                }
              />
            ))
          )
        }
      </Loaded>
      <SigningOver
        signer={signing?.signer ?? null}
        siteId={signing?.siteId ?? ''}
        finishLabel="Back to what there is to sign"
        onClose={() => setSigning(null)}
      />
    </Page>
  );
}

function Nowhere({ known }: { known: boolean }) {
  return (
    <p className="text-ink-soft">
      {known
        ? 'You are on no site’s crew. Your supervisor puts you on one, or you scan the code on the site board.'
        : 'This sign-in is not tied to a person on the crew list. Ask your administrator to tie it.'}
    </p>
  );
}

function Site({ toSign, onOpen }: { toSign: ToSign; onOpen: (key: string) => void }) {
  const tasks = tasksOf(toSign, useOutgoing(accountOutbox));
  const open = tasks.filter(({ isOpen }) => isOpen).length;
  return (
    <Section title={`${toSign.site.name}: ${open === 0 ? 'nothing left to sign' : `${open} to sign`}`}>
      <div className="max-w-2xl">
        <TaskList toSign={toSign} tasks={tasks} outbox={accountOutbox} onOpen={({ key }) => onOpen(key)} />
      </div>
    </Section>
  );
}
