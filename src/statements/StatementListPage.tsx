import { useQuery } from '@tanstack/react-query';
import { FilePlus } from 'lucide-react';
import { formatInstant } from '#shared/kernel/work-date.ts';
import { type StatementRow, statementStates } from '#shared/statements/statements.api.ts';
import { paths } from '../app/paths.ts';
import { useMayDo } from '../app/session.queries.ts';
import { useSiteInHand } from '../app/site-in-hand.ts';
import { useUrlFilters } from '../lib/useUrlFilters.ts';
import { ButtonLink } from '../ui/Button.tsx';
import { type Column, DataTable } from '../ui/DataTable.tsx';
import { Filters, FilterSearch, FilterSelect } from '../ui/Filters.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page } from '../ui/Page.tsx';
import { stateNames } from './state-names.ts';
import { StateBadge } from './StateBadge.tsx';
import { statementsQuery } from './statements.queries.ts';

const columns: Column<StatementRow>[] = [
  { title: 'Statement', cell: ({ title }) => title },
  { title: 'Site', cell: ({ site }) => site },
  { title: 'State', cell: (row) => <StateBadge {...row} /> },
  {
    title: 'In force',
    cell: ({ currentRevision }) => (currentRevision === null ? 'None' : `Revision ${currentRevision}`),
    wide: true,
  },
  {
    title: 'Last change',
    cell: ({ updatedAt, updatedBy, timeZone }) => `${formatInstant(updatedAt, timeZone)}, ${updatedBy}`,
    wide: true,
  },
];

export function StatementListPage() {
  const [filters, setFilters] = useUrlFilters();
  const mayDo = useMayDo();
  const { sites } = useSiteInHand();
  const state = statementStates.find((candidate) => candidate === filters.state);
  const query = useQuery(statementsQuery({ siteId: filters.siteId, state, search: filters.search }));
  return (
    <Page
      title="Statements"
      actions={
        mayDo('statement.write') ? (
          <ButtonLink kind="filled" icon={FilePlus} to={paths.newStatement}>
            New statement
          </ButtonLink>
        ) : null
      }
    >
      <Filters>
        <FilterSearch label="Title" value={filters.search} onChange={(search) => setFilters({ search })} />
        <FilterSelect
          label="Site"
          empty="Every site"
          choices={sites.map(({ id, name }) => ({ value: id, label: name }))}
          value={filters.siteId}
          onChange={(siteId) => setFilters({ siteId })}
        />
        <FilterSelect
          label="State"
          empty="Every state"
          choices={statementStates.map((value) => ({ value, label: stateNames[value] }))}
          value={filters.state}
          onChange={(value) => setFilters({ state: value })}
        />
      </Filters>
      <Loaded query={query}>
        {({ statements }) => (
          <DataTable
            label="Statements"
            rows={statements}
            columns={columns}
            keyOf={({ id }) => id}
            linkOf={({ id }) => paths.statement(id)}
            empty="No statement matches. Start one: choose a site and a starter, and adapt it."
          />
        )}
      </Loaded>
    </Page>
  );
}
