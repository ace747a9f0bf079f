import { useQuery } from '@tanstack/react-query';
import { FilePlus, Megaphone } from 'lucide-react';
import { Link } from 'react-router-dom';
import { formatInstant } from '#shared/kernel/work-date.ts';
import type { BoardPart } from '#shared/sites/sites.api.ts';
import type { StatementRow } from '#shared/statements/statements.api.ts';
import type { TalkRow } from '#shared/talks/talks.api.ts';
import { paths } from '../app/paths.ts';
import { Badge } from '../ui/Badge.tsx';
import { ButtonLink } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { todayQuery } from './audit.queries.ts';

/** The supervisor's morning: one glance says what stands in the way, each with the link that mends it. */
export function TodayPage() {
  const query = useQuery(todayQuery);
  return (
    <Page
      title="Today"
      actions={
        <>
          <ButtonLink icon={Megaphone} to={paths.newTalk}>
            New talk
          </ButtonLink>
          <ButtonLink kind="filled" icon={FilePlus} to={paths.newStatement}>
            New statement
          </ButtonLink>
        </>
      }
    >
      <Loaded query={query}>
        {({ sites, drafts, talks }) => (
          <>
            {sites.length === 0 ? (
              <p>
                No site yet. <Link to={paths.newSite}>Add the first site</Link>: a statement is written for a
                site.
              </p>
            ) : null}
            {sites.map((site) => (
              <SiteMorning key={site.id} {...site} />
            ))}
            <Drafts drafts={drafts} />
            <Talks talks={talks} />
          </>
        )}
      </Loaded>
    </Page>
  );
}

function SiteMorning({ id, name, parts }: { id: string; name: string; parts: BoardPart[] }) {
  const open = parts.filter(({ well }) => !well);
  return (
    <section className="lip mt-5">
      <div className="flex flex-wrap items-baseline justify-between gap-2">
        <h2 className="text-lg">
          <Link to={paths.site(id)} className="text-ink">
            {name}
          </Link>
        </h2>
        <p className={open.length === 0 ? 'text-lichen' : 'text-line'}>
          {open.length === 0
            ? 'Nothing open that is known here'
            : `${open.length} of ${parts.length} not well`}
        </p>
      </div>
      <ul className="mt-2 flex flex-col">
        {parts.map((part) => (
          <li
            key={part.key + part.words}
            className="flex min-h-9 items-center gap-3 border-b border-zinc py-1.5"
          >
            <Badge tone={part.well ? 'done' : 'attention'}>{part.well ? 'Well' : 'Open'}</Badge>
            <Link to={part.link} className="first-letter:uppercase">
              {part.words}
            </Link>
          </li>
        ))}
      </ul>
    </section>
  );
}

function Drafts({ drafts }: { drafts: StatementRow[] }) {
  return (
    <Section title="Drafts that wait">
      <DataTable
        label="Drafts"
        rows={drafts}
        keyOf={({ id }) => id}
        linkOf={({ id }) => paths.statement(id)}
        empty="No draft waits."
        columns={[
          { title: 'Statement', cell: ({ title }) => title },
          { title: 'Site', cell: ({ site }) => site },
          {
            title: 'State',
            cell: ({ state }) => (state === 'submitted' ? 'With the safety officer' : 'Being written'),
          },
          {
            title: 'Last change',
            cell: ({ updatedAt, updatedBy, timeZone }) =>
              `${formatInstant(updatedAt, timeZone)}, ${updatedBy}`,
            wide: true,
          },
        ]}
      />
    </Section>
  );
}

function Talks({ talks }: { talks: TalkRow[] }) {
  return (
    <Section title="Talks of the day">
      <DataTable
        label="Talks"
        rows={talks}
        keyOf={({ id }) => id}
        linkOf={({ id }) => paths.talk(id)}
        empty="No talk is planned for today."
        columns={[
          { title: 'Topic', cell: ({ topic }) => topic },
          { title: 'Site', cell: ({ site }) => site },
          { title: 'Time', cell: ({ time }) => time },
          { title: 'There', cell: ({ attended, crew }) => `${attended} of ${crew}` },
          { title: 'State', cell: ({ state }) => (state === 'closed' ? 'Held and closed' : 'Open') },
        ]}
      />
    </Section>
  );
}
