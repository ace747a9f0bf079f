import { useQuery } from '@tanstack/react-query';
import { Download, Plus } from 'lucide-react';
import { formatDay } from '#shared/kernel/work-date.ts';
import { getTalksCsv, type TalkRow } from '#shared/talks/talks.api.ts';
import { paths } from '../app/paths.ts';
import { useMayDo } from '../app/session.queries.ts';
import { useSiteInHand } from '../app/site-in-hand.ts';
import { addressOf } from '../lib/call.ts';
import { useUrlFilters } from '../lib/useUrlFilters.ts';
import { peopleQuery } from '../people/people.queries.ts';
import { Badge } from '../ui/Badge.tsx';
import { ButtonLink } from '../ui/Button.tsx';
import { type Column, DataTable } from '../ui/DataTable.tsx';
import { FilterDate, Filters, FilterSearch, FilterSelect } from '../ui/Filters.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page } from '../ui/Page.tsx';
import { talkUrl } from './talk-url.ts';
import { talksQuery } from './talks.queries.ts';

const columns: Column<TalkRow>[] = [
  { title: 'Topic', cell: ({ topic }) => topic },
  { title: 'When', cell: ({ date, time }) => `${formatDay(date)}, ${time}` },
  { title: 'Site', cell: ({ site }) => site, wide: true },
  { title: 'Presenter', cell: ({ presenter }) => presenter, wide: true },
  {
    title: 'State',
    cell: ({ state }) => <Badge tone={state === 'closed' ? 'done' : 'attention'}>{state}</Badge>,
  },
  { title: 'Signed', cell: ({ attended, crew }) => `${attended} of ${crew}`, numeric: true },
  {
    title: 'Counts as',
    cell: ({ consultation }) => (consultation ? 'Consultation' : 'Briefing only'),
    wide: true,
  },
  { title: 'Actions', cell: ({ openActions }) => openActions, wide: true, numeric: true },
];

/** The register of toolbox talks. */
export function TalkListPage() {
  const [filters, setFilters] = useUrlFilters();
  const shown = talkUrl.parse(filters);
  const query = useQuery(talksQuery(shown));
  const mayWrite = useMayDo()('talk.write');
  return (
    <Page
      title="Toolbox talks"
      wide
      actions={
        <>
          <ButtonLink icon={Download} outside to={addressOf(getTalksCsv, { query: shown })}>
            CSV of what is shown
          </ButtonLink>
          {mayWrite ? (
            <ButtonLink kind="filled" icon={Plus} to={paths.newTalk}>
              New talk
            </ButtonLink>
          ) : null}
        </>
      }
    >
      <TalkFilters shown={shown} onChange={setFilters} />
      <Loaded query={query}>
        {({ talks }) => (
          <DataTable
            label="Toolbox talks"
            rows={talks}
            columns={columns}
            keyOf={({ id }) => id}
            linkOf={({ id }) => paths.talk(id)}
            empty={
              Object.keys(filters).length > 0
                ? 'No talk matches these filters.'
                : 'No talk yet. Start one: a topic, a few points, and the crew signs on their phones or on yours.'
            }
          />
        )}
      </Loaded>
    </Page>
  );
}

function TalkFilters({
  shown,
  onChange,
}: {
  shown: ReturnType<typeof talkUrl.parse>;
  onChange: (change: Record<string, string | undefined>) => void;
}) {
  const { sites } = useSiteInHand();
  const people = useQuery(peopleQuery({ siteId: shown.siteId }));
  return (
    <Filters>
      <FilterSearch label="Topic" value={shown.search} onChange={(search) => onChange({ search })} />
      <FilterSelect
        label="Site"
        empty="Every site"
        value={shown.siteId}
        choices={sites.map(({ id, name }) => ({ value: id, label: name }))}
        onChange={(siteId) => onChange({ siteId })}
      />
      <FilterSelect
        label="Signed by"
        empty="Anybody"
        value={shown.personId}
        choices={(people.data?.people ?? []).map(({ id, name }) => ({ value: id, label: name }))}
        onChange={(personId) => onChange({ personId })}
      />
      <FilterDate label="From" value={shown.from} onChange={(from) => onChange({ from })} />
      <FilterDate label="To" value={shown.to} onChange={(to) => onChange({ to })} />
      <FilterSelect
        label="State"
        empty="Open or closed"
        value={shown.state}
        choices={[
          { value: 'open', label: 'Open' },
          { value: 'closed', label: 'Closed' },
        ]}
        onChange={(state) => onChange({ state })}
      />
    </Filters>
  );
}
