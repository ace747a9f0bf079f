import { useQuery } from '@tanstack/react-query';
import { FileText, Printer, Users } from 'lucide-react';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { toast } from 'sonner';
import { formatDay } from '#shared/kernel/work-date.ts';
import type { Site } from '#shared/sites/sites.api.ts';
import { paths } from '../app/paths.ts';
import { useMayDo } from '../app/session.queries.ts';
import { wordsOf } from '../lib/query.ts';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { ConfirmDialog } from '../ui/Dialog.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { Crew } from './Crew.tsx';
import { signAccessQuery, siteQuery, useArchiveSite } from './sites.queries.ts';

export function SitePage() {
  const { id = '' } = useParams();
  const mayDo = useMayDo();
  const query = useQuery(siteQuery(id));
  return (
    <Loaded query={query}>
      {(site) => (
        <Page
          title={site.name}
          lead={site.address}
          actions={
            <>
              {mayDo('signon.take') && !site.archivedAt ? (
                <ButtonLink kind="filled" icon={Users} to={paths.handedRound(id)}>
                  Hand the device round
                </ButtonLink>
              ) : null}
              <ButtonLink icon={FileText} to={paths.registerOf({ siteId: id })}>
                Register
              </ButtonLink>
              {mayDo('site.manage') ? <ButtonLink to={paths.editSite(id)}>Change</ButtonLink> : null}
              {mayDo('site.manage') ? <Archive site={site} /> : null}
            </>
          }
        >
          {site.archivedAt ? <Notice kind="attention">This site is closed. Its records stay.</Notice> : null}
          <dl className="grid gap-x-6 gap-y-1 sm:grid-cols-[12rem_1fr]">
            <dt className="text-ink-soft">Principal contractor</dt>
            <dd>{site.principalContractor || 'Not named'}</dd>
            <dt className="text-ink-soft">Emergency</dt>
            <dd className="whitespace-pre-line">{site.emergency || 'Nothing written yet'}</dd>
            <dt className="text-ink-soft">Time zone</dt>
            <dd>{site.timeZone}</dd>
          </dl>
          {mayDo('signon.take') && !site.archivedAt ? <SignAccess id={id} /> : null}
          <Crew site={site} />
          <p className="mt-6">
            <Link to={`${paths.statements}?siteId=${id}`}>Statements of this site</Link>
          </p>
        </Page>
      )}
    </Loaded>
  );
}

/** How the crew reaches the sign-on page: code to scan, address to type, and today's code. */
function SignAccess({ id }: { id: string }) {
  const query = useQuery(signAccessQuery(id));
  return (
    <Section
      title="Sign on by phone"
      actions={
        <ButtonLink icon={Printer} to={paths.siteSheet(id)}>
          Print the sheet for the site board
        </ButtonLink>
      }
    >
      <Loaded query={query}>
        {({ address, qrSvg, dayCode, day }) => (
          <div className="flex flex-wrap items-center gap-6">
            <img
              alt={`QR code of ${address}`}
              src={`data:image/svg+xml;utf8,${encodeURIComponent(qrSvg)}`}
              className="size-40 bg-white p-1"
            />
            <div>
              <p className="text-ink-soft">Code for {formatDay(day)}</p>
              <p className="text-4xl font-semibold tracking-[0.2em] tabular-nums">{dayCode}</p>
              <p className="mt-2 break-all">
                <a href={address}>{address}</a>
              </p>
            </div>
          </div>
        )}
      </Loaded>
    </Section>
  );
}

function Archive({ site }: { site: Site }) {
  const [asking, setAsking] = useState(false);
  const archive = useArchiveSite(site.id);
  const set = (archived: boolean) =>
    archive.mutate(archived, {
      onError: (error) => toast(wordsOf(error)),
      onSettled: () => setAsking(false),
    });
  if (site.archivedAt) return <Button onClick={() => set(false)}>Open again</Button>;
  return (
    <>
      <Button kind="destructive" onClick={() => setAsking(true)}>
        Close the site
      </Button>
      <ConfirmDialog
        destructive
        title={`Close ${site.name}?`}
        lead="Nobody can sign on there any more, and it leaves the lists. Its statements and signatures stay on record. You can open it again."
        act="Close the site"
        open={asking}
        busy={archive.isPending}
        onClose={() => setAsking(false)}
        onConfirm={() => set(true)}
      />
    </>
  );
}
