import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { newId } from '#shared/kernel/ids.ts';
import type { Site } from '#shared/sites/sites.api.ts';
import { paths } from '../app/paths.ts';
import { useMayDo, useSession } from '../app/session.queries.ts';
import { useSiteInHand } from '../app/site-in-hand.ts';
import { sitesQuery } from '../sites/sites.queries.ts';
import { Loaded } from '../ui/Loaded.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page } from '../ui/Page.tsx';
import { OpenTalk } from './OpenTalk.tsx';
import { newTalkForm } from './talk-form.ts';
import { TalkForm } from './TalkForm.tsx';
import { TalkRecord } from './TalkRecord.tsx';
import { talkQuery } from './talks.queries.ts';
import { useTalkEditing } from './useTalkEditing.ts';

/** A toolbox talk: new, open and being written, or closed. */
export function TalkPage() {
  const { id = 'new' } = useParams();
  return id === 'new' ? <NewTalk /> : <KnownTalk key={id} id={id} />;
}

function KnownTalk({ id }: { id: string }) {
  const query = useQuery(talkQuery(id));
  const mayWrite = useMayDo()('talk.write');
  // A talk that was opened to be written stays with its form, so that what was typed outlives somebody else's closing it.
  const [wasOpen, setWasOpen] = useState(false);
  return (
    <Loaded query={query}>
      {(talk) => {
        if (mayWrite && (wasOpen || talk.state === 'open'))
          return <OpenTalk talk={talk} onMounted={() => setWasOpen(true)} />;
        return <TalkRecord talk={talk} />;
      }}
    </Loaded>
  );
}

function NewTalk() {
  const mayWrite = useMayDo()('talk.write');
  const sites = useQuery(sitesQuery('no'));
  return (
    <Page title="New talk">
      {mayWrite ? (
        <Loaded query={sites}>{({ sites: choices }) => <NewTalkForm sites={choices} />}</Loaded>
      ) : (
        <Notice kind="attention">Your role reads talks and does not write them.</Notice>
      )}
    </Page>
  );
}

function NewTalkForm({ sites }: { sites: Site[] }) {
  const [id] = useState(newId);
  const [search] = useSearchParams();
  const { siteId } = useSiteInHand();
  const session = useSession();
  const navigate = useNavigate();
  const wanted = search.get('siteId') ?? siteId;
  const site = sites.find((candidate) => candidate.id === wanted) ?? sites[0];
  const { form } = useTalkEditing({
    id,
    lockVersion: 0,
    start: newTalkForm({
      siteId: site?.id ?? '',
      timeZone: site?.timeZone ?? session.organisation.timeZone,
      presenter: session.account.name,
    }),
    onSaved: () => void navigate(paths.talk(id), { replace: true }),
  });
  if (!site)
    return (
      <Notice kind="attention">There is no open site yet. A talk is held at a site: add one first.</Notice>
    );
  return <TalkForm form={form} sites={sites} siteIsFixed={false} act="Save the talk" />;
}
